import { expect, test } from 'vitest';
import { roundStep } from './round-step';

test('roundStep(least) is 1, 2, 2.5 or 5 times a power of ten, never less than asked', () => {
  expect([0.3, 0.5, 1, 1.2, 2.1, 2.6, 7, 60].map(roundStep)).toEqual([0.5, 0.5, 1, 2, 2.5, 5, 10, 100]);
});
