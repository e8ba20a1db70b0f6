import type { DimensionName } from '@/engine/quantity';
import { unitScale } from './cells';
import type { DecimalMark, Edit, Field, FileFacts, MappedColumn, Mapping, NumberField } from './contract';
import { FIELD_QUANTITY, isNumberField } from './headings';
import type { FileLine } from './stream';

export type NumberColumn = {
  index: number;
  heading: string;
  field: NumberField;
  quantity: DimensionName;
  unit: string;
  factor: number;
  /** SI value of one of the cells' numbers. */
  scale: number;
  /** Factor of single lines that are in another unit. */
  scaleOfLine: ReadonlyMap<number, number> | null;
};

/** A mapping and its edits, laid out for reading a hundred thousand rows. */
export type Plan = {
  mapping: Mapping;
  mark: DecimalMark;
  designation: number;
  shape: number | null;
  computed: number | null;
  numbers: readonly NumberColumn[];
  /** Columns of text that are no property; looked at for formulas only. */
  others: readonly number[];
  width: number;
  headings: readonly string[];
  edits: ReadonlyMap<number, readonly Edit[]>;
  /** Groups whose suggestions are taken, and whose rows are left out. */
  taken: ReadonlySet<string>;
  dropped: ReadonlySet<string>;
};

export type Corrections = Pick<FileFacts, 'corrections' | 'swaps' | 'assumed'>;
/** What is wrong with whole columns, and what they are read by all the same. */
export type ColumnFindings = Pick<FileFacts, 'findings'> & Corrections;
const NO_CORRECTIONS: Corrections = { corrections: [], swaps: [], assumed: {} };

function numberColumn(
  column: MappedColumn,
  edits: readonly Edit[],
  { corrections }: Corrections,
): NumberColumn[] {
  const { index, heading, field, unit, factor } = column;
  if (!isNumberField(field) || unit === null) return [];
  const quantity = FIELD_QUANTITY[field];
  const own = corrections.filter((one) => one.column === index);
  const whole = own.filter(({ lines }) => lines === null).reduce((product, one) => product * one.factor, 1);
  const scale = unitScale(unit, quantity) * factor * whole;
  const ofLine = new Map<number, number>();
  for (const { lines, factor: by } of own) for (const line of lines ?? []) ofLine.set(line, scale * by);
  for (const edit of edits) {
    if (edit.kind !== 'set_cells_unit' || edit.column !== index) continue;
    for (const line of edit.lines) ofLine.set(line, unitScale(edit.unit, quantity) * edit.factor);
  }
  const scaleOfLine = ofLine.size === 0 ? null : ofLine;
  return [{ index, heading, field, quantity, unit, factor, scale, scaleOfLine }];
}

function swapped(columns: readonly MappedColumn[], swaps: Corrections['swaps']): readonly MappedColumn[] {
  return swaps.reduce<readonly MappedColumn[]>((all, [one, other]) => {
    const fieldOf = (index: number) => all.find((column) => column.index === index)?.field ?? null;
    return all.map((column) => {
      if (column.index === one) return { ...column, field: fieldOf(other) };
      return column.index === other ? { ...column, field: fieldOf(one) } : column;
    });
  }, columns);
}

function byLine(edits: readonly Edit[]): Map<number, Edit[]> {
  const lines = new Map<number, Edit[]>();
  for (const edit of edits) {
    if (!('line' in edit)) continue;
    lines.set(edit.line, [...(lines.get(edit.line) ?? []), edit]);
  }
  return lines;
}

function headingsByIndex(columns: readonly MappedColumn[]): string[] {
  const headings: string[] = [];
  for (const { index, heading } of columns) headings[index] = heading;
  return Array.from(headings, (heading) => heading ?? '');
}

/** `corrections`: what the first reading found wrong with whole columns. */
export function planOf(
  mapping: Mapping,
  edits: readonly Edit[],
  corrections: Corrections = NO_CORRECTIONS,
): Plan {
  const columns = swapped(mapping.columns, corrections.swaps);
  const indexOf = (field: Field) => columns.find((column) => column.field === field)?.index ?? null;
  const numbers = columns.flatMap((column) => numberColumn(column, edits, corrections));
  const groupsOf = (kind: Edit['kind']) =>
    new Set(edits.flatMap((edit) => ('group' in edit && edit.kind === kind ? [edit.group] : [])));
  return {
    mapping: { ...mapping, ...corrections.assumed },
    mark: mapping.decimalMark ?? '.',
    designation: indexOf('designation') ?? -1,
    shape: indexOf('shape'),
    computed: indexOf('computed'),
    numbers,
    others: columns.filter(({ field }) => field === null).map(({ index }) => index),
    width: Math.max(...columns.map(({ index }) => index + 1)),
    headings: headingsByIndex(columns),
    edits: byLine(edits),
    taken: groupsOf('take_every'),
    dropped: groupsOf('drop_every'),
  };
}

export const columnOf = (plan: Plan, field: NumberField): NumberColumn | undefined =>
  plan.numbers.find((column) => column.field === field);

/** The cells of a line moved by one from a column on: 1 to the right, -1 to the left. */
export function shifted(cells: readonly string[], from: number, by: 1 | -1): string[] {
  if (by === 1) return [...cells.slice(0, from), '', ...cells.slice(from)];
  return [...cells.slice(0, from), ...cells.slice(from + 1), ''];
}

function editCells(cells: readonly string[], edit: Edit): readonly string[] {
  switch (edit.kind) {
    case 'set_cell':
      return cells.map((cell, at) => (at === edit.column ? edit.value : cell));
    case 'swap_cells': {
      const [one, other] = edit.columns;
      return cells.map((cell, at) =>
        at === one ? (cells[other] ?? '') : at === other ? (cells[one] ?? '') : cell,
      );
    }
    case 'shift_row':
      return shifted(cells, edit.from, edit.by);
    default:
      return cells;
  }
}

/** The line with its edits; null where it is left out, or is another name for a section that stands elsewhere. */
export function editedLine(line: FileLine, plan: Plan): FileLine | null {
  const edits = plan.edits.get(line.number);
  if (!edits) return line;
  if (edits.some(({ kind }) => kind === 'drop_row' || kind === 'alias')) return null;
  return { number: line.number, cells: [...edits.reduce<readonly string[]>(editCells, line.cells)] };
}
