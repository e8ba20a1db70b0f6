import { relative } from 'node:path';
import ts from 'typescript';
import { ROOT } from './root';

/** One change of one file. `was` and `becomes` are the line that it is on, before and after, without its indent. */
export type Mutant = {
  /** From the root of the repository. */
  file: string;
  line: number;
  /** The function or method it is in; empty outside of any. */
  inside: string;
  was: string;
  becomes: string;
  /** The whole file, changed. */
  source: string;
};

type Edit = { start: number; end: number; text: string };

const OPPOSITE: Readonly<Partial<Record<ts.SyntaxKind, string>>> = {
  [ts.SyntaxKind.PlusToken]: '-',
  [ts.SyntaxKind.MinusToken]: '+',
  [ts.SyntaxKind.AsteriskToken]: '/',
  [ts.SyntaxKind.SlashToken]: '*',
  [ts.SyntaxKind.PercentToken]: '*',
  [ts.SyntaxKind.AsteriskAsteriskToken]: '*',
  [ts.SyntaxKind.PlusEqualsToken]: '-=',
  [ts.SyntaxKind.MinusEqualsToken]: '+=',
  [ts.SyntaxKind.AsteriskEqualsToken]: '/=',
  [ts.SyntaxKind.SlashEqualsToken]: '*=',
};

/** Arithmetic that is spelled as methods, by the class that has them. */
const METHODS: Readonly<Record<string, Readonly<Record<string, string>>>> = {
  Wide: { plus: 'minus', minus: 'plus', times: 'over', over: 'times' },
  Sum: { add: 'subtract', subtract: 'add' },
};
const CONSTANTS: Readonly<Record<string, string>> = { 'Wide.ZERO': 'Wide.ONE', 'Wide.ONE': 'Wide.of(2)' };

/** Arithmetic of formulas, which are functions of this file. */
const ALGEBRA = 'src/engine/chart/expression.ts';
const FUNCTIONS: Readonly<Record<string, string>> = {
  add: 'subtract',
  subtract: 'add',
  multiply: 'divide',
  divide: 'multiply',
};

/** Every number changed a little and every sign and operator turned into its opposite, one at a time, file by file. */
export function mutantsOf(files: readonly string[]): Mutant[] {
  const config = ts.getParsedCommandLineOfConfigFile(
    `${ROOT}/tsconfig.json`,
    {},
    {
      ...ts.sys,
      onUnRecoverableConfigFileDiagnostic: (fault) => {
        throw new Error(String(fault.messageText));
      },
    },
  )!;
  const program = ts.createProgram([...files], config.options);
  const checker = program.getTypeChecker();
  return files.flatMap((path) => {
    const source = program.getSourceFile(path)!;
    const found: Mutant[] = [];
    const visit = (node: ts.Node): void => {
      if (ts.isTypeNode(node)) return; // its numbers are gone before anything runs
      for (const edit of editsOf(node, source, checker)) found.push(described(edit, node, source));
      ts.forEachChild(node, visit);
    };
    visit(source);
    return found;
  });
}

function editsOf(node: ts.Node, source: ts.SourceFile, checker: ts.TypeChecker): Edit[] {
  const [start, end] = [node.getStart(source), node.getEnd()];
  const text = node.getText(source);
  if (ts.isNumericLiteral(node)) return [{ start, end, text: perturbed(text) }];
  if (ts.isStringLiteral(node)) return isFormula(node) ? formulaEdits(node.text, start + 1) : [];
  if (ts.isPropertyAccessExpression(node) && CONSTANTS[text]) return [{ start, end, text: CONSTANTS[text] }];
  if (ts.isPrefixUnaryExpression(node) && node.operator === ts.SyntaxKind.MinusToken)
    return [{ start, end: start + 1, text: '' }];
  if (ts.isBinaryExpression(node)) return operatorEdits(node, source, checker);
  if (ts.isCallExpression(node)) return callEdits(node, source, checker);
  return [];
}

/** A whole number becomes the next, any other one part in a thousand larger. */
function perturbed(text: string): string {
  const value = Number(text.replaceAll('_', ''));
  return String(Number.isInteger(value) ? value + 1 : value * 1.001);
}

function operatorEdits(node: ts.BinaryExpression, source: ts.SourceFile, checker: ts.TypeChecker): Edit[] {
  const { operatorToken, left, right } = node;
  const opposite = OPPOSITE[operatorToken.kind];
  const joinsText = [left, right].some(
    (side) => checker.getTypeAtLocation(side).flags & ts.TypeFlags.StringLike,
  );
  if (!opposite || joinsText) return [];
  return [{ start: operatorToken.getStart(source), end: operatorToken.getEnd(), text: opposite }];
}

function callEdits(call: ts.CallExpression, source: ts.SourceFile, checker: ts.TypeChecker): Edit[] {
  const { expression: callee } = call;
  if (ts.isPropertyAccessExpression(callee)) {
    const { name, expression: receiver } = callee;
    const owner = checker.getTypeAtLocation(receiver).symbol?.name ?? '';
    if (owner === 'Wide' && name.text === 'negated')
      return [{ start: receiver.getEnd(), end: call.getEnd(), text: '' }];
    const opposite = Object.hasOwn(METHODS, owner) ? METHODS[owner]?.[name.text] : undefined;
    return opposite ? [{ start: name.getStart(source), end: name.getEnd(), text: opposite }] : [];
  }
  if (!ts.isIdentifier(callee) || !isAlgebra(callee, checker)) return [];
  const edit = { start: callee.getStart(source), end: callee.getEnd() };
  if (callee.text === 'negate') return [{ ...edit, text: '' }];
  const opposite = FUNCTIONS[callee.text];
  if (!opposite || call.arguments.length !== 2 || call.arguments.some(ts.isSpreadElement)) return [];
  const owner = source.fileName.endsWith(ALGEBRA) ? '' : "require('./expression').";
  return [{ ...edit, text: owner + opposite }];
}

function isAlgebra(callee: ts.Identifier, checker: ts.TypeChecker): boolean {
  const symbol = checker.getSymbolAtLocation(callee);
  const named = symbol && symbol.flags & ts.SymbolFlags.Alias ? checker.getAliasedSymbol(symbol) : symbol;
  return named?.declarations?.some((one) => one.getSourceFile().fileName.endsWith(ALGEBRA)) ?? false;
}

/** The printed formulas of a chart case are text: `within` and `beyond` are lists of them. */
function isFormula(node: ts.StringLiteral): boolean {
  const row = ts.isArrayLiteralExpression(node.parent) ? node.parent.parent : null;
  return !!row && ts.isPropertyAssignment(row) && /^(within|beyond)$/.test(row.name.getText());
}

const SIGNS: Readonly<Record<string, string>> = { '+': '-', '-': '+', '*': '/', '/': '*' };

function formulaEdits(formula: string, at: number): Edit[] {
  return [...formula.matchAll(/\d+|[-+*/]/g)].map(({ 0: token, index }) => {
    const isUnary = token === '-' && (index === 0 || formula[index - 1] === '(');
    const text = isUnary ? '' : (SIGNS[token] ?? perturbed(token));
    return { start: at + index, end: at + index + token.length, text };
  });
}

function described(edit: Edit, node: ts.Node, source: ts.SourceFile): Mutant {
  const { text } = source;
  const from = text.lastIndexOf('\n', edit.start - 1) + 1;
  const next = text.indexOf('\n', edit.end);
  const to = next < 0 ? text.length : next;
  return {
    file: relative(ROOT, source.fileName),
    line: source.getLineAndCharacterOfPosition(edit.start).line + 1,
    inside: functionAround(node),
    was: text.slice(from, to).trim(),
    becomes: (text.slice(from, edit.start) + edit.text + text.slice(edit.end, to)).trim(),
    source: text.slice(0, edit.start) + edit.text + text.slice(edit.end),
  };
}

function functionAround(node: ts.Node): string {
  for (let at = node.parent; at; at = at.parent) {
    if (ts.isFunctionDeclaration(at) || ts.isMethodDeclaration(at)) return at.name?.getText() ?? '';
    if (ts.isVariableDeclaration(at) && at.initializer && ts.isArrowFunction(at.initializer))
      return at.name.getText();
  }
  return '';
}
