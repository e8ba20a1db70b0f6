import { describe, expect, test } from 'vitest';
import { piecewise } from '@/engine/polynomial/index';
import { pathOf, polylineOf, type Span, spansOf, valuesAt } from './curve';

const same = (value: number) => value;
const bezier = ({ ordinates }: Span, t: number) => {
  const s = 1 - t;
  const [a = 0, b = 0, c = 0, d = 0] = ordinates;
  if (ordinates.length === 2) return a * s + b * t;
  if (ordinates.length === 3) return a * s * s + 2 * b * s * t + c * t * t;
  return a * s ** 3 + 3 * b * s * s * t + 3 * c * s * t * t + d * t ** 3;
};

describe('spansOf(curve)', () => {
  test('follows pieces up to cubic to the last digit', () => {
    const curve = piecewise(
      [0, 2, 5],
      [
        [1, -2, 0.5, 3],
        [4, 1, -2, 0.25],
      ],
    );
    for (const span of spansOf(curve, 0.1)) {
      for (const t of [0, 0.2, 0.5, 0.9, 1]) {
        const x = span.x0 + (span.x1 - span.x0) * t;
        const [left, right] = valuesAt(curve, x);
        expect(bezier(span, t)).toBeCloseTo(t === 1 ? left : right, 10);
      }
    }
  });

  test('follows a quintic within the tolerance, and meets the extremes it is led through', () => {
    // Deflected shape of a fixed-ended beam under a triangular load, in shape: u²(1 − u)²(2 + u).
    const curve = piecewise([0, 1], [[0, 0, 2, -3, 0, 1]]);
    const top = 0.5477;
    const spans = spansOf(curve, 1e-4, [top]);
    expect(spans.some(({ x1 }) => x1 === top)).toBe(true);
    for (const span of spans) {
      for (const t of [0, 0.25, 0.5, 0.75, 1]) {
        const [value] = valuesAt(curve, span.x0 + (span.x1 - span.x0) * t);
        expect(Math.abs(bezier(span, t) - value)).toBeLessThan(1e-4);
      }
    }
  });

  test('keeps a straight piece one straight span', () => {
    expect(spansOf(piecewise([0, 3], [[6, -2, 0, 0]]), 0.1)).toEqual([{ x0: 0, x1: 3, ordinates: [6, 0] }]);
  });

  test('leaves out pieces of no length', () => {
    expect(spansOf(piecewise([0, 1, 1, 2], [[1], [9], [2]]), 0.1)).toHaveLength(2);
  });
});

test('valuesAt(curve, x) gives both sides of a jump, and the value inside at the ends', () => {
  const shear = piecewise(
    [0, 2, 4],
    [
      [10, 0],
      [-10, 0],
    ],
  );
  expect(valuesAt(shear, 0)).toEqual([10, 10]);
  expect(valuesAt(shear, 2)).toEqual([10, -10]);
  expect(valuesAt(shear, 4)).toEqual([-10, -10]);
  expect(valuesAt(shear, 9)).toEqual([-10, -10]);
});

describe('pathOf(spans)', () => {
  const shear = piecewise(
    [0, 2, 4],
    [
      [10, 0],
      [-10, 0],
    ],
  );

  test('draws a jump as a vertical line and closes to the baseline at both ends', () => {
    expect(pathOf(spansOf(shear, 0.1), same, same, 0)).toBe('M0 0L0 10L2 10L2 -10L4 -10L4 0');
  });

  test('writes a parabola as a quadratic', () => {
    const moment = piecewise([0, 4], [[0, 4, -1]]);
    expect(pathOf(spansOf(moment, 0.1), same, same)).toBe('M0 0Q2 8 4 0');
  });

  test('is empty for no curve', () => {
    expect(pathOf([], same, same)).toBe('');
  });
});

test('polylineOf(spans) has a point every few px of a curve and two on a straight', () => {
  const curve = piecewise(
    [0, 40, 80],
    [
      [0, 1],
      [40, 0, -0.01],
    ],
  );
  expect(polylineOf(spansOf(curve, 0.1), same, same, 8)).toHaveLength(2 + 6);
});
