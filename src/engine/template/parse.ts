/**
 * Text to tree. The server's entry of this module: it alone loads the maths library, and only its parser; the
 * browser gets trees. What the parser reads is walked over a whitelist, so that nothing else can ever be evaluated.
 */
import {
  isConditionalNode,
  isConstantNode,
  isFunctionNode,
  isOperatorNode,
  isParenthesisNode,
  isRelationalNode,
  isSymbolNode,
  type MathNode,
  parse,
} from 'mathjs/number';
import {
  isSymbol,
  MOST_DEPTH,
  MOST_NODES,
  NAMED_VALUE,
  OPERATIONS,
  type Operation,
  sizeOf,
  type Tree,
} from './tree';

type ParseCode =
  | 'empty'
  | 'too_long'
  | 'too_deep'
  | 'bad_character'
  | 'syntax'
  | 'not_allowed'
  | 'not_finite';
type ParseFault = { ok: false; code: ParseCode; message: string; at: number };
export type Parsing = { ok: true; tree: Tree } | ParseFault;

const LONGEST = 300;

/** The maths library's names of the operators that are allowed, and ours. */
const OPERATORS: Readonly<Record<string, Operation>> = {
  add: '+',
  subtract: '-',
  multiply: '*',
  divide: '/',
  pow: '^',
  unaryMinus: 'neg',
  smaller: '<',
  smallerEq: '<=',
  larger: '>',
  largerEq: '>=',
  equal: '==',
  unequal: '!=',
  and: 'and',
  or: 'or',
  not: 'not',
};

const FUNCTIONS = ['min', 'max', 'abs', 'sqrt', 'sin', 'cos', 'tan', 'sum', 'count'] as const;
const isFunction = (name: string): name is (typeof FUNCTIONS)[number] =>
  FUNCTIONS.some((known) => known === name);

/** Carries a refusal out of the recursive walk; never leaves this file. */
class Refusal extends Error {
  constructor(
    readonly code: ParseCode,
    message: string,
    readonly token = '',
  ) {
    super(message);
  }
}

/**
 * Reads an expression: numbers, symbols, + − * / ^, comparisons (also chained, 0 < a <= L), and, or, not,
 * condition ? value : value, named values in quotes, and the functions min, max, abs, sqrt, sin, cos, tan, sum
 * (rows, term) and count (rows). Anything else is refused with the place, before it is looked at any further.
 */
export function parseExpression(text: string): Parsing {
  const early = refuseText(text);
  if (early) return early;
  try {
    const tree = walk(parse(text), 0);
    const size = sizeOf(tree);
    if (size > MOST_NODES) throw new Refusal('too_long', `Split it: ${size} parts, at most ${MOST_NODES}.`);
    return { ok: true, tree };
  } catch (error) {
    if (error instanceof Refusal)
      return fault(error.code, error.message, Math.max(0, text.indexOf(error.token)));
    if (error instanceof SyntaxError) return syntax(error, text);
    throw error;
  }
}

const fault = (code: ParseCode, message: string, at: number): ParseFault => ({
  ok: false,
  code,
  message,
  at,
});

/** What can be seen without parsing: length, characters, and nesting (which would recurse in the parser). */
function refuseText(text: string): ParseFault | undefined {
  if (text.trim() === '') return fault('empty', 'Empty. Write an expression such as L + a.', 0);
  if (text.length > LONGEST)
    return fault('too_long', `Too long. Use at most ${LONGEST} characters.`, LONGEST);
  const stranger = text.search(/[^A-Za-z0-9_ .,+\-*/^()<>=!?:"]/);
  if (stranger >= 0)
    return fault(
      'bad_character',
      `“${text.charAt(stranger)}” has no place in an expression. Remove it.`,
      stranger,
    );
  let depth = 0;
  for (let at = 0; at < text.length; at++) {
    if (text[at] === '(') depth++;
    if (text[at] === ')') depth--;
    if (depth > MOST_DEPTH)
      return fault('too_deep', `Nested too deeply. Use at most ${MOST_DEPTH} levels of brackets.`, at);
  }
  return undefined;
}

function syntax(error: SyntaxError, text: string): ParseFault {
  const char = 'char' in error && typeof error.char === 'number' ? error.char - 1 : 0;
  const at = Math.min(Math.max(0, char), text.length);
  const near = text.slice(at, at + 8).trim();
  return fault(
    'syntax',
    near ? `This does not read on at “${near}”. Correct it there.` : 'The end is missing.',
    at,
  );
}

/** The node as a tree; every kind that is not named here (assignment, index, range, object …) is refused. */
function walk(node: MathNode, depth: number): Tree {
  if (depth > MOST_DEPTH)
    throw new Refusal('too_deep', `Nested too deeply. Use at most ${MOST_DEPTH} levels.`);
  const down = (part: MathNode): Tree => walk(part, depth + 1);
  if (isConstantNode(node)) return constant(node.value);
  if (isSymbolNode(node)) return symbol(node.name);
  if (isParenthesisNode(node)) return down(node.content);
  if (isConditionalNode(node)) return ['if', down(node.condition), down(node.trueExpr), down(node.falseExpr)];
  if (isRelationalNode(node)) return chain(node.conditionals, node.params.map(down));
  if (isOperatorNode(node)) return operator(node.fn, node.op, node.implicit, node.args.map(down));
  if (isFunctionNode(node)) return call(node.fn.name, node.args.map(down));
  throw new Refusal(
    'not_allowed',
    'Use only numbers, symbols, + - * / ^, comparisons and the listed functions.',
  );
}

function constant(value: unknown): Tree {
  if (typeof value === 'string') {
    if (NAMED_VALUE.test(value)) return ['text', value];
    throw new Refusal('not_allowed', 'Text in quotes is the name of a choice, such as "both".', value);
  }
  if (typeof value !== 'number')
    throw new Refusal('not_allowed', 'Only numbers may stand here.', String(value));
  if (Number.isFinite(value)) return value;
  throw new Refusal('not_finite', 'This number is too large to calculate with. Write a smaller one.');
}

function symbol(name: string): Tree {
  if (!isSymbol(name))
    throw new Refusal(
      'not_allowed',
      `“${name}” is no symbol. Use a letter, then letters and digits, 8 at most.`,
      name,
    );
  return name;
}

function operator(fn: string, sign: string, implicit: boolean, parts: Tree[]): Tree {
  const [first, second] = parts;
  if (implicit) throw new Refusal('not_allowed', 'Write the multiplication sign, as in 2*L.');
  if (fn === 'unaryPlus' && first !== undefined) return first;
  if (fn === 'unaryMinus' && typeof first === 'number') return -first;
  const operation = Object.hasOwn(OPERATORS, fn) ? OPERATORS[fn] : undefined;
  if (!operation || first === undefined)
    throw new Refusal('not_allowed', `“${sign}” is not allowed here.`, sign);
  return second === undefined ? [operation, first] : [operation, first, second];
}

/** 0 < a <= L is 0 < a and a <= L. */
function chain(conditions: string[], parts: Tree[]): Tree {
  const links = conditions.map((fn, index) => operator(fn, fn, false, parts.slice(index, index + 2)));
  return links.reduce((all, link) => ['and', all, link]);
}

function call(name: string, parts: Tree[]): Tree {
  if (!isFunction(name))
    throw new Refusal('not_allowed', `There is no function “${name}”. Use ${FUNCTIONS.join(', ')}.`, name);
  const [least, most] = OPERATIONS[name];
  if (parts.length < least || parts.length > most)
    throw new Refusal(
      'not_allowed',
      `“${name}” takes ${least === most ? least : `${least} to ${most}`} values.`,
      name,
    );
  if ((name === 'sum' || name === 'count') && typeof parts[0] !== 'string')
    throw new Refusal('not_allowed', `“${name}” takes the symbol of a list of rows first.`, name);
  return [name, ...parts];
}
