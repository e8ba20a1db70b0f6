import { ticksPath } from './paths';

/** A row of dimensions: extension lines that stop short of the object, one line, oblique ticks. Figures are drawn apart. */
export function Dimension({
  y,
  from,
  xs,
  pairs,
}: {
  y: number;
  from: number;
  xs: readonly number[];
  pairs: readonly (readonly [number, number])[];
}) {
  return (
    <>
      <path className="dimension-extension" d={xs.map((x) => `M${x} ${from}V${y + 4}`).join('')} />
      <path className="dimension" d={pairs.map(([a, b]) => `M${a} ${y}H${b}`).join('')} />
      <path className="dimension-tick" d={ticksPath(xs, y)} />
    </>
  );
}
