import { sectionProperties, TUBE_STANDARDS } from '@/engine/section';
import type { Mapping, NumberField } from './contract';
import { findingOf } from './finding';
import { type ColumnFindings, columnOf, type Plan } from './plan';
import { possible, type RowStore } from './row-store';
import { unitSlip } from './slips';

const SAMPLE = 300; // rows, spread over the file
const FEW = 3;
const FITS = 0.06; // of a property, for its row to speak for the sizes
const HALF = 0.5;
const MOST = 0.8;
const JUDGES: readonly NumberField[] = ['area', 'iMajor', 'iMinor', 'wElMajor', 'mass'];
const LENGTHS: readonly NumberField[] = ['h', 'b', 'tw', 'tf', 'r', 't'];
const FACTORS = [10, 0.1, 100, 0.01, 1000, 0.001, 25.4, 1 / 25.4, 2.54, 1 / 2.54] as const;
const PAIRS: readonly (readonly [NumberField, NumberField])[] = [
  ['h', 'b'],
  ['tw', 'tf'],
  ['tf', 'r'],
  ['b', 'tw'],
  ['b', 't'],
];

/** Rows of a sample whose sizes give most of what the row says; and how many there are to say so. */
function fitting(store: RowStore, sample: readonly number[], mapping: Mapping): number {
  let fits = 0;
  for (const at of sample) {
    const dimensions = possible(store, at, mapping);
    if (!dimensions) continue;
    const computed = sectionProperties(dimensions);
    const expected: Partial<Record<NumberField, number>> = {
      ...computed,
      mass: mapping.density * computed.area,
    };
    const judges = JUDGES.filter((name) => store.value(name, at) > 0);
    const right = judges.filter(
      (name) => Math.abs(store.value(name, at) / (expected[name] ?? Number.NaN) - 1) < FITS,
    );
    if (judges.length > 0 && right.length >= HALF * judges.length) fits++;
  }
  return fits;
}

function sampleOf(store: RowStore): number[] {
  const step = Math.max(1, Math.floor(store.count / SAMPLE));
  const rows: number[] = [];
  for (let at = 0; at < store.count; at += step) rows.push(at);
  return rows.filter((at) => JUDGES.some((name) => store.value(name, at) > 0));
}

/**
 * A column of sizes in another unit, two of them exchanged, or tubes to another standard: whatever makes most rows fit
 * that do not. Every row would else be at fault.
 */
export function sizeHypothesis(store: RowStore, mapping: Mapping, plan: Plan): ColumnFindings {
  const none: ColumnFindings = { findings: [], corrections: [], swaps: [], assumed: {} };
  const sample = sampleOf(store);
  if (sample.length < FEW) return none;
  if (fitting(store, sample, mapping) >= HALF * sample.length)
    return tubeStandard(store, sample, mapping) ?? none;
  return sizeUnits(store, sample, mapping, plan) ?? sizeSwaps(store, sample, mapping, plan) ?? none;
}

function sizeUnits(
  store: RowStore,
  sample: readonly number[],
  mapping: Mapping,
  plan: Plan,
): ColumnFindings | null {
  const present = LENGTHS.filter((field) => columnOf(plan, field));
  const tries = [...present.map((field) => [field]), present];
  for (const fields of tries) {
    for (const factor of FACTORS) {
      for (const field of fields) store.scale(field, factor, null);
      const fits = fitting(store, sample, mapping);
      if (fits >= MOST * sample.length) return sizeSlips(fields, factor, fits, sample.length, plan);
      for (const field of fields) store.scale(field, 1 / factor, null);
    }
  }
  return null;
}

function sizeSlips(
  fields: readonly NumberField[],
  factor: number,
  fits: number,
  of: number,
  plan: Plan,
): ColumnFindings {
  const columns = fields.map((field) => columnOf(plan, field)).filter((column) => column !== undefined);
  const findings = columns.map((column) => {
    const slip = unitSlip(1 / factor, column);
    const words = slip?.words ?? `${Number(factor.toPrecision(4))} times as much`;
    const unit = slip?.unit ?? column.unit;
    const edit = {
      kind: 'set_column_unit',
      column: column.index,
      unit,
      factor: slip?.factor ?? column.factor * factor,
    } as const;
    return findingOf({
      rule: 20,
      severity: 'error',
      cause: 'size_column_slip',
      column: column.index,
      heading: column.heading,
      read: column.unit,
      expected: words,
      formula: `${fits} of ${of} rows fit when the column is read in ${words}`,
      message: `The whole column of sizes looks like ${words} under a heading of ${column.unit}.`,
      fixes: [{ label: `Read the column in ${words}`, reach: 'column', edit }],
    });
  });
  const corrections = columns.map(({ index }) => ({ column: index, factor, lines: null }));
  return { findings, corrections, swaps: [], assumed: {} };
}

function sizeSwaps(
  store: RowStore,
  sample: readonly number[],
  mapping: Mapping,
  plan: Plan,
): ColumnFindings | null {
  for (const [one, other] of PAIRS) {
    const [first, second] = [columnOf(plan, one), columnOf(plan, other)];
    if (!first || !second) continue;
    store.swap(one, other);
    const fits = fitting(store, sample, mapping);
    if (fits >= MOST * sample.length) {
      const columns: [number, number] = [first.index, second.index];
      const finding = findingOf({
        rule: 15,
        severity: 'error',
        cause: 'columns_swapped',
        column: first.index,
        heading: first.heading,
        read: first.heading,
        expected: second.heading,
        formula: `${fits} of ${sample.length} rows fit when the two columns are exchanged`,
        message: `"${first.heading}" and "${second.heading}" look exchanged in the whole file.`,
        fixes: [
          { label: 'Exchange the two columns', reach: 'column', edit: { kind: 'swap_columns', columns } },
        ],
      });
      return { findings: [finding], corrections: [], swaps: [columns], assumed: {} };
    }
    store.swap(one, other);
  }
  return null;
}

const CLOSE = 0.01; // of the area, which the corner radii of another standard change by more

/** Tubes whose areas are those of another standard: its corners are rounder, or its wall is thinner. */
function tubeStandard(store: RowStore, sample: readonly number[], mapping: Mapping): ColumnFindings | null {
  const tubes = sample.filter(
    (at) => ['rhs', 'shs'].includes(store.shape(at) ?? '') && store.value('area', at) > 0,
  );
  if (tubes.length < FEW) return null;
  const share = (standard: Mapping['tubeStandard']) =>
    tubes.filter((at) => {
      const dimensions = possible(store, at, { ...mapping, tubeStandard: standard });
      return dimensions && Math.abs(store.value('area', at) / sectionProperties(dimensions).area - 1) < CLOSE;
    }).length / tubes.length;
  if (share(mapping.tubeStandard) >= HALF) return null;
  const value = TUBE_STANDARDS.find((standard) => share(standard) >= MOST);
  if (!value) return null;
  const message = `The areas of the tubes are those of ${value}, not of ${mapping.tubeStandard}.`;
  const fixes = [
    { label: `Take ${value}`, reach: 'file', edit: { kind: 'set_tube_standard', value } } as const,
  ];
  const base = { rule: 3, severity: 'warning', cause: 'tube_standard' } as const;
  const finding = findingOf({ ...base, read: mapping.tubeStandard, expected: value, message, fixes });
  return { findings: [finding], corrections: [], swaps: [], assumed: { tubeStandard: value } };
}
