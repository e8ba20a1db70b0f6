import { describe, expect, test } from 'vitest';
import type { Point } from './curve';
import { hatchOf, rectangle } from './hatch';

const lines = (path: string): number[][] =>
  path
    .split('M')
    .slice(1)
    .map((line) => line.split(/[L ]/).map(Number));

describe('hatchOf(polygon, angle, pitch)', () => {
  test('fills a rectangle with vertical lines at the pitch', () => {
    const found = lines(hatchOf(rectangle(1, 10, 20, 8), 90, 5));
    expect(found.map(([x]) => Math.round(x ?? 0)).sort((a, b) => a - b)).toEqual([5, 10, 15, 20]);
    for (const [, y0 = 0, , y1 = 0] of found) expect([Math.min(y0, y1), Math.max(y0, y1)]).toEqual([10, 18]);
  });

  test('stays inside the area between a curve and its baseline, on both sides', () => {
    // A diagram that crosses its baseline y = 0 at x = 50: the outline crosses itself there.
    const area: Point[] = [
      [0, 0],
      [0, 20],
      [100, -20],
      [100, 0],
    ];
    for (const [x0 = 0, y0 = 0, x1 = 0, y1 = 0] of lines(hatchOf(area, -45, 6))) {
      const [x, y] = [(x0 + x1) / 2, (y0 + y1) / 2];
      const curve = 20 - 0.4 * x;
      expect(y).toBeGreaterThan(Math.min(0, curve) - 0.2);
      expect(y).toBeLessThan(Math.max(0, curve) + 0.2);
    }
  });

  test('rises to the right at −45°', () => {
    for (const [x0 = 0, y0 = 0, x1 = 0, y1 = 0] of lines(hatchOf(rectangle(0, 0, 30, 30), -45, 6))) {
      expect((y1 - y0) / (x1 - x0)).toBeCloseTo(-1, 1);
    }
  });

  test('draws nothing in an area of no size', () => {
    expect(
      hatchOf(
        [
          [0, 5],
          [10, 5],
        ],
        90,
        5,
      ),
    ).toBe('');
  });
});
