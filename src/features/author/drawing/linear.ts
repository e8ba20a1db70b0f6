/** Lengths that are sums of symbols, as most places on a beam are: L1 + L2/2. */
import type { Tree } from '@/engine/template';

/** Coefficients by symbol, in the order in which they are written; none of them is zero. */
export type Linear = ReadonlyMap<string, number>;

/** A sum of symbols times numbers; null for any other expression. Zero is the empty sum. */
export function linearOf(tree: Tree): Linear | null {
  if (tree === 0) return new Map();
  if (typeof tree === 'number') return null;
  if (typeof tree === 'string') return new Map([[tree, 1]]);
  const [operation, first = 0, second = 0] = tree;
  switch (operation) {
    case '+':
      return combined(linearOf(first), linearOf(second), 1);
    case '-':
      return combined(linearOf(first), linearOf(second), -1);
    case 'neg':
      return scaled(linearOf(first), -1);
    case '*':
      if (typeof first === 'number') return scaled(linearOf(second), first);
      return typeof second === 'number' ? scaled(linearOf(first), second) : null;
    case '/':
      return typeof second === 'number' && second !== 0 ? scaled(linearOf(first), 1 / second) : null;
    default:
      return null;
  }
}

/** Below this share of one a coefficient is what rounding left of zero. */
const NOTHING = 1e-12;

function combined(a: Linear | null, b: Linear | null, times: number): Linear | null {
  if (!a || !b) return null;
  const sum = new Map(a);
  for (const [symbol, coefficient] of b) sum.set(symbol, (sum.get(symbol) ?? 0) + times * coefficient);
  return withoutNothing(sum);
}

const scaled = (linear: Linear | null, times: number): Linear | null =>
  linear && withoutNothing(new Map([...linear].map(([symbol, part]) => [symbol, part * times])));

const withoutNothing = (linear: Linear): Linear =>
  new Map([...linear].filter(([, coefficient]) => Math.abs(coefficient) > NOTHING));

export const sum = (a: Linear, b: Linear): Linear => combined(a, b, 1) ?? new Map();

/** The place at this share of the way from a to b. */
export const along = (a: Linear, b: Linear, share: number): Linear =>
  sum(a, scaled(combined(b, a, -1), share) ?? new Map());

/** The expression as an author would write it: "L1 + L2/2"; "0" for the empty sum. */
export function linearText(linear: Linear): string {
  // A sum that begins with a minus is turned so that it does not.
  const terms = [...linear].sort(([, a], [, b]) => Number(a < 0) - Number(b < 0));
  const text = terms
    .map(([symbol, coefficient], index) => {
      const sign = coefficient < 0 ? '-' : index === 0 ? '' : '+';
      const space = index === 0 ? '' : ' ';
      return `${space}${sign}${sign === '' ? '' : space}${termText(symbol, Math.abs(coefficient))}`;
    })
    .join('');
  return text === '' ? '0' : text;
}

/** Thirds, quarters and the like are written as fractions. */
const LARGEST_DIVISOR = 12;

function termText(symbol: string, coefficient: number): string {
  for (let divisor = 1; divisor <= LARGEST_DIVISOR; divisor++) {
    const top = Math.round(coefficient * divisor);
    if (top === 0 || Math.abs(coefficient * divisor - top) > 1e-9) continue;
    return `${top === 1 ? '' : `${top}*`}${symbol}${divisor === 1 ? '' : `/${divisor}`}`;
  }
  return `${coefficient}*${symbol}`;
}
