import { type Piecewise, pieceAt } from '../polynomial/index';

/** Coefficients, about x, of the piece of p that holds `within`. */
export function coefficientsAbout(p: Piecewise, within: number, x: number): Float64Array {
  const a = new Float64Array(p.degree + 1);
  readAbout(p, pieceAt(p, within), x, a);
  return a;
}

/** Writes the coefficients of piece k about x: repeated synthetic division. */
export function readAbout(
  { breaks, degree, coefficients }: Piecewise,
  k: number,
  x: number,
  into: Float64Array,
): void {
  for (let j = 0; j <= degree; j++) into[j] = coefficients[k * (degree + 1) + j]!;
  const s = x - breaks[k]!;
  for (let i = 0; i < degree; i++) {
    for (let j = degree - 1; j >= i; j--) into[j]! += s * into[j + 1]!;
  }
}

/** The break that x coincides with, or x itself. */
export function breakAt(p: Piecewise, x: number, nearness: number): number {
  const k = pieceAt(p, x);
  const near = [p.breaks[k]!, p.breaks[k + 1]!].find((at) => Math.abs(at - x) <= nearness);
  return near ?? x;
}

/** Ascending; positions nearer than `nearness` are one. */
export function distinct(positions: readonly number[], nearness: number): number[] {
  const kept: number[] = [];
  for (const x of Float64Array.from(positions).sort()) {
    if (kept.length === 0 || x - kept.at(-1)! > nearness) kept.push(x);
  }
  return kept;
}
