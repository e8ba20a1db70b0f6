import { unitText } from '@/engine/quantity';

interface UnitPickProps {
  label: string;
  unit: string;
  units: readonly string[];
  name?: string | undefined;
  onPick: (unit: string) => void;
}

const word = (unit: string) => (unit === 'ft-in' ? 'ft, in' : unitText(unit));

/** The unit beside a figure; with more than one on offer, a press changes it. */
export function UnitPick({ label, unit, units, name, onPick }: UnitPickProps) {
  if (units.length < 2) {
    return <span className="pr-6 text-schedule whitespace-nowrap text-ink-2">{word(unit)}</span>;
  }
  return (
    <select
      aria-label={`Unit of ${label}`}
      name={name && `${name}.unit`}
      value={unit}
      onChange={(event) => onPick(event.target.value)}
      className="mr-4 min-h-26 min-w-28 field-sizing-content appearance-none text-right text-schedule text-ink-2 underline decoration-ochre decoration-dotted decoration-[1.5px] underline-offset-3 pointer-coarse:min-h-44"
    >
      {units.map((offered) => (
        <option key={offered} value={offered}>
          {word(offered)}
        </option>
      ))}
    </select>
  );
}
