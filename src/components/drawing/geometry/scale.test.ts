import { describe, expect, test } from 'vitest';
import { drawnDepth, fitOrdinates, timesDrawn } from './scale';

describe('fitOrdinates(least, most, top, bottom)', () => {
  test('uses the whole height when the diagram lies on both sides', () => {
    expect(fitOrdinates(-50, 150, 10, 110)).toEqual({ base: 85, perUnit: 0.5 });
  });

  test('keeps the zero line in view when every ordinate is far above it', () => {
    expect(fitOrdinates(900, 1000, 0, 100)).toEqual({ base: 100, perUnit: 0.1 });
  });

  test('keeps the zero line in view when every ordinate is below it', () => {
    expect(fitOrdinates(-1000, -900, 0, 100)).toEqual({ base: 0, perUnit: 0.1 });
  });

  test('lays the baseline of an empty diagram in the middle', () => {
    expect(fitOrdinates(0, 0, 0, 80)).toEqual({ base: 40, perUnit: 0 });
  });
});

test('drawnDepth(depth) is to scale between 5 px and the most that fits', () => {
  expect(drawnDepth(0.37, 100, 44)).toBeCloseTo(37);
  expect(drawnDepth(0.01, 100, 44)).toBe(5);
  expect(drawnDepth(0.9, 100, 44)).toBe(44);
  expect(drawnDepth(0.9, 100, 16)).toBe(16);
});

test('timesDrawn(…) has two figures below ten and whole numbers above', () => {
  expect(timesDrawn(4430, 100)).toBe('44');
  expect(timesDrawn(440, 100)).toBe('4.4');
  expect(timesDrawn(0, 100)).toBe('1');
});
