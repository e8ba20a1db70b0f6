import { type Piecewise, pieceAt } from '../polynomial/index';

/** Coefficients, about x, of the piece of p that holds `within`: repeated synthetic division. */
export function coefficientsAbout(p: Piecewise, within: number, x: number): number[] {
  const k = pieceAt(p, within);
  const a = Array.from(p.coefficients.subarray(k * (p.degree + 1), (k + 1) * (p.degree + 1)));
  const s = x - p.breaks[k]!;
  for (let i = 0; i < p.degree; i++) {
    for (let j = p.degree - 1; j >= i; j--) a[j]! += s * a[j + 1]!;
  }
  return a;
}

/** Ascending; positions nearer than `nearness` are one. */
export function distinct(positions: readonly number[], nearness: number): number[] {
  const kept: number[] = [];
  for (const x of [...positions].sort((a, b) => a - b)) {
    if (kept.length === 0 || x - kept.at(-1)! > nearness) kept.push(x);
  }
  return kept;
}
