import { type KeyboardEvent, type ReactNode, useId, useRef } from 'react';
import {
  type DimensionName,
  formatNumber,
  formatQuantity,
  type QuantityReading,
  readQuantity,
  toUnit,
  unitText,
} from '@/engine/quantity';
import { FieldNote } from './Field';
import { RangeLine } from './RangeLine';
import { RevisionTriangle } from './RevisionTriangle';
import { changeUnit, entryFor, type QuantityEntry, type QuantityRange } from './range';

export interface QuantityFieldProps {
  symbol?: string | undefined;
  label: string;
  dimension: DimensionName;
  entry: QuantityEntry;
  /** Units on offer; with one alone the unit is plain text. */
  units: readonly string[];
  onChange: (entry: QuantityEntry, reading: QuantityReading) => void;
  range?: QuantityRange | undefined;
  /** Words for the ends instead of figures, such as 0 and L. */
  rangeEnds?: readonly [string, string] | undefined;
  /** A fault that only the whole form can see; it outranks the field's own. */
  error?: string | undefined;
  help?: ReactNode;
  helpHref?: string | undefined;
  /** Why the value cannot be changed here, such as "from section OV 260". */
  locked?: string | undefined;
  changedAt?: string | undefined;
  /** Form names: the text as `name`, its unit as `name.unit`. */
  name?: string | undefined;
}

/** A parameter: keeps exactly what was typed, says at once how it reads or why it does not. */
export function QuantityField(props: QuantityFieldProps) {
  const { symbol, label, dimension, entry, onChange, range, locked } = props;
  const id = useId();
  const reading = readQuantity(entry.text, dimension, { unit: entry.unit });
  const good = useGoodEntry(entry, reading);
  const set = (next: QuantityEntry) =>
    onChange(next, readQuantity(next.text, dimension, { unit: next.unit }));
  const error = props.error ?? (reading.ok ? outOfRange(reading.value, range, entry.unit) : reading.message);
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.key !== 'Escape') return;
    if (good.current) set(good.current);
    event.currentTarget.blur();
  };
  return (
    <div className={`min-w-0 px-14 pt-8 pb-9 ${error ? 'bg-error-wash' : ''}`}>
      <div className="flex items-baseline gap-7 text-schedule text-ink-2">
        <label htmlFor={id} className="min-w-0">
          {symbol && <i className="mr-7 text-[1rem] font-semibold text-ink">{symbol}</i>}
          {label}
        </label>
        {props.changedAt && (
          <span className="ml-auto">
            <RevisionTriangle revision={props.changedAt} />
          </span>
        )}
      </div>
      <div
        className={`mt-2 flex items-baseline gap-6 bg-field focus-within:outline-2 focus-within:outline-ochre ${error ? 'border-b-[2.5px] border-error' : 'border-b-[1.5px] border-ink'}`}
      >
        <input
          id={id}
          type="text"
          inputMode={dimension === 'length' ? 'text' : 'decimal'}
          autoComplete="off"
          spellCheck={false}
          name={props.name}
          value={entry.text}
          readOnly={locked !== undefined}
          aria-invalid={error ? true : undefined}
          aria-describedby={`${id}-note`}
          onChange={(event) => set({ text: event.target.value, unit: entry.unit })}
          onFocus={good.hold}
          onBlur={good.release}
          onKeyDown={onKeyDown}
          className={`min-h-34 min-w-0 flex-1 px-6 text-value outline-none pointer-coarse:min-h-44 ${error ? 'font-semibold text-error' : ''} ${locked ? 'text-ink-2' : ''}`}
        />
        <UnitPick {...props} onPick={(unit) => set(changeUnit(entry, unit, dimension))} />
      </div>
      <Below {...props} id={`${id}-note`} reading={reading} error={error} set={set} />
    </div>
  );
}

/** The entry that Esc puts back: the last good one before the reader began to type. */
function useGoodEntry(entry: QuantityEntry, reading: QuantityReading) {
  const current = useRef<QuantityEntry | undefined>(reading.ok ? entry : undefined);
  const held = useRef(false);
  if (!held.current && reading.ok) current.current = entry;
  return {
    get current() {
      return current.current;
    },
    hold: () => {
      held.current = true;
    },
    release: () => {
      held.current = false;
    },
  };
}

function outOfRange(value: number, range: QuantityRange | undefined, unit: string): string | undefined {
  if (!range) return undefined;
  const slack = 1e-9 * Math.max(Math.abs(range.low), Math.abs(range.high)); // rounding of unit conversions
  if (value >= range.low - slack && value <= range.high + slack) return undefined;
  return `Must be ${formatQuantity(range.low, unit)} to ${formatQuantity(range.high, unit)}.`;
}

function UnitPick({
  label,
  entry,
  units,
  locked,
  name,
  onPick,
}: QuantityFieldProps & { onPick: (unit: string) => void }) {
  if (units.length < 2 || locked !== undefined) {
    return <span className="pr-6 text-schedule whitespace-nowrap text-ink-2">{unitText(entry.unit)}</span>;
  }
  return (
    <select
      aria-label={`Unit of ${label}`}
      name={name && `${name}.unit`}
      value={entry.unit}
      onChange={(event) => onPick(event.target.value)}
      className="mr-4 min-h-26 field-sizing-content appearance-none text-right text-schedule text-ink-2 underline decoration-ochre decoration-dotted decoration-[1.5px] underline-offset-3 pointer-coarse:min-h-44"
    >
      {units.map((unit) => (
        <option key={unit} value={unit}>
          {unitText(unit)}
        </option>
      ))}
    </select>
  );
}

interface BelowProps extends QuantityFieldProps {
  id: string;
  reading: QuantityReading;
  error: string | undefined;
  set: (entry: QuantityEntry) => void;
}

function Below({
  id,
  reading,
  error,
  set,
  entry,
  range,
  rangeEnds,
  label,
  locked,
  help,
  helpHref,
}: BelowProps) {
  const choices = reading.ok ? undefined : reading.choices;
  const echo =
    reading.ok && !isPlainNumber(entry.text) ? `= ${formatQuantity(reading.value, entry.unit)}` : undefined;
  const note =
    locked ??
    (echo || help ? (
      <>
        {echo} {help}
      </>
    ) : undefined);
  return (
    <>
      {range && !locked && !error && (
        <RangeLine
          range={range}
          ends={rangeEnds ?? [endText(range.low, entry.unit), endText(range.high, entry.unit)]}
          value={reading.ok ? reading.value : undefined}
          unit={entry.unit}
          label={label}
          onChange={(value) => set(entryFor(value, entry.unit))}
        />
      )}
      <FieldNote id={id} help={note} helpHref={helpHref} error={error} />
      {choices && (
        <div className="mt-6 flex flex-wrap gap-6">
          {choices.map((text) => (
            <button
              key={text}
              type="button"
              onClick={() => set({ text, unit: entry.unit })}
              className="min-h-26 border border-ink bg-paper px-8 text-schedule font-semibold hover:bg-paper-3 pointer-coarse:min-h-44"
            >
              {text}
            </button>
          ))}
        </div>
      )}
    </>
  );
}

const endText = (value: number, unit: string) =>
  unit === 'ft-in' ? formatQuantity(value, unit) : formatNumber(toUnit(value, unit), { significant: 4 });

const isPlainNumber = (text: string) => /^\s*[-+\u2212]?[\d.,\s]*$/.test(text);
