import { describe, expect, test } from 'vitest';
import type { Point } from './curve';
import { type LabelWish, placeLabels } from './labels';

const bounds = { left: 0, right: 400, top: 0, bottom: 120 };
const flat: Point[] = [
  [0, 60],
  [400, 60],
];
const wish = (at: Point, rank: number, more: Partial<LabelWish> = {}): LabelWish => ({
  at,
  width: 80,
  rank,
  outside: -1,
  ...more,
});

describe('placeLabels(wishes)', () => {
  test('puts a label outside the curve first, centred over its point', () => {
    const [label] = placeLabels([wish([200, 60], 0)], { bounds, curves: [flat], baseline: 100 });
    expect(label).toMatchObject({ x: 200, anchor: 'middle', leader: null });
    expect(label?.y).toBeLessThan(60);
  });

  test('starts the label beside a point at the left edge, and ends it at the right edge', () => {
    const labels = placeLabels([wish([5, 60], 0), wish([395, 60], 1)], {
      bounds,
      curves: [flat],
      baseline: 100,
    });
    expect(labels.map(({ anchor }) => anchor)).toEqual(['start', 'end']);
  });

  test('goes inside where there is no room outside', () => {
    const high: Point[] = [
      [0, 6],
      [400, 6],
    ];
    const [label] = placeLabels([wish([200, 6], 0)], { bounds, curves: [high], baseline: 100 });
    expect(label).toMatchObject({ leader: null });
    expect(label?.y).toBeGreaterThan(6);
  });

  test('hangs a label of the baseline on a leader of at most 34 px', () => {
    const falling: Point[] = [
      [0, 0],
      [400, 120],
    ];
    const [label] = placeLabels([wish([200, 60], 3, { leaderFirst: true })], {
      bounds,
      curves: [falling],
      baseline: 60,
    });
    const [x, y] = label?.leader ?? [0, 0];
    expect(Math.hypot(x - 200, y - 60)).toBeLessThanOrEqual(34);
    expect(Math.hypot(x - 200, y - 60)).toBeGreaterThan(10);
  });

  test('drops the lesser of two that meet in every place', () => {
    const narrow = { left: 160, right: 245, top: 40, bottom: 62 };
    const labels = placeLabels([wish([201, 60], 1), wish([200, 60], 0)], {
      bounds: narrow,
      curves: [flat],
      baseline: 100,
    });
    expect(labels.map((label) => label.wish)).toEqual([1]);
  });

  test('keeps the governing one even where nothing is free', () => {
    const tight = { left: 0, right: 400, top: 50, bottom: 66 };
    const labels = placeLabels([wish([200, 60], 0), wish([100, 60], 1)], {
      bounds: tight,
      curves: [flat],
      baseline: 60,
    });
    expect(labels.map((label) => label.wish)).toEqual([0]);
  });

  test('never lets two labels meet', () => {
    const wishes = Array.from({ length: 12 }, (_, i) => wish([20 + i * 33, 60], i));
    const boxes = placeLabels(wishes, { bounds, curves: [flat], baseline: 100 }).map(({ x, y, anchor }) => {
      const left = anchor === 'start' ? x : anchor === 'end' ? x - 80 : x - 40;
      return { left, right: left + 80, top: y - 10, bottom: y + 3.5 };
    });
    boxes.forEach((a, i) => {
      for (const b of boxes.slice(i + 1)) {
        expect(a.right <= b.left || b.right <= a.left || a.bottom <= b.top || b.bottom <= a.top).toBe(true);
      }
    });
  });
});
