import { type DimensionName, unitFactor } from '@/engine/quantity';
import type { TabulatedName } from '@/engine/section';
import type { SectionTableMeta } from '../section';
import { cellText } from './old-cells';

type SizeName = 'h' | 'b' | 'tw' | 'tf' | 'r' | 't';
export type NumberField = SizeName | TabulatedName;
type TextField = 'designation' | 'shape' | 'computed';
export type Field = NumberField | TextField;

/** Quantity of each numeric field. */
export const FIELD_QUANTITY: Readonly<Record<NumberField, DimensionName>> = {
  h: 'length',
  b: 'length',
  tw: 'length',
  tf: 'length',
  r: 'length',
  t: 'length',
  mass: 'mass_per_length',
  area: 'area',
  iMajor: 'second_moment',
  iMinor: 'second_moment',
  wElMajor: 'section_modulus',
  wElMinor: 'section_modulus',
  wPlMajor: 'section_modulus',
  wPlMinor: 'section_modulus',
  rMajor: 'length',
  rMinor: 'length',
  j: 'second_moment',
  iw: 'warping',
};
export const isNumberField = (field: Field): field is NumberField => Object.hasOwn(FIELD_QUANTITY, field);

/** Headings without their unit, in lower case, letters and digits only. */
const NEUTRAL: Readonly<Record<Field, readonly string[]>> = {
  designation: ['designation', 'name', 'section', 'profile', 'profil', 'size', 'bezeichnung', 'type'],
  shape: ['shape', 'form'],
  computed: ['computed'],
  h: ['h', 'height', 'depth', 'hohe', 'diameter'],
  b: ['b', 'bf', 'width', 'breite', 'flangewidth'],
  tw: ['tw', 's', 'web', 'webthickness'],
  tf: ['tf', 'flange', 'flangethickness'],
  t: ['t', 'wall', 'wallthickness', 'tdes'],
  r: ['r', 'r1', 'root', 'rootradius', 'radius'],
  mass: [
    'mass',
    'm',
    'g',
    'weight',
    'masspermetre',
    'masspermeter',
    'nominalmass',
    'nominalweight',
    'kgperm',
    'plf',
  ],
  area: ['a', 'area', 'sectionalarea', 'areaofsection', 'crosssectionalarea'],
  iMajor: ['imajor', 'secondmomentmajor', 'secondmomentofareamajor'],
  iMinor: ['iminor', 'secondmomentminor', 'secondmomentofareaminor'],
  wElMajor: ['welmajor', 'elasticmodulusmajor'],
  wElMinor: ['welminor', 'elasticmodulusminor'],
  wPlMajor: ['wplmajor', 'plasticmodulusmajor'],
  wPlMinor: ['wplminor', 'plasticmodulusminor'],
  rMajor: ['rmajor', 'radiusofgyrationmajor'],
  rMinor: ['rminor', 'radiusofgyrationminor'],
  j: ['j', 'it', 'torsionconstant', 'torsionalconstant'],
  iw: ['iw', 'cw', 'warpingconstant'],
};

type Axes = NonNullable<SectionTableMeta['axes']>;

/**
 * Headings whose axis or modulus letter means opposite things by region. EN: y is the strong axis, W_el and W_pl.
 * US: x is strong, S elastic, Z plastic. British before 2005: x is strong, Z elastic, S plastic.
 */
const REGIONAL: Readonly<Record<Axes, Readonly<Record<string, NumberField>>>> = {
  en: {
    iy: 'iMajor',
    iyy: 'iMajor',
    iz: 'iMinor',
    izz: 'iMinor',
    wely: 'wElMajor',
    wy: 'wElMajor',
    welz: 'wElMinor',
    wz: 'wElMinor',
    wply: 'wPlMajor',
    wplz: 'wPlMinor',
  },
  us: {
    d: 'h',
    ix: 'iMajor',
    ixx: 'iMajor',
    iy: 'iMinor',
    iyy: 'iMinor',
    sx: 'wElMajor',
    sy: 'wElMinor',
    zx: 'wPlMajor',
    zy: 'wPlMinor',
    rx: 'rMajor',
    ry: 'rMinor',
    w: 'mass',
  },
  british: {
    d: 'h',
    ix: 'iMajor',
    ixx: 'iMajor',
    iy: 'iMinor',
    iyy: 'iMinor',
    zx: 'wElMajor',
    zxx: 'wElMajor',
    zy: 'wElMinor',
    sx: 'wPlMajor',
    sy: 'wPlMinor',
    rx: 'rMajor',
    ry: 'rMinor',
  },
};

export type Heading = { name: string; unit: string | null; factor: number };

/** "I_w (10³ cm⁶)" into name, unit and multiplier. A unit also stands after a blank: "A cm2". */
export function readHeading(heading: string): Heading {
  const text = cellText(heading)
    .replaceAll(/[⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+/g, (run) => `^${run.normalize('NFKC').replace('\u2212', '-')}`)
    .normalize('NFKC');
  const bracketed = /^(.*?)\s*[([]\s*([^)\]]*)[)\]]\s*$/.exec(text);
  const trailing = /^(.*\S)\s+(\S+)$/.exec(text);
  const [name = text, unit] = bracketed
    ? bracketed.slice(1)
    : trailing && isUnit(trailing[2] ?? '')
      ? trailing.slice(1)
      : [text];
  const power = unit === undefined ? null : /[x×*]?\s*10\^(-?\d+)\s*[x×*·]?/.exec(unit);
  const bare = unit?.replace(power?.[0] ?? '', '').trim();
  return { name, unit: bare || null, factor: 10 ** Number(power?.[1] ?? 0) };
}

const QUANTITIES = [...new Set(Object.values(FIELD_QUANTITY))];
export const isUnit = (text: string): boolean =>
  text !== '' && QUANTITIES.some((quantity) => unitFactor(text, quantity).ok);

const plainName = (name: string) =>
  name
    .normalize('NFD')
    .toLowerCase()
    .replaceAll(/[^a-z0-9]/g, '');

const NEUTRAL_BY_NAME: ReadonlyMap<string, Field> = new Map(
  (Object.keys(NEUTRAL) as Field[]).flatMap((field) => NEUTRAL[field].map((name) => [name, field])),
);

/** The field that a heading means; 'axis' where that depends on a region that is not given. */
export function fieldOf({ name, unit }: Heading, axes: Axes | undefined): Field | 'axis' | null {
  if (axes === 'british' && /^t$/i.test(name)) return name === 't' ? 'tw' : 'tf';
  if (axes === 'british' && name === 'H') return 'iw';
  const plain = plainName(name);
  const neutral = NEUTRAL_BY_NAME.get(plain);
  if (neutral) return neutral;
  const isRadius = /^i/.test(name) && unit !== null && unitFactor(unit, 'length').ok;
  if (!axes) return Object.values(REGIONAL).some((names) => Object.hasOwn(names, plain)) ? 'axis' : null;
  const field = REGIONAL[axes][plain] ?? null;
  if (!isRadius) return field;
  return field === 'iMajor' ? 'rMajor' : field === 'iMinor' ? 'rMinor' : null;
}
