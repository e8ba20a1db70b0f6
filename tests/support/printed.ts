import { expect } from 'vitest';

/**
 * The value agrees with the printed text: to half a unit of its last printed digit (or as many as the table is known
 * to be off by), or, for a fraction, exactly but for rounding.
 */
export function expectPrinted(value: number, printed: string, units = 0.5): void {
  const [top = '', bottom] = printed.split('/');
  const want = bottom === undefined ? Number(top) : Number(top) / Number(bottom);
  const decimals = top.split('.')[1]?.length ?? 0;
  const whole = bottom !== undefined || (decimals === 0 && Math.abs(want) < 10);
  const tolerance = whole ? 1e-11 * Math.abs(want) : units * 10 ** -decimals;
  expect(Number.isFinite(want), `"${printed}" is a printed number`).toBe(true);
  expect(Math.abs(value - want), `${value} is printed ${printed}`).toBeLessThanOrEqual(tolerance);
}
