import { formatNumber, fromUnit, toUnit } from '@/engine/quantity';
import {
  depthOf,
  freeBending,
  type SectionDimensions,
  type SectionShape,
  sectionProperties,
  widthOf,
} from '@/engine/section';
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

/** Of an outline the sizes over all are found from its corners. */
const OF_OUTLINE: readonly SectionField[] = ['depth_mm', 'width_mm'];

const isComputed = (item: SectionItem, field: SectionField): boolean =>
  ALWAYS_COMPUTED.includes(field) ||
  (item.shape === 'outline' && OF_OUTLINE.includes(field)) ||
  item.computed.includes(IN_TABLE[field] ?? field);

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

/** Moduli about the minor axis as a table has them; null where it has none. */
export interface MinorModuli {
  readonly w_el_minor_cm3: number | null;
  readonly w_pl_minor_cm3: number | null;
}
const NOT_TABULATED: MinorModuli = { w_el_minor_cm3: null, w_pl_minor_cm3: null };

type Figure = Pick<PropertyLine, 'metric' | 'metricUnit' | 'us' | 'usUnit'>;

const inPower = (si: number, power: 2 | 3 | 4): Figure => ({
  metric: shown(si, `cm${power}`),
  metricUnit: `cm^{${power}}`,
  us: shown(si, `in${power}`),
  usUnit: `in^{${power}}`,
});

const inLength = (si: number, unit: 'mm' | 'cm'): Figure => ({
  metric: formatNumber(toUnit(si, unit), { places: unit === 'mm' ? 1 : 2 }),
  metricUnit: unit,
  us: formatNumber(toUnit(si, 'in'), { places: 2 }),
  usUnit: 'in',
});

const computed = (name: string, symbol: string, figure: Figure): PropertyLine => ({
  name,
  symbol,
  ...figure,
  computed: true,
});

/** Moduli about the minor axis as the table has them, and what the engine finds from the dimensions beside its columns. */
export function furtherLines(
  item: SectionItem,
  axes: AxisLetters,
  minor: MinorModuli = NOT_TABULATED,
): PropertyLine[] {
  const dimensions = dimensionsOf(item);
  const found = sectionProperties(dimensions);
  const modulus = (name: string, symbol: string, column: keyof MinorModuli, si: number): PropertyLine => {
    const value = minor[column];
    const figure = inPower(value === null ? si : fromUnit(value, 'cm3'), 3);
    return { ...computed(name, symbol, figure), computed: value === null || item.computed.includes(column) };
  };
  return [
    modulus('elastic modulus, minor axis', `W_{el,${axes.minor}}`, 'w_el_minor_cm3', found.wElMinor),
    modulus('plastic modulus, minor axis', `W_{pl,${axes.minor}}`, 'w_pl_minor_cm3', found.wPlMinor),
    computed('first moment of what lies above the axis', 'S', inPower(found.firstMoment, 3)),
    computed('area of the web', 'A_{w}', inPower(found.webArea, 2)),
    computed('shear area, for deflection', 'A_{v}', inPower(found.shearArea, 2)),
    ...principalLines(dimensions),
    ...placeLines(dimensions),
  ];
}

const DEGREES = 180 / Math.PI;

/** Of a section whose axes are not those of symmetry. */
function principalLines(dimensions: SectionDimensions): PropertyLine[] {
  const { principal, area } = sectionProperties(dimensions);
  const free = freeBending(dimensions);
  if (!principal || !free) return [];
  const { iU, iV, angle } = principal;
  const degrees = formatNumber(angle * DEGREES, { places: 1 });
  const turn: Figure = { metric: degrees, metricUnit: '°', us: degrees, usUnit: '°' };
  return [
    computed('second moment, greatest', 'I_{u}', inPower(iU, 4)),
    computed('second moment, least', 'I_{v}', inPower(iV, 4)),
    computed('radius of gyration, greatest', 'i_{u}', inLength(Math.sqrt(iU / area), 'cm')),
    computed('radius of gyration, least', 'i_{v}', inLength(Math.sqrt(iV / area), 'cm')),
    computed('axis u from the major axis, anticlockwise', 'α', turn),
    computed('second moment where it is free to move sideways', 'I_{free}', inPower(free.iMajor, 4)),
    computed('elastic modulus where it is free to move sideways', 'W_{free}', inPower(free.wElMajor, 3)),
  ];
}

const MIDDLE = 1e-6; // of the size: nearer to the middle is in it

/** Where the centroid and the shear centre lie, as far as symmetry does not say so. */
function placeLines(dimensions: SectionDimensions): PropertyLine[] {
  const { centroid, centroidUp, shearCentre } = sectionProperties(dimensions);
  const isAside = (place: number, size: number) => Math.abs(place - size / 2) > MIDDLE * size;
  const lines: PropertyLine[] = [];
  if (isAside(centroid, widthOf(dimensions)))
    lines.push(computed('centroid from the left', 'e_{left}', inLength(centroid, 'mm')));
  if (isAside(centroidUp, depthOf(dimensions)))
    lines.push(computed('centroid from the bottom', 'e_{bottom}', inLength(centroidUp, 'mm')));
  if (Math.abs(shearCentre - centroid) > MIDDLE * widthOf(dimensions))
    lines.push(computed('shear centre from the left', 'e_{M}', inLength(shearCentre, 'mm')));
  return lines;
}

const EL_DARWISH = 'I_{t} by El Darwish and Johnston';

/** How far the computed torsion and warping constants of a shape can be relied on. */
const ACCURACY: Readonly<Record<SectionShape, string>> = {
  i: `${EL_DARWISH}, within 4 % of published values; I_{w} = I_{z} (h − t_{f})²/4, within 4 %.`,
  tapered_i: `${EL_DARWISH} for sloping flanges: American sections within 3 %; printed tables of European ones lie 6 to 8 % above it. I_{w} within 4 %.`,
  channel: `${EL_DARWISH}, within 4 % of published values; I_{w} on the mid-lines without root radii, 3 to 8 % above printed tables.`,
  tapered_channel: `${EL_DARWISH} for sloping flanges, and I_{w} on the mid-lines: within 4 % of published values.`,
  tee: `${EL_DARWISH}, within 5 % of published values; I_{w} of flange and stem by themselves, small.`,
  angle: `${EL_DARWISH}, within 4 % of published values; angles hardly warp, I_{w} counts as 0.`,
  rhs: 'I_{t} on the mid-line of the wall (EN 10210-2, annex B), within 1.5 % of published values; I_{w} of a tube counts as 0.',
  shs: 'I_{t} on the mid-line of the wall (EN 10210-2, annex B), within 1.5 % of published values; I_{w} of a tube counts as 0.',
  chs: 'I_{t} is exact; a round tube does not warp.',
  rectangle:
    'I_{t} by the series that Roark gives, within 0.5 %; a solid section hardly warps, I_{w} counts as 0.',
  round: 'I_{t} is exact; a round bar does not warp.',
  outline:
    'I_{t} and I_{w} are those of its parts added up, a lower bound, or what was given with the outline.',
  values: 'I_{t} and I_{w} are as supplied, 0 where they were not.',
};

/** A sentence on torsion and warping, where the table does not supply both. */
export const accuracyOf = ({ shape, computed: found }: SectionItem): string | null =>
  shape === 'values' || found.includes('j_cm4') || found.includes('iw_cm6') ? ACCURACY[shape] : null;
