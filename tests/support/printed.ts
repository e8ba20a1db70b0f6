import { expect } from 'vitest';
import { readPrinted } from './printed-value';

/** The value agrees with the printed text. */
export function expectPrinted(value: number, printed: string, units = 0.5): void {
  const { want, tolerance } = readPrinted(printed, units);
  expect(Number.isFinite(want), `"${printed}" is a printed number`).toBe(true);
  expect(Math.abs(value - want), `${value} is printed ${printed}`).toBeLessThanOrEqual(tolerance);
}
