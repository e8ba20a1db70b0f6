import { describe, expect, test } from 'vitest';
import { closeBracket } from './close';
import type { Count } from './count';

/** What a matrix whose determinant is Π (root − ω²) tells, and how often it was asked. */
function matrixOf(roots: readonly number[]) {
  const asked: number[] = [];
  const at = (omega2: number): Count => {
    asked.push(omega2);
    const below = roots.filter((root) => root < omega2).length;
    const log = roots.reduce((sum, root) => sum + Math.log(Math.abs(root - omega2)), 0);
    return { omega2, below, log };
  };
  return { at, asked };
}

/** Halvings from a width of 9 to 10⁻¹² of the lower end 1, and the four steps beyond. */
const MOST_STEPS = Math.ceil(Math.log2(9e12)) + 4;

describe('closeBracket', () => {
  test.each<[string, number[], number]>([
    ['a single root', [3.7, 40, 90], 12],
    ['a root of three that coincide', [3.7, 3.7, 3.7, 40], 12],
    ['a root at a hair from the lower end', [1 + 1e-9, 40], MOST_STEPS],
    [
      'the first of many that lie close together',
      Array.from({ length: 60 }, (_, i) => 3.7 + 1e-4 * i),
      MOST_STEPS,
    ],
  ])('closes around %s in few steps', (_, roots, most) => {
    const { at, asked } = matrixOf(roots);
    const { lower, upper } = closeBracket({ lower: at(1), upper: at(10) }, at);
    expect(lower.omega2).toBeLessThanOrEqual(roots[0]!);
    expect(upper.omega2).toBeGreaterThanOrEqual(roots[0]!);
    expect(lower.below).toBe(0);
    expect(upper.below).toBe(roots.filter((root) => root === roots[0]).length);
    expect(upper.omega2 - lower.omega2).toBeLessThanOrEqual(1e-12);
    expect(asked.length - 2).toBeLessThanOrEqual(most);
  });
});
