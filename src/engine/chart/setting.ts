import { type Expression, evaluate, subtract } from './expression';

/** What the formulas of one beam are read with: the symbols' values, its EI, and its length to tell places apart. */
export type Setting = { value: (name: string) => number; ei: Expression; length: number };

/** −1, 0 or 1 as a is before, at or beyond b; places within 1e-10 of the length are one. */
export function compare(a: Expression, b: Expression, { value, length }: Setting): number {
  const difference = evaluate(subtract(a, b), value);
  return Math.abs(difference) <= 1e-10 * length ? 0 : Math.sign(difference);
}
