import { describe, expect, test } from 'vitest';
import { extremes, magnitude, settle } from './extremes';
import { piecewise } from './piecewise';
import { signChanges } from './sign-changes';

describe('extremes(p)', () => {
  test('finds a turning point between the breaks', () => {
    const parabola = piecewise([0, 4], [[0, 4, -1]]);
    expect(extremes(parabola)).toEqual({ max: { value: 4, at: [2] }, min: { value: 0, at: [0, 4] } });
  });

  test('counts both sides of a jump, at one position', () => {
    const jump = piecewise(
      [0, 1, 2],
      [
        [0, 3],
        [-3, 3],
      ],
    );
    expect(extremes(jump)).toEqual({ max: { value: 3, at: [1] }, min: { value: -3, at: [1] } });
  });

  test('gives the two ends of a constant piece', () => {
    const step = piecewise([0, 1, 3, 4], [[2], [5], [2]]);
    expect(extremes(step)).toEqual({ max: { value: 5, at: [1, 3] }, min: { value: 2, at: [0, 1, 3, 4] } });
  });

  test('lists all ties within 1e-9 of the largest magnitude, and no more', () => {
    const waves = (second: number) =>
      piecewise(
        [0, 2, 4],
        [
          [0, 2, -1],
          [0, 2 * second, -second],
        ],
      );
    expect(extremes(waves(1 - 5e-10)).max.at).toEqual([1, 3]);
    expect(extremes(waves(1 - 5e-9)).max.at).toEqual([1]);
  });

  test('takes a turning point beside a break for the break', () => {
    const cubic = piecewise(
      [0, 1, 2],
      [
        [0, 2, -1 + 1e-12],
        [1, 0, -1],
      ],
    );
    expect(extremes(cubic).max.at).toEqual([1]);
  });

  test('takes a sharp turning point a rounding before a break for the break, and one after it as well', () => {
    // 1 − 10⁷ s² about a place 5·10⁻¹⁰ beside the break at 1: higher there by 2.5·10⁻¹², which is more than rounding.
    const [sharp, beside] = [1e7, 5e-10];
    const about = (from: number, top: number) => {
      const s = from - top;
      return [1 - sharp * s * s, -2 * sharp * s, -sharp];
    };
    const before = piecewise([0.9997, 1, 2], [about(0.9997, 1 - beside), [1 - sharp * beside ** 2]]);
    expect(extremes(before).max.at).toEqual([1, 2]);
    const after = piecewise([0, 1, 1.0003], [[1 - sharp * beside ** 2], about(1, 1 + beside)]);
    expect(extremes(after).max.at).toEqual([0, 1]);
  });

  test('takes rounding on a constant stretch for constant', () => {
    const still = piecewise([0, 1, 2], [[1], [1, -4e-17, 4e-17]]);
    expect(extremes(still).max.at).toEqual([0, 1, 2]);
  });

  test('takes the end for the place where the function levels out towards it', () => {
    const [a, b] = [0.1 + 0.2, 0.7];
    for (const order of [2, 3, 4]) {
      // (x − b)ⁿ about a, whose n-fold root at b rounding moves inside the piece
      const h = b - a;
      const binomial = [
        [1, -2, 1],
        [-1, 3, -3, 1],
        [1, -4, 6, -4, 1],
      ][order - 2]!;
      const p = piecewise([a, b], [binomial.map((c, j) => c * h ** (order - j))]);
      const { max, min } = extremes(p);
      expect([...max.at, ...min.at].sort()).toEqual([a, b]);
    }
  });

  test('calls a value that is nothing beside the largest 0, and never −0', () => {
    const { max } = extremes(piecewise([0, 1], [[-1, 1 - 2 ** -50]]));
    expect(Object.is(max.value, 0)).toBe(true);
    expect(Object.is(settle(-0, 1), 0)).toBe(true);
    expect(settle(1e-12, 1)).toBe(1e-12);
  });

  test('of the zero function is 0 at every break', () => {
    const zero = piecewise([0, 1, 2], [[0], [0]]);
    expect(extremes(zero)).toEqual({ max: { value: 0, at: [0, 1, 2] }, min: { value: 0, at: [0, 1, 2] } });
    expect(magnitude(zero)).toBe(0);
  });
});

describe('signChanges(p)', () => {
  test('finds a change through a root and one by a jump', () => {
    const p = piecewise([0, 2, 3], [[-1, 1], [-4]]);
    expect(signChanges(p)).toEqual([1, 2]);
  });

  test('passes over a place where zero is touched only', () => {
    expect(signChanges(piecewise([0, 1], [[0.25, -1, 1]]))).toEqual([]);
    expect(
      signChanges(
        piecewise(
          [0, 1, 2],
          [
            [1, -1],
            [0, 1],
          ],
        ),
      ),
    ).toEqual([]);
  });

  test('finds a change exactly in a break', () => {
    expect(
      signChanges(
        piecewise(
          [0, 1, 2],
          [
            [1, -1],
            [0, -1],
          ],
        ),
      ),
    ).toEqual([1]);
    expect(
      signChanges(
        piecewise(
          [0, 1, 2],
          [
            [1, -1 - 4e-16],
            [0, -1],
          ],
        ),
      ),
    ).toEqual([1]);
  });

  test('gives both ends of a stretch of zero between two signs', () => {
    expect(signChanges(piecewise([0, 1, 2, 3], [[1, -1], [0], [0, -1]]))).toEqual([1, 2]);
    expect(signChanges(piecewise([0, 1, 2, 3], [[1, -1], [0], [0, 1]]))).toEqual([]);
  });

  test('takes no sign from rounding', () => {
    expect(signChanges(piecewise([0, 1, 2], [[1, -1], [-1e-16]]))).toEqual([]);
    expect(signChanges(piecewise([0, 1], [[0]]))).toEqual([]);
  });
});
