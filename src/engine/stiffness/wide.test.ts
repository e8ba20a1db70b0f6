import { describe, expect, test } from 'vitest';
import { Wide } from './wide';

/** The exact value as a fraction over 2¹²⁰⁰, so that BigInt can judge what doubles cannot. */
function exact(value: number): bigint {
  let [scaled, shift] = [value, 0];
  while (!Number.isInteger(scaled)) {
    scaled *= 2;
    shift++;
  }
  return (BigInt(scaled) << 1200n) >> BigInt(shift);
}
const exactly = (w: Wide) => exact(w.hi) + exact(w.lo);
const relative = (got: bigint, want: bigint) => Number(((got - want) * 10n ** 40n) / (want || 1n)) / 1e40;

const samples: [number, number][] = [
  [1 / 3, 3],
  [1e8 + 1, 1e-8],
  [Math.PI, -Math.E],
  [0.1, 1e-4],
  [6e11, 7e-5],
];

describe('Wide', () => {
  test.each(samples)('%f and %f add, multiply and divide to 30 digits', (a, b) => {
    const [x, y] = [Wide.of(a).over(7), Wide.of(b).over(11)];
    const [p, q] = [exactly(x), exactly(y)];
    expect(Math.abs(relative(exactly(x.plus(y)), p + q))).toBeLessThan(1e-30);
    expect(Math.abs(relative(exactly(x.minus(y)), p - q))).toBeLessThan(1e-30);
    expect(Math.abs(relative(exactly(x.times(y)), (p * q) >> 1200n))).toBeLessThan(1e-30);
    expect(Math.abs(relative(exactly(x.over(y)), (p << 1200n) / q))).toBeLessThan(1e-30);
  });

  test('difference of two doubles is exact where the doubles cancel', () => {
    expect(exactly(Wide.difference(1 + 2 ** -52, 2 ** -80))).toBe(exact(1 + 2 ** -52) - exact(2 ** -80));
  });

  test('rounded is the nearest double', () => {
    expect(Wide.of(1).over(3).rounded()).toBe(1 / 3);
  });
});
