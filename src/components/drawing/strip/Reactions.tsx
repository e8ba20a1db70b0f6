import type { Beam } from '@/engine/model/index';
import { textWidth } from '../geometry/text-width';
import { arrowPath } from '../marks/paths';
import { Rich } from '../marks/Rich';
import type { ElevationLayout, ReactionMark } from './elevation-layout';
import { type Frame, xOf } from './frame';
import { Turn } from './Loads';

type Props = { beam: Beam; frame: Frame; layout: ElevationLayout; marks: readonly ReactionMark[] };

/** Where a reaction's arrow stands: in the gutter at the ends, beside the support elsewhere; `side` is where its value goes. */
function standOf({ beam, frame }: Props, at: number): { x: number; side: -1 | 1 } {
  const end = beam.length * 1e-6;
  if (at < end) return { x: frame.x0 - frame.reaction[0], side: -1 };
  if (at > beam.length - end) return { x: frame.x1 + frame.reaction[1], side: 1 };
  return { x: xOf(frame, at) - 24, side: -1 };
}

type ValueProps = {
  x: number;
  y: number;
  side: -1 | 1;
  width: number;
  text: string;
  note?: string | undefined;
  /** How far down a value goes that is wider than its gutter, to clear the arrow. */
  drop: number;
};

function Value({ x, y, side, width, text, note, drop }: ValueProps) {
  const reach = textWidth(text, 13.5, 600);
  const tooWide = side < 0 ? x - reach < 6 : x + reach > width - 4;
  const edge = side < 0 ? 6 : width - 4;
  const textAnchor = side < 0 === tooWide ? 'start' : 'end';
  const top = tooWide ? y + drop : y;
  return (
    <>
      <text x={tooWide ? edge : x} y={top} textAnchor={textAnchor} className="reaction-value">
        <Rich text={text} />
      </text>
      {note && (
        <text x={tooWide ? edge : x} y={top + 16} textAnchor={textAnchor} className="note">
          {note}
        </text>
      )}
    </>
  );
}

/** Reactions in the sense in which they act on the beam, each with its value beside it. */
export function Reactions(props: Props) {
  const { layout, marks, frame } = props;
  return marks.map((mark) => {
    const { x, side } = standOf(props, mark.at);
    if (mark.kind === 'moment') {
      return (
        <g key={`${mark.letter} moment`}>
          {mark.sense !== 0 && (
            <Turn x={x} y={layout.centre - 1} radius={15} clockwise={mark.sense < 0} className="reaction" />
          )}
          <Value
            x={x - side * 16}
            y={layout.centre - 24}
            side={side}
            width={frame.width}
            text={mark.text}
            drop={0}
          />
        </g>
      );
    }
    const [low, high] = [layout.bottom + 46, layout.bottom + 12];
    const up = mark.sense > 0;
    return (
      <g key={`${mark.letter} vertical`}>
        {mark.sense !== 0 && (
          <path className="reaction" d={arrowPath(x, up ? low : high, x, up ? high : low, 9, 2.4)} />
        )}
        <Value
          x={x + side * 12}
          y={layout.bottom + 34}
          side={side}
          width={frame.width}
          text={mark.text}
          note={mark.note}
          drop={26}
        />
      </g>
    );
  });
}

const PER_LINE = 3;

const lineHeightOf = (marks: readonly ReactionMark[]): number => (marks.some(({ note }) => note) ? 36 : 20);

/** On a phone: one to three values to a line under the drawing, each after a small arrow. */
export function ReactionLines({ frame, layout, marks }: Omit<Props, 'beam'>) {
  const lineHeight = lineHeightOf(marks);
  return (
    <>
      <path className="rule" d={`M0 ${layout.height}H${frame.width}`} />
      {marks.map((mark, i) => {
        const line = Math.floor(i / PER_LINE);
        const inLine = Math.min(PER_LINE, marks.length - line * PER_LINE);
        const width = textWidth(mark.text, 13.5, 600) + 14;
        const free = frame.width - 28 - width;
        const x = 14 + (inLine < 2 ? 0 : ((i % PER_LINE) / (inLine - 1)) * free);
        const y = layout.height + 20 + line * lineHeight;
        return (
          <g key={`${mark.letter} ${mark.kind}`}>
            {mark.sense !== 0 && mark.kind === 'vertical' && (
              <path
                className="reaction"
                d={
                  mark.sense > 0
                    ? arrowPath(x + 4, y + 1, x + 4, y - 11, 6, 2)
                    : arrowPath(x + 4, y - 11, x + 4, y + 1, 6, 2)
                }
              />
            )}
            {mark.sense !== 0 && mark.kind === 'moment' && (
              <Turn x={x + 3} y={y - 5} radius={5} clockwise={mark.sense < 0} className="reaction" />
            )}
            <text x={x + 14} y={y} className="reaction-value">
              <Rich text={mark.text} />
            </text>
            {mark.note && (
              <text x={x + 14} y={y + 15} className="note">
                {mark.note}
              </text>
            )}
          </g>
        );
      })}
    </>
  );
}
