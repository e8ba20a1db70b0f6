import { formatNumber, fromUnit, toUnit, unitText } from '@/engine/quantity';
import {
  asciiDesignation,
  cornerRadii,
  depthOf,
  designationKey,
  designWall,
  dimensionFaults,
  type Finding,
  type MeasuredShape,
  plausibilityFindings,
  type SectionDimensions,
  sectionProperties,
  TABULATED,
  type Tabulated,
  type TabulatedName,
  taper,
  widthOf,
} from '@/engine/section';
import type { SectionRow, SectionTableMeta } from '../section';
import type { Column } from './columns';
import { type ImportFault, isError } from './fault';
import { halfDigit } from './old-cells';
import { isNumberField, type NumberField } from './old-headings';
import {
  type Line,
  lineOf,
  type RowContext,
  readDesignation,
  readNumbers,
  readShape,
  type Values,
} from './values';

export type RowReading = { row: SectionRow | null; faults: ImportFault[] };

/** Which column holds each dimension of the engine. */
const SIZE_FIELDS: Readonly<Record<string, NumberField>> = { d: 'h', ro: 't' };

/**
 * Reads one line: the faults of its cells; if it has none, those of its geometry; if it has none, what its properties
 * say against each other. A row is given where no fault is an error.
 */
export function readRow(cells: readonly string[], number: number, context: RowContext): RowReading {
  const line = lineOf(cells, number, context.columns);
  const failed = () => line.faults.some(isError);
  const printed = readDesignation(line);
  const shape = readShape(line, context.meta);
  if (shape === null) return { row: null, faults: line.faults };
  const values = readNumbers(line, shape, context);
  if (failed()) return { row: null, faults: line.faults };

  const dimensions = dimensionsOf(shape, values, context.meta);
  for (const { dimension, message } of dimensionFaults(dimensions)) {
    const field = context.columns.map((column) => column.field).find((one) => one === dimension);
    line.report(field ?? SIZE_FIELDS[dimension] ?? 'h', {
      code: 'geometry',
      severity: 'error',
      message: `This section cannot exist: ${message}.`,
    });
  }
  if (failed()) return { row: null, faults: line.faults };

  const tabulated = tabulatedOf(values);
  judge(line, dimensions, tabulated, values.r !== undefined, context);
  const row = failed() ? null : toRow(printed, dimensions, tabulated, line.text('computed'), context.meta);
  return { row, faults: line.faults };
}

function dimensionsOf(shape: MeasuredShape, values: Values, meta: SectionTableMeta): SectionDimensions {
  const { h = Number.NaN, b = h, tw = Number.NaN, tf = Number.NaN, r = 0, t = Number.NaN } = values;
  const wall = designWall(t, meta.tube_standard);
  switch (shape) {
    case 'i':
    case 'channel':
    case 'tee':
      return { shape, h, b, tw, tf, r };
    case 'tapered_i':
    case 'tapered_channel':
      return taper(shape, { h, b, tw, tf, r }, meta.axes === 'us' ? 'american' : 'european');
    case 'angle':
      return { shape, h, b, t, r, toe: r / 2 };
    case 'rhs':
    case 'shs':
      return { shape, h, b, t: wall, ...cornerRadii(wall, meta.tube_standard) };
    case 'chs':
      return { shape, d: h, t: wall };
    case 'rectangle':
      return { shape, h, b };
    case 'round':
      return { shape, d: h };
  }
}

const TABULATED_NAMES = Object.keys(TABULATED) as TabulatedName[];
const tabulatedOf = (values: Values): Tabulated =>
  Object.fromEntries(TABULATED_NAMES.map((name) => [name, values[name]]));

/** Half a unit of each cell's last digit, SI. */
function roundingOf(line: Line, { columns, mark }: RowContext): Tabulated {
  return Object.fromEntries(
    columns.flatMap(({ field, unit, factor }) =>
      isNumberField(field) && unit !== null
        ? [[field, fromUnit(halfDigit(line.text(field), mark) * factor, siUnit(field, unit))]]
        : [],
    ),
  );
}

/** A pound per foot in a mass column is a mass, where the unit alone would be a force. */
const siUnit = (field: NumberField, unit: string) =>
  field === 'mass' ? unit.replace(/^lbs?(?=\/)/i, 'lbm').replace(/^plf$/i, 'lbm/ft') : unit;

function judge(
  line: Line,
  dimensions: SectionDimensions,
  tabulated: Tabulated,
  rootRadiusKnown: boolean,
  context: RowContext,
): void {
  const findings = plausibilityFindings(dimensions, tabulated, {
    density: context.meta.density_kg_m3,
    rounding: roundingOf(line, context),
    rootRadiusKnown,
  });
  for (const finding of findings) {
    const column = context.columns.find((one) => one.field === finding.property);
    line.report(finding.property, wordsOf(finding, line.text(finding.property), column));
  }
}

const FIGURES = { significant: 4 };

function wordsOf(finding: Finding, got: string, column: Column | undefined) {
  const { severity, formula, cause } = finding;
  const tail = cause === null ? '' : ` ${cause}.`;
  if (finding.expected === null || !column?.unit) {
    return {
      code: 'implausible',
      severity,
      message: `${formula}: the file says ${got}.${tail}`,
    } as const;
  }
  const unit = siUnit(finding.property, column.unit);
  const expected = formatNumber(toUnit(finding.expected, unit) / column.factor, FIGURES);
  const message = `${formula} gives ${expected} ${unitText(unit)}; the file says ${got}.${tail}`;
  return { code: 'implausible', severity, expected, message } as const;
}

const EXACT = 12; // figures: what a file prints, without the last bits of its conversion
const inUnit = (value: number, unit: string) => Number(toUnit(value, unit).toPrecision(EXACT));

/** The supplied values; what the file does not give is computed from the dimensions and named so. */
function toRow(
  printed: string,
  dimensions: SectionDimensions,
  tabulated: Tabulated,
  named: string,
  meta: SectionTableMeta,
): SectionRow {
  const properties = sectionProperties(dimensions);
  const computed = new Set(named.split(/[\s;]+/).filter((name) => name !== ''));
  const value = (name: Exclude<TabulatedName, 'mass'>, unit: string, field: string): number => {
    const supplied = tabulated[name];
    if (supplied === undefined) computed.add(field);
    return inUnit(supplied ?? properties[name], unit);
  };
  const values = {
    area_cm2: value('area', 'cm2', 'area_cm2'),
    i_major_cm4: value('iMajor', 'cm4', 'i_major_cm4'),
    i_minor_cm4: value('iMinor', 'cm4', 'i_minor_cm4'),
    w_el_cm3: value('wElMajor', 'cm3', 'w_el_cm3'),
    w_el_minor_cm3: value('wElMinor', 'cm3', 'w_el_minor_cm3'),
    w_pl_cm3: value('wPlMajor', 'cm3', 'w_pl_cm3'),
    w_pl_minor_cm3: value('wPlMinor', 'cm3', 'w_pl_minor_cm3'),
    j_cm4: value('j', 'cm4', 'j_cm4'),
    iw_cm6: value('iw', 'cm6', 'iw_cm6'),
  };
  if (tabulated.mass === undefined) computed.add('mass_kg_m');
  return {
    designation: asciiDesignation(printed),
    printed,
    key: designationKey(printed),
    shape: dimensions.shape,
    depth_mm: inUnit(depthOf(dimensions), 'mm'),
    width_mm: inUnit(widthOf(dimensions), 'mm'),
    mass_kg_m: inUnit(tabulated.mass ?? meta.density_kg_m3 * properties.area, 'kg/m'),
    ...values,
    computed: [...computed].sort(),
    dimensions,
  };
}
