import type { Map1 } from '../geometry/curve';
import type { NamedLength } from '../geometry/dimensions';
import { Dimension } from '../marks/Dimension';
import { Rich } from '../marks/Rich';

/** Between two rows of dimensions, px. */
export const ROW = 19;

interface NamedLengthsProps {
  rows: readonly (readonly NamedLength[])[];
  toX: Map1;
  /** Where the extension lines of the inner row begin. */
  from: number;
}

/** y of a row's line. */
export const rowAt = (from: number, row: number): number => from + 10 + row * ROW;

/** Dimensions by their letters alone, the inner row first. */
export function NamedLengths({ rows, toX, from }: NamedLengthsProps) {
  return rows.flatMap((row, i) => {
    const y = rowAt(from, i);
    return row.map(({ symbol, from: start, to }) => {
      const [x1, x2] = [toX(start), toX(to)];
      return (
        <g key={`${symbol} ${start}`}>
          <Dimension y={y} from={y - 10} xs={[x1, x2]} pairs={[[x1, x2]]} />
          <text x={(x1 + x2) / 2} y={y - 5} textAnchor="middle" className="figure">
            <Rich text={symbol} />
          </text>
        </g>
      );
    });
  });
}
