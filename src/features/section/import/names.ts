import type { SectionShape } from '@/engine/section';
import { cellText, halfDigit } from './cells';
import type { Cause, Finding, NameFacts, NumberField, RuleNumber } from './contract';
import { dropRow, findingOf } from './finding';
import { columnOf, type NumberColumn, type Plan } from './plan';
import { isRolled, type RowRead, type Values } from './reading';

const INCH = 0.0254; // m
const MILLIMETRE = 0.001; // m
const TIMBER = 1500; // kg/m³: no wood is as heavy, no metal as light

/** Sizes in a row's name, as numbers. */
const sizesOf = ({ name }: Pick<RowRead, 'name'>): number[] => name.sizes.map(Number);

/** The unit in which a size of a name comes nearest to what was measured. */
function nominalUnit(size: number, measured: number): number {
  const off = (unit: number) => Math.abs(Math.log(measured / (size * unit)));
  return off(INCH) < off(MILLIMETRE) ? INCH : MILLIMETRE;
}

/** The mass that a name ends with, and that of the row, in the unit of its column. */
function massesOf(row: RowRead, column: NumberColumn | undefined) {
  if (!isRolled(row.shape)) return null;
  const sizes = sizesOf(row);
  const { mass } = row.values;
  if (sizes.length < 2 || mass === undefined || !column) return null;
  return { named: sizes.at(-1) ?? 0, given: mass / column.scale };
}

/** The mass may be rounded to a whole number in the name, and a little differently in the column. */
const MASS_ROOM = 1;

const BELOW = 0.95; // of what the name and its family say: light ones, HE AA, all stay below their names
const ABOVE = 1.6; // heavy columns are rolled far above their serial depth

function depthRatio({ name, values, shape }: RowRead): { size: number; unit: number; ratio: number } | null {
  if (!isRolled(shape)) return null;
  const [size] = sizesOf({ name });
  if (size === undefined || size === 0 || values.h === undefined) return null;
  const unit = nominalUnit(size, values.h);
  return { size, unit, ratio: values.h / (size * unit) };
}

/** What lumber of a nominal size measures when it is dressed, in: PS 20, from memory. */
function dressed(nominal: number): readonly number[] {
  if (nominal === 1) return [0.75];
  if (nominal < 8) return [nominal - 0.5];
  return [nominal - 0.75, nominal - 0.5];
}

const SIZE_ROOM = 0.001; // m: names are rounded to whole millimetres and sixteenths
const isSize = (measured: number, size: number) =>
  Math.abs(measured - size) <= Math.max(SIZE_ROOM, 0.005 * size);

type SizeMatch = 'as_named' | 'dressed' | 'nominal' | 'other';

/** How width and depth of a solid stand to the two sizes of its name. */
function matchSizes([one, other]: readonly number[], { h, b }: Values, isTimber: boolean): SizeMatch | null {
  if (one === undefined || other === undefined || h === undefined || b === undefined) return null;
  const unit = nominalUnit(Math.max(one, other), Math.max(h, b));
  const [small, large] = [Math.min(one, other), Math.max(one, other)];
  const [narrow, deep] = [Math.min(h, b), Math.max(h, b)];
  const isNominal = isTimber && unit === INCH && Number.isInteger(one) && Number.isInteger(other);
  const isDressed = [small, large].every((size, at) =>
    dressed(size).some((actual) => isSize(at === 0 ? narrow : deep, actual * INCH)),
  );
  if (isNominal && isDressed) return 'dressed';
  const isAsNamed = isSize(narrow, small * unit) && isSize(deep, large * unit);
  if (isAsNamed) return isNominal ? 'nominal' : 'as_named';
  return 'other';
}

function matchTube(row: RowRead): SizeMatch | null {
  const { h, b = h } = row.values;
  const sizes = sizesOf(row);
  const [one = 0, other = one] = row.shape === 'chs' ? [sizes[0]] : sizes;
  if (h === undefined || b === undefined || one === 0) return null;
  const unit = nominalUnit(one, h);
  const [small, large] = [Math.min(one, other), Math.max(one, other)];
  const isAsNamed = isSize(Math.min(h, b), small * unit) && isSize(Math.max(h, b), large * unit);
  return isAsNamed ? 'as_named' : 'other';
}

const isTube = (shape: SectionShape | null) => shape === 'rhs' || shape === 'shs' || shape === 'chs';
function matchOf(row: RowRead, plan: Plan): SizeMatch | null {
  if (row.shape === 'rectangle') return matchSizes(sizesOf(row), row.values, plan.mapping.density < TIMBER);
  return isTube(row.shape) ? matchTube(row) : null;
}

const FEW = 3; // sections of a family, from which its usual depth is told

/** Counts, row by row, what the names of a file carry. */
export class NameCount {
  private readonly of = { mass: 0, sizes: 0 };
  private readonly fits = { mass: 0, sizes: 0 };
  private readonly depths = new Map<string, number[]>();

  add(row: RowRead, plan: Plan): void {
    const count = (kind: 'mass' | 'sizes', fits: boolean) => {
      this.of[kind]++;
      if (fits) this.fits[kind]++;
    };
    const masses = massesOf(row, columnOf(plan, 'mass'));
    if (masses) count('mass', Math.abs(masses.named - masses.given) <= MASS_ROOM);
    const match = matchOf(row, plan);
    if (match) count('sizes', match !== 'other');
    const depth = depthRatio(row);
    if (!depth) return;
    const ratios = this.depths.get(row.name.family);
    if (ratios) ratios.push(depth.ratio);
    else this.depths.set(row.name.family, [depth.ratio]);
  }

  facts(): NameFacts {
    const most = (kind: 'mass' | 'sizes') => this.of[kind] > 0 && this.fits[kind] >= MOST * this.of[kind];
    const depths: Record<string, number> = {};
    for (const [family, ratios] of this.depths) {
      const usual = [...ratios].sort((a, b) => a - b)[Math.floor(ratios.length / 2)] ?? 0;
      if (ratios.length >= FEW && usual > LEAST_DEPTH && usual < ABOVE) depths[family] = usual;
    }
    return { mass: most('mass'), sizes: most('sizes'), depths };
  }
}
const LEAST_DEPTH = 0.85; // of the name: below, its first size is no depth
const MOST = 0.6; // of the rows: then names carry it, and the others are at fault

type Said = {
  rule: RuleNumber;
  severity: Finding['severity'];
  cause: Cause;
  message: string;
  field: NumberField;
};

function report(row: RowRead, plan: Plan, said: Said, expected: string, formula: string): Finding {
  const column = columnOf(plan, said.field);
  const { field: _field, ...rest } = said;
  return findingOf({
    ...rest,
    line: row.line.number,
    designation: row.printed,
    ...(column ? { column: column.index, heading: column.heading } : {}),
    read: column ? cellText(row.line.cells[column.index] ?? '') : '',
    expected,
    formula,
    fixes: [dropRow(row.line.number)],
  });
}

const plainly = (value: number) => String(Number(value.toPrecision(4)));

function massFinding(row: RowRead, plan: Plan): Finding | null {
  const column = columnOf(plan, 'mass');
  const masses = massesOf(row, column);
  if (!masses || !column) return null;
  const room = MASS_ROOM + halfDigit(cellText(row.line.cells[column.index] ?? ''), plan.mark);
  if (Math.abs(masses.named - masses.given) <= room) return null;
  const message =
    'The mass in the name is another than that of the row: the name or the row belongs to another section.';
  const said = { rule: 17, severity: 'warning', cause: 'name_mass', message, field: 'mass' } as const;
  const formula = `The name says ${plainly(masses.named)} ${column.unit}, the row ${plainly(masses.given)}`;
  return report(row, plan, said, `${plainly(masses.named)} ${column.unit}`, formula);
}

function depthFinding(row: RowRead, plan: Plan, usual: number): Finding | null {
  const depth = depthRatio(row);
  if (!depth || (depth.ratio >= BELOW * Math.min(usual, 1) && depth.ratio <= ABOVE)) return null;
  const message =
    'The depth is far from the one in the name: the name or the row belongs to another section.';
  const said = { rule: 17, severity: 'warning', cause: 'name_depth', message, field: 'h' } as const;
  const unit = depth.unit === INCH ? 'in' : 'mm';
  return report(
    row,
    plan,
    said,
    `${depth.size} ${unit}`,
    `h over the depth in the name is ${depth.ratio.toFixed(2)}, in the family ${usual.toFixed(2)}`,
  );
}

function sizeFinding(row: RowRead, plan: Plan): Finding | null {
  const match = matchOf(row, plan);
  if (match === null || match === 'as_named' || match === 'dressed') return null;
  const isTimber = row.shape === 'rectangle' && plan.mapping.density < TIMBER;
  const sizes = sizesOf(row).slice(0, row.shape === 'chs' ? 1 : 2);
  const named = sizes.map(String).join(' × ');
  if (match === 'nominal') {
    const actual = sizes.map((size) => plainly(dressed(size)[0] ?? size)).join(' × ');
    const message = `These are nominal sizes. Lumber of ${named} measures ${actual} in when it is dressed.`;
    const said = { rule: 39, severity: 'error', cause: 'nominal_size', message, field: 'h' } as const;
    return report(row, plan, said, `${actual} in`, `Dressed size of nominal ${named}`);
  }
  const message = isTimber
    ? 'The sizes are not those of the name: sawn for regularised, or another piece.'
    : 'The sizes are not those of the name: the name or the row belongs to another section.';
  const severity = isTimber ? 'error' : 'warning';
  const said = { rule: isTimber ? 39 : 17, severity, cause: 'name_size', message, field: 'h' } as const;
  return report(row, plan, said, named, 'Sizes of the name against h and b');
}

const CLEAR_ROOM = 0.001; // m

/** Clear depth of the web; US tables print detailing values, which are not tested. */
function clearFinding(row: RowRead, plan: Plan): Finding | null {
  const { dClear, h, tf, r } = row.values;
  const column = columnOf(plan, 'dClear');
  if (dClear === undefined || h === undefined || tf === undefined || r === undefined || !column) return null;
  if (plan.mapping.axes === 'us') return null;
  const expected = h - 2 * tf - 2 * r;
  if (Math.abs(dClear - expected) <= CLEAR_ROOM) return null;
  const shown = plainly(expected / column.scale);
  const message = 'The clear depth of the web does not follow from depth, flanges and root radii.';
  const said = { rule: 16, severity: 'note', cause: 'clear_depth', message, field: 'dClear' } as const;
  return report(row, plan, said, `${shown} ${column.unit}`, `d = h − 2·t_f − 2·r = ${shown} ${column.unit}`);
}

/** What a row's name says against its values, and its clear depth. */
export function nameFindings(row: RowRead, plan: Plan, names: NameFacts): Finding[] {
  const { family } = row.name;
  const usual = Object.hasOwn(names.depths, family) ? names.depths[family] : undefined;
  return [
    names.mass ? massFinding(row, plan) : null,
    usual === undefined ? null : depthFinding(row, plan, usual),
    names.sizes ? sizeFinding(row, plan) : null,
    clearFinding(row, plan),
  ].filter((finding) => finding !== null);
}
