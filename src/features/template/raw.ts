/** What stands in the fields of a template's parameters, exactly as typed, and what it says to whoever evaluates it. */
import {
  type DimensionName,
  formatFeetInches,
  formatNumber,
  readQuantity,
  toUnit,
  type UnitSystemName,
} from '@/engine/quantity';
import {
  type Column,
  type Parameter,
  type QuantityParameter,
  type RowsParameter,
  type Template,
  unitOf,
} from '@/engine/template';
import { unitsOffered } from './units';

/** A quantity's text, and the unit beside it, which counts where the text has none. */
export type Entry = { readonly text: string; readonly unit: string };
export type LoadPart = { readonly group: string; readonly entry: Entry };
/** By column: a quantity, or the name of a group. */
export type RawRow = Readonly<Record<string, Entry | string>>;
export type RawValue =
  | { readonly kind: 'quantity'; readonly entry: Entry }
  | { readonly kind: 'load'; readonly parts: readonly LoadPart[] }
  | { readonly kind: 'choice'; readonly value: string }
  | { readonly kind: 'rows'; readonly rows: readonly RawRow[] };
/** By symbol. */
export type Raw = Readonly<Record<string, RawValue>>;

type Parameters = Pick<Template, 'parameters'>;

export type RawOptions = {
  readonly system: UnitSystemName;
  /** Loads are given by their groups, each with a field of its own. */
  readonly byGroup?: boolean | undefined;
};

/** Fields that say what is given; a parameter that is not given stands at its default. */
export const toRaw = (
  { parameters }: Parameters,
  given: Readonly<Record<string, unknown>>,
  options: RawOptions,
): Raw =>
  Object.fromEntries(
    parameters.map((parameter) => [
      parameter.symbol,
      toRawValue(parameter, given[parameter.symbol] ?? parameter.default, options),
    ]),
  );

function toRawValue(parameter: Parameter, given: unknown, options: RawOptions): RawValue {
  switch (parameter.kind) {
    case 'choice':
      return { kind: 'choice', value: typeof given === 'string' ? given : parameter.default };
    case 'rows':
      return { kind: 'rows', rows: rowsOf(parameter, given, options.system) };
    case 'quantity':
      return parameter.group !== undefined && (options.byGroup || isObject(given))
        ? { kind: 'load', parts: partsOf(parameter, parameter.group, given, options.system) }
        : { kind: 'quantity', entry: toEntry(parameter, given, options.system) };
  }
}

const isObject = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const partsOf = (
  parameter: QuantityParameter,
  group: string,
  given: unknown,
  system: UnitSystemName,
): LoadPart[] =>
  Object.entries(isObject(given) ? given : { [group]: given }).map(([name, part]) => ({
    group: name,
    entry: toEntry(parameter, part, system),
  }));

const rowsOf = (
  { columns, default: rows }: RowsParameter,
  given: unknown,
  system: UnitSystemName,
): RawRow[] =>
  (Array.isArray(given) ? given : rows).filter(isObject).map((row) => toRawRow(columns, row, system));

function toRawRow(
  columns: readonly Column[],
  row: Readonly<Record<string, unknown>>,
  system: UnitSystemName,
): RawRow {
  return Object.fromEntries(
    columns.map((column) => {
      const cell = row[column.symbol] ?? column.default;
      const isGroup = column.kind === 'group';
      return [column.symbol, isGroup ? String(cell) : toEntry(column, cell, system)];
    }),
  );
}

/** A further row, at the columns' defaults. */
export const newRow = ({ columns }: RowsParameter, system: UnitSystemName): RawRow =>
  toRawRow(columns, {}, system);

function toEntry(parameter: QuantityParameter, given: unknown, system: UnitSystemName): Entry {
  const shown = unitOf(parameter, system);
  if (typeof given === 'number') return { text: numberText(given, shown), unit: shown };
  return readEntry(typeof given === 'string' ? given : '', parameter.dimension, shown);
}

/** "7.2 m" as 7.2 beside m; a text in another form stays as it is, beside the unit that the field starts in. */
export function readEntry(text: string, dimension: DimensionName, shown: string): Entry {
  for (const unit of [shown, ...unitsOffered(dimension, shown)])
    if (unit !== '' && text.endsWith(` ${unit}`)) return { text: text.slice(0, -unit.length - 1), unit };
  return { text, unit: shown };
}

const numberText = (si: number, unit: string): string =>
  unit === 'ft-in' ? formatFeetInches(si) : formatNumber(toUnit(si, unit));

/** The text with its unit: as typed where it has one, else with the unit beside it. */
export function entryText({ text, unit }: Entry, dimension: DimensionName): string {
  const said = text.trim();
  const beside = readQuantity(said, dimension, { unit });
  const alone = readQuantity(said, dimension);
  if (alone.ok || !beside.ok || unit === '') return said;
  return `${said} ${unit === 'ft-in' ? 'ft' : unit}`;
}

/** What the fields say, as the evaluation, the endpoint and a member take it. */
export const toParameters = ({ parameters }: Parameters, raw: Raw): Record<string, Given> =>
  Object.fromEntries(
    parameters.flatMap((parameter): [string, Given][] => {
      const value = raw[parameter.symbol];
      return value === undefined ? [] : [[parameter.symbol, toGiven(parameter, value)]];
    }),
  );

export type Given = string | Record<string, string> | Record<string, string>[];

function toGiven(parameter: Parameter, value: RawValue): Given {
  if (value.kind === 'choice') return value.value;
  if (value.kind === 'rows')
    return parameter.kind === 'rows' ? value.rows.map((row) => rowText(parameter.columns, row)) : [];
  if (parameter.kind !== 'quantity') return '';
  if (value.kind === 'quantity') return entryText(value.entry, parameter.dimension);
  return Object.fromEntries(
    value.parts.map(({ group, entry }) => [group, entryText(entry, parameter.dimension)]),
  );
}

const rowText = (columns: readonly Column[], row: RawRow): Record<string, string> =>
  Object.fromEntries(
    columns.map((column) => {
      const cell = row[column.symbol] ?? '';
      const isEntry = typeof cell !== 'string' && column.kind === 'quantity';
      return [column.symbol, isEntry ? entryText(cell, column.dimension) : String(cell)];
    }),
  );
