import { LOAD_GROUP_NAMES } from '../combination/index';
import {
  type Parameter,
  type QuantityParameter,
  type Row,
  readParameters,
  unitOf,
  type Value,
} from '../template/index';
import { exactly, type Figures } from './figures';
import type { Cell, SheetBlock, SheetInput, SheetRow } from './types';

const groupNames: Readonly<Record<string, string>> = LOAD_GROUP_NAMES;

/** "G, permanent"; a practice's own group by its letter alone. */
export const groupText = (group: string): string =>
  groupNames[group] === undefined ? group : `${group}, ${groupNames[group]}`;

/** What was given, with what was typed for it; loads by their groups. */
export function givensTable(input: SheetInput, figures: Figures): SheetBlock {
  const { template, parameters } = input;
  const reading = readParameters(template, parameters);
  const values = reading.ok ? reading.values : {};
  const rows = template.parameters.flatMap((parameter) =>
    rowsOf(parameter, values[parameter.symbol], parameters[parameter.symbol], figures),
  );
  return {
    kind: 'table',
    name: 'Givens',
    source: `${template.reference} rev ${template.revision}`,
    columns: [
      { title: 'Item' },
      { title: 'Symbol' },
      { title: 'Value', figures: true },
      { title: 'Unit' },
      { title: 'Typed, or from' },
    ],
    rows: [...rows, ...stiffnessRows(input, figures)],
  };
}

const isFields = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** What was typed; a value in SI came from a program. */
const typedText = (typed: unknown): string => {
  if (typeof typed === 'string') return typed;
  return typeof typed === 'number' ? 'SI value' : 'template';
};

const row = (...cells: Cell[]): SheetRow => ({ cells });

function rowsOf(
  parameter: Parameter,
  value: Value | undefined,
  typed: unknown,
  figures: Figures,
): SheetRow[] {
  const { name, tex } = parameter;
  if (value === undefined) return [];
  if (parameter.kind === 'choice') {
    const option = parameter.options.find((one) => one.value === value);
    return [row(name, { tex }, option?.name ?? String(value), '', typedText(typed))];
  }
  if (parameter.kind === 'rows')
    return Array.isArray(value) ? listRows(parameter, value, typed, figures) : [];
  if (typeof value === 'number') return [measured(parameter, name, value, typed, figures)];
  if (!isFields(value)) return [];
  const shares = Object.entries(value).map(([group, share]) => {
    const part = isFields(typed) ? typed[group] : typed;
    return measured(parameter, `${name}: ${groupText(group)}`, Number(share), part, figures);
  });
  if (shares.length < 2) return shares;
  const sum = Object.values(value).reduce((total, share) => total + Number(share), 0);
  const all = row(`${name}: all groups`, { tex }, ...exactly(sum, unitOf(parameter, figures.system)), 'sum');
  return [...shares, { ...all, strong: true }];
}

const measured = (
  parameter: QuantityParameter,
  name: string,
  value: number,
  typed: unknown,
  { system }: Figures,
): SheetRow =>
  row(name, { tex: parameter.tex }, ...exactly(value, unitOf(parameter, system)), typedText(typed));

/** A list's rows, each cell of which is a given of its own; the row's group stands with it. */
function listRows(
  { name, columns }: Extract<Parameter, { kind: 'rows' }>,
  rows: readonly Row[],
  typed: unknown,
  { system }: Figures,
): SheetRow[] {
  return rows.flatMap((given, index) => {
    const said: unknown = Array.isArray(typed) ? typed[index] : undefined;
    const grouped = columns.find(({ kind }) => kind === 'group');
    const group = grouped && given[grouped.symbol];
    const place = `${name} ${index + 1}${group === undefined ? '' : ` (${group})`}`;
    return columns.flatMap((column) => {
      const value = given[column.symbol];
      if (column.kind === 'group' || typeof value !== 'number') return [];
      const text = typedText(isFields(said) ? said[column.symbol] : undefined);
      const tex = `${column.tex}_{${index + 1}}`;
      return [
        row(
          `${place}: ${column.name.toLowerCase()}`,
          { tex },
          ...exactly(value, unitOf(column, system)),
          text,
        ),
      ];
    });
  });
}

/** What the section brings: stiffness and weight. */
function stiffnessRows({ section, result, ownWeight }: SheetInput, figures: Figures): SheetRow[] {
  const measuredRow = (
    name: string,
    tex: string,
    si: number,
    purpose: 'bending_stiffness' | 'line_load',
    from: string,
  ) => row(name, { tex }, figures.value(si, purpose), figures.unit(purpose), from);
  const from = section ? `${section.designation}, ${section.material.name}` : 'template’s usual value';
  const stiffness = measuredRow('Bending stiffness', 'EI', result.ei, 'bending_stiffness', from);
  if (!result.section || !ownWeight.acts) return [stiffness];
  const { selfWeight } = result.section;
  return [
    stiffness,
    measuredRow('Own weight: G, permanent', 'w_{\\text{self}}', selfWeight, 'line_load', from),
  ];
}
