import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  add,
  differentiate,
  evaluate,
  evaluatePiece,
  integralOfProduct,
  integrate,
  multiply,
  pieceAt,
  piecewise,
  scale,
  withoutBreaks,
} from './piecewise';

/** x on [0, 2], then a jump to 5 − 2(x − 2) on [2, 3]. */
const p = piecewise(
  [0, 2, 3],
  [
    [0, 1],
    [5, -2],
  ],
);

describe('evaluate(p, x)', () => {
  test('gives both sides of a jump', () => {
    expect(evaluate(p, 2)).toEqual([2, 5]);
  });

  test('gives the value inside at both ends of the domain', () => {
    expect(evaluate(p, 0)).toEqual([0, 0]);
    expect(evaluate(p, 3)).toEqual([3, 3]);
  });

  test('gives one value twice elsewhere', () => {
    expect(evaluate(p, 2.5)).toEqual([4, 4]);
  });
});

test('piecewise(breaks, pieces) refuses a count of pieces that does not fit', () => {
  expect(() => piecewise([0, 1], [])).toThrow('0 pieces need 1 breaks, not 2');
});

test('pieceAt(p, x) is the piece at the right of a break, and the last one at the end', () => {
  expect([0, 1.9, 2, 3].map((x) => pieceAt(p, x))).toEqual([0, 0, 1, 1]);
});

test('evaluatePiece(p, k, s) reads from the left end of the piece', () => {
  expect(evaluatePiece(p, 1, 0.5)).toBe(4);
});

test('withoutBreaks(p, positions) leaves the pieces at their left', () => {
  const line = piecewise(
    [0, 1, 2],
    [
      [0, 1],
      [1, 1],
    ],
  );
  expect(withoutBreaks(line, [1])).toEqual(piecewise([0, 2], [[0, 1]]));
  expect(withoutBreaks(line, [])).toBe(line);
});

const coefficient = fc.integer({ min: -9, max: 9 });
const polynomial = fc
  .tuple(
    fc.uniqueArray(fc.integer({ min: 1, max: 19 }), { minLength: 0, maxLength: 4 }),
    fc.integer({ min: 1, max: 4 }),
  )
  .chain(([inner, length]) => {
    const breaks = [0, ...inner.sort((a, b) => a - b), 20].map((x) => x / 4);
    const piece = fc.array(coefficient, { minLength: length, maxLength: length });
    return fc
      .array(piece, { minLength: breaks.length - 1, maxLength: breaks.length - 1 })
      .map((pieces) => piecewise(breaks, pieces));
  });
const positions = fc
  .array(fc.integer({ min: 0, max: 40 }), { minLength: 1, maxLength: 9 })
  .map((xs) => xs.map((x) => x / 8));

const near = (actual: readonly number[], expected: readonly number[]) => {
  actual.forEach((value, i) => {
    expect(Math.abs(value - expected[i]!)).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(expected[i]!)));
  });
};

test('the value of a sum, a multiple and a product is the sum, the multiple and the product of the values', () => {
  fc.assert(
    fc.property(polynomial, polynomial, positions, (p, q, xs) => {
      for (const x of xs) {
        const [a, b] = [evaluate(p, x), evaluate(q, x)];
        near(evaluate(add(p, q), x), [a[0] + b[0], a[1] + b[1]]);
        near(evaluate(scale(p, -2), x), [-2 * a[0], -2 * a[1]]);
        near(evaluate(multiply(p, q), x), [a[0] * b[0], a[1] * b[1]]);
      }
    }),
  );
});

test('differentiating an antiderivative gives the function back, and the antiderivative has no jumps', () => {
  fc.assert(
    fc.property(polynomial, positions, (p, xs) => {
      const antiderivative = integrate(p, 7);
      expect(evaluate(antiderivative, 0)[0]).toBe(7);
      for (const x of xs) {
        near(evaluate(differentiate(antiderivative), x), evaluate(p, x));
        const [left, right] = evaluate(antiderivative, x);
        near([left], [right]);
      }
    }),
  );
});

test('integralOfProduct(p, q) of straight lines is the textbook’s l/6 (2ac + ad + bc + 2bd)', () => {
  const line = (a: number, b: number) => piecewise([0, 6], [[a, (b - a) / 6]]);
  expect(integralOfProduct(line(1, 3), line(2, 5))).toBeCloseTo((6 / 6) * (2 * 2 + 5 + 6 + 2 * 15), 12);
});

test('integralOfProduct(p, q) cuts at the breaks of both', () => {
  const hat = piecewise(
    [0, 1, 2],
    [
      [0, 1],
      [1, -1],
    ],
  );
  const step = piecewise([0, 0.5, 2], [[0], [2]]);
  expect(integralOfProduct(hat, step)).toBeCloseTo(2 * (1 - 0.125), 14);
});
