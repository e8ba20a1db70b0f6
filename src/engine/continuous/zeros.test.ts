import { describe, expect, test } from 'vitest';
import { findMonotoneZero, quadraticZeros, quartic } from './zeros';

const zerosOf = (c0: number, c1: number, c2: number, h: number): number[] => {
  const out = new Float64Array(2);
  return [...out.subarray(0, quadraticZeros(c0, c1, c2, h, out))];
};

describe('quadraticZeros', () => {
  test('(s − 1)(s − 3) has both within 4, one within 2, none within 1', () => {
    expect(zerosOf(3, -4, 1, 4)).toEqual([1, 3]);
    expect(zerosOf(-3, 4, -1, 4)).toEqual([1, 3]);
    expect(zerosOf(3, -4, 1, 2)).toEqual([1]);
    expect(zerosOf(3, -4, 1, 3)).toEqual([1]);
    expect(zerosOf(3, -4, 1, 1)).toEqual([]);
  });

  test('(s + 1)(s − 2) has the one that is positive, and (s + 1)(s + 2) none', () => {
    expect(zerosOf(-2, -1, 1, 9)).toEqual([2]);
    expect(zerosOf(2, 3, 1, 9)).toEqual([]);
  });

  test('s(s − 2) has none at the end', () => {
    expect(zerosOf(0, -2, 1, 9)).toEqual([2]);
    expect(zerosOf(0, -2, 1, 2)).toEqual([]);
  });

  test('a straight line has one, a constant none', () => {
    expect(zerosOf(-6, 2, 0, 4)).toEqual([3]);
    expect(zerosOf(-6, 2, 0, 3)).toEqual([]);
    expect(zerosOf(6, 2, 0, 4)).toEqual([]);
    expect(zerosOf(6, 0, 0, 4)).toEqual([]);
    expect(zerosOf(0, 0, 0, 4)).toEqual([]);
  });

  test('a parabola that only touches zero, or does not reach it, has none', () => {
    expect(zerosOf(4, -4, 1, 9)).toEqual([]);
    expect(zerosOf(5, -4, 1, 9)).toEqual([]);
  });

  test('a small zero beside a large one keeps its digits', () => {
    // (s − 1e-9)(s − 1): the usual formula would subtract nearly equal numbers.
    expect(zerosOf(1e-9, -1 - 1e-9, 1, 2)[0]).toBeCloseTo(1e-9, 24);
  });
});

describe('findMonotoneZero', () => {
  const find = (coefficients: number[], from: number, to: number): number => {
    const c = Float64Array.from({ length: 5 }, (_, i) => coefficients[i] ?? 0);
    const stretch = Float64Array.of(from, to, quartic(c, from), quartic(c, to), Number.NaN);
    findMonotoneZero(c, stretch);
    return stretch[4]!;
  };

  test('of a straight line it is the chord’s', () => {
    expect(find([-6, 2], 0, 9)).toBe(3);
  });

  test.each([
    ['rising cube', [-8, 0, 0, 1], 0, 5, 2],
    ['falling cube', [8, 0, 0, -1], 0, 5, 2],
    ['quartic', [-81, 0, 0, 0, 1], 1, 100, 3],
    ['sum of powers', [-9, 1, 2, 2, 4], 0, 3, 1],
  ])('of a %s', (_, c, from, to, want) => {
    expect(find(c, from, to)).toBeCloseTo(want, 6);
    expect(
      Math.abs(
        quartic(
          Float64Array.from({ length: 5 }, (__, i) => c[i] ?? 0),
          find(c, from, to),
        ),
      ),
    ).toBeLessThan(1e-12 * Math.max(...c.map(Math.abs)));
  });

  test('of a curve that is all but level where the chord meets zero', () => {
    expect(find([-1e-9, 0, 0, 1], 0, 1)).toBeCloseTo(1e-3, 12);
    expect(find([-1, 0, 0, 0, 1e6], 0, 1)).toBeCloseTo(1e-6 ** 0.25, 14);
    expect(find([1, 0, 0, 0, -1e6], 0, 1)).toBeCloseTo(1e-6 ** 0.25, 14);
  });

  test('of a curve that is level where it crosses, to what a threefold zero is known to', () => {
    const zero = find([-0.125, 0.75, -1.5, 1], 0, 2); // (s − 1/2)³
    expect(Math.abs(zero - 0.5)).toBeLessThan(1e-4);
  });

  test('of a curve that meets zero exactly where the chord does', () => {
    expect(find([-1, 1, 0, 0], 0, 2)).toBe(1);
  });
});
