import { describe, expect, test } from 'vitest';
import { axialScope } from './index';

describe('axialScope', () => {
  test('has Euler’s force of a pinned steel column', () => {
    // Gere and Goodno, Mechanics of Materials: W 8 × 28, E 29,000 ksi, I 21.7 in⁴, 25 ft: 69 kip (from memory)
    const inch = 0.0254;
    const ei = 29000e3 * 4.4482216 * 21.7 * inch ** 2;
    expect(axialScope(0, ei, 300 * inch).critical / 4448.2216).toBeCloseTo(69, 0);
  });

  test('is in scope up to a tenth of it, and not beyond', () => {
    const critical = Math.PI ** 2 * 5e6;
    expect(axialScope(0.0999 * critical, 5e6, 1)).toMatchObject({
      ratio: expect.closeTo(0.0999, 12),
      inScope: true,
    });
    expect(axialScope(0.1001 * critical, 5e6, 1)).toMatchObject({ inScope: false });
    expect(axialScope(0.4 * critical, 5e6, 0.5).ratio).toBeCloseTo(0.1, 12);
    expect(axialScope(0.05, 0.5, 1).critical).toBeCloseTo(Math.PI ** 2 / 2, 12);
  });

  test('is in scope under any tension', () => {
    expect(axialScope(-1e9, 5e6, 1)).toMatchObject({ ratio: 0, inScope: true });
  });

  test.each([
    [0, 1],
    [1, 0],
    [Number.NaN, 1],
  ])('throws for EI %s and a buckling length of %s', (ei, length) => {
    expect(() => axialScope(1, ei, length)).toThrow(RangeError);
  });
});
