import { describe, expect, test } from 'vitest';
import { LIMIT_PLACE, tickPlace, utilisationFigure, utilisationState } from './utilisation';

describe('utilisation figure', () => {
  test.each([
    [0, '0.00'],
    [0.001, '0.01'],
    [0.5, '0.50'],
    [0.8500000000000001, '0.85'],
    [0.85001, '0.86'],
    [0.999, '1.00'],
    [1, '1.00'],
    [1.0000000000001, '1.01'],
    [1.001, '1.01'],
    [250, '> 99'],
    [Number.POSITIVE_INFINITY, '> 99'],
  ])('%d is shown as %s', (ratio, figure) => {
    expect(utilisationFigure(ratio)).toBe(figure);
  });
});

test('a ratio of exactly 1 passes, the next number above it fails', () => {
  expect(utilisationState(1)).toBe('close');
  expect(utilisationState(1 + Number.EPSILON)).toBe('fails');
  expect(utilisationState(0.95)).toBe('passes');
});

test('the tick stands on the limit line at 1 and never leaves the cell', () => {
  expect(tickPlace(1)).toBe(LIMIT_PLACE);
  expect(tickPlace(40)).toBeLessThan(1);
  expect(tickPlace(-0.2)).toBe(0);
});
