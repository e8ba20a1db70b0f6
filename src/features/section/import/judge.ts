import { formatNumber, unitText } from '@/engine/quantity';
import {
  type Finding as EngineFinding,
  plausibilityFindings,
  type SectionDimensions,
  type SectionProperties,
  TABULATED,
  type Tabulated,
  type TabulatedName,
} from '@/engine/section';
import { cellText, halfDigit } from './cells';
import type { Cause, Finding, Fix, RuleNumber } from './contract';
import { dropRow, findingOf } from './finding';
import { withNumbers } from './formula';
import { columnOf, type NumberColumn, type Plan } from './plan';
import type { RowRead } from './reading';
import { type UnitSlip, unitSlip } from './slips';

const TABULATED_NAMES = Object.keys(TABULATED) as TabulatedName[];

function tabulatedOf({ values }: Pick<RowRead, 'values'>): Tabulated {
  const tabulated: { [Name in TabulatedName]?: number } = {};
  for (const name of TABULATED_NAMES) {
    const value = values[name];
    if (value !== undefined) tabulated[name] = value;
  }
  return tabulated;
}

/** Half a unit of each cell's last digit, SI. */
function roundingOf({ line }: RowRead, plan: Plan): Tabulated {
  const rounding: { [Name in TabulatedName]?: number } = {};
  for (const { field, index, scale, scaleOfLine } of plan.numbers) {
    if (!(field in TABULATED)) continue;
    const text = line.cells[index] ?? '';
    rounding[field as TabulatedName] = halfDigit(text, plan.mark) * (scaleOfLine?.get(line.number) ?? scale);
  }
  return rounding;
}

/** Number and cause of the engine's rules; both second moments have one rule each. */
const RULE_OF: Readonly<Record<string, { rule: RuleNumber; cause: Cause }>> = {
  mass: { rule: 1, cause: 'mass' },
  nominal_wall: { rule: 2, cause: 'nominal_wall' },
  area: { rule: 3, cause: 'area' },
  second_moment: { rule: 4, cause: 'second_moment' },
  axes: { rule: 6, cause: 'axes_swapped' },
  gyration: { rule: 7, cause: 'gyration' },
  elastic_modulus: { rule: 8, cause: 'elastic_modulus' },
  plastic_below_elastic: { rule: 9, cause: 'moduli_swapped' },
  shape_factor: { rule: 10, cause: 'shape_factor' },
  shape_factor_minor: { rule: 11, cause: 'shape_factor_minor' },
  plastic_modulus: { rule: 12, cause: 'plastic_modulus' },
  torsion: { rule: 13, cause: 'torsion' },
  warping: { rule: 14, cause: 'warping' },
  proportions: { rule: 15, cause: 'proportions' },
};

const FIGURES = { significant: 4 };

/** An SI value as the column would print it. */
export const inColumn = (value: number, column: NumberColumn): string =>
  formatNumber(value / column.scale, FIGURES);
export const withUnit = (value: number, column: NumberColumn): string =>
  `${inColumn(value, column)} ${column.factor === 1 ? '' : `× ${column.factor} `}${unitText(column.unit)}`.trim();

/** As it would be typed into a cell of the column: the file's decimal mark, no thousands. */
const asCell = (value: number, column: NumberColumn, plan: Plan): string =>
  String(Number((value / column.scale).toPrecision(4))).replace('.', plan.mark);

/** What the properties of a row say against its dimensions and each other. */
export function judge(
  row: RowRead,
  dimensions: SectionDimensions,
  computed: SectionProperties,
  plan: Plan,
): Finding[] {
  const { density, flanges, tubeStandard } = plan.mapping;
  const found = plausibilityFindings(dimensions, tabulatedOf(row), {
    density,
    rounding: roundingOf(row, plan),
    rootRadiusKnown: row.values.r !== undefined,
    taperedFlanges: flanges === 'tapered',
    tubeStandard,
    computed,
  });
  return found.map((finding) => toFinding(finding, row, dimensions, plan));
}

function toFinding(found: EngineFinding, row: RowRead, d: SectionDimensions, plan: Plan): Finding {
  const column = columnOf(plan, found.property);
  const { rule, cause } = RULE_OF[found.rule] ?? { rule: 0, cause: 'area' as const };
  const line = row.line.number;
  const base = {
    rule: found.rule === 'second_moment' && found.property === 'iMinor' ? 5 : rule,
    cause,
    severity: found.severity,
    line,
    designation: row.printed,
    ...(column && found.rule !== 'proportions' ? { column: column.index, heading: column.heading } : {}),
    read: found.rule === 'proportions' || !column ? '' : cellText(row.line.cells[column.index] ?? ''),
  };
  const value = row.values[found.property];
  if (!column || found.expected === null || value === undefined || found.rule === 'proportions') {
    const fixes = exchange(found, row, plan);
    const other = otherOf(found, row, plan);
    const words = found.cause ?? 'Compare the source';
    return findingOf({ ...base, expected: other, formula: found.formula, message: `${words}.`, fixes });
  }
  const expected = withUnit(found.expected, column);
  const formula = `${withNumbers(found, d, row.values, plan.mapping.density)} = ${expected}`;
  const slip = found.expected === 0 ? null : unitSlip(value / found.expected, column);
  if (slip) return slipFinding(base, slip, { expected, formula, column, plan });
  const words = found.cause ?? offBy(value, found.expected);
  const fixes: Fix[] = [
    {
      label: `Use ${expected}`,
      reach: 'cell',
      edit: { kind: 'set_cell', line, column: column.index, value: asCell(found.expected, column, plan) },
    },
    dropRow(line),
  ];
  return findingOf({ ...base, expected, formula, message: `${words}.`, fixes });
}

function offBy(value: number, expected: number): string {
  if (expected === 0) return 'The value should be 0';
  const percent = (100 * (value / expected - 1)).toFixed(1);
  return `The value is ${percent.startsWith('-') ? percent.replace('-', '−') : `+${percent}`} % off. Look for a mistyped figure`;
}

type SlipPlace = { expected: string; formula: string; column: NumberColumn; plan: Plan };

/** One cell in another unit than its heading says. */
function slipFinding(
  base: Omit<Parameters<typeof findingOf>[0], 'message'>,
  slip: UnitSlip,
  { expected, formula, column }: SlipPlace,
): Finding {
  const line = base.line ?? 0;
  const { index } = column;
  const fixes: Fix[] = [];
  if (slip.unit !== null) {
    const { unit, factor } = slip;
    const edit = { kind: 'set_cells_unit', column: index, lines: [line], unit, factor } as const;
    fixes.push({ label: `Read the cell in ${slip.words}`, reach: 'cell', edit });
    fixes.push({
      label: `Read the whole column in ${slip.words}`,
      reach: 'column',
      edit: { kind: 'set_column_unit', column: index, unit, factor },
    });
  }
  const { rule, cause, message } = slip;
  return findingOf({
    ...base,
    rule,
    cause,
    severity: 'error',
    expected,
    formula,
    message,
    fixes: [...fixes, dropRow(line)],
  });
}

const EXCHANGED: Readonly<Partial<Record<TabulatedName, TabulatedName>>> = {
  iMajor: 'iMinor',
  wPlMajor: 'wElMajor',
  wPlMinor: 'wElMinor',
};
const isExchange = (rule: string) => rule === 'axes' || rule === 'plastic_below_elastic';

/** What stands in the other of two exchanged cells. */
function otherOf({ rule, property }: EngineFinding, { line }: RowRead, plan: Plan): string | null {
  const other = EXCHANGED[property];
  const column = isExchange(rule) && other ? columnOf(plan, other) : undefined;
  return column ? cellText(line.cells[column.index] ?? '') : null;
}

/** Cells of a row that are exchanged back. */
function exchange({ rule, property }: EngineFinding, row: RowRead, plan: Plan): Fix[] {
  const partner = EXCHANGED[property];
  if (!isExchange(rule) || !partner) return [dropRow(row.line.number)];
  const [one, other] = [property, partner].map((field) => columnOf(plan, field)?.index);
  if (one === undefined || other === undefined) return [dropRow(row.line.number)];
  const columns = [one, other] as const;
  const line = row.line.number;
  return [
    { label: 'Exchange the two cells', reach: 'row', edit: { kind: 'swap_cells', line, columns } },
    { label: 'Exchange the two columns', reach: 'column', edit: { kind: 'swap_columns', columns } },
    dropRow(line),
  ];
}
