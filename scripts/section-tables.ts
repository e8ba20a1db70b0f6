import { fromUnit, toUnit } from '../src/engine/quantity';
import { cornerRadii, sectionProperties, taper } from '../src/engine/section';

/** A line of data/sections/source/*.csv: sizes in mm, masses in kg/m. */
export type Source = {
  family: string;
  name: string;
  shape: string;
  h: string;
  b: string;
  tw: string;
  tf: string;
  r: string;
  t: string;
  mass_nominal: string;
};

export type Sizes = { h: number; b: number; tw: number; tf: number; t: number };

/** A root radius in mm and where it comes from; `computed` marks it so in the table. */
export type Radius = { r: number; computed: boolean };

const MM = 1e-3;
const INCH = 25.4; // mm
const POUND_PER_FOOT = 0.45359237 / 0.3048; // kg/m
const STEEL = 7850; // kg/m³
const FILLETS = 4 - Math.PI; // area of the four root fillets per r²

export const sizesOf = (row: Source): Sizes => {
  const sizes = {
    h: Number(row.h),
    b: Number(row.b),
    tw: Number(row.tw),
    tf: Number(row.tf),
    t: Number(row.t),
  };
  // the source gives a channel's depth and flange width the other way round
  return row.shape === 'U' ? { ...sizes, h: sizes.b, b: sizes.h } : sizes;
};

const times = (text: string, factor: number) => (text === '' ? '' : String(Number(text) * factor));

/** A line that is written in inches and lb/ft. */
export const fromInches = (row: Source): Source => ({
  ...row,
  ...Object.fromEntries(
    (['h', 'b', 'tw', 'tf', 'r', 't'] as const).map((size) => [size, times(row[size], INCH)]),
  ),
  mass_nominal: times(row.mass_nominal, POUND_PER_FOOT),
});

/** W12x26 cut along the middle of its web: WT6x13, half as deep and half as heavy, with the root radius of the whole. */
export function teeOf(row: Source, { r }: Radius): Source {
  const half = row.name.replaceAll(/\d+(\.\d+)?/g, (size) => times(size, 0.5)).replace('W', 'WT');
  const [h, mass_nominal] = [times(row.h, 0.5), times(row.mass_nominal, 0.5)];
  return { ...row, family: 'WT', name: half, shape: 'T', h, r: String(r), mass_nominal };
}

/** r² in mm² that makes up the difference between the nominal mass and the area without fillets. */
function squareFromMass(row: Source): number {
  const { h, b, tw, tf } = sizesOf(row);
  const nominal = Number(row.mass_nominal) / STEEL / MM ** 2;
  return (nominal - 2 * b * tf - (h - 2 * tf) * tw) / FILLETS;
}

const median = (values: readonly number[]): number => {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length / 2;
  return ((sorted[Math.ceil(middle) - 1] ?? 0) + (sorted[Math.floor(middle)] ?? 0)) / 2;
};

/** Sections of one series are rolled by the same rolls: one serial size, one flange width within 3.5 %. */
const SAME_WIDTH = 0.035;
const serialSize = ({ name }: Source) =>
  /^(\d+x\d+)x/.exec(name)?.[1] ?? /^(?:W|IPE )(\d+)x/.exec(name)?.[1] ?? name;

function seriesOf(row: Source, rows: readonly Source[]): Source[] {
  const first = rows.find((one) => isSameSeries(one, row)) ?? row;
  return rows.filter((one) => isSameSeries(first, one));
}
const isSameSeries = (first: Source, other: Source) =>
  serialSize(first) === serialSize(other) && Math.abs(Number(first.b) / Number(other.b) - 1) < SAME_WIDTH;

/**
 * Root radius from the nominal mass. One mass is rounded too coarsely to give it, so it is the median of the series.
 * Against the printed radii of British sections it is within 2 mm.
 */
export function radiusFromMass(row: Source, rows: readonly Source[]): Radius {
  const square = median(seriesOf(row, rows).map(squareFromMass));
  return { r: Math.round(Math.sqrt(Math.max(square, 0)) * 10) / 10, computed: true };
}

/** HE 200 AA and IPE O 200 are rolled by the rolls of HE 200 A and IPE 200: they share its radius. IPE 750 has its mass in its name. */
export function radiusOfSeries(row: Source, rows: readonly Source[]): Radius {
  if (row.r !== '') return { r: Number(row.r), computed: false };
  if (row.mass_nominal !== '') return radiusFromMass(row, rows);
  const size = /\d+/.exec(row.name)?.[0] ?? '';
  const base = rows.find((one) => one.r !== '' && /\d+/.exec(one.name)?.[0] === size);
  if (!base) throw new Error(`${row.name}: no section of its series has a root radius`);
  return { r: Number(base.r), computed: true };
}

/** UPE root radii, from memory of DIN 1026-2; the source has none. */
const UPE_RADII: Readonly<Record<number, number>> = {
  80: 10,
  100: 10,
  120: 12,
  140: 12,
  160: 12,
  180: 12,
  200: 13,
  220: 13,
  240: 15,
  270: 15,
  300: 15,
  330: 18,
  360: 18,
  400: 18,
};
export function radiusOfChannel(row: Source): Radius {
  const r = UPE_RADII[sizesOf(row).h];
  if (r === undefined) throw new Error(`${row.name}: no root radius`);
  return { r, computed: true };
}

/** As the standard has it. */
export const radiusGiven = ({ r }: Source): Radius => ({ r: Number(r), computed: false });
/** By a rule, or as the whole section has it. */
export const radiusByRule = ({ r }: Source): Radius => ({ r: Number(r), computed: true });

export type Units = {
  length: string;
  mass: string;
  area: string;
  second: string;
  modulus: string;
  warping: string;
};
export const METRIC: Units = {
  length: 'mm',
  mass: 'kg/m',
  area: 'cm2',
  second: 'cm4',
  modulus: 'cm3',
  warping: 'cm6',
};
export const INCHES: Units = {
  length: 'in',
  mass: 'lb/ft',
  area: 'in2',
  second: 'in4',
  modulus: 'in3',
  warping: 'in6',
};

const FIGURES = 5;
const figures = (value: number) => String(Number(value.toPrecision(FIGURES)));
const massUnit = (units: Units) => (units.mass === 'lb/ft' ? 'lbm/ft' : units.mass);

/** Columns of every table, in order: heading, its unit, and the name under which `computed` lists it. */
const PROPERTIES = [
  ['A', 'area', 'area', 'area_cm2'],
  ['I_major', 'second', 'iMajor', 'i_major_cm4'],
  ['I_minor', 'second', 'iMinor', 'i_minor_cm4'],
  ['W_el_major', 'modulus', 'wElMajor', 'w_el_cm3'],
  ['W_el_minor', 'modulus', 'wElMinor', 'w_el_minor_cm3'],
  ['W_pl_major', 'modulus', 'wPlMajor', 'w_pl_cm3'],
  ['W_pl_minor', 'modulus', 'wPlMinor', 'w_pl_minor_cm3'],
  ['I_t', 'second', 'j', 'j_cm4'],
  ['I_w', 'warping', 'iw', 'iw_cm6'],
] as const;

const FLANGED = ['h', 'b', 't_w', 't_f', 'r'];
const SIZE_COLUMNS: Readonly<Record<string, readonly string[]>> = {
  I: FLANGED,
  'tapered I': FLANGED,
  U: FLANGED,
  'tapered U': FLANGED,
  T: FLANGED,
  L: ['h', 'b', 't', 'r'],
  RHS: ['h', 'b', 't'],
  SHS: ['h', 'b', 't'],
  CHS: ['h', 't'],
  rectangle: ['h', 'b'],
};
const SHAPES = {
  I: 'i',
  'tapered I': 'tapered_i',
  U: 'channel',
  'tapered U': 'tapered_channel',
  T: 'tee',
  L: 'angle',
  RHS: 'rhs',
  SHS: 'shs',
  CHS: 'chs',
  rectangle: 'rectangle',
} as const;
const isShape = (text: string): text is keyof typeof SHAPES => Object.hasOwn(SHAPES, text);

export function headings(shape: string, units: Units): string[] {
  return [
    'designation',
    'shape',
    ...(SIZE_COLUMNS[shape] ?? []).map((symbol) => `${symbol} (${units.length})`),
    `mass (${units.mass})`,
    ...PROPERTIES.map(([symbol, quantity]) => `${symbol} (${units[quantity]})`),
    'computed',
  ];
}

export type RowOptions = {
  units: Units;
  density: number;
  radius: Radius | null;
  rename?: (name: string) => string;
};

/** Taper and toes are those of the standards that the sizes are printed for: European in mm, American in inches. */
function propertiesOf(shape: keyof typeof SHAPES, mm: Record<string, number>, { length }: Units) {
  const {
    h = 0,
    b = 0,
    t_w = 0,
    t_f = 0,
    r = 0,
    t = 0,
  } = Object.fromEntries(Object.entries(mm).map(([symbol, value]) => [symbol, value * MM]));
  switch (shape) {
    case 'I':
    case 'U':
    case 'T':
      return sectionProperties({ shape: SHAPES[shape], h, b, tw: t_w, tf: t_f, r });
    case 'tapered I':
    case 'tapered U': {
      const origin = length === 'in' ? 'american' : 'european';
      return sectionProperties(taper(SHAPES[shape], { h, b, tw: t_w, tf: t_f, r }, origin));
    }
    case 'L':
      return sectionProperties({ shape: 'angle', h, b, t, r, toe: length === 'in' ? 0 : r / 2 });
    case 'RHS':
    case 'SHS':
      return sectionProperties({ shape: SHAPES[shape], h, b, t, ...cornerRadii(t, 'EN 10210') });
    case 'CHS':
      return sectionProperties({ shape: 'chs', d: h, t });
    case 'rectangle':
      return sectionProperties({ shape: 'rectangle', h, b });
  }
}

/** One line of a table: sizes as supplied, properties computed from them as they are printed here. */
export function tableRow(row: Source, { units, density, radius, rename }: RowOptions): string[] {
  if (!isShape(row.shape)) throw new Error(`${row.name}: unknown shape ${row.shape}`);
  const { h, b, tw, tf, t } = sizesOf(row);
  const all: Readonly<Record<string, number>> = { h, b, t_w: tw, t_f: tf, r: radius?.r ?? 0, t };
  const printed = (SIZE_COLUMNS[row.shape] ?? []).map(
    (symbol) => [symbol, printSize(all[symbol] ?? 0, units)] as const,
  );
  const used = Object.fromEntries(
    printed.map(([symbol, text]) => [symbol, toUnit(fromUnit(Number(text), units.length), 'mm')]),
  );
  const properties = propertiesOf(row.shape, used, units);
  const mass = toUnit(Number(row.mass_nominal) || density * properties.area, massUnit(units));
  const computed = [
    ...(radius?.computed ? ['r'] : []),
    ...(row.mass_nominal === '' ? ['mass_kg_m'] : []),
    ...PROPERTIES.map(([, , , field]) => field),
  ];
  return [
    rename ? rename(row.name) : row.name,
    SHAPES[row.shape],
    ...printed.map(([, text]) => text),
    row.mass_nominal === '' ? figures(mass) : String(Number(mass.toFixed(2))),
    ...PROPERTIES.map(([, quantity, name]) => figures(toUnit(properties[name], units[quantity]))),
    computed.join(' '),
  ];
}

const printSize = (mm: number, units: Units) =>
  String(Number(toUnit(mm * MM, units.length).toFixed(units.length === 'in' ? 4 : 2)));
