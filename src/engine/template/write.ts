import type { Operation, Tree } from './tree';

const INFIX: Partial<Record<Operation, number>> = {
  or: 1,
  and: 2,
  '==': 3,
  '!=': 3,
  '<': 3,
  '<=': 3,
  '>': 3,
  '>=': 3,
  '+': 4,
  '-': 4,
  '*': 5,
  '/': 5,
  '^': 7,
};
const PREFIX: Partial<Record<Operation, string>> = { neg: '-', not: 'not ' };
const BINDS_PREFIX = 6;
const TIGHTEST_SUM = 4;

/** The tree as text for a message: "w*L^2/8", with the fewest brackets that keep its meaning. */
export function writeExpression(tree: Tree, tightness = 0): string {
  if (typeof tree === 'number' && tree < 0 && tightness > TIGHTEST_SUM) return `(${tree})`;
  if (typeof tree === 'number' || typeof tree === 'string') return String(tree);
  const [operation, ...parts] = tree;
  const [first = '', second = '', third = ''] = parts;
  const level = INFIX[operation];
  if (level !== undefined) {
    const sign = level < 5 ? ` ${operation} ` : operation;
    const text =
      writeExpression(first, operation === '^' ? level + 1 : level) +
      sign +
      writeExpression(second, level + 1);
    return level < tightness ? `(${text})` : text;
  }
  const prefix = PREFIX[operation];
  if (prefix) {
    const text = prefix + writeExpression(first, BINDS_PREFIX);
    return tightness > TIGHTEST_SUM ? `(${text})` : text;
  }
  if (operation === 'text') return `"${String(first)}"`;
  if (operation === 'if')
    return `(${writeExpression(first)} ? ${writeExpression(second)} : ${writeExpression(third)})`;
  return `${operation}(${parts.map((part) => writeExpression(part)).join(', ')})`;
}
