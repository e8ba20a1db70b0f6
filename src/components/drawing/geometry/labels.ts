import type { Point } from './curve';

export type Box = { left: number; right: number; top: number; bottom: number };
export type Anchor = 'start' | 'middle' | 'end';

/** A label that wants a place. Rank 0 is the governing one: it is placed first, and always kept. */
export type LabelWish = {
  at: Point;
  width: number;
  rank: number;
  /** Which way lies outside the curve at this point: −1 up, +1 down. */
  outside: 1 | -1;
  /** On the baseline (contraflexure): goes to a leader at once. */
  leaderFirst?: boolean | undefined;
};

export type PlacedLabel = { wish: number; x: number; y: number; anchor: Anchor; leader: Point | null };

const ASCENT = 10;
const DESCENT = 3.5;
const CLEAR = 2;
const LEADERS: readonly Point[] = [
  [30, -10],
  [-30, -10],
  [22, -25],
  [-22, -25],
  [30, 14],
  [-30, 14],
  [20, 27],
  [-20, 27],
];

type Candidate = { x: number; y: number; anchor: Anchor; leader: Point | null };

function boxOf({ x, y, anchor }: Candidate, width: number): Box {
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2;
  return { left, right: left + width, top: y - ASCENT, bottom: y + DESCENT };
}

const meets = (a: Box, b: Box): boolean =>
  a.left < b.right + CLEAR &&
  b.left < a.right + CLEAR &&
  a.top < b.bottom + CLEAR &&
  b.top < a.bottom + CLEAR;

const inside = (box: Box, bounds: Box): boolean =>
  box.left >= bounds.left &&
  box.right <= bounds.right &&
  box.top >= bounds.top &&
  box.bottom <= bounds.bottom;

/** Whether the segment a–b enters the box: clipped by each edge in turn (Liang and Barsky). */
function enters([ax, ay]: Point, [bx, by]: Point, box: Box): boolean {
  // Most pieces of a curve are nowhere near: they are left before anything is allocated.
  if ((ax < box.left && bx < box.left) || (ax > box.right && bx > box.right)) return false;
  if ((ay < box.top && by < box.top) || (ay > box.bottom && by > box.bottom)) return false;
  let from = 0;
  let to = 1;
  const [dx, dy] = [bx - ax, by - ay];
  for (const [along, room] of [
    [-dx, ax - box.left],
    [dx, box.right - ax],
    [-dy, ay - box.top],
    [dy, box.bottom - ay],
  ] as const) {
    if (along === 0 && room < 0) return false;
    if (along < 0) from = Math.max(from, room / along);
    if (along > 0) to = Math.min(to, room / along);
  }
  return from < to;
}

const crosses = (curve: readonly Point[], box: Box): boolean =>
  curve.some((point, i) => {
    const next = curve[i + 1];
    return next !== undefined && enters(point, next, box);
  });

/** Outside the curve, then inside, then at the end of a leader of at most 34 px. */
function candidates({ at: [x, y], width, outside, leaderFirst }: LabelWish, bounds: Box): Candidate[] {
  const beside = (side: 1 | -1): Candidate[] => {
    const textY = side < 0 ? y - 7 : y + 17;
    const middle: Candidate = { x, y: textY, anchor: 'middle', leader: null };
    const start: Candidate = { x: x + 10, y: side < 0 ? y - 5 : y + 15, anchor: 'start', leader: null };
    const end: Candidate = { ...start, x: x - 10, anchor: 'end' };
    if (x - width / 2 < bounds.left) return [start, middle, end];
    if (x + width / 2 > bounds.right) return [end, middle, start];
    return [middle, start, end];
  };
  const onLeader = LEADERS.map(([dx, dy]): Candidate => {
    const anchor = dx > 0 ? 'start' : 'end';
    return { x: x + dx, y: y + dy, anchor, leader: [x + dx - Math.sign(dx) * 3, y + dy - 4] };
  });
  if (leaderFirst) return onLeader;
  const other = outside < 0 ? 1 : -1;
  return [...beside(outside), ...beside(other), ...onLeader];
}

/** The label pushed back inside the bounds: how the governing one is kept when nothing is free. */
function forced(candidate: Candidate, width: number, bounds: Box): Candidate {
  const box = boxOf(candidate, width);
  const dx = Math.max(0, bounds.left - box.left) - Math.max(0, box.right - bounds.right);
  const dy = Math.max(0, bounds.top - box.top) - Math.max(0, box.bottom - bounds.bottom);
  return { ...candidate, x: candidate.x + dx, y: candidate.y + dy };
}

/**
 * Places labels by rank so that none meets another or crosses a curve; the baseline is crossed only where nothing else is free.
 * What finds no place is dropped, except the governing one.
 */
export function placeLabels(
  wishes: readonly LabelWish[],
  { bounds, curves, baseline }: { bounds: Box; curves: readonly (readonly Point[])[]; baseline: number },
): PlacedLabel[] {
  const taken: Box[] = [];
  const placed: PlacedLabel[] = [];
  const order = wishes.map((wish, index) => ({ wish, index })).sort((a, b) => a.wish.rank - b.wish.rank);
  for (const { wish, index } of order) {
    const options = candidates(wish, bounds);
    const free = options.filter((option) => {
      const box = boxOf(option, wish.width);
      return (
        inside(box, bounds) &&
        !taken.some((other) => meets(box, other)) &&
        !curves.some((curve) => crosses(curve, box))
      );
    });
    const offBaseline = free.find((option) => {
      const box = boxOf(option, wish.width);
      return box.bottom < baseline - 1 || box.top > baseline + 1;
    });
    const first = options[0];
    const chosen =
      offBaseline ?? free[0] ?? (wish.rank === 0 && first ? forced(first, wish.width, bounds) : null);
    if (!chosen) continue;
    taken.push(boxOf(chosen, wish.width));
    placed.push({ wish: index, ...chosen });
  }
  return placed;
}
