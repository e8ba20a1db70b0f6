import { describe, expect, test } from 'vitest';
import { forceArrow, lift, loadArrow, toScreen, turnArrow } from './signs';

describe('signs of screens and sheets', () => {
  test("shear keeps the engine's sign and is drawn up", () => {
    expect([toScreen('shear', 5), lift('shear')]).toEqual([5, 1]);
  });

  test('a sagging moment is positive and drawn below, on the tension side', () => {
    expect([toScreen('moment', 5), lift('moment')]).toEqual([5, -1]);
  });

  test('a practice may draw moments on the compression side', () => {
    expect(lift('moment', 'compression')).toBe(1);
  });

  test('an anticlockwise slope is shown negative, and a clockwise one is drawn down', () => {
    expect([toScreen('slope', 2), Math.sign(lift('slope') * -2)]).toEqual([-2, -1]);
  });

  test('a deflection downward is shown positive and drawn down', () => {
    expect([toScreen('deflection', -0.008), Math.sign(lift('deflection') * -0.008)]).toEqual([0.008, -1]);
  });

  test('arrows point the way things act', () => {
    expect(forceArrow(-3)).toEqual({ points: 'down', size: 3 });
    expect(loadArrow(3)).toEqual({ points: 'down', size: 3 });
    expect(turnArrow(-4)).toEqual({ turns: 'clockwise', size: 4 });
  });
});
