import type { Piecewise } from './types';

const STEPS = 200; // bisection alone needs 60; Newton's steps are extra and seldom more than five

/**
 * The positions in piece k, ends included, where p is zero; none where p is zero throughout.
 *
 * Between two roots of its derivative a polynomial is monotone, so each sign change there brackets one root, which
 * Newton's method, kept inside the bracket by bisection, finds to rounding. Roots without a change of sign are found
 * where the derivative's root gives exactly 0. Works on t = s/h in [0, 1], so that pieces of any length are alike.
 */
export function rootsOfPiece(p: Piecewise, k: number): number[] {
  const from = p.breaks[k]!;
  const length = p.breaks[k + 1]! - from;
  const scaled: number[] = [];
  let power = 1;
  for (let j = 0; j <= p.degree; j++) {
    scaled.push(p.coefficients[k * (p.degree + 1) + j]! * power);
    power *= length;
  }
  return unitRoots(scaled).map((t) => (t === 1 ? p.breaks[k + 1]! : from + t * length));
}

/** Roots in [0, 1], ascending, of Σ a[j] t^j. */
function unitRoots(a: readonly number[]): number[] {
  let degree = a.length - 1;
  while (degree > 0 && a[degree] === 0) degree--;
  if (degree === 0) return [];
  const derivative = a.slice(1, degree + 1).map((c, j) => c * (j + 1));
  const turns = [0, ...unitRoots(derivative).filter((t) => t > 0 && t < 1), 1];
  const values = turns.map((t) => horner(a, degree, t));
  const roots: number[] = [];
  turns.forEach((t, i) => {
    if (values[i] === 0) roots.push(t);
    const next = values[i + 1];
    if (next !== undefined && values[i]! * next < 0) {
      roots.push(bracketedRoot(a, derivative, degree, t, turns[i + 1]!));
    }
  });
  return roots;
}

function bracketedRoot(
  a: readonly number[],
  derivative: readonly number[],
  degree: number,
  from: number,
  to: number,
): number {
  const rising = horner(a, degree, from) < 0;
  let low = from;
  let high = to;
  let t = (low + high) / 2;
  for (let step = 0; step < STEPS; step++) {
    const value = horner(a, degree, t);
    if (value === 0) return t;
    if (value < 0 === rising) low = t;
    else high = t;
    const newton = t - value / horner(derivative, degree - 1, t);
    // Every third step bisects, so that a bracket that Newton closes from one side only is closed all the same.
    const next = step % 3 < 2 && newton > low && newton < high ? newton : (low + high) / 2;
    if (next === t || next <= low || next >= high) return next;
    t = next;
  }
  return t;
}

function horner(a: readonly number[], degree: number, t: number): number {
  let value = 0;
  for (let j = degree; j >= 0; j--) value = value * t + a[j]!;
  return value;
}
