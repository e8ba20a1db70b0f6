import { type KeyboardEvent, type ReactNode, useEffect, useId, useRef } from 'react';
import { type DimensionName, type QuantityReading, readQuantity } from '@/engine/quantity';
import { QuantityBelow } from './QuantityBelow';
import { RevisionTriangle } from './RevisionTriangle';
import { changeUnit, outOfRange, type QuantityEntry, type QuantityRange } from './range';
import { UnitPick } from './UnitPick';

export interface QuantityFieldProps {
  symbol?: ReactNode;
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
  /** At the end of the label's line, such as taking the field out. */
  action?: ReactNode;
  /** Form names: the text as `name`, its unit as `name.unit`. */
  name?: string | undefined;
}

/** A parameter: keeps exactly what was typed, says at once how it reads or why it does not. */
export function QuantityField(props: QuantityFieldProps) {
  const { label, dimension, entry, onChange, range, locked } = props;
  const id = useId();
  const reading = readQuantity(entry.text, dimension, { unit: entry.unit });
  const good = useGoodEntry(entry, reading);
  const set = (next: QuantityEntry) =>
    onChange(next, readQuantity(next.text, dimension, { unit: next.unit }));
  const beyond = reading.ok && range ? outOfRange(reading.value, range, entry.unit) : undefined;
  const error = props.error ?? (reading.ok ? beyond : reading.message);
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>) => {
    if (event.key !== 'Escape') return;
    const last = good.get();
    if (last) set(last);
    event.currentTarget.blur();
  };
  return (
    <div
      className={`min-w-0 px-14 pt-8 pb-9 max-md:grid max-md:grid-cols-[minmax(0,1fr)_minmax(0,168px)] max-md:items-center max-md:gap-x-10 ${error ? 'bg-error-wash' : ''}`}
    >
      <LabelLine {...props} id={id} />
      <div
        className={`mt-2 flex items-baseline gap-6 bg-field focus-within:outline-2 focus-within:outline-ochre ${error ? 'border-b-[2.5px] border-error' : 'border-b-[1.5px] border-ink'}`}
      >
        <input
          id={id}
          type="text"
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
        <UnitPick
          label={label}
          unit={entry.unit}
          units={locked === undefined ? props.units : []}
          name={props.name && `${props.name}.unit`}
          onPick={(unit) => set(changeUnit(entry, unit, dimension))}
        />
      </div>
      <QuantityBelow {...props} id={`${id}-note`} reading={reading} error={error} set={set} />
    </div>
  );
}

type LabelProps = Pick<QuantityFieldProps, 'symbol' | 'label' | 'changedAt' | 'action'> & { id: string };

function LabelLine({ id, symbol, label, changedAt, action }: LabelProps) {
  return (
    <div className="flex items-baseline gap-7 text-schedule text-ink-2">
      <label htmlFor={id} className="min-w-0">
        {symbol && <i className="mr-4 text-[1rem] font-semibold text-ink">{symbol}</i>} {label}
      </label>
      {changedAt && (
        <span className="ml-auto">
          <RevisionTriangle revision={changedAt} />
        </span>
      )}
      {action && <span className="ml-auto">{action}</span>}
    </div>
  );
}

/** The entry that Esc puts back: the last good one before the reader began to type. */
function useGoodEntry(entry: QuantityEntry, reading: QuantityReading) {
  const good = useRef<QuantityEntry>(undefined);
  const held = useRef(false);
  useEffect(() => {
    if (!held.current && reading.ok) good.current = entry;
  });
  return {
    get: () => good.current,
    hold: () => {
      held.current = true;
    },
    release: () => {
      held.current = false;
      if (reading.ok) good.current = entry;
    },
  };
}
