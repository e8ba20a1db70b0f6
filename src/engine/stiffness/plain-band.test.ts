import { describe, expect, test } from 'vitest';
import { PlainBand } from './plain-band';

describe('PlainBand', () => {
  /** The second difference on n points, held at both ends: 2 on the diagonal, −1 beside it. */
  const string = (n: number, last = 2) => {
    const band = new PlainBand();
    band.clear(n);
    for (let i = 0; i < n; i++) band.couple(i, i, i === n - 1 ? last : 2);
    for (let i = 1; i < n; i++) band.couple(i % 2 ? i : i - 1, i % 2 ? i - 1 : i, -1);
    return band;
  };

  test.each([1, 2, 3, 4, 5, 16, 17, 40])(
    'of a string of %i points under a unit load has its parabola',
    (n) => {
      const band = string(n);
      expect(band.factorise()).toBe(true);
      const b = new Float64Array(n).fill(1);
      band.solve(b);
      // −u″ = 1 with u = 0 at 0 and n + 1: i (n + 1 − i)/2
      b.forEach((value, k) => {
        expect(Math.abs(value - ((k + 1) * (n - k)) / 2)).toBeLessThan(1e-11 * n);
      });
    },
  );

  test('cannot factorise what is not above rounding: 2⁻⁴⁰ is, 0 is not', () => {
    // The pivots of the string are (i + 1)/i; the last is what is left of its diagonal, 1/n more than a mechanism's.
    const n = 5;
    expect(string(n, 1 - 1 / n + 2 ** -40).factorise()).toBe(true);
    expect(string(n, 1 - 1 / n).factorise()).toBe(false);
    expect(string(n, 1 - 1 / n - 2 ** -40).factorise()).toBe(false);
    expect(string(n, Number.NaN).factorise()).toBe(false);
    expect(string(1, 0).factorise()).toBe(false);
    expect(string(1, -1).factorise()).toBe(false);
  });

  test('leaves out the rows of prescribed movements', () => {
    const band = new PlainBand();
    band.clear(1);
    band.couple(0, 0, 4);
    band.couple(-1, 0, 9);
    band.couple(0, -1, 9);
    band.couple(-1, -1, 9);
    expect(band.factorise()).toBe(true);
    const b = new Float64Array([8]);
    band.solve(b);
    expect([...b]).toEqual([2]);
  });

  test('of a full band of three solves what is multiplied', () => {
    const n = 9;
    const entry = (i: number, j: number) => (i === j ? 10 + i : Math.abs(i - j) <= 3 ? 1 / (i + j + 1) : 0);
    const band = new PlainBand();
    for (let round = 0; round < 2; round++) {
      band.clear(n);
      for (let i = 0; i < n; i++)
        for (let j = Math.max(0, i - 3); j <= i; j++) band.couple(j, i, entry(i, j));
      expect(band.factorise()).toBe(true);
      const x = Array.from({ length: n }, (_, i) => (i % 2 ? -i : i + 1));
      const b = Float64Array.from(x, (_, i) => x.reduce((sum, xj, j) => sum + entry(i, j) * xj, 0));
      band.solve(b);
      b.forEach((value, i) => {
        expect(Math.abs(value - x[i]!)).toBeLessThan(1e-13);
      });
    }
  });
});
