/** What an expression of a template may speak of: its kinds, for checking, and its values, for evaluating. */
import { supportLetter } from '../model/index';
import { DIMENSIONS } from '../quantity/index';
import { dimensionOf, type Kind, type Kinds, ofDimension } from './dimension';
import type { Template } from './document';
import { evaluateNumber, type Scope } from './evaluate';
import type { Column, Parameter, QuantityParameter } from './parts';
import { symbolsOf, type Tree } from './tree';
import { isRows, type Row, totalOf, type Value, type Values } from './values';

/**
 * Symbols that mean the same in every template: the bending stiffness; and in rules the section's depth, whether the
 * section's shear deformation is in the result, the largest movement either way, and the reactions by letter.
 */
const RESERVED = ['EI', 'h', 'shear', 'dmax'] as const;
export const isReserved = (symbol: string): boolean =>
  RESERVED.some((reserved) => reserved === symbol) || /^R[A-Z]$/.test(symbol);

const SHEAR = ['included', 'left-out'] as const;

/** Of a parameter or a column, what decides its kind. */
export type Declared =
  | Pick<QuantityParameter, 'kind' | 'symbol' | 'dimension'>
  | { kind: 'choice'; symbol: string; options: readonly { value: string }[] }
  | { kind: 'group'; symbol: string }
  | { kind: 'rows'; symbol: string; columns: readonly Declared[] };

/** Of a template, what its expressions speak of. */
export type Spoken = {
  parameters: readonly Declared[];
  derived: readonly { symbol: string; expression: { tree: Tree } }[];
  beam: { supports: readonly { when?: unknown }[] };
};

/** A parameter's own kind. */
function kindOfParameter(parameter: Declared): Kind {
  switch (parameter.kind) {
    case 'quantity':
      return ofDimension(DIMENSIONS[parameter.dimension]);
    case 'choice':
      return { is: 'text', values: parameter.options.map(({ value }) => value) };
    case 'group':
      return { is: 'text', values: [] };
    case 'rows':
      return { is: 'rows', columns: columnKinds(parameter.columns) };
  }
}

export const columnKinds = (columns: readonly Declared[]): Kinds =>
  new Map(columns.map((column) => [column.symbol, kindOfParameter(column)]));

/** Kinds of parameters, EI and derived values; a derived value that is unsound is left out. */
export function kindsOf(template: Omit<Spoken, 'beam'>): Map<string, Kind> {
  const kinds = new Map<string, Kind>(
    template.parameters.map((parameter) => [parameter.symbol, kindOfParameter(parameter)]),
  );
  kinds.set('EI', ofDimension(DIMENSIONS.bending_stiffness));
  for (const { symbol, expression } of template.derived) {
    const reading = dimensionOf(expression.tree, kinds);
    if (reading.ok) kinds.set(symbol, reading.kind);
  }
  return kinds;
}

/** Kinds of a rule: the result's symbols besides. */
export function ruleKinds(template: Spoken): Map<string, Kind> {
  const kinds = withReactions(template, template.beam.supports);
  kinds.set('h', ofDimension(DIMENSIONS.length));
  kinds.set('shear', { is: 'text', values: SHEAR });
  kinds.set('dmax', ofDimension(DIMENSIONS.length));
  return kinds;
}

/** Kinds of a figure: the reactions besides, as many as there always are. */
export const figureKinds = (template: Spoken): Map<string, Kind> =>
  withReactions(
    template,
    template.beam.supports.filter(({ when }) => when === undefined),
  );

function withReactions(template: Spoken, supports: readonly unknown[]): Map<string, Kind> {
  const kinds = kindsOf(template);
  for (const index of supports.keys()) kinds.set(reactionSymbol(index), ofDimension(DIMENSIONS.force));
  return kinds;
}

const reactionSymbol = (index: number): string => `R${supportLetter(index)}`;

/** The reactions by their symbols. */
export const reactionsOf = (reactions: readonly { vertical: number }[]): Map<string, number> =>
  new Map(reactions.map(({ vertical }, index) => [reactionSymbol(index), vertical]));

type Cell = number | string | readonly Scope[];

/** The values in force for an expression; `ofGroup` keeps one load group's share of every load. */
export function scopeOf(template: Template, values: Values, ei: number, ofGroup?: string): Map<string, Cell> {
  const scope = new Map<string, Cell>([['EI', ei]]);
  for (const parameter of template.parameters) {
    const value = values[parameter.symbol];
    if (value !== undefined) scope.set(parameter.symbol, cellOf(parameter, value, ofGroup));
  }
  for (const { symbol, expression } of template.derived)
    scope.set(symbol, evaluateNumber(expression.tree, scope));
  return scope;
}

function cellOf(parameter: Parameter, value: Value, ofGroup: string | undefined): Cell {
  if (typeof value === 'number' || typeof value === 'string') return value;
  if (!isRows(value)) return ofGroup === undefined ? totalOf(value) : (value[ofGroup] ?? 0);
  const columns = parameter.kind === 'rows' ? parameter.columns : [];
  return value.map((row) => rowScope(columns, row, ofGroup));
}

function rowScope(columns: readonly Column[], row: Row, ofGroup: string | undefined): Scope {
  const cells = new Map(Object.entries(row));
  for (const column of columns)
    if (isLoad(column) && ofGroup !== undefined && groupOfRow(columns, row) !== ofGroup)
      cells.set(column.symbol, 0);
  return cells;
}

const isLoad = (parameter: Parameter | Column): boolean =>
  parameter.kind === 'quantity' && parameter.group !== undefined;

/** The group of a row's loads: its own, else that of its load column. */
export function groupOfRow(columns: readonly Column[], row: Row): string | undefined {
  for (const column of columns) {
    const cell = row[column.symbol];
    if (column.kind === 'group' && typeof cell === 'string') return cell;
  }
  return columns.map((column) => (column.kind === 'quantity' ? column.group : undefined)).find(Boolean);
}

/** Every parameter and column that is a quantity. */
export const allMeasured = (template: Template): QuantityParameter[] =>
  template.parameters
    .flatMap((parameter): (Parameter | Column)[] =>
      parameter.kind === 'rows' ? parameter.columns : [parameter],
    )
    .filter((parameter) => parameter.kind === 'quantity');

/** Parameters and columns that an expression reads, also through derived values. */
export function sourcesOf(template: Template, tree: Tree): Set<string> {
  const found = new Set<string>();
  for (const symbol of symbolsOf(tree)) {
    const derived = template.derived.find((one) => one.symbol === symbol);
    if (derived) for (const deeper of sourcesOf(template, derived.expression.tree)) found.add(deeper);
    else found.add(symbol);
  }
  return found;
}
