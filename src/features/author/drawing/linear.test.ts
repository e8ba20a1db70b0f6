import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { evaluateNumber } from '@/engine/template';
import { parseExpression } from '@/engine/template/parse';
import { along, type Linear, linearOf, linearText } from './linear';

const read = (text: string) => {
  const parsing = parseExpression(text);
  if (!parsing.ok) throw new Error(parsing.message);
  return parsing.tree;
};
const linear = (text: string): Linear => {
  const found = linearOf(read(text));
  if (!found) throw new Error(`${text} is a sum`);
  return found;
};

const SCOPE = new Map([
  ['L1', 6.25],
  ['L2', 4.5],
  ['a', 1.75],
]);
const sums = fc
  .uniqueArray(fc.constantFrom(...SCOPE.keys()), { maxLength: 3 })
  .chain((symbols) =>
    fc.tuple(
      ...symbols.map((symbol) =>
        fc
          .tuple(fc.integer({ min: -24, max: 24 }), fc.integer({ min: 1, max: 12 }))
          .map(([top, bottom]) => [symbol, top / bottom] as const)
          .filter(([, coefficient]) => coefficient !== 0),
      ),
    ),
  )
  .map((terms): Linear => new Map(terms));
const amountOf = (sum: Linear): number =>
  [...sum].reduce((total, [symbol, times]) => total + times * (SCOPE.get(symbol) ?? Number.NaN), 0);

describe('a length as a sum', () => {
  test.each([
    ['0', '0'],
    ['L1', 'L1'],
    ['L1 + L2/2', 'L1 + L2/2'],
    ['L1 + (L1 + L2 - L1)/3', 'L1 + L2/3'],
    ['0.75*L1', '3*L1/4'],
    ['-(a - L1)', 'L1 - a'],
    ['a - a', '0'],
    ['0.37*L1', '0.37*L1'],
  ])('%s is written %s', (text, written) => {
    expect(linearText(linear(text))).toBe(written);
  });

  test.each(['L1*L2', 'max(L1, a)', '6', 'L1^2', '2/L1'])('%s is none', (text) => {
    expect(linearOf(read(text))).toBeNull();
  });

  test('reads as it is written, to the value of its terms', () => {
    fc.assert(
      fc.property(sums, (sum) => {
        expect(evaluateNumber(read(linearText(sum)), SCOPE)).toBeCloseTo(amountOf(sum), 9);
      }),
    );
  });

  test('a place along the way divides it in that share', () => {
    fc.assert(
      fc.property(sums, sums, fc.constantFrom(0, 1 / 4, 1 / 3, 1 / 2, 2 / 3, 1), (a, b, share) => {
        const at = amountOf(a) + share * (amountOf(b) - amountOf(a));
        expect(evaluateNumber(read(linearText(along(a, b, share))), SCOPE)).toBeCloseTo(at, 9);
      }),
    );
  });
});
