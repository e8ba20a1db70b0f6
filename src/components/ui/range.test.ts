import { describe, expect, test } from 'vitest';
import { changeUnit, entryFor, nudge, placeInRange, roundStep, snapToStep, valueAtPlace } from './range';

const SPAN = { low: 1, high: 18 };
const SECOND_MOMENT = { low: 100e-8, high: 400_000e-8 };

describe('place in a range', () => {
  test('ends are 0 and 1, and values outside stay at the nearer end', () => {
    expect(placeInRange(1, SPAN)).toBe(0);
    expect(placeInRange(18, SPAN)).toBe(1);
    expect(placeInRange(40, SPAN)).toBe(1);
    expect(placeInRange(0, SPAN)).toBe(0);
  });

  test('a very wide range is logarithmic', () => {
    expect(placeInRange(Math.sqrt(100 * 400_000) * 1e-8, SECOND_MOMENT)).toBeCloseTo(0.5, 12);
  });

  test.each([SPAN, SECOND_MOMENT])('valueAtPlace undoes placeInRange', (range) => {
    const value = range.low * 0.3 + range.high * 0.7;
    expect(valueAtPlace(placeInRange(value, range), range) / value).toBeCloseTo(1, 12);
  });

  test('a range without width has its tick at the start', () => {
    expect(placeInRange(5, { low: 5, high: 5 })).toBe(0);
  });
});

test('steps are 1, 2 or 5 times a power of ten', () => {
  expect([0.17, 0.3, 0.7, 1, 12].map(roundStep)).toEqual([0.1, 0.2, 0.5, 1, 10]);
});

test('a dragged value falls on round figures of its unit', () => {
  expect(snapToStep(7.1938, SPAN, 'm')).toBe(7.2);
  expect(snapToStep(17.99999, SPAN, 'm')).toBe(18);
  expect(snapToStep(-3, SPAN, 'm')).toBe(1);
});

test('a nudge moves one step and stops at the ends', () => {
  expect(nudge(7.2, 1, SPAN, 'm')).toBeCloseTo(7.3, 12);
  expect(nudge(7.2, -10, SPAN, 'm')).toBeCloseTo(6.2, 12);
  expect(nudge(17.95, 1, SPAN, 'm')).toBe(18);
  expect(nudge(12 * 0.3048, 1, SPAN, 'ft-in')).toBeCloseTo(12.5 * 0.3048, 12);
});

describe('changing the unit keeps the quantity', () => {
  test('metres to millimetres and back', () => {
    expect(changeUnit({ text: '7.2', unit: 'm' }, 'mm', 'length')).toEqual({
      text: '7\u202f200',
      unit: 'mm',
    });
    expect(changeUnit({ text: '7\u202f200', unit: 'mm' }, 'm', 'length')).toEqual({ text: '7.2', unit: 'm' });
  });

  test('feet and inches only where a sixteenth holds it exactly', () => {
    expect(entryFor(3.81, 'ft-in').text).toBe('12\'-6"');
    expect(entryFor(7.2, 'ft-in').text).toBe('23.6220472441 ft');
  });

  test('text that does not read is left alone', () => {
    expect(changeUnit({ text: 'about 7', unit: 'm' }, 'mm', 'length')).toEqual({
      text: 'about 7',
      unit: 'mm',
    });
  });
});
