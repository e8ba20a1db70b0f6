import { useId, useState } from 'react';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { formatNumber, type UnitSystemName } from '@/engine/quantity';
import type { Bound } from './address';
import { fromShown, richUnitOf, toShown, unitOf } from './display';
import type { SectionField } from './query';

interface NumberBoundProps {
  readonly label: string;
  readonly name: Bound;
  readonly field: SectionField;
  readonly value: number | undefined;
  readonly system: UnitSystemName;
  /** Shown where there is no bound, such as the end of the histogram. */
  readonly placeholder?: string;
  readonly withUnit?: boolean;
  readonly onChange: (name: Bound, value: number | null) => void;
}

const figure = (value: number): string => formatNumber(Number(value.toPrecision(6)));
const read = (text: string): number => Number(text.replaceAll(/[\s\u202f]/g, '').replace(',', '.'));

/**
 * One end of a range in the unit shown; what is typed stays as typed while it is being typed, and until it is put
 * right where it is no number.
 */
export function NumberBound(props: NumberBoundProps) {
  const { label, name, field, value, system, placeholder, withUnit = false, onChange } = props;
  const id = useId();
  const [text, setText] = useState<string | null>(null);
  const shown = text ?? (value === undefined ? '' : figure(toShown(field, value, system)));
  const isBad = text !== null && text.trim() !== '' && !Number.isFinite(read(text));
  return (
    <>
      <input
        className="input w-72! text-right"
        type="text"
        inputMode="decimal"
        autoComplete="off"
        aria-label={`${label}, ${unitOf(field, system)}`}
        aria-invalid={isBad || undefined}
        aria-describedby={isBad ? id : undefined}
        placeholder={placeholder}
        value={shown}
        onChange={(event) => {
          const typed = event.target.value;
          setText(typed);
          if (typed.trim() === '') onChange(name, null);
          else if (Number.isFinite(read(typed))) onChange(name, fromShown(field, read(typed), system));
        }}
        onKeyDown={(event) => event.key === 'Escape' && setText(null)}
        onBlur={() => !isBad && setText(null)}
      />
      {withUnit && (
        <span className="text-ink-2">
          <RichHtml text={richUnitOf(field, system)} />
        </span>
      )}
      {isBad && (
        <p
          id={id}
          role="alert"
          className="order-last col-span-full basis-full text-note font-semibold text-error first-letter:uppercase"
        >
          {label}: give a number, such as 310. The unit is {unitOf(field, system)}.
        </p>
      )}
    </>
  );
}
