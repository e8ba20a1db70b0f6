import { ticksPath } from './paths';

/**
 * A row of dimensions: extension lines that stop short of the object, one line, oblique ticks, and leaders down to the figures that
 * stand outside. Figures are drawn apart.
 */
export function Dimension({
  y,
  from,
  xs,
  pairs,
  leaders = [],
}: {
  y: number;
  from: number;
  xs: readonly number[];
  pairs: readonly (readonly [number, number])[];
  leaders?: readonly { from: number; to: number }[];
}) {
  return (
    <>
      <path className="dimension-extension" d={xs.map((x) => `M${x} ${from}V${y + 4}`).join('')} />
      <path className="dimension" d={pairs.map(([a, b]) => `M${a} ${y}H${b}`).join('')} />
      <path className="dimension-tick" d={ticksPath(xs, y)} />
      {leaders.length > 0 && (
        <path
          className="leader"
          d={leaders.map(({ from, to }) => `M${from} ${y}V${y + 5}L${to} ${y + 10}`).join('')}
        />
      )}
    </>
  );
}
