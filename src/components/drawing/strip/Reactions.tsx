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

/** Where a reaction's value is written. */
export type ValuePlace = { x: number; y: number; anchor: 'start' | 'end' };

type Wish = {
  x: number;
  y: number;
  side: -1 | 1;
  width: number;
  text: string;
  /** How far down a value goes that is wider than its gutter, to clear the arrow. */
  drop: number;
};

function placeValue({ x, y, side, width, text, drop }: Wish): ValuePlace {
  const reach = textWidth(text, SIZE, 600);
  const tooWide = side < 0 ? x - reach < 6 : x + reach > width - 4;
  const edge = side < 0 ? 6 : width - 4;
  const anchor = side < 0 === tooWide ? 'start' : 'end';
  return tooWide ? { x: edge, y: y + drop, anchor } : { x, y, anchor };
}

const SIZE = 13.5;

function besideArrow(props: Props, mark: ReactionMark): ValuePlace {
  const { layout, frame } = props;
  const { x, side } = standOf(props, mark.at);
  const common = { side, width: frame.width, text: mark.text };
  return mark.kind === 'moment'
    ? placeValue({ ...common, x: x - side * 16, y: layout.centre - 24, drop: 0 })
    : placeValue({ ...common, x: x + side * 12, y: layout.bottom + 34, drop: 26 });
}

/** Every reaction's value with its place, on a screen as on a phone. */
export function reactionPlaces(props: Props): (ValuePlace & { mark: ReactionMark })[] {
  return props.marks.map((mark, i) =>
    props.frame.mode === 'phone'
      ? { mark, ...inLine(props, i), anchor: 'start' }
      : { mark, ...besideArrow(props, mark) },
  );
}

function Value({ mark: { text, note }, place }: { mark: ReactionMark; place: ValuePlace }) {
  const { x, y, anchor } = place;
  return (
    <>
      <text x={x} y={y} textAnchor={anchor} className="reaction-value">
        <Rich text={text} />
      </text>
      {note && (
        <text x={x} y={y + 16} textAnchor={anchor} className="note">
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
    const { x } = standOf(props, mark.at);
    const value = <Value mark={mark} place={besideArrow(props, mark)} />;
    if (mark.kind === 'moment') {
      return (
        <g key={`${mark.letter} moment`}>
          {mark.sense !== 0 && (
            <Turn x={x} y={layout.centre - 1} radius={15} clockwise={mark.sense < 0} className="reaction" />
          )}
          {value}
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
        {value}
      </g>
    );
  });
}

const PER_LINE = 3;

const lineHeightOf = (marks: readonly ReactionMark[]): number => (marks.some(({ note }) => note) ? 36 : 20);

/** Place of a value in the lines under the drawing. */
function inLine({ frame, layout, marks }: Omit<Props, 'beam'>, i: number): { x: number; y: number } {
  const lineHeight = lineHeightOf(marks);
  const line = Math.floor(i / PER_LINE);
  const inLine = Math.min(PER_LINE, marks.length - line * PER_LINE);
  const width = textWidth(marks[i]?.text ?? '', SIZE, 600) + 14;
  const free = frame.width - 28 - width;
  const start = 14 + (inLine < 2 ? 0 : ((i % PER_LINE) / (inLine - 1)) * free);
  return { x: start + 14, y: layout.height + 20 + line * lineHeight };
}

/** On a phone: one to three values to a line under the drawing, each after a small arrow. */
export function ReactionLines({ frame, layout, marks }: Omit<Props, 'beam'>) {
  return (
    <>
      <path className="rule" d={`M0 ${layout.height}H${frame.width}`} />
      {marks.map((mark, i) => {
        const place = inLine({ frame, layout, marks }, i);
        const [x, y] = [place.x - 14, place.y];
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
