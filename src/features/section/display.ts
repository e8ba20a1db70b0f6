import {
  formatNumber,
  fromUnit,
  type Rounding,
  toUnit,
  type UnitSystemName,
  unitText,
} from '@/engine/quantity';
import { measureOf, type SectionField } from './query';
import type { SectionItem } from './section';

type Shown = Rounding & { readonly unit: string };

interface FieldWords {
  /** What the field is called in a sentence: "second moment, major axis". */
  readonly name: string;
  /** Letter and mark: I_{y}. `major` and `minor` stand for the letters of the axes. */
  readonly symbol: string;
  /** The unit of the field itself. */
  readonly own: string;
  readonly metric: Shown;
  readonly us: Shown;
}

const WHOLE = { significant: 3, places: 0 };
const size = (name: string, symbol: string, places: number): FieldWords => ({
  name,
  symbol,
  own: 'mm',
  metric: { unit: 'mm', places: 1 },
  us: { unit: 'in', places },
});
const moment = (name: string, symbol: string): FieldWords => ({
  name,
  symbol,
  own: 'cm4',
  metric: { unit: 'cm4', ...WHOLE },
  us: { unit: 'in4', ...WHOLE },
});
const modulus = (name: string, symbol: string): FieldWords => ({
  name,
  symbol,
  own: 'cm3',
  metric: { unit: 'cm3', ...WHOLE },
  us: { unit: 'in3', ...WHOLE },
});
const radius = (name: string, symbol: string): FieldWords => ({
  name,
  symbol,
  own: 'cm',
  metric: { unit: 'cm', places: 2 },
  us: { unit: 'in', places: 2 },
});

export const FIELD_WORDS: Readonly<Record<SectionField, FieldWords>> = {
  mass_kg_m: {
    name: 'mass',
    symbol: 'm',
    own: 'kg/m',
    metric: { unit: 'kg/m', places: 1 },
    us: { unit: 'lbm/ft', places: 1 },
  },
  depth_mm: size('depth', 'h', 2),
  width_mm: size('width', 'b', 2),
  tw_mm: size('web or wall', 't_{w}', 3),
  tf_mm: size('flange', 't_{f}', 3),
  r_mm: size('root or corner radius', 'r', 3),
  area_cm2: {
    name: 'area',
    symbol: 'A',
    own: 'cm2',
    metric: { unit: 'cm2', significant: 3, places: 1 },
    us: { unit: 'in2', significant: 3 },
  },
  i_major_cm4: moment('second moment, major axis', 'I_{major}'),
  i_minor_cm4: moment('second moment, minor axis', 'I_{minor}'),
  w_el_cm3: modulus('elastic modulus, major axis', 'W_{el,major}'),
  w_pl_cm3: modulus('plastic modulus, major axis', 'W_{pl,major}'),
  r_major_cm: radius('radius of gyration, major axis', 'i_{major}'),
  r_minor_cm: radius('radius of gyration, minor axis', 'i_{minor}'),
  j_cm4: moment('torsion constant', 'I_{t}'),
  iw_cm6: {
    name: 'warping constant',
    symbol: 'I_{w}',
    own: 'cm6',
    metric: { unit: 'dm6', significant: 3 },
    us: { unit: 'in6', ...WHOLE },
  },
};

/** The letters of the axes; the same letter means opposite axes in Europe and America. */
const AXES = { en: { major: 'y', minor: 'z' }, us: { major: 'x', minor: 'y' } } as const;
export type AxisLetters = (typeof AXES)[keyof typeof AXES];

export const axesOf = (system: UnitSystemName): AxisLetters => AXES[system === 'us' ? 'us' : 'en'];

/** A table's own letters, else those of the person. */
export const axesOfTable = (
  axes: 'en' | 'us' | 'british' | undefined,
  system: UnitSystemName,
): AxisLetters => (axes === undefined ? axesOf(system) : AXES[axes === 'en' ? 'en' : 'us']);

export const symbolOf = (field: SectionField, axes: AxisLetters): string =>
  FIELD_WORDS[field].symbol.replace('major', axes.major).replace('minor', axes.minor);

/** The unit in running text: cm⁴. */
export const unitOf = (field: SectionField, system: UnitSystemName): string =>
  unitText(FIELD_WORDS[field][system].unit);

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** The unit as rich text, cm^{4}: the typeface has no raised 4 of its own. */
export const richUnitOf = (field: SectionField, system: UnitSystemName): string =>
  unitOf(field, system).replace(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/, (digit) => `^{${RAISED.indexOf(digit)}}`);

/** A value in the field's own unit, in the unit that is shown. */
export function toShown(field: SectionField, value: number, system: UnitSystemName): number {
  const { own, [system]: shown } = FIELD_WORDS[field];
  return own === shown.unit ? value : toUnit(fromUnit(value, own), shown.unit);
}

const EXACT = 12; // figures: a bound typed in inches reads the same after it has been millimetres

export function fromShown(field: SectionField, value: number, system: UnitSystemName): number {
  const { own, [system]: shown } = FIELD_WORDS[field];
  return own === shown.unit ? value : Number(toUnit(fromUnit(value, shown.unit), own).toPrecision(EXACT));
}

/** The figure alone; a dash where the section has none. */
export function figureOf(item: SectionItem, field: SectionField, system: UnitSystemName): string {
  const value = measureOf(item, field);
  if (value === null) return '–';
  return formatNumber(toShown(field, value, system), FIELD_WORDS[field][system]);
}

export const withUnit = (item: SectionItem, field: SectionField, system: UnitSystemName): string =>
  `${figureOf(item, field, system)} ${unitOf(field, system)}`;

/** "310.4 × 164.8 mm, 38.7 kg/m": what tells a section from its neighbours in a list. */
export const sizeLine = (item: SectionItem, system: UnitSystemName): string =>
  `${figureOf(item, 'depth_mm', system)} × ${withUnit(item, 'width_mm', system)}, ${withUnit(item, 'mass_kg_m', system)}`;

/** With × between sizes, as it is set in print. */
export const shownName = (designation: string): string => designation.replaceAll(/(?<=\d)x(?=\d)/g, '×');
