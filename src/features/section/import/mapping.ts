import { unitScale } from './cells';
import type { Answer, Axes, Field, MappedColumn, Mapping, Question } from './contract';
import { FIELD_QUANTITY, isNumberField, readUnitText, settle } from './headings';

/** Units that are offered for a column without one, the usual one first. */
const OFFERED: Readonly<Record<string, readonly string[]>> = {
  length: ['mm', 'cm', 'in', 'm'],
  mass_per_length: ['kg/m', 'lb/ft'],
  area: ['cm2', 'mm2', 'in2'],
  second_moment: ['cm4', 'mm4', 'in4'],
  section_modulus: ['cm3', 'mm3', 'in3'],
  warping: ['cm6', 'dm6', 'mm6', 'in6'],
};

/** Radii of gyration are printed in cm. */
export const offeredUnits = (field: Field): readonly string[] => {
  if (!isNumberField(field)) return [];
  if (field === 'rMajor' || field === 'rMinor') return ['cm', 'mm', 'in'];
  return OFFERED[FIELD_QUANTITY[field]] ?? [];
};

/** Whether the column's unit is one of its quantity. */
export const hasRightUnit = ({ field, unit }: Pick<MappedColumn, 'field' | 'unit'>): boolean =>
  isNumberField(field) && unit !== null && !Number.isNaN(unitScale(unit, FIELD_QUANTITY[field]));

/** True where a heading means opposite axes by region and nobody has said which it follows. */
const isAxisOpen = (mapping: Mapping): boolean =>
  mapping.axes === null &&
  mapping.columns.some(({ field, byAxes }) => field === null && byAxes !== undefined);

const hasNeeded = ({ columns, shape }: Mapping) => {
  const has = (field: Field) => columns.some((column) => column.field === field);
  return { designation: has('designation'), h: has('h'), shape: shape !== null || has('shape') };
};

/** What still has to be answered before the file can be checked. */
export function openQuestions(mapping: Mapping): Question['kind'][] {
  const needed = hasNeeded(mapping);
  const isUnitOpen = mapping.columns.some((column) => isNumberField(column.field) && !hasRightUnit(column));
  const open: [Question['kind'], boolean][] = [
    ['encoding', mapping.encoding === null],
    ['decimal_mark', mapping.decimalMark === null],
    ['axes', isAxisOpen(mapping)],
    ['column', !needed.designation || !needed.h],
    ['unit', isUnitOpen],
    ['shape', !needed.shape],
  ];
  return open.filter(([, is]) => is).map(([kind]) => kind);
}

function withAxes(mapping: Mapping, axes: Axes): Mapping {
  const columns = mapping.columns.map((column) =>
    column.byAxes ? { ...column, field: column.byAxes[axes] } : column,
  );
  return { ...mapping, axes, columns: settle(columns) };
}

function withColumn(
  mapping: Mapping,
  index: number,
  change: (column: MappedColumn) => MappedColumn,
): Mapping {
  const columns = mapping.columns.map((column) => (column.index === index ? change(column) : column));
  return { ...mapping, columns };
}

/** A field given to one column is taken from the other that had it. */
function withField(mapping: Mapping, index: number, field: Field | null): Mapping {
  const columns = mapping.columns.map((column) => {
    if (column.index === index) return { ...column, field };
    return field !== null && column.field === field ? { ...column, field: null } : column;
  });
  return { ...mapping, columns };
}

/** The mapping with one answer; the others stay. A unit may carry a multiplier: "10³ cm⁶". */
export function answer(mapping: Mapping, given: Answer): Mapping {
  switch (given.kind) {
    case 'encoding':
      return { ...mapping, encoding: given.value };
    case 'decimal_mark':
      return { ...mapping, decimalMark: given.value };
    case 'axes':
      return withAxes(mapping, given.value);
    case 'unit':
      return withColumn(mapping, given.column, (column) => ({ ...column, ...readUnitText(given.value) }));
    case 'field':
      return withField(mapping, given.column, given.value);
    case 'shape':
      return { ...mapping, shape: given.value };
    case 'flanges':
      return { ...mapping, flanges: given.value };
    case 'density':
      return { ...mapping, density: given.value };
    case 'tube_standard':
      return { ...mapping, tubeStandard: given.value };
  }
}

const plain = (heading: string) =>
  heading
    .replaceAll(/[\ufeff\s]+/g, ' ')
    .trim()
    .toLowerCase();

/**
 * A supplier's mapping on a new file of the same headings in the same order: what was said of columns, axes, units and
 * kind; encoding, delimiter, decimal mark and lines are those of the new file, where they are known. Null where a
 * heading differs.
 */
export function remember(remembered: Mapping, recognised: Mapping): Mapping | null {
  const isSame =
    remembered.columns.length === recognised.columns.length &&
    remembered.columns.every(
      ({ heading }, at) => plain(heading) === plain(recognised.columns[at]?.heading ?? ''),
    );
  if (!isSame) return null;
  const columns = remembered.columns.map((column, at) => {
    const now = recognised.columns[at];
    if (!now) return column;
    const isGiven = now.unit !== null && now.field === column.field;
    const unit = isGiven
      ? { unit: now.unit, factor: now.factor }
      : { unit: column.unit, factor: column.factor };
    return { ...column, ...unit, index: now.index, heading: now.heading };
  });
  return {
    ...remembered,
    columns,
    encoding: recognised.encoding ?? remembered.encoding,
    delimiter: recognised.delimiter,
    decimalMark: recognised.decimalMark ?? remembered.decimalMark,
    headingLine: recognised.headingLine,
    unitLine: recognised.unitLine,
  };
}
