import { dimensionFaults, sectionProperties } from '@/engine/section';
import { cellText } from './cells';
import type { Finding, Fix, NameFacts, NumberField } from './contract';
import { dropRow, findingOf, isError } from './finding';
import { hasError, type JudgedRow, judgeLine } from './judge-row';
import { columnOf, type NumberColumn, type Plan, shifted } from './plan';
import { dimensionsOf, SIZES, type Values } from './reading';
import { unitSlip } from './slips';
import type { FileLine } from './stream';

const SUSPICIOUS = 3; // errors in one row, from which a shift is likelier than as many slips

export const filled = (cells: readonly string[]) => cells.map(cellText).filter((cell) => cell !== '');

/** The row with its cells moved by one from some column on, where that makes it sound: the fault that says so. */
export function shiftFinding(line: FileLine, width: number, plan: Plan, names: NameFacts): Finding | null {
  const { number, cells } = line;
  for (let from = 0; from < plan.width; from++) {
    for (const by of [-1, 1] as const) {
      const moved = shifted(cells, from, by);
      if (moved.length < width || filled(moved.slice(width)).length > 0) continue;
      const row = judgeLine({ number, cells: moved }, plan, names);
      if (hasError(row) || row.dimensions === null) continue;
      const heading = plan.headings[from] ?? '';
      const way = by === -1 ? 'right' : 'left';
      const message = `The cells from "${heading}" on stand one column too far to the ${way}. Move them back.`;
      const fixes: Fix[] = [
        { label: 'Move the cells back', reach: 'row', edit: { kind: 'shift_row', line: number, from, by } },
        dropRow(number),
      ];
      const read = cellText(cells[from] ?? '');
      const base = { rule: 21, severity: 'error', cause: 'row_shift', line: number, column: from } as const;
      return findingOf({
        ...base,
        heading,
        designation: row.printed,
        read,
        expected: cellText(moved[from] ?? ''),
        message,
        fixes,
      });
    }
  }
  return null;
}

/** Factors by which one size of a row may be out: another unit, or a decimal mark that has moved. */
const SIZE_FACTORS = [10, 0.1, 100, 0.01, 1000, 0.001, 25.4, 1 / 25.4, 2.54, 1 / 2.54] as const;

/** The line with one number multiplied, as it would then read. */
function scaled({ number, cells }: FileLine, column: NumberColumn, value: number, plan: Plan): FileLine {
  const text = String(Number(value.toPrecision(12))).replace('.', plan.mark);
  return { number, cells: cells.map((cell, at) => (at === column.index ? text : cell)) };
}

function sizeSlip(row: JudgedRow, plan: Plan, names: NameFacts): Finding | null {
  for (const field of row.shape === null ? [] : [...SIZES[row.shape], 'r' as const]) {
    const column = columnOf(plan, field);
    const value = row.values[field];
    if (!column || value === undefined) continue;
    for (const factor of SIZE_FACTORS) {
      if (!couldFit({ ...row.values, [field]: value * factor }, row, plan)) continue;
      const typed = (value / column.scale) * factor;
      const line = scaled(row.line, column, typed, plan);
      if (hasNoFewer(judgeLine(line, plan, names))) continue;
      return sizeFinding(row, column, factor, line);
    }
  }
  return null;
}

const ROUGHLY = 0.1; // of the area: what fits the whole row fits this

/** A quick look at the area or the mass, since a row is judged a hundred times as slowly. */
function couldFit(values: Values, { shape }: JudgedRow, plan: Plan): boolean {
  if (shape === null) return false;
  const dimensions = dimensionsOf(shape, values, plan.mapping);
  if (dimensionFaults(dimensions).length > 0) return false;
  const { area = Number.NaN, mass = Number.NaN } = values;
  const computed = sectionProperties(dimensions).area;
  const isNear = (given: number) => Number.isNaN(given) || Math.abs(given / computed - 1) < ROUGHLY;
  return isNear(area) || isNear(mass / plan.mapping.density);
}

/** Sound but for notes: then the change explains the row. */
const hasNoFewer = (row: JudgedRow) =>
  row.dimensions === null || row.findings.some(({ severity }) => severity !== 'note');

function sizeFinding(row: JudgedRow, column: NumberColumn, factor: number, line: FileLine): Finding {
  const number = row.line.number;
  const slip = unitSlip(1 / factor, column);
  const expected = cellText(line.cells[column.index] ?? '');
  const cause = slip?.cause ?? 'size_slip';
  const words = slip?.message ?? 'The value is in another unit than its heading says.';
  const message = `${words} Everything else in the row fits ${expected} ${column.unit}.`;
  const fixes: Fix[] = [
    {
      label: `Read as ${expected}`,
      reach: 'cell',
      edit: { kind: 'set_cell', line: number, column: column.index, value: expected },
    },
    dropRow(number),
  ];
  const base = { severity: 'error', line: number, column: column.index, heading: column.heading } as const;
  const read = cellText(row.line.cells[column.index] ?? '');
  const shown = `${expected} ${column.unit}`;
  const formula = `With ${shown} all properties of the row follow from its sizes`;
  return findingOf({
    ...base,
    rule: slip?.rule ?? 18,
    cause,
    designation: row.printed,
    read,
    expected: shown,
    formula,
    message,
    fixes,
  });
}

/** Pairs of sizes that stand in each other's column often enough to be tried. */
const SIZE_PAIRS: readonly (readonly [NumberField, NumberField])[] = [
  ['h', 'b'],
  ['tw', 'tf'],
  ['tf', 'r'],
  ['b', 'tw'],
  ['b', 't'],
];

function sizeSwap(row: JudgedRow, plan: Plan, names: NameFacts): Finding | null {
  for (const pair of SIZE_PAIRS) {
    const [one, other] = pair.map((field) => columnOf(plan, field));
    if (!one || !other || row.values[pair[0]] === undefined || row.values[pair[1]] === undefined) continue;
    const exchanged = { ...row.values, [pair[0]]: row.values[pair[1]], [pair[1]]: row.values[pair[0]] };
    if (!couldFit(exchanged, row, plan)) continue;
    const { number, cells } = row.line;
    const swapped = cells.map((cell, at) =>
      at === one.index ? (cells[other.index] ?? '') : at === other.index ? (cells[one.index] ?? '') : cell,
    );
    if (hasNoFewer(judgeLine({ number, cells: swapped }, plan, names))) continue;
    const columns = [one.index, other.index] as const;
    const fixes: Fix[] = [
      { label: 'Exchange the two cells', reach: 'row', edit: { kind: 'swap_cells', line: number, columns } },
      { label: 'Exchange the two columns', reach: 'column', edit: { kind: 'swap_columns', columns } },
      dropRow(number),
    ];
    const message = `"${one.heading}" and "${other.heading}" look exchanged: the other way round the whole row fits.`;
    const base = {
      rule: 15,
      severity: 'error',
      cause: 'columns_swapped',
      line: number,
      column: one.index,
    } as const;
    const read = cellText(cells[one.index] ?? '');
    const expected = cellText(cells[other.index] ?? '');
    return findingOf({
      ...base,
      heading: one.heading,
      designation: row.printed,
      read,
      expected,
      message,
      fixes,
    });
  }
  return null;
}

/** Findings that follow from a wrong size: then one size may explain them all. */
const OF_SIZES: ReadonlySet<string> = new Set([
  'geometry',
  'area',
  'second_moment',
  'proportions',
  'torsion',
  'elastic_modulus',
  'plastic_modulus',
  'shape_factor',
  'shape_factor_minor',
  'warping',
  'gyration',
  'power_of_ten',
  'inches',
  'axes_swapped',
  'name_depth',
  'name_size',
]);

/**
 * One fault that explains all of a row's, in its place: cells moved by one, one size in another unit, two sizes
 * exchanged. What the row says of its cells alone stays.
 */
export function explained(row: JudgedRow, plan: Plan, names: NameFacts): readonly Finding[] {
  const errors = row.findings.filter(isError);
  const isGap = errors.length > 1 && errors.some(({ cause }) => cause === 'missing');
  if (errors.length >= SUSPICIOUS || isGap) {
    const shift = shiftFinding(row.line, row.line.cells.length, plan, names);
    if (shift) return [shift];
  }
  const ofSizes = row.findings.filter(({ cause }) => OF_SIZES.has(cause));
  const isGeometry = errors.some(({ cause }) => cause === 'geometry');
  if (ofSizes.length < 2 && !isGeometry) return row.findings;
  const slip = sizeSlip(row, plan, names) ?? sizeSwap(row, plan, names);
  if (!slip) return row.findings;
  return [...row.findings.filter(({ cause }) => !OF_SIZES.has(cause) && cause !== 'mass'), slip];
}
