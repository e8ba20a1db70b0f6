import { differentiate, evaluatePiece, pieceCount } from './piecewise';
import { rootsOf } from './roots';
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

/** Ends and those turning points that may be extremes, piece by piece. */
function candidatesOf(p: Piecewise): Candidate[] {
  const turnsIn = rootsOf(differentiate(p));
  const candidateAt = (k: number, x: number): Candidate => ({
    x,
    value: evaluatePiece(p, k, x - p.breaks[k]!),
  });
  const pieces = Array.from({ length: pieceCount(p) }, (_, k) => [
    candidateAt(k, p.breaks[k]!),
    candidateAt(k, p.breaks[k + 1]!),
  ]);
  const ends = range(pieces.flat());
  const bounds = new Float64Array(p.degree + 1);
  pieces.forEach((piece, k) => {
    if (!mayPass(p, k, ends, bounds)) return;
    const turns = turnsIn(k).map((x) => candidateAt(k, x));
    piece.splice(1, 0, ...turns);
  });
  const largest = largestOf(pieces.flat());
  return pieces.flatMap((piece) => distinct(piece, ROUNDING * largest));
}

/**
 * Whether piece k may go beyond a range, or come as near to its ends as counts as a tie: by its coefficients in the
 * basis of Bernstein's polynomials, between which its values lie. They go into `bounds`.
 */
function mayPass(
  { breaks, degree, coefficients }: Piecewise,
  k: number,
  { max, min }: { max: number; min: number },
  bounds: Float64Array,
): boolean {
  const length = breaks[k + 1]! - breaks[k]!;
  let scale = 1; // length to the power of i, divided by the binomial coefficient
  for (let i = 0; i <= degree; i++) {
    bounds[i] = coefficients[k * (degree + 1) + i]! * scale;
    scale *= (length * (i + 1)) / (degree - i);
  }
  for (let r = 1; r <= degree; r++) {
    for (let j = degree; j >= r; j--) bounds[j]! += bounds[j - 1]!;
  }
  const tie = TIE * Math.max(Math.abs(max), Math.abs(min));
  let reaches = false;
  for (let j = 1; j < degree; j++) {
    // !(<) also of what is not a number
    reaches ||= !(bounds[j]! < max - tie) || !(bounds[j]! > min + tie);
  }
  return reaches;
}

/**
 * The ends, and the turning points that differ from what is beside them. A piece that levels out towards its end has
 * a multiple root of p' there, which rounding moves: by 1e-8 of the piece where it is double, by 1e-5 where triple.
 */
function distinct(piece: readonly Candidate[], rounding: number): Candidate[] {
  const kept = [piece[0]!];
  const right = piece.at(-1)!;
  for (let i = 1; i < piece.length - 1; i++) {
    if (Math.abs(piece[i]!.value - kept.at(-1)!.value) > rounding) kept.push(piece[i]!);
  }
  while (kept.length > 1 && Math.abs(kept.at(-1)!.value - right.value) <= rounding) kept.pop();
  kept.push(right);
  return kept;
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
