import type { Couple, CurvatureLoad, LineLoad, Load, PointLoad } from '@/engine/model/index';
import { type DrawingFormat, figure } from '../format';
import { type CombRow, combRows, levels, oneWayParts, type Placed } from '../geometry/stacking';
import { textWidth } from '../geometry/text-width';
import { loadArrow } from '../signs';
import type { Figure, LoadName } from './figures';
import { type Frame, xOf } from './frame';

const FIGURE_SIZE = 13.5;
const LINE = 17;
const GAP = 8;

/** Heights are measured upward from the top of the member. */
type CombMark = {
  x1: number;
  x2: number;
  rise: number;
  tall1: number;
  tall2: number;
  upward: boolean;
};
type PointMark = { x: number; tall: number; upward: boolean };
type CoupleMark = { x: number; clockwise: boolean; leader: number };
type CurvatureMark = { x1: number; x2: number; rise: number; sagging: boolean };
export type LoadLayout = {
  combs: CombMark[];
  points: PointMark[];
  couples: CoupleMark[];
  curvatures: CurvatureMark[];
  figures: Figure[];
  height: number;
};

type Context = { frame: Frame; format: DrawingFormat; names: readonly (LoadName | undefined)[] };

function titled({ names }: Context, { index, load }: Placed<Load>, text: string): string {
  const name = names[index];
  if (name?.words) return `${name.words} ${text}`;
  if (name?.symbol) return `${name.symbol} = ${text}`;
  return load.group ? `${load.group} ${text}` : text;
}

function lineFigure(format: DrawingFormat, { w0, w1 }: LineLoad): string {
  const upward = w0 + w1 < 0;
  const shown = (w: number) => format.value('lineLoad', upward ? -w : w);
  const range = w0 === w1 ? shown(w0) : `${shown(w0)} to ${shown(w1)}`;
  return `${range} ${format.unit('lineLoad')}${upward ? ' up' : ''}`;
}

function combMarks({ frame }: Context, row: CombRow, rise: number, tallest: number): CombMark[] {
  return row.loads.flatMap(({ load }) =>
    oneWayParts(load).map(({ from, to, w0, w1 }) => {
      const tall = (w: number) => (Math.abs(w) / row.most) * tallest;
      const upward = loadArrow(w0 + w1).points === 'up';
      return { x1: xOf(frame, from), x2: xOf(frame, to), rise, tall1: tall(w0), tall2: tall(w1), upward };
    }),
  );
}

/** Beyond the right end, where a stacked row has one load that reaches it and the gutter has room. */
function besideRow(context: Context, row: CombRow, rise: number): Figure | null {
  const { frame, format, names } = context;
  const [only, ...others] = row.loads;
  if (!only || others.length > 0 || frame.mode === 'phone' || only.load.to < frame.length * (1 - 1e-6))
    return null;
  const text = titled(context, only, lineFigure(format, only.load));
  if (textWidth(text, FIGURE_SIZE) > frame.width - frame.x1 - 12) return null;
  return { x: frame.x1 + 9, y: -rise, text, anchor: 'start', edits: names[only.index]?.edits };
}

function aboveRow(context: Context, row: CombRow, rise: number): { figures: Figure[]; rows: number } {
  const { frame, format, names } = context;
  const inOrder = [...row.loads].sort((a, b) => a.load.from - b.load.from);
  const texts = inOrder.map((placed) => titled(context, placed, lineFigure(format, placed.load)));
  const starts = inOrder.map(({ load }, i) =>
    Math.max(
      4,
      Math.min(xOf(frame, load.from) + 4, frame.width - 10 - textWidth(texts[i] ?? '', FIGURE_SIZE)),
    ),
  );
  const level = levels(
    starts.map((x, i) => [x, x + textWidth(texts[i] ?? '', FIGURE_SIZE)] as const),
    8,
  );
  const figures = inOrder.map(
    ({ index }, i): Figure => ({
      x: starts[i] ?? 0,
      y: -(rise + 6 + (level[i] ?? 0) * LINE),
      text: texts[i] ?? '',
      anchor: 'start',
      edits: names[index]?.edits,
    }),
  );
  return { figures, rows: Math.max(0, ...level) + 1 };
}

/** On a phone stacked rows share one line: their figures from the top row down, or only their names where those do not fit. */
function sharedLine(context: Context, rows: readonly CombRow[], rise: number): Figure {
  const { frame, format, names } = context;
  const loads = rows.flatMap((row) => row.loads).reverse();
  const full = loads.map((placed) => titled(context, placed, lineFigure(format, placed.load))).join(', ');
  const short = loads
    .map(
      ({ index, load }) =>
        names[index]?.words ?? names[index]?.symbol ?? load.group ?? lineFigure(format, load),
    )
    .join(', ');
  const room = frame.width - frame.x0 - 8;
  return {
    x: frame.x0 + 4,
    y: -(rise + 6),
    text: textWidth(full, FIGURE_SIZE) <= room ? full : short,
    anchor: 'start',
  };
}

function layCombs(context: Context, loads: readonly Load[]) {
  const { frame } = context;
  const rows = combRows(loads);
  const stacked = rows.length > 1;
  const tallest = stacked ? frame.combStacked : frame.comb;
  const combs: CombMark[] = [];
  const figures: Figure[] = [];
  let rise = 3;
  for (const row of rows) {
    combs.push(...combMarks(context, row, rise, tallest));
    const shared = stacked && frame.mode === 'phone';
    const beside = stacked && !shared ? besideRow(context, row, rise + tallest / 2 - 4) : null;
    rise += tallest;
    if (beside) figures.push(beside);
    else if (!shared) {
      const above = aboveRow(context, row, rise);
      figures.push(...above.figures);
      rise += above.rows * LINE;
    }
    rise += GAP;
  }
  if (stacked && frame.mode === 'phone') {
    figures.push(sharedLine(context, rows, rise - GAP));
    rise += LINE;
  }
  return { combs, figures, rise };
}

function layCurvatures(context: Context, loads: readonly Load[], from: number) {
  const { frame, format } = context;
  const marks: CurvatureMark[] = [];
  const figures: Figure[] = [];
  let rise = from;
  loads.forEach((load, index) => {
    if (load.kind !== 'curvature' || load.kappa === 0) return;
    const placed: Placed<CurvatureLoad> = { index, load };
    const text = titled(context, placed, `curvature ${figure(format, 'curvature', Math.abs(load.kappa))}`);
    rise += 8;
    marks.push({ x1: xOf(frame, load.from), x2: xOf(frame, load.to), rise, sagging: load.kappa > 0 });
    figures.push({
      x: xOf(frame, load.from) + 4,
      y: -(rise + 8),
      text,
      anchor: 'start',
      edits: context.names[index]?.edits,
    });
    rise += LINE + GAP;
  });
  return { marks, figures, rise };
}

type Tail = {
  placed: Placed<PointLoad | Couple>;
  x: number;
  text: string;
  from: number;
  to: number;
  anchor: 'start' | 'end';
};

function tailOf(context: Context, placed: Placed<PointLoad | Couple>): Tail {
  const { frame, format } = context;
  const { load } = placed;
  const upward = load.kind === 'point' && load.p < 0;
  const size =
    load.kind === 'point'
      ? figure(format, 'force', Math.abs(load.p))
      : figure(format, 'moment', Math.abs(load.m));
  const text = `${titled(context, placed, size)}${upward ? ' up' : ''}`;
  const x = xOf(frame, load.at);
  const width = textWidth(text, FIGURE_SIZE);
  const fits = x + 7 + width <= frame.width - (frame.mode === 'screen' ? frame.gutterRight : 6);
  return fits
    ? { placed, x, text, from: x - 4, to: x + 7 + width, anchor: 'start' }
    : { placed, x, text, from: x - 7 - width, to: x + 4, anchor: 'end' };
}

/** A figure goes to the left of its arrow where the next arrow would stand in it, and nothing stands on the left. */
function clearOfNext(tail: Tail, i: number, all: readonly Tail[]): Tail {
  const width = tail.to - tail.x - 7;
  const [left, right] = [tail.x - 7 - width, all[i + 1]?.x ?? Number.POSITIVE_INFINITY];
  const before = all[i - 1]?.x ?? Number.NEGATIVE_INFINITY;
  if (tail.anchor === 'end' || right > tail.to || left < Math.max(before, 4)) return tail;
  return { ...tail, from: left, to: tail.x + 4, anchor: 'end' };
}

/** Every load of the beam with its figure; nothing overlaps but arrows, which pass through the rows below their tail. */
export function layLoads(context: Context, loads: readonly Load[]): LoadLayout {
  const { combs, figures, rise } = layCombs(context, loads);
  const curved = layCurvatures(context, loads, rise);
  figures.push(...curved.figures);
  const tails = loads
    .flatMap((load, index): Placed<PointLoad | Couple>[] => {
      if (load.kind === 'point' && load.p !== 0) return [{ index, load }];
      return load.kind === 'couple' && load.m !== 0 ? [{ index, load }] : [];
    })
    .map((placed) => tailOf(context, placed))
    .sort((a, b) => a.x - b.x)
    .map(clearOfNext);
  const level = levels(
    tails.map(({ from, to }) => [from, to] as const),
    6,
  );
  const lowest = Math.max(46, curved.rise + 20);
  const points: PointMark[] = [];
  const couples: CoupleMark[] = [];
  tails.forEach(({ placed, x, text, anchor }, i) => {
    const tall = lowest + (level[i] ?? 0) * LINE;
    const { load, index } = placed;
    if (load.kind === 'point') points.push({ x, tall, upward: load.p < 0 });
    else couples.push({ x, clockwise: load.m < 0, leader: tall });
    figures.push({
      x: x + (anchor === 'start' ? 7 : -7),
      y: -(tall - 9),
      text,
      anchor,
      edits: context.names[index]?.edits,
    });
  });
  const tallest = Math.max(0, ...points.map(({ tall }) => tall), ...couples.map(({ leader }) => leader));
  return {
    combs,
    points,
    couples,
    curvatures: curved.marks,
    figures,
    height: Math.max(curved.rise, tallest),
  };
}
