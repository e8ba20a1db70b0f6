import { evaluateNumber, type Tree } from '../template/index';
import { propertyOf } from './section-property';
import type { Part, Root, Solution, Trace } from './types';

type Scope = ReadonlyMap<string, number>;

/**
 * What a number comes to from its parts alone, SI; a leaf from itself. Whatever a trace says must be so within rounding:
 * the engine's own tests ask it of every number.
 */
export function recompute({ value, how, parts }: Trace): number {
  const scope = scopeOf(parts);
  switch (how.kind) {
    case 'formula':
      return evaluateNumber(how.tree, scope);
    case 'solution':
      return solved(how, scope);
    case 'root':
      return rootOf(how, scope, value);
    case 'section':
      return propertyOf(how, scope);
    default:
      return value;
  }
}

const scopeOf = (parts: readonly Part[]): Scope =>
  new Map(parts.map(({ name, trace }) => [name, trace.value]));

/** Gauss with the largest pivot of each column. */
function solved({ of, matrix, right }: Solution, scope: Scope): number {
  const rows = matrix.map((row, i) => [
    ...row.map((name) => (name === null ? 0 : evaluateNumber(name, scope))),
    evaluateNumber(right[i] ?? 0, scope),
  ]);
  rows.forEach((_, k) => {
    const pivot = rows.slice(k).reduce((a, b) => (Math.abs(b[k]!) > Math.abs(a[k]!) ? b : a));
    rows[rows.indexOf(pivot)] = rows[k]!;
    rows[k] = pivot;
    rows.forEach((row, i) => {
      if (i === k) return;
      const times = row[k]! / pivot[k]!;
      for (let j = k; j < row.length; j++) row[j]! -= times * pivot[j]!;
    });
  });
  const row = rows[of]!;
  return row.at(-1)! / row[of]!;
}

const MOST_STEPS = 40;

/** Newton's method from where the root is said to be: it stays there if it is one. */
function rootOf({ from, polynomial }: Root, scope: Scope, value: number): number {
  const coefficients = polynomial.map((tree: Tree) => evaluateNumber(tree, scope));
  const start = evaluateNumber(from, scope);
  let s = value - start;
  for (let step = 0; step < MOST_STEPS; step++) {
    let [p, slope] = [0, 0];
    for (const c of coefficients.toReversed()) {
      slope = slope * s + p;
      p = p * s + c;
    }
    const next = slope === 0 ? s : s - p / slope;
    if (next === s) break;
    s = next;
  }
  return start + s;
}
