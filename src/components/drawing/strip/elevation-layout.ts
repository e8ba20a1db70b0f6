import type { Beam } from '@/engine/model/index';
import { type DrawingFormat, dimensionFigure, figure, named } from '../format';
import { placeDimensionFigures } from '../geometry/dimension-figures';
import { type DimensionPart, dimensionRows, type NamedLength } from '../geometry/dimensions';
import { drawnDepth } from '../geometry/scale';
import { textWidth } from '../geometry/text-width';
import { namedSupports } from '../names';
import { forceArrow, turnArrow } from '../signs';
import type { Figure, LoadName } from './figures';
import { type Frame, xOf } from './frame';
import { type LoadLayout, layLoads } from './load-layout';

/** A support's pull on the beam, N and N·m in the engine's signs; `least` is the other end of an envelope's range. */
export type DrawnReaction = {
  at: number;
  vertical: number;
  moment: number;
  least?: { vertical: number; moment: number } | undefined;
};

export type Symbols = {
  /** Lengths that have a name; other dimensions show their figure alone. */
  lengths?: readonly NamedLength[] | undefined;
  /** By the load's place in the beam. */
  loads?: readonly (LoadName | undefined)[] | undefined;
};

/** How far a mechanism is drawn moving, px. */
export const MECHANISM_REACH = 62;

type DimensionRow = {
  y: number;
  from: number;
  xs: number[];
  pairs: [number, number][];
  leaders: { from: number; to: number }[];
};

export type ElevationLayout = {
  top: number;
  centre: number;
  bottom: number;
  loads: LoadLayout;
  dimensions: DimensionRow[];
  figures: Figure[];
  /** Height of the drawing itself, and of the line of reactions under it on a phone. */
  height: number;
  reactionHeight: number;
};

const FIGURE_SIZE = 13.5;
const ROW = 28;
const CLOUDED_ROW = 54;
/** From a dimension's line to a figure outside it, and what a row with one is taller by. */
const OUTSIDE = 22;
const OUTSIDE_ROW = 24;
/** Between a figure and the edge of the sheet. */
const EDGE = 4;
/** Height of what a cloud advises. */
const ADVICE = 40;

function layDimensions(
  beam: Beam,
  lengths: readonly NamedLength[],
  frame: Frame,
  format: DrawingFormat,
  { first, pitch }: { first: number; pitch: number },
) {
  const rows: DimensionRow[] = [];
  const figures: Figure[] = [];
  let y = first;
  dimensionRows(beam, lengths).forEach((parts, i) => {
    const row = layRow(parts, y, frame, format);
    const pairs = parts.map(({ from, to }): [number, number] => [xOf(frame, from), xOf(frame, to)]);
    rows.push({
      y,
      from: y - (i === 0 ? 28 : 20),
      xs: [...new Set(pairs.flat())],
      pairs,
      leaders: row.leaders,
    });
    figures.push(...row.figures);
    y += pitch + (row.leaders.length > 0 ? OUTSIDE_ROW : 0);
  });
  return { rows, figures, end: y - pitch };
}

/** The figures of one row, and the leaders to those that stand outside. */
function layRow(parts: readonly DimensionPart[], y: number, frame: Frame, format: DrawingFormat) {
  const texts = parts.map(({ from, to, name }) => named(name?.symbol, dimensionFigure(format, to - from)));
  const wishes = parts.map(({ from, to, name }, i) => ({
    x1: xOf(frame, from),
    x2: xOf(frame, to),
    width: textWidth(texts[i]!, FIGURE_SIZE),
    kept: name !== undefined,
  }));
  const places = placeDimensionFigures(wishes, { left: EDGE, right: frame.width - EDGE });
  const figures = places.map(({ wish, x, leader }): Figure => {
    const { name } = parts[wish]!;
    const edits = name?.editable ? name.symbol : undefined;
    return { x, y: leader ? y + OUTSIDE : y - 6, text: texts[wish]!, anchor: 'middle', edits };
  });
  return { figures, leaders: places.flatMap(({ leader }) => (leader ? [leader] : [])) };
}

/** What hangs below the member: symbols, reactions beside them, and an arrow where a support moves. */
function roomBelow(beam: Beam): number {
  const moves = beam.supports.some(
    ({ vertical, rotation }) =>
      (vertical.kind !== 'free' && vertical.movement !== 0) ||
      (rotation.kind !== 'free' && rotation.movement !== 0),
  );
  return moves ? 84 : 56;
}

const onPhoneLines = (beam: Beam): number =>
  Math.ceil(
    namedSupports(beam).reduce(
      (sum, { support }) =>
        sum + (support.vertical.kind === 'free' ? 0 : 1) + (support.rotation.kind === 'free' ? 0 : 1),
      0,
    ) / 3,
  );

type ElevationOptions = {
  depth: number;
  symbols?: Symbols | undefined;
  /** Whether reactions are given, and as ranges with a least value each. */
  reactions: { shown: boolean; ranged: boolean };
  /** A mechanism is drawn, and needs room to move. */
  moves: boolean;
  /** A cloud stands over a dimension: the rows keep clear of it, and what to do is said under them. */
  clouded: boolean;
  /** Height to spread the drawing over, px. */
  spare: number;
};

/** Height of the plumb line's reading in the corner. */
const READING = 46;

export function layElevation(
  beam: Beam,
  frame: Frame,
  format: DrawingFormat,
  { depth, symbols = {}, reactions, moves, clouded, spare }: ElevationOptions,
): ElevationLayout {
  const loads = layLoads({ frame, format, names: symbols.loads ?? [] }, beam.loads);
  const tall = drawnDepth(depth, frame.perMetre, frame.depthMost);
  const wall = 26 * frame.supportScale;
  // A moment's value stands over the member's end, under the heading and the reading.
  // A load's figure beyond the beam's end stands clear of the plumb line's reading, which is in the same corner.
  const isBeside = frame.mode === 'screen' && loads.figures.some(({ x }) => x > xOf(frame, beam.length));
  const above = Math.max(loads.height + (isBeside ? READING : 14), wall + 28, 84 - tall / 2);
  const top = above + spare / 4;
  const bottom = top + tall;
  const first = bottom + roomBelow(beam) + (moves ? MECHANISM_REACH : 0) - (frame.mode === 'screen' ? 0 : 6);
  const pitch = clouded ? CLOUDED_ROW : ROW;
  const dimensions = layDimensions(beam, symbols.lengths ?? [], frame, format, { first, pitch });
  const advice = clouded && frame.mode !== 'phone' ? ADVICE : clouded ? 10 : 0;
  const used = (dimensions.rows.length - 1) * (pitch - ROW) + advice;
  const lines = frame.mode === 'phone' && reactions.shown ? onPhoneLines(beam) : 0;
  return {
    top,
    centre: top + tall / 2,
    bottom,
    loads,
    dimensions: dimensions.rows,
    figures: [...loads.figures.map((each) => ({ ...each, y: top + each.y })), ...dimensions.figures],
    height: dimensions.end + 14 + advice + Math.max(0, (spare * 3) / 4 - used),
    reactionHeight: lines === 0 ? 0 : 10 + lines * (reactions.ranged ? 36 : 20),
  };
}

export type ReactionMark = {
  letter: string;
  at: number;
  kind: 'vertical' | 'moment';
  text: string;
  note?: string;
  sense: number;
};

/** Sizes as printed beside the arrows, "R_{A} 72.3 kN"; `sense` is 0 where the reaction is nothing, else its engine sign. */
export function reactionMarks(
  beam: Beam,
  reactions: readonly DrawnReaction[],
  format: DrawingFormat,
): ReactionMark[] {
  const largest = Math.max(
    0,
    ...reactions.flatMap(({ vertical, moment }) => [Math.abs(vertical), Math.abs(moment) / beam.length]),
  );
  const sense = (value: number) => (Math.abs(value) > largest * 1e-9 ? Math.sign(value) : 0);
  return namedSupports(beam).flatMap(({ support, letter }) => {
    const reaction = reactions.find(({ at }) => Math.abs(at - support.at) < beam.length * 1e-6);
    if (!reaction) return [];
    const { vertical, moment, least } = reaction;
    const marks: ReactionMark[] = [];
    if (support.vertical.kind !== 'free') {
      const note = least ? { note: `least ${format.value('force', least.vertical)}` } : {};
      const text = `R_{${letter}} ${figure(format, 'force', forceArrow(vertical).size)}`;
      marks.push({ letter, at: support.at, kind: 'vertical', text, sense: sense(vertical), ...note });
    }
    if (support.rotation.kind !== 'free') {
      const text = `M_{${letter}} ${figure(format, 'moment', turnArrow(moment).size)}`;
      marks.push({ letter, at: support.at, kind: 'moment', text, sense: sense(moment / beam.length) });
    }
    return marks;
  });
}
