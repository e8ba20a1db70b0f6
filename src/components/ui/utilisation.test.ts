import { expect, test } from 'vitest';
import { LIMIT_PLACE, tickPlace, utilisationState } from './utilisation';

test('a ratio of exactly 1 passes, the next number above it fails', () => {
  expect(utilisationState(1)).toBe('close');
  expect(utilisationState(1 + Number.EPSILON)).toBe('fails');
  expect(utilisationState(0.95)).toBe('passes');
  expect(utilisationState(0.951)).toBe('close');
});

test('the tick stands on the limit line at 1 and never leaves the cell', () => {
  expect(tickPlace(1)).toBe(LIMIT_PLACE);
  expect(tickPlace(40)).toBeLessThan(1);
  expect(tickPlace(-0.2)).toBe(0);
});
