import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { Wide } from './wide';

/** Whole numbers of up to 53 bits, whose sums and products BigInt knows exactly. */
const whole = fc.maxSafeInteger();
const exact = (value: Wide): bigint => BigInt(value.hi) + BigInt(value.lo);
const magnitude = (n: bigint) => (n < 0n ? -n : n);

/** A double of whatever size, exactly, over 2¹²⁰⁰. */
function scaled(value: number): bigint {
  let [digits, shift] = [value, 0];
  while (!Number.isInteger(digits)) {
    digits *= 2;
    shift++;
  }
  return (BigInt(digits) << 1200n) >> BigInt(shift);
}
const scaledPair = (w: Wide) => scaled(w.hi) + scaled(w.lo);
const relative = (got: bigint, want: bigint) => Math.abs(Number(((got - want) * 10n ** 40n) / want)) / 1e40;

describe('a wide number', () => {
  test('holds the product of two doubles to the last bit', () => {
    fc.assert(
      fc.property(whole, whole, (a, b) => {
        expect(exact(Wide.of(a).times(b))).toBe(BigInt(a) * BigInt(b));
        expect(exact(Wide.of(a).times(Wide.of(b)))).toBe(BigInt(a) * BigInt(b));
      }),
    );
  });

  test('holds the difference of two doubles to the last bit', () => {
    fc.assert(
      fc.property(whole, whole, (a, b) => {
        expect(exact(Wide.difference(a * 2 ** 40, b))).toBe(BigInt(a) * 2n ** 40n - BigInt(b));
      }),
    );
  });

  test('adds to within 2⁻¹⁰² of the larger term, where the terms do not cancel', () => {
    fc.assert(
      fc.property(whole, whole, whole, whole, (a, b, c, d) => {
        const [left, right] = [Wide.of(a).times(b), Wide.of(c).times(d)];
        const [l, r] = [BigInt(a) * BigInt(b), BigInt(c) * BigInt(d)];
        const error = magnitude(exact(left.plus(right)) - (l + r));
        expect(error * 2n ** 102n <= magnitude(l) + magnitude(r)).toBe(true);
        expect(exact(left.minus(left))).toBe(0n);
      }),
    );
  });

  test('divides so that the quotient times the divisor is the dividend to 100 bits', () => {
    fc.assert(
      fc.property(
        whole,
        whole.filter((n) => n !== 0),
        (a, b) => {
          const rest = Wide.of(a).over(b).times(b).minus(Wide.of(a));
          expect(Math.abs(rest.rounded())).toBeLessThanOrEqual(2 ** -100 * Math.abs(a));
        },
      ),
    );
  });

  test.each([
    [1 / 3, 3],
    [1e8 + 1, 1e-8],
    [Math.PI, -Math.E],
    [0.1, 1e-4],
    [6e11, 7e-5],
  ])('%f and %f add, multiply and divide to 30 digits', (a, b) => {
    const [x, y] = [Wide.of(a).over(7), Wide.of(b).over(11)];
    const [p, q] = [scaledPair(x), scaledPair(y)];
    expect(relative(scaledPair(x.plus(y)), p + q)).toBeLessThan(1e-30);
    expect(relative(scaledPair(x.minus(y)), p - q)).toBeLessThan(1e-30);
    expect(relative(scaledPair(x.times(y)), (p * q) >> 1200n)).toBeLessThan(1e-30);
    expect(relative(scaledPair(x.over(y)), (p << 1200n) / q)).toBeLessThan(1e-30);
  });

  test('keeps a difference of doubles that a double would round away', () => {
    const difference = Wide.difference(1 + 2 ** -52, 2 ** -80);
    expect(scaledPair(difference)).toBe(scaled(1 + 2 ** -52) - scaled(2 ** -80));
  });

  test('rounds to the nearest double', () => {
    expect(Wide.ONE.over(3).rounded()).toBe(1 / 3);
    expect(Wide.ONE.over(3).times(3).rounded()).toBe(1);
    expect(Wide.pair(1, 2 ** -60).rounded()).toBe(1);
    expect(Wide.of(-2).negated().rounded()).toBe(2);
  });
});
