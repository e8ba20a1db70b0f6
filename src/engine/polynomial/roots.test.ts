import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { piecewise } from './piecewise';
import { rootsOf } from './roots';

const roots = (coefficients: number[], length = 1) => rootsOf(piecewise([0, length], [coefficients]))(0);

/** Coefficients of Π (x − r). */
const withRoots = (all: readonly number[]) =>
  all.reduce<number[]>(
    (a, r) => Array.from({ length: a.length + 1 }, (_, j) => (a[j - 1] ?? 0) - r * (a[j] ?? 0)),
    [1],
  );

describe('rootsOf(p)(k)', () => {
  test('finds none in a constant, the zero constant too', () => {
    expect(roots([0])).toEqual([]);
    expect(roots([0, 0, 0])).toEqual([]);
    expect(roots([3])).toEqual([]);
  });

  test('counts the ends of the piece', () => {
    expect(roots([0, 1])).toEqual([0]);
    expect(roots([-1, 1])).toEqual([1]);
    expect(roots([0, -2, 2])).toEqual([0, 1]);
  });

  test('ends exactly at the break where the root is the right end', () => {
    const third = piecewise([0, 1 / 3, 0.7], [[1], [-(0.7 - 1 / 3), 1]]);
    expect(rootsOf(third)(1)).toEqual([0.7]);
  });

  test('finds a double root that touches zero exactly', () => {
    expect(roots([0.25, -1, 1])).toEqual([0.5]);
  });

  test('works on pieces of any length', () => {
    expect(roots([-1e-7, 1], 1e-6)[0]).toBeCloseTo(1e-7, 20);
    expect(roots([-3e8, 0, 1], 1e6)[0]).toBeCloseTo(Math.sqrt(3e8), 6);
  });

  test('finds every simple root, up to five of them, to rounding', () => {
    const place = fc.integer({ min: 1, max: 99 });
    fc.assert(
      fc.property(fc.uniqueArray(place, { minLength: 1, maxLength: 5 }), (hundredths) => {
        const expected = hundredths.map((n) => n / 100).sort((a, b) => a - b);
        const found = roots(withRoots(expected));
        expect(found).toHaveLength(expected.length);
        // A root moves by the rounding of the value there, ε · Σ|aⱼ|, over the slope: at worst 32 ε · 100⁴.
        found.forEach((x, i) => {
          expect(Math.abs(x - expected[i]!)).toBeLessThan(32 * Number.EPSILON * 1e8);
        });
      }),
    );
  });
});
