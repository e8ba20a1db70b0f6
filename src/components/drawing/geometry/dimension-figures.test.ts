import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type DimensionWish, placeDimensionFigures, placeLetters } from './dimension-figures';

const bounds = { left: 0, right: 390 };
const wish = (x1: number, x2: number, width: number, kept = true): DimensionWish => ({ x1, x2, width, kept });

describe('placeDimensionFigures(wishes, bounds)', () => {
  test('centres a figure over its line where it fits between the ticks', () => {
    expect(placeDimensionFigures([wish(20, 120, 60)], bounds)).toEqual([{ wish: 0, x: 70, leader: null }]);
  });

  test('puts the figure of a short dimension outside, with a leader from its middle', () => {
    expect(placeDimensionFigures([wish(100, 110, 60), wish(110, 300, 60)], bounds)).toEqual([
      { wish: 0, x: 105, leader: { from: 105, to: 105 } },
      { wish: 1, x: 205, leader: null },
    ]);
  });

  test('puts short neighbours side by side about their middle', () => {
    const [a, b] = placeDimensionFigures([wish(100, 110, 52), wish(110, 120, 52)], bounds);
    expect([a!.x, b!.x]).toEqual([80, 140]);
    // The leaders end inside their own figures.
    expect(a!.leader).toEqual({ from: 105, to: 100 });
    expect(b!.leader).toEqual({ from: 115, to: 120 });
  });

  test('keeps a figure on the sheet', () => {
    expect(placeDimensionFigures([wish(2, 8, 60)], bounds)[0]!.x).toBe(30);
    expect(placeDimensionFigures([wish(380, 388, 60)], bounds)[0]!.x).toBe(360);
  });

  test('leaves out what has no name before what has one', () => {
    const wishes = Array.from({ length: 8 }, (_, i) => wish(100 + 5 * i, 105 + 5 * i, 60, i === 3));
    const places = placeDimensionFigures(wishes, { left: 90, right: 155 });
    expect(places.map((place) => place.wish)).toEqual([3]);
  });

  test('prints no figure over another or off the sheet, and crosses no leaders', () => {
    const dimension = fc.record({
      size: fc.integer({ min: 1, max: 90 }),
      width: fc.integer({ min: 20, max: 70 }),
      kept: fc.boolean(),
    });
    fc.assert(
      fc.property(fc.array(dimension, { minLength: 1, maxLength: 40 }), (parts) => {
        let x = 10;
        const wishes = parts.map(({ size, width, kept }) => {
          x += size;
          return wish(x - size, x, width, kept);
        });
        const right = Math.max(390, x + 10);
        const places = placeDimensionFigures(wishes, { left: 0, right });
        const outside = places.filter(({ leader }) => leader);
        for (const { wish: i, x: at } of places) {
          expect(at - wishes[i]!.width / 2).toBeGreaterThanOrEqual(-1e-9);
          expect(at + wishes[i]!.width / 2).toBeLessThanOrEqual(right + 1e-9);
        }
        outside.slice(1).forEach((place, i) => {
          const before = outside[i]!;
          const room = place.x - before.x - (wishes[place.wish]!.width + wishes[before.wish]!.width) / 2;
          expect(room).toBeGreaterThan(7.9);
          expect(place.leader!.from).toBeGreaterThan(before.leader!.from);
          expect(place.leader!.to).toBeGreaterThan(before.leader!.to);
        });
        for (const { wish: i, x: at, leader } of places) {
          const { x1, x2, width } = wishes[i]!;
          if (!leader) expect(at).toBeCloseTo((x1 + x2) / 2, 9);
          else expect(width + 6).toBeGreaterThan(x2 - x1);
        }
      }),
    );
  });
});

describe('placeLetters(ticks, width, right)', () => {
  test('stands over the line where there is room, else beyond a tick, on the sheet', () => {
    expect(placeLetters([20, 60], 14, 300)).toEqual({ x: 40, anchor: 'middle', covers: [20, 60] });
    expect(placeLetters([20, 30], 14, 300)).toEqual({ x: 37, anchor: 'start', covers: [20, 51] });
    expect(placeLetters([280, 290], 14, 300)).toEqual({ x: 273, anchor: 'end', covers: [259, 290] });
  });
});
