import { formatQuantity, type QuantityReading } from '@/engine/quantity';
import { FieldNote } from './Field';
import type { QuantityFieldProps } from './QuantityField';
import { RangeLine } from './RangeLine';
import { endText, entryFor, type QuantityEntry } from './range';

interface BelowProps extends QuantityFieldProps {
  id: string;
  reading: QuantityReading;
  error: string | undefined;
  set: (entry: QuantityEntry) => void;
}

/** Under the figure: its range, or how the text reads, or what is wrong and the ways to put it right. */
export function QuantityBelow({
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
    <div className="max-md:col-span-2">
      {range && !locked && (reading.ok || !error) && (
        <RangeLine
          range={range}
          ends={
            error
              ? undefined
              : (rangeEnds ?? [endText(range.low, entry.unit), endText(range.high, entry.unit)])
          }
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
    </div>
  );
}

const isPlainNumber = (text: string) => /^\s*[-+\u2212]?[\d.,\s]*$/.test(text);
