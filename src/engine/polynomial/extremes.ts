import { differentiate, evaluatePiece, pieceCount } from './piecewise';
import { rootsOfPiece } from './roots';
import type { Extreme, Piecewise } from './types';

/** Values nearer to an extreme than this part of the largest magnitude attain it. */
const TIE = 1e-9;
/** What varies by less than this part of the largest magnitude varies by rounding only. */
const ROUNDING = 1e-13;
/** Two positions nearer than this part of the domain are one: a root found beside a break is the break. */
export const COINCIDENT = 1e-9;

type Candidate = { x: number; value: number };

/** A value that is nothing beside the largest of its kind is 0; and never −0. */
export const settle = (value: number, largest: number): number =>
  Math.abs(value) <= ROUNDING * largest ? 0 : value;

/** Largest |p|, exactly: over the ends of the pieces, both sides of each break, and the turning points. */
export const magnitude = (p: Piecewise): number => largestOf(candidatesOf(p));

/**
 * The largest and the smallest value with every position where it is attained, from the roots of p' and both sides of
 * each break, not from sampling. Ties count within 1e-9 of the largest magnitude; a constant piece gives its two ends.
 */
export function extremes(p: Piecewise): { max: Extreme; min: Extreme } {
  const candidates = candidatesOf(p);
  const largest = largestOf(candidates);
  const attained = (extreme: number): Extreme => {
    const near = candidates.filter(({ value }) => Math.abs(value - extreme) <= TIE * largest);
    return { value: settle(extreme, largest), at: merged(p, near) };
  };
  const { max, min } = range(candidates);
  return { max: attained(max), min: attained(min) };
}

/** Ends and turning points, piece by piece. */
function candidatesOf(p: Piecewise): Candidate[] {
  const derivative = differentiate(p);
  const pieces = Array.from({ length: pieceCount(p) }, (_, k) => {
    const [from, to] = [p.breaks[k]!, p.breaks[k + 1]!];
    const at = (x: number): Candidate => ({ x, value: evaluatePiece(p, k, x - from) });
    return { left: at(from), turns: rootsOfPiece(derivative, k).map(at), right: at(to) };
  });
  const largest = largestOf(pieces.flatMap(({ left, turns, right }) => [left, ...turns, right]));
  return pieces.flatMap((piece) => distinct(piece, ROUNDING * largest));
}

/**
 * The ends, and the turning points that differ from what is beside them. A piece that levels out towards its end has
 * a multiple root of p' there, which rounding moves: by 1e-8 of the piece where it is double, by 1e-5 where triple.
 */
function distinct(
  { left, turns, right }: { left: Candidate; turns: Candidate[]; right: Candidate },
  rounding: number,
): Candidate[] {
  const kept = [left];
  for (const turn of turns) {
    if (Math.abs(turn.value - kept.at(-1)!.value) > rounding) kept.push(turn);
  }
  while (kept.length > 1 && Math.abs(kept.at(-1)!.value - right.value) <= rounding) kept.pop();
  return [...kept, right];
}

function range(candidates: readonly Candidate[]): { max: number; min: number } {
  let [max, min] = [-Infinity, Infinity];
  for (const { value } of candidates) {
    if (value > max) max = value;
    if (value < min) min = value;
  }
  return { max, min };
}

function largestOf(candidates: readonly Candidate[]): number {
  const { max, min } = range(candidates);
  return Math.max(Math.abs(max), Math.abs(min));
}

/** Ascending and without repeats: breaks as they are, turning points only where no other position is so near. */
function merged(p: Piecewise, candidates: readonly Candidate[]): number[] {
  const nearness = COINCIDENT * (p.breaks.at(-1)! - p.breaks[0]!);
  const breaks = new Set(p.breaks);
  const positions = [...new Set(candidates.map(({ x }) => x))].sort((a, b) => a - b);
  const kept: number[] = [];
  for (const x of positions) {
    const last = kept.at(-1);
    if (last === undefined || x - last > nearness || (breaks.has(last) && breaks.has(x))) kept.push(x);
    else if (breaks.has(x)) kept[kept.length - 1] = x;
  }
  return kept;
}
