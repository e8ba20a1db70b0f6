import type { Operation, Tree } from './tree';

export type Scalar = number | string | boolean;

/** Values by symbol; a list of rows is a list of scopes, one for each row. A plain Map will do. */
export type Scope = { get(symbol: string): number | string | readonly Scope[] | undefined };

/** A tree that was never checked: an unknown symbol, or text where a number belongs. Checked templates never throw it. */
export class BrokenExpression extends Error {
  constructor(message: string) {
    super(message);
    this.name = 'BrokenExpression';
  }
}

/**
 * Two numbers count as equal in <= and >= within this share of the larger: a = 6.3 m satisfies a <= 0.9*L at
 * L = 7 m, whatever the last bit of the product. It is some hundred times the rounding of one operation.
 */
const SAME = 1e-13;

const notAbove = (a: number, b: number): boolean => a - b <= SAME * Math.max(Math.abs(a), Math.abs(b));

type Numbers = Exclude<Operation, '==' | '!=' | 'and' | 'or' | 'not' | 'if' | 'sum' | 'count' | 'text'>;

const NUMERIC: Readonly<Record<Numbers, (a: number, b: number) => Scalar>> = {
  '+': (a, b) => a + b,
  '-': (a, b) => a - b,
  '*': (a, b) => a * b,
  '/': (a, b) => a / b,
  '^': (a, b) => a ** b,
  neg: (a) => -a,
  '<': (a, b) => !notAbove(b, a),
  '<=': (a, b) => notAbove(a, b),
  '>': (a, b) => !notAbove(a, b),
  '>=': (a, b) => notAbove(b, a),
  min: Math.min,
  max: Math.max,
  abs: Math.abs,
  sqrt: Math.sqrt,
  sin: Math.sin,
  cos: Math.cos,
  tan: Math.tan,
};

const isNumeric = (operation: Operation): operation is Numbers => Object.hasOwn(NUMERIC, operation);

/**
 * Value of a checked expression, SI. A number that is not finite (a division by zero) is returned as it is: the
 * caller knows where it was written. Throws BrokenExpression for a tree that does not fit the scope.
 */
export function evaluateExpression(tree: Tree, scope: Scope): Scalar {
  if (typeof tree === 'number') return tree;
  if (typeof tree === 'string') return symbolValue(tree, scope);
  const [operation, first = 0, second = 0, third = 0] = tree;
  if (operation === 'text') return String(first);
  if (operation === 'sum')
    return rowsOf(first, scope).reduce((sum, row) => sum + evaluateNumber(second, within(row, scope)), 0);
  if (operation === 'count') return rowsOf(first, scope).length;
  if (operation === 'if') return evaluateExpression(evaluateTruth(first, scope) ? second : third, scope);
  if (operation === 'and') return evaluateTruth(first, scope) && evaluateTruth(second, scope);
  if (operation === 'or') return evaluateTruth(first, scope) || evaluateTruth(second, scope);
  if (operation === 'not') return !evaluateTruth(first, scope);
  if (operation === '==') return evaluateExpression(first, scope) === evaluateExpression(second, scope);
  if (operation === '!=') return evaluateExpression(first, scope) !== evaluateExpression(second, scope);
  if (!isNumeric(operation)) throw new BrokenExpression(`No operation ${String(operation)}`);
  return numeric(operation, tree, scope);
}

function numeric(operation: Numbers, tree: Exclude<Tree, number | string>, scope: Scope): Scalar {
  const [, ...parts] = tree;
  if (operation === 'min' || operation === 'max')
    return Math[operation](...parts.map((part) => evaluateNumber(part, scope)));
  const [first = 0, second = 0] = parts;
  return NUMERIC[operation](evaluateNumber(first, scope), evaluateNumber(second, scope));
}

/** Value of an expression that is known to be a number. */
export function evaluateNumber(tree: Tree, scope: Scope): number {
  const value = evaluateExpression(tree, scope);
  if (typeof value === 'number') return value;
  throw new BrokenExpression(`${JSON.stringify(tree)} is not a number`);
}

/** Value of an expression that is known to be a condition. */
export function evaluateTruth(tree: Tree, scope: Scope): boolean {
  const value = evaluateExpression(tree, scope);
  if (typeof value === 'boolean') return value;
  throw new BrokenExpression(`${JSON.stringify(tree)} is not a condition`);
}

/** A row's columns before everything else that is known. */
export const within = (row: Scope, scope: Scope): Scope => ({
  get: (symbol) => row.get(symbol) ?? scope.get(symbol),
});

function symbolValue(symbol: string, scope: Scope): number | string {
  const value = scope.get(symbol);
  if (typeof value === 'number' || typeof value === 'string') return value;
  throw new BrokenExpression(`${symbol} has no single value`);
}

/** The rows of a list parameter by its symbol. */
export function rowsOf(symbol: Tree, scope: Scope): readonly Scope[] {
  const value = typeof symbol === 'string' ? scope.get(symbol) : undefined;
  if (Array.isArray(value)) return value;
  throw new BrokenExpression(`${JSON.stringify(symbol)} is no list of rows`);
}
