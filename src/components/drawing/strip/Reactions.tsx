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

function Value({
  x,
  y,
  side,
  text,
  note,
}: {
  x: number;
  y: number;
  side: -1 | 1;
  text: string;
  note?: string | undefined;
}) {
  // A value wider than the gutter keeps its start in view and runs under its arrow.
  const tooWide = side < 0 && x - textWidth(text, 13.5, 600) < 6;
  const place = tooWide
    ? { x: 6, textAnchor: 'start' as const }
    : { x, textAnchor: side < 0 ? ('end' as const) : ('start' as const) };
  return (
    <>
      <text {...place} y={y} className="reaction-value">
        <Rich text={text} />
      </text>
      {note && (
        <text {...place} y={y + 16} className="note">
          {note}
        </text>
      )}
    </>
  );
}

/** Reactions in the sense in which they act on the beam, each with its value beside it. */
export function Reactions(props: Props) {
  const { layout, marks } = props;
  return marks.map((mark) => {
    const { x, side } = standOf(props, mark.at);
    if (mark.kind === 'moment') {
      return (
        <g key={`${mark.letter} moment`}>
          {mark.sense !== 0 && (
            <Turn x={x} y={layout.centre - 1} radius={15} clockwise={mark.sense < 0} className="reaction" />
          )}
          <Value x={x - side * 16} y={layout.centre - 24} side={side} text={mark.text} />
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
        <Value x={x + side * 12} y={layout.bottom + 34} side={side} text={mark.text} note={mark.note} />
      </g>
    );
  });
}

/** On a phone: one to three values to a line under the drawing, each after a small arrow. */
export function ReactionLines({ frame, layout, marks }: Omit<Props, 'beam'>) {
  const perLine = 3;
  return (
    <>
      <path className="rule" d={`M0 ${layout.height}H${frame.width}`} />
      {marks.map((mark, i) => {
        const line = Math.floor(i / perLine);
        const inLine = Math.min(perLine, marks.length - line * perLine);
        const width = textWidth(mark.text, 13.5, 600) + 14;
        const free = frame.width - 28 - width;
        const x = 14 + (inLine < 2 ? 0 : ((i % perLine) / (inLine - 1)) * free);
        const y = layout.height + 20 + line * 20;
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
          </g>
        );
      })}
    </>
  );
}
