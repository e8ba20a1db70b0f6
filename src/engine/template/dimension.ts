import {
  DIMENSIONS,
  type Dimension,
  divideDimensions,
  equalDimensions,
  isDimensionless,
  multiplyDimensions,
  nameDimension,
  raiseDimension,
} from '../quantity/index';
import { evaluateNumber } from './evaluate';
import { type Operation, symbolsOf, type Tree } from './tree';
import { writeExpression } from './write';

/**
 * What an expression yields. `zero` is the constant 0, which fits every dimension; `text` is a choice with its
 * named values, or one of them written out.
 */
export type Kind =
  | { is: 'number'; dimension: Dimension }
  | { is: 'zero' }
  | { is: 'truth' }
  | { is: 'text'; values: readonly string[] }
  | { is: 'rows'; columns: Kinds };

/** Kinds by symbol. */
export type Kinds = ReadonlyMap<string, Kind>;
export type KindReading = { ok: true; kind: Kind } | { ok: false; message: string };

/** Carries what is wrong out of the recursion; never leaves this file. */
class Unsound extends Error {}

/**
 * Dimension of an expression, or what is wrong with it in words: "L + w is a length plus a force per length".
 * Also refuses unknown symbols, text used as a number, conditions used as values and unknown named values.
 */
export function dimensionOf(tree: Tree, kinds: Kinds): KindReading {
  try {
    return { ok: true, kind: kindOf(tree, kinds) };
  } catch (error) {
    if (error instanceof Unsound) return { ok: false, message: error.message };
    throw error;
  }
}

export const ofDimension = (dimension: Dimension): Kind => ({ is: 'number', dimension });
const RATIO = ofDimension(DIMENSIONS.ratio);
const TRUTH: Kind = { is: 'truth' };

/** A kind in words: "a length", "a choice", "a condition". */
export function nameKind(kind: Kind): string {
  switch (kind.is) {
    case 'number':
      return nameDimension(kind.dimension);
    case 'zero':
      return 'zero';
    case 'truth':
      return 'a condition';
    case 'text':
      return 'a choice';
    case 'rows':
      return 'a list of rows';
  }
}

function kindOf(tree: Tree, kinds: Kinds): Kind {
  if (typeof tree === 'number') return tree === 0 ? { is: 'zero' } : RATIO;
  if (typeof tree === 'string') {
    const kind = kinds.get(tree);
    if (kind) return kind;
    throw new Unsound(`There is no “${tree}”. Use ${[...kinds.keys()].join(', ') || 'a number'}.`);
  }
  const [operation, ...parts] = tree;
  if (operation === 'text') return { is: 'text', values: [String(parts[0])] };
  if (operation === 'sum' || operation === 'count') return overRows(operation, parts, kinds);
  return READERS[operation](
    tree,
    parts.map((part) => kindOf(part, kinds)),
    parts,
  );
}

type Reader = (tree: Tree, kinds: readonly Kind[], parts: readonly Tree[]) => Kind;

const READERS: Readonly<Record<Exclude<Operation, 'text' | 'sum' | 'count'>, Reader>> = {
  '+': (tree, kinds) => common(tree, kinds, 'plus'),
  '-': (tree, kinds) => common(tree, kinds, 'minus'),
  '*': (tree, kinds) => product(tree, kinds, multiplyDimensions),
  '/': (tree, kinds) => product(tree, kinds, divideDimensions),
  '^': power,
  neg: (tree, kinds) => common(tree, kinds, ''),
  '<': compare,
  '<=': compare,
  '>': compare,
  '>=': compare,
  '==': compare,
  '!=': compare,
  and: logic,
  or: logic,
  not: logic,
  if: (tree, [condition, ...branches]) => {
    if (condition?.is !== 'truth')
      throw new Unsound(`The part before “?” in ${writeExpression(tree)} is no condition.`);
    return common(tree, branches, 'or');
  },
  min: (tree, kinds) => common(tree, kinds, 'beside'),
  max: (tree, kinds) => common(tree, kinds, 'beside'),
  abs: (tree, kinds) => common(tree, kinds, ''),
  sqrt: (tree, [kind]) =>
    kind?.is === 'zero' ? kind : ofDimension(raiseDimension(numberOf(tree, kind), 0.5)),
  sin: angle,
  cos: angle,
  tan: angle,
};

function numberOf(tree: Tree, kind: Kind | undefined): Dimension {
  if (kind?.is === 'number') return kind.dimension;
  if (kind?.is === 'zero') return DIMENSIONS.ratio;
  throw new Unsound(
    `${writeExpression(tree)} calculates with ${kind ? nameKind(kind) : 'nothing'}. Use numbers.`,
  );
}

/** The one dimension that all the parts share; a constant 0 fits any. */
function common(tree: Tree, kinds: readonly Kind[], joint: string): Kind {
  const [first, ...rest] = kinds.filter((kind) => kind.is !== 'zero');
  if (!first) return { is: 'zero' };
  const dimension = numberOf(tree, first);
  for (const kind of rest)
    if (!equalDimensions(dimension, numberOf(tree, kind)))
      throw new Unsound(`${writeExpression(tree)} is ${nameKind(first)} ${joint} ${nameKind(kind)}.`);
  return first;
}

function product(
  tree: Tree,
  kinds: readonly Kind[],
  combine: (a: Dimension, b: Dimension) => Dimension,
): Kind {
  const [a, b] = kinds;
  if (b?.is === 'zero' && combine === divideDimensions)
    throw new Unsound(`${writeExpression(tree)} divides by zero.`);
  const dimension = combine(numberOf(tree, a), numberOf(tree, b));
  return a?.is === 'zero' || b?.is === 'zero' ? { is: 'zero' } : ofDimension(dimension);
}

function power(tree: Tree, [base, exponent]: readonly Kind[], [, written = 0]: readonly Tree[]): Kind {
  const dimension = numberOf(tree, base);
  if (!isDimensionless(numberOf(tree, exponent)))
    throw new Unsound(
      `${writeExpression(tree)} has ${exponent ? nameKind(exponent) : 'nothing'} as its exponent. Use a number.`,
    );
  if (isDimensionless(dimension)) return RATIO;
  if (symbolsOf(written).size > 0)
    throw new Unsound(
      `${writeExpression(tree)} raises ${nameDimension(dimension)} to a varying power. Use a fixed number.`,
    );
  return ofDimension(raiseDimension(dimension, evaluateNumber(written, new Map())));
}

function compare(tree: Tree, kinds: readonly Kind[]): Kind {
  const [a, b] = kinds;
  if (a?.is !== 'text' || b?.is !== 'text') {
    common(tree, kinds, 'compared with');
    return TRUTH;
  }
  const [one, all] = a.values.length < b.values.length ? [a.values, b.values] : [b.values, a.values];
  const stranger = one.find((value) => !all.includes(value));
  if (stranger !== undefined) throw new Unsound(`“${stranger}” is no value here. Use ${all.join(', ')}.`);
  return TRUTH;
}

function logic(tree: Tree, kinds: readonly Kind[]): Kind {
  const stranger = kinds.find((kind) => kind.is !== 'truth');
  if (stranger)
    throw new Unsound(`${writeExpression(tree)} takes conditions, and one part is ${nameKind(stranger)}.`);
  return TRUTH;
}

function angle(tree: Tree, [kind]: readonly Kind[]): Kind {
  if (!isDimensionless(numberOf(tree, kind)))
    throw new Unsound(
      `${writeExpression(tree)} takes an angle, and is given ${kind ? nameKind(kind) : 'nothing'}.`,
    );
  return RATIO;
}

function overRows(operation: 'sum' | 'count', [symbol, term]: readonly Tree[], kinds: Kinds): Kind {
  const rows = typeof symbol === 'string' ? kinds.get(symbol) : undefined;
  if (rows?.is !== 'rows') throw new Unsound(`“${String(symbol)}” in ${operation} is no list of rows.`);
  return operation === 'count' || term === undefined
    ? RATIO
    : kindOf(term, new Map([...kinds, ...rows.columns]));
}
