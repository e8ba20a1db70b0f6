/** Operations of an expression besides constants and symbols. Each takes the number of arguments given here. */
export const OPERATIONS = {
  '+': [2, 2],
  '-': [2, 2],
  '*': [2, 2],
  '/': [2, 2],
  '^': [2, 2],
  neg: [1, 1],
  '<': [2, 2],
  '<=': [2, 2],
  '>': [2, 2],
  '>=': [2, 2],
  '==': [2, 2],
  '!=': [2, 2],
  and: [2, 2],
  or: [2, 2],
  not: [1, 1],
  /** Condition, value if so, value if not. */
  if: [3, 3],
  min: [1, 8],
  max: [1, 8],
  abs: [1, 1],
  sqrt: [1, 1],
  sin: [1, 1],
  cos: [1, 1],
  tan: [1, 1],
  /** Rows parameter, then what to add up, written in the columns of a row. */
  sum: [2, 2],
  /** Number of rows of a rows parameter. */
  count: [1, 1],
  /** A named value of a choice: the one argument is its name, not a symbol. */
  text: [1, 1],
} as const satisfies Record<string, readonly [least: number, most: number]>;

export type Operation = keyof typeof OPERATIONS;

/** An expression as it is stored: a constant, a symbol, or an operation and its arguments. */
export type Tree = number | string | readonly [Operation, ...Tree[]];

/** Text as the author typed it, and the tree that is evaluated. */
export type Expression = { text: string; tree: Tree };

const isOperation = (name: unknown): name is Operation =>
  typeof name === 'string' && Object.hasOwn(OPERATIONS, name);

/** The depth and size beyond which an expression is refused: far above any formula, far below any trouble. */
export const MOST_DEPTH = 32;
export const MOST_NODES = 300;

/** A parameter, derived value or result: a letter, then letters and digits; no function and nothing built in. */
export const isSymbol = (name: string): boolean =>
  /^[A-Za-z][A-Za-z0-9]{0,7}$/.test(name) && !isOperation(name) && !(name in {});

/** Whether a stored value is a tree: right operations, right number of arguments, no deeper than allowed. */
export function isTree(value: unknown, depth = 0): value is Tree {
  if (typeof value === 'number') return Number.isFinite(value);
  if (typeof value === 'string') return isSymbol(value);
  if (!Array.isArray(value) || depth >= MOST_DEPTH) return false;
  const [name, ...rest] = value;
  if (!isOperation(name)) return false;
  const [least, most] = OPERATIONS[name];
  if (rest.length < least || rest.length > most) return false;
  if (name === 'text') return typeof rest[0] === 'string' && NAMED_VALUE.test(rest[0]);
  return rest.every((part) => isTree(part, depth + 1));
}

/** A named value of a choice. */
export const NAMED_VALUE = /^[a-z][a-z0-9-]{0,39}$/;

/** Every symbol that an expression reads, the columns inside a sum included. */
export function symbolsOf(tree: Tree, into = new Set<string>()): Set<string> {
  if (typeof tree === 'string') into.add(tree);
  else if (typeof tree !== 'number') {
    const [operation, ...parts] = tree;
    if (operation !== 'text') for (const part of parts) symbolsOf(part, into);
  }
  return into;
}

/** How many constants, symbols and operations there are. */
export function sizeOf(tree: Tree): number {
  if (typeof tree !== 'object') return 1;
  const [, ...parts] = tree;
  return parts.reduce<number>((size, part) => size + sizeOf(part), 1);
}
