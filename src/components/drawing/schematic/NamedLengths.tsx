import type { Map1 } from '../geometry/curve';
import { type LetterPlace, placeLetters } from '../geometry/dimension-figures';
import { type NamedLength, packed } from '../geometry/dimensions';
import { textWidth } from '../geometry/text-width';
import { Dimension } from '../marks/Dimension';
import { Rich } from '../marks/Rich';

/** Between two rows of dimensions, px. */
export const ROW = 19;
const LETTERS = 13.5;

/** The x axis of a drawing, and how wide its sheet is. */
interface Across {
  toX: Map1;
  width: number;
}

interface NamedLengthsProps extends Across {
  rows: readonly (readonly NamedLength[])[];
  /** Where the extension lines of the inner row begin. */
  from: number;
}

/** y of a row's line. */
export const rowAt = (from: number, row: number): number => from + 10 + row * ROW;

const placeOf = ({ symbol, from, to }: NamedLength, { toX, width }: Across): LetterPlace =>
  placeLetters([toX(from), toX(to)], textWidth(symbol, LETTERS), width);

/** Lengths in rows, the inner one first, so that neither they nor their letters meet. */
export const lengthRows = <T extends NamedLength>(lengths: readonly T[], across: Across): T[][] =>
  packed(lengths, (length) => placeOf(length, across).covers);

/** Dimensions by their letters alone. */
export function NamedLengths({ rows, from, ...across }: NamedLengthsProps) {
  return rows.flatMap((row, i) => {
    const y = rowAt(from, i);
    return row.map((length) => {
      const [x1, x2] = [across.toX(length.from), across.toX(length.to)];
      const { x, anchor } = placeOf(length, across);
      return (
        <g key={`${length.symbol} ${length.from}`}>
          <Dimension y={y} from={y - 10} xs={[x1, x2]} pairs={[[x1, x2]]} />
          <text x={x} y={anchor === 'middle' ? y - 5 : y + 4} textAnchor={anchor} className="figure">
            <Rich text={length.symbol} />
          </text>
        </g>
      );
    });
  });
}
