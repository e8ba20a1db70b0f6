import { describe, expect, test } from 'vitest';
import { firstRowAt, graduationsOf } from './graduations';
import { keyedRange, movedTo, shifted } from './histogram';

const bins = { from: 100, to: 200, bin: 20 };
const key = (name: string, shiftKey = false) => ({ key: name, shiftKey });

describe('the cursors of a range', () => {
  const range = { low: 120, high: 160 };

  test('stay on the step and within the bins', () => {
    expect(movedTo(range, 'low', 123.4, bins, 5)).toEqual({ low: 125, high: 160 });
    expect(movedTo(range, 'low', 20, bins, 5)).toEqual({ low: 100, high: 160 });
    expect(movedTo(range, 'high', 900, bins, 5)).toEqual({ low: 120, high: 200 });
  });

  test('never pass one another', () => {
    expect(movedTo(range, 'low', 190, bins, 5)).toEqual({ low: 160, high: 160 });
    expect(movedTo(range, 'high', 20, bins, 5)).toEqual({ low: 120, high: 120 });
  });

  test('move together without changing their width', () => {
    expect(shifted(range, 100, bins)).toEqual({ low: 160, high: 200 });
    expect(shifted(range, -5, bins)).toEqual({ low: 115, high: 155 });
  });

  test('answer to the keys', () => {
    expect(keyedRange(key('ArrowRight'), range, 'low', bins, 1)?.low).toBe(121);
    expect(keyedRange(key('ArrowLeft', true), range, 'high', bins, 1)?.high).toBe(150);
    expect(keyedRange(key('Home'), range, 'low', bins, 1)?.low).toBe(100);
    expect(keyedRange(key(']'), range, 'low', bins, 2)).toEqual({ low: 122, high: 162 });
    expect(keyedRange(key('a'), range, 'low', bins, 2)).toBeNull();
  });
});

describe('graduationsOf(column)', () => {
  test('marks the rows where the column passes a round value', () => {
    const column = Array.from({ length: 101 }, (_, i) => 20 + i);
    const { marks } = graduationsOf(column, 0, 300);
    expect(marks.map(({ label }) => label)).toEqual([
      '30',
      '40',
      '50',
      '60',
      '70',
      '80',
      '90',
      '100',
      '110',
      '120',
    ]);
    expect(marks[0]?.y).toBe(30);
  });

  test('works downward too, and thins its ticks', () => {
    const column = Array.from({ length: 1000 }, (_, i) => 1000 - i);
    const { marks, ticks } = graduationsOf(column, 0, 200);
    expect(marks.slice(0, 2).map(({ label }) => label)).toEqual(['1000', '800']);
    expect(ticks.length).toBeLessThanOrEqual(101);
  });

  test('has no marks where every row is alike', () => {
    expect(graduationsOf([5, 5, 5], 0, 100).marks).toEqual([]);
  });
});

test('firstRowAt(y) centres the window on the pointer and stops at the ends', () => {
  expect(firstRowAt(50, 101, 11, 0, 100)).toBe(45);
  expect(firstRowAt(0, 101, 11, 0, 100)).toBe(0);
  expect(firstRowAt(100, 101, 11, 0, 100)).toBe(90);
  expect(firstRowAt(50, 5, 11, 0, 100)).toBe(0);
});
