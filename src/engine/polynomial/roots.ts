import type { Piecewise } from './types';
import { horner, UnitRoots } from './unit-roots';

/**
 * The positions in the pieces of p, ends included, where it is zero: a function of the piece's number; none where p is
 * zero throughout the piece. Roots are found in t = s/h in (0, 1), so that pieces of any length are alike.
 */
export function rootsOf({ breaks, degree, coefficients }: Piecewise): (k: number) => number[] {
  const inside = new UnitRoots();
  const scaled = new Float64Array(degree + 1);
  return (k) => {
    const from = breaks[k]!;
    const to = breaks[k + 1]!;
    let power = 1;
    for (let j = 0; j <= degree; j++) {
      scaled[j] = coefficients[k * (degree + 1) + j]! * power;
      power *= to - from;
    }
    if (scaled.every((a) => a === 0)) return [];
    const found: number[] = [];
    if (scaled[0] === 0) found.push(from);
    const count = inside.find(scaled, degree);
    for (let i = 0; i < count; i++) found.push(from + inside.roots[i]! * (to - from));
    if (horner(scaled, degree, 1) === 0) found.push(to);
    return found;
  };
}
