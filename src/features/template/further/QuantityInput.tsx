import { useId } from 'react';
import { FieldNote } from '@/components/ui/Field';
import { changeUnit } from '@/components/ui/range';
import { UnitPick } from '@/components/ui/UnitPick';
import { type DimensionName, readQuantity } from '@/engine/quantity';
import type { Entry } from '../raw';
import { unitsOffered } from '../units';

interface QuantityInputProps {
  readonly label: string;
  readonly dimension: DimensionName;
  readonly entry: Entry;
  /** A fault that only the whole can see; it gives way to what is wrong with the text itself. */
  readonly error?: string | undefined;
  readonly help?: string | undefined;
  /** Said by the row or the heading that it stands in. */
  readonly isLabelHidden?: boolean;
  readonly onChange: (entry: Entry) => void;
}

/** A quantity in a line of fields: as typed, with its unit, and what is wrong with it below. */
export function QuantityInput(props: QuantityInputProps) {
  const { label, dimension, entry, error, help, isLabelHidden = false, onChange } = props;
  const id = useId();
  const reading = readQuantity(entry.text, dimension, entry);
  const wrong = reading.ok ? error : reading.message;
  return (
    <div className="min-w-0">
      <label htmlFor={id} className={isLabelHidden ? 'sr-only' : 'caps mb-2 block'}>
        {label}
      </label>
      <div
        className={`flex items-baseline bg-field focus-within:outline-2 focus-within:outline-ochre ${wrong ? 'border-b-[2.5px] border-error' : 'border-b-[1.5px] border-ink'}`}
      >
        <input
          id={id}
          autoComplete="off"
          spellCheck={false}
          value={entry.text}
          aria-invalid={wrong ? true : undefined}
          aria-describedby={`${id}-note`}
          onChange={(event) => onChange({ text: event.target.value, unit: entry.unit })}
          className={`min-h-34 w-full min-w-0 px-6 text-[1rem] outline-none pointer-coarse:min-h-44 ${wrong ? 'text-error' : ''}`}
        />
        <UnitPick
          label={label}
          unit={entry.unit}
          units={unitsOffered(dimension, entry.unit)}
          onPick={(unit) => onChange(changeUnit({ ...entry }, unit, dimension))}
        />
      </div>
      <FieldNote id={`${id}-note`} help={help} error={wrong} />
    </div>
  );
}
