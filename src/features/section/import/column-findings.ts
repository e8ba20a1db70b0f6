import { unitText } from '@/engine/quantity';
import { sectionProperties, TABULATED, type TabulatedName } from '@/engine/section';
import type { FileFacts, Finding, Mapping, NumberField } from './contract';
import { findingOf } from './finding';
import { withUnit } from './judge';
import { type ColumnFindings, columnOf, type NumberColumn, type Plan } from './plan';
import { possible, type RowStore } from './row-store';
import { sizeHypothesis } from './size-columns';
import { type UnitSlip, unitSlip } from './slips';

const FEW = 3; // rows, below which nothing is said of a column
const MOST = 0.9; // of the rows: then the column is wrong, not the rows
const SAME = 0.02; // spread of the rows about the median
const SOME = 0.05; // of the rows, and FEW: a second unit in the column
const OFF = 0.05; // of the median, by which a column is out without a unit that explains it
const ROUGH: ReadonlySet<TabulatedName> = new Set(['j', 'iw']); // computed within 5 and 12 % only
const ROUGHLY_OFF = 0.2;

const NOMINAL_MASS = 1.07; // over that of the design wall of a tube to ASTM A500

const TABULATED_NAMES = Object.keys(TABULATED) as TabulatedName[];

const median = (sorted: Float64Array) => sorted[Math.floor(sorted.length / 2)] ?? Number.NaN;

/** Logarithms of tabulated over computed, row by row, for each property that the file has; NaN where a row has none. */
function ratiosOf(store: RowStore, mapping: Mapping): Map<TabulatedName, Float64Array> {
  const names = TABULATED_NAMES.filter((name) => store.fields.includes(name));
  const logs = names.map(() => new Float64Array(store.count).fill(Number.NaN));
  for (let at = 0; at < store.count; at++) {
    const dimensions = possible(store, at, mapping);
    if (!dimensions) continue;
    const computed = sectionProperties(dimensions);
    const isDesignWall = mapping.tubeStandard === 'ASTM A500' && 't' in dimensions;
    const mass = mapping.density * computed.area * (isDesignWall ? NOMINAL_MASS : 1);
    for (const [k, name] of names.entries()) {
      const value = store.value(name, at);
      const expected = name === 'mass' ? mass : computed[name];
      if (value > 0 && expected > 0) (logs[k] as Float64Array)[at] = Math.log(value / expected);
    }
  }
  return new Map(names.map((name, k) => [name, logs[k] as Float64Array]));
}

/** What is wrong with whole columns, each once; the store is corrected for it as the second reading will be. */
export function columnFindings(store: RowStore, mapping: Mapping, plan: Plan): ColumnFindings {
  const sizes = sizeHypothesis(store, mapping, plan);
  const found: ColumnFindings = {
    ...sizes,
    findings: [...sizes.findings],
    corrections: [...sizes.corrections],
  };
  const swapped = swaps(store, plan);
  found.findings.push(...swapped.findings);
  found.swaps = [...found.swaps, ...swapped.swaps];
  const judged = { ...mapping, ...found.assumed };
  for (const [name, logs] of ratiosOf(store, judged)) {
    const column = fieldColumn(plan, name, found.swaps);
    if (column) judgeColumn(name, logs, column, store, found, judged);
  }
  return found;
}

/** The column that holds a property once exchanged columns are put right. */
function fieldColumn(plan: Plan, field: NumberField, swapped: FileFacts['swaps']): NumberColumn | undefined {
  const own = columnOf(plan, field);
  const swap = swapped.find((pair) => own !== undefined && pair.includes(own.index));
  const other = swap?.find((index) => index !== own?.index);
  return other === undefined ? own : plan.numbers.find(({ index }) => index === other);
}

function judgeColumn(
  name: TabulatedName,
  logs: Float64Array,
  column: NumberColumn,
  store: RowStore,
  found: ColumnFindings,
  mapping: Mapping,
): void {
  const given = logs.filter((log) => !Number.isNaN(log)).sort();
  if (given.length < FEW) return;
  const middle = median(given);
  const agreeing = agreeingWithin(given, middle, SAME);
  const slip = unitSlip(Math.exp(middle), column);
  const limit = ROUGH.has(name) ? ROUGHLY_OFF : OFF;
  const isTogether =
    agreeing >= MOST * given.length ||
    (slip !== null && agreeingWithin(given, middle, NEAR) >= MOST * given.length);
  if (isTogether && (slip || Math.abs(middle) > limit)) {
    columnSlip(
      { name, column, slip, ratio: Math.exp(middle), agreeing, of: given.length },
      store,
      found,
      mapping,
    );
    return;
  }
  mixedUnits(logs, given.length, column, store, found);
}

const NEAR = 0.06; // where values of few figures scatter about a slip of units
const agreeingWithin = (logs: Float64Array, middle: number, by: number) =>
  logs.reduce((sum, log) => (Math.abs(log - middle) <= by ? sum + 1 : sum), 0);

type Slipped = {
  name: TabulatedName;
  column: NumberColumn;
  slip: UnitSlip | null;
  ratio: number;
  agreeing: number;
  of: number;
};

/** What is said of a whole column, and what it is read by all the same. */
function columnSlip(slipped: Slipped, store: RowStore, found: ColumnFindings, mapping: Mapping): void {
  if (slipped.slip) unitOfColumn(slipped, slipped.slip, store, found);
  else if (slipped.name === 'mass') densityOfMasses(slipped, found, mapping);
  else unknownFactor(slipped, store, found);
}

const timesOf = (ratio: number): number => Number(ratio.toPrecision(3));
const evidence = ({ ratio, agreeing, of }: Slipped): string =>
  `given over computed is ${timesOf(ratio)} in the median, and within 2 % of it in ${agreeing} of ${of} rows`;
const slipOf = (slipped: Slipped) =>
  ({
    rule: 20,
    severity: 'error',
    cause: 'column_slip',
    column: slipped.column.index,
    heading: slipped.column.heading,
    formula: evidence(slipped),
  }) as const;

function unitOfColumn(slipped: Slipped, slip: UnitSlip, store: RowStore, found: ColumnFindings): void {
  const { column } = slipped;
  const { unit, factor, words, message, correction } = slip;
  const edit = { kind: 'set_column_unit', column: column.index, unit: unit ?? column.unit, factor } as const;
  const fixes = [{ label: `Read the column in ${words}`, reach: 'column', edit } as const];
  const said = `The whole column: ${message.charAt(0).toLowerCase()}${message.slice(1)}`;
  found.findings.push(
    findingOf({ ...slipOf(slipped), read: unitText(column.unit), expected: words, message: said, fixes }),
  );
  found.corrections.push({ column: column.index, factor: correction, lines: null });
  store.scale(column.field, correction, null);
}

function densityOfMasses(slipped: Slipped, found: ColumnFindings, mapping: Mapping): void {
  const { index, heading } = slipped.column;
  const density = mapping.density * slipped.ratio;
  const value = timesOf(density);
  const edit = { kind: 'set_density', value } as const;
  found.findings.push(
    findingOf({
      rule: 1,
      severity: 'warning',
      cause: 'density',
      column: index,
      heading,
      formula: evidence(slipped),
      read: String(mapping.density),
      expected: `${value} kg/m³`,
      message: `The masses are those of a material of ${value} kg/m³, not of ${mapping.density}.`,
      fixes: [{ label: `Take ${value} kg/m³`, reach: 'file', edit }],
    }),
  );
  found.assumed = { ...found.assumed, density };
}

function unknownFactor(slipped: Slipped, store: RowStore, found: ColumnFindings): void {
  const { column, ratio } = slipped;
  const times = timesOf(ratio);
  const edit = { kind: 'leave_out_column', column: column.index } as const;
  found.findings.push(
    findingOf({
      ...slipOf(slipped),
      read: `× ${times}`,
      expected: '× 1',
      message: `All rows give ${times} times what their sizes give. Look what the column holds, or leave it out.`,
      fixes: [{ label: 'Leave the column out', reach: 'column', edit }],
    }),
  );
  found.corrections.push({ column: column.index, factor: 1 / ratio, lines: null });
  store.scale(column.field, 1 / ratio, null);
}

const FAR = Math.log(1.3); // a factor between units is farther from 1 than any fault of rounding

/** Clusters of rows a known factor away from the others. */
function mixedUnits(
  logs: Float64Array,
  given: number,
  column: NumberColumn,
  store: RowStore,
  found: ColumnFindings,
): void {
  const clusters = new Map<string, { slip: UnitSlip; rows: number[] }>();
  for (let at = 0; at < logs.length; at++) {
    const log = logs[at] ?? Number.NaN;
    if (!(Math.abs(log) >= FAR)) continue;
    const slip = unitSlip(Math.exp(log), column);
    if (!slip) continue;
    const cluster = clusters.get(slip.words) ?? { slip, rows: [] };
    cluster.rows.push(at);
    clusters.set(slip.words, cluster);
  }
  for (const { slip, rows: members } of clusters.values()) {
    if (members.length < Math.max(FEW, SOME * given)) continue;
    const lines = members.map((at) => store.lines[at] ?? 0);
    const { unit, factor, words, correction } = slip;
    const edit = {
      kind: 'set_cells_unit',
      column: column.index,
      lines,
      unit: unit ?? column.unit,
      factor,
    } as const;
    const first = members[0] ?? 0;
    const value = store.value(column.field, first);
    found.findings.push(
      findingOf({
        rule: 27,
        severity: 'error',
        cause: 'mixed_units',
        column: column.index,
        heading: column.heading,
        read: withUnit(value, column),
        expected: withUnit(value * correction, column),
        formula: `${members.length} of ${given} rows fit when they are read in ${words}`,
        message: `Two units in one column: ${members.length} rows, the first in line ${lines[0]}, look like ${words}.`,
        fixes: [{ label: `Read these ${members.length} cells in ${words}`, reach: 'column', edit }],
      }),
    );
    found.corrections.push({ column: column.index, factor: correction, lines });
    store.scale(column.field, correction, members);
  }
}

/** Pairs of columns that stand in each other's place in nearly every row. */
function swaps(store: RowStore, plan: Plan): Pick<ColumnFindings, 'findings' | 'swaps'> {
  const findings: Finding[] = [];
  const swapped: [number, number][] = [];
  const pairs = [
    { one: 'wElMajor', other: 'wPlMajor', rule: 9, cause: 'moduli_swapped', words: 'W_pl is below W_el' },
    { one: 'wElMinor', other: 'wPlMinor', rule: 9, cause: 'moduli_swapped', words: 'W_pl is below W_el' },
    { one: 'iMajor', other: 'iMinor', rule: 6, cause: 'axes_swapped', words: 'I major is below I minor' },
  ] as const;
  for (const { one, other, rule, cause, words } of pairs) {
    const [first, second] = [columnOf(plan, one), columnOf(plan, other)];
    if (!first || !second) continue;
    const { below, of } = countBelow(store, one, other);
    if (of < FEW || below < MOST * of) continue;
    const columns: [number, number] = [first.index, second.index];
    const message = `The two columns look exchanged: ${words} in ${below} of ${of} rows. Look at the axis convention too.`;
    const fixes = [
      {
        label: 'Exchange the two columns',
        reach: 'column',
        edit: { kind: 'swap_columns', columns },
      } as const,
    ];
    const base = { rule, severity: 'error', cause, column: first.index, heading: first.heading } as const;
    findings.push(
      findingOf({ ...base, read: first.heading, expected: second.heading, formula: words, message, fixes }),
    );
    swapped.push(columns);
    store.swap(one, other);
  }
  return { findings, swaps: swapped };
}

/** How many rows have `other` below `one` (moduli), or `one` below `other` (axes); equal values say nothing. */
function countBelow(store: RowStore, one: NumberField, other: NumberField) {
  let below = 0;
  let of = 0;
  for (let at = 0; at < store.count; at++) {
    const [a, b] = [store.value(one, at), store.value(other, at)];
    if (!(a > 0 && b > 0) || Math.abs(a / b - 1) < 0.01) continue;
    of++;
    if (one === 'iMajor' ? a < b : b < a) below++;
  }
  return { below, of };
}
