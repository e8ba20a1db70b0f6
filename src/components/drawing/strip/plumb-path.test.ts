import { describe, expect, test } from 'vitest';
import { plumbPath } from './plumb-path';

const text = (y: number, x = 100) => ({ x, y, text: '17.4 kNm', anchor: 'middle' as const });

describe('the plumb line', () => {
  test('runs through where no text stands', () => {
    expect(plumbPath(100, [[20, 300]], [text(80, 400)])).toBe('M100 20V300');
  });

  test('breaks at a text across it, and goes on below', () => {
    expect(plumbPath(100, [[20, 300]], [text(80)])).toBe('M100 20V67M100 85V300');
  });

  test('breaks once for texts that lie over each other', () => {
    expect(plumbPath(100, [[20, 300]], [text(90), text(80)])).toBe('M100 20V67M100 95V300');
  });

  test('keeps its spans apart', () => {
    const spans: [number, number][] = [
      [20, 100],
      [130, 300],
    ];
    expect(plumbPath(100, spans, [text(100)])).toBe('M100 20V87M100 130V300');
  });
});
