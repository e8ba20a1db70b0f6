import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { horner, UnitRoots } from './unit-roots';

/** Coefficients of scale · Π (t − root), lowest power first. */
const product = (roots: readonly number[], scale: number): Float64Array =>
  Float64Array.from(
    roots.reduce<number[]>(
      (a, root) => Array.from({ length: a.length + 1 }, (_, j) => (a[j - 1] ?? 0) - root * (a[j] ?? 0)),
      [scale],
    ),
  );

const finder = new UnitRoots();
const find = (a: Float64Array) => {
  const count = finder.find(a, a.length - 1);
  return [...finder.roots.subarray(0, count)];
};

const apart = fc
  .uniqueArray(fc.integer({ min: -30, max: 70 }), { minLength: 1, maxLength: 5 })
  .map((marks) => marks.map((mark) => (mark + 0.5) / 40).sort((a, b) => a - b));

describe('UnitRoots', () => {
  test('finds the roots between 0 and 1 of a polynomial made of its roots, ascending, and no others', () => {
    fc.assert(
      fc.property(apart, fc.constantFrom(1, -3, 1e9, -1e-9), (roots, scale) => {
        const inside = roots.filter((root) => root > 0 && root < 1);
        const found = find(product(roots, scale));
        expect(found.length).toBe(inside.length);
        found.forEach((root, i) => {
          expect(Math.abs(root - inside[i]!)).toBeLessThan(1e-10);
        });
      }),
    );
  });

  test('finds none of what is constant, zero or has none', () => {
    expect(find(Float64Array.of(0, 0, 0))).toEqual([]);
    expect(find(Float64Array.of(2))).toEqual([]);
    expect(find(Float64Array.of(1, 0, 1))).toEqual([]);
    expect(find(Float64Array.of(1, 0, 0, 1, 0, 0))).toEqual([]);
  });

  test('keeps a small root of a quadratic to rounding: t² + 10⁸t − 1', () => {
    const [root] = find(Float64Array.of(-1, 1e8, 1));
    expect(Math.abs(root! - 1e-8) / 1e-8).toBeLessThan(1e-15);
  });

  test('gives a double root once where it is exact', () => {
    expect(find(Float64Array.of(0.25, -1, 1))).toEqual([0.5]);
  });

  test('horner(a, degree, t) is the value', () => {
    expect(horner(Float64Array.of(1, 2, 3), 2, 2)).toBe(17);
  });
});
