import type { Template } from './document';
import {
  inRange,
  type ParameterFault,
  type Path,
  type Reading,
  readMeasured,
  refuse,
  type ValueOptions,
} from './measured';
import type { ChoiceParameter, Column, Parameter, QuantityParameter, RowsParameter } from './parts';

/** A load by its groups, SI: { G: 5520, S: 3600 }. */
export type Parts = Readonly<Record<string, number>>;
export type Row = Readonly<Record<string, number | string>>;
/** A number (SI), a named value, a load by its groups, or rows. */
export type Value = number | string | Parts | readonly Row[];
export type Values = Readonly<Record<string, Value>>;

export const isRows = (value: Value): value is readonly Row[] => Array.isArray(value);

export type ValuesReading = { ok: true; values: Values } | { ok: false; faults: ParameterFault[] };

/**
 * Reads what a person or a program gives for the parameters: texts with units, SI numbers, named values, rows; a load
 * may be given by its groups, { "G": "5.5 kN/m", "S": "3.6 kN/m" }. Missing parameters take their default. Every
 * fault is returned, at its parameter; a value outside the range is one, with the range in words.
 */
export function readParameters(
  template: Pick<Template, 'parameters'>,
  raw: Readonly<Record<string, unknown>>,
  options: ValueOptions = {},
): ValuesReading {
  const values: Record<string, Value> = {};
  const faults: ParameterFault[] = [];
  const known = template.parameters.map(({ symbol }) => symbol);
  for (const symbol of Object.keys(raw))
    if (!known.includes(symbol))
      faults.push({
        path: [symbol],
        code: 'unknown_parameter',
        message: `There is no parameter “${symbol}”. Use ${known.join(', ')}.`,
      });
  for (const parameter of template.parameters) {
    const given = Object.hasOwn(raw, parameter.symbol) ? raw[parameter.symbol] : undefined;
    const reading = readOne(
      parameter,
      given === undefined ? parameter.default : given,
      [parameter.symbol],
      options,
    );
    if (reading.ok) values[parameter.symbol] = reading.value;
    else faults.push(...reading.faults);
  }
  return faults.length > 0 ? { ok: false, faults } : { ok: true, values };
}

function readOne(parameter: Parameter, given: unknown, path: Path, options: ValueOptions): Reading<Value> {
  switch (parameter.kind) {
    case 'choice':
      return readChoice(parameter, given, path);
    case 'rows':
      return readRows(parameter, given, path, options);
    case 'quantity':
      return parameter.group === undefined
        ? readMeasured(parameter, given, path, options)
        : readLoad(parameter, parameter.group, given, path, options);
  }
}

function readChoice(parameter: ChoiceParameter, given: unknown, path: Path): Reading<string> {
  const found = parameter.options.find(({ value }) => value === given);
  if (found) return { ok: true, value: found.value };
  const names = parameter.options.map(({ value }) => `“${value}”`).join(', ');
  return refuse(path, 'not_allowed', `${parameter.name}: give one of ${names}.`);
}

function readLoad(
  parameter: QuantityParameter,
  group: string,
  given: unknown,
  path: Path,
  options: ValueOptions,
): Reading<Parts> {
  if (typeof given !== 'object' || given === null || Array.isArray(given)) {
    const reading = readMeasured(parameter, given, path, options);
    return reading.ok ? { ok: true, value: { [group]: reading.value } } : reading;
  }
  const parts: Record<string, number> = {};
  const faults: ParameterFault[] = [];
  for (const [name, part] of Object.entries(given)) {
    const reading = GROUP.test(name)
      ? readMeasured(parameter, part, [...path, name], options)
      : refuse(
          [...path, name],
          'unknown_group',
          `“${name}” is no load group. Use a capital letter such as G or Q.`,
        );
    if (reading.ok) parts[name] = reading.value;
    else faults.push(...reading.faults);
  }
  if (faults.length > 0) return { ok: false, faults };
  const sum = inRange(parameter, totalOf(parts), path, options);
  return sum.ok ? { ok: true, value: Object.keys(parts).length > 0 ? parts : { [group]: 0 } } : sum;
}

const GROUP = /^[A-Z][A-Za-z0-9]{0,7}$/;

export const totalOf = (parts: Parts): number => Object.values(parts).reduce((sum, part) => sum + part, 0);

function readRows(
  parameter: RowsParameter,
  given: unknown,
  path: Path,
  options: ValueOptions,
): Reading<Row[]> {
  if (!Array.isArray(given)) return refuse(path, 'wrong_type', `${parameter.name}: give a list of rows.`);
  const { least, most } = parameter;
  if (given.length < least || given.length > most)
    return refuse(path, 'out_of_range', `${parameter.name}: ${given.length} rows. Give ${least} to ${most}.`);
  const rows = given.map((row, index) => readRow(parameter, row, [...path, index], options));
  const faults = rows.flatMap((row) => (row.ok ? [] : row.faults));
  return faults.length > 0
    ? { ok: false, faults }
    : { ok: true, value: rows.flatMap((row) => (row.ok ? [row.value] : [])) };
}

function readRow(
  { columns, name }: RowsParameter,
  given: unknown,
  path: Path,
  options: ValueOptions,
): Reading<Row> {
  if (typeof given !== 'object' || given === null || Array.isArray(given))
    return refuse(
      path,
      'wrong_type',
      `${name}: a row is an object with ${columns.map(({ symbol }) => symbol).join(', ')}.`,
    );
  const cells = new Map<string, unknown>(Object.entries(given));
  const row: Record<string, number | string> = {};
  const faults: ParameterFault[] = [...cells.keys()]
    .filter((key) => !columns.some(({ symbol }) => symbol === key))
    .map((key) => ({
      path: [...path, key],
      code: 'unknown_column',
      message: `A row of ${name} has no “${key}”. Use ${columns.map(({ symbol }) => symbol).join(', ')}.`,
    }));
  for (const column of columns) {
    const reading = readCell(column, cells.get(column.symbol), [...path, column.symbol], options);
    if (reading.ok) row[column.symbol] = reading.value;
    else faults.push(...reading.faults);
  }
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: row };
}

function readCell(
  column: Column,
  given: unknown,
  path: Path,
  options: ValueOptions,
): Reading<number | string> {
  if (column.kind === 'quantity') {
    if (given === undefined)
      return refuse(path, 'missing', `${column.name} is missing. Give it in every row.`);
    return readMeasured(column, given, path, options);
  }
  if (given === undefined) return { ok: true, value: column.default };
  if (typeof given === 'string' && GROUP.test(given)) return { ok: true, value: given };
  return refuse(
    path,
    'unknown_group',
    `“${String(given)}” is no load group. Use a capital letter such as G or Q.`,
  );
}
