import { formatNumber, toUnit } from '@/engine/quantity';
import { sectionProperties } from '@/engine/section';
import { type AxisLetters, FIELD_WORDS, figureOf, richUnitOf, symbolOf } from './display';
import { measureOf, type SectionField } from './query';
import { dimensionsOf, type SectionItem } from './section';

/** A property in both unit systems, and where its value comes from. */
export interface PropertyLine {
  readonly name: string;
  readonly symbol: string;
  readonly metric: string;
  readonly metricUnit: string;
  readonly us: string;
  readonly usUnit: string;
  readonly computed: boolean;
}

const ORDER: readonly SectionField[] = [
  'mass_kg_m',
  'depth_mm',
  'width_mm',
  'tw_mm',
  'tf_mm',
  'r_mm',
  'area_cm2',
  'i_major_cm4',
  'i_minor_cm4',
  'w_el_cm3',
  'w_pl_cm3',
  'r_major_cm',
  'r_minor_cm',
  'j_cm4',
  'iw_cm6',
];

/** Derived here from two columns, and so computed in every table. */
const ALWAYS_COMPUTED: readonly SectionField[] = ['r_major_cm', 'r_minor_cm'];
const IN_TABLE: Readonly<Partial<Record<SectionField, string>>> = { tw_mm: 'tw', tf_mm: 'tf', r_mm: 'r' };

const isComputed = (item: SectionItem, field: SectionField): boolean =>
  ALWAYS_COMPUTED.includes(field) || item.computed.includes(IN_TABLE[field] ?? field);

/** What the table says of a section; what it has no value for is left out. */
export function tabulatedLines(item: SectionItem, axes: AxisLetters): PropertyLine[] {
  return ORDER.filter((field) => measureOf(item, field) !== null).map((field) => ({
    name: FIELD_WORDS[field].name,
    symbol: symbolOf(field, axes),
    metric: figureOf(item, field, 'metric'),
    metricUnit: richUnitOf(field, 'metric'),
    us: figureOf(item, field, 'us'),
    usUnit: richUnitOf(field, 'us'),
    computed: isComputed(item, field),
  }));
}

const shown = (si: number, unit: string): string =>
  formatNumber(toUnit(si, unit), { significant: 3, places: 0 });

/** What the engine finds from the dimensions beside the table's own columns. */
export function furtherLines(item: SectionItem, axes: AxisLetters): PropertyLine[] {
  const found = sectionProperties(dimensionsOf(item));
  const line = (name: string, symbol: string, si: number, power: 2 | 3): PropertyLine => ({
    name,
    symbol,
    metric: shown(si, `cm${power}`),
    metricUnit: `cm^{${power}}`,
    us: shown(si, `in${power}`),
    usUnit: `in^{${power}}`,
    computed: true,
  });
  return [
    line('elastic modulus, minor axis', `W_{el,${axes.minor}}`, found.wElMinor, 3),
    line('plastic modulus, minor axis', `W_{pl,${axes.minor}}`, found.wPlMinor, 3),
    line('first moment of half the section', 'S', found.firstMoment, 3),
    line('area of the web', 'A_{w}', found.webArea, 2),
    line('shear area, for deflection', 'A_{v}', found.shearArea, 2),
  ];
}
