import { DIMENSIONS, type Dimension } from './dimension';

export const INCH = 0.0254; // m, exact: 1959 international yard and pound agreement
export const FOOT = 0.3048; // m, exact: 12 in
const POUND = 0.45359237; // kg, exact: the same agreement
export const STANDARD_GRAVITY = 9.80665; // m/s², exact: 3rd General Conference on Weights and Measures, 1901
const POUND_FORCE = POUND * STANDARD_GRAVITY; // N
const KIP = 1000 * POUND_FORCE; // N

/** One reading of a unit symbol: SI value of 1, dimension, and the power of an angle in it. */
export type UnitValue = { readonly factor: number; readonly dimension: Dimension; readonly angle: number };

const MASS: Dimension = { length: 0, mass: 1, time: 0, temperature: 0 };
const TIME: Dimension = { length: 0, mass: 0, time: 1, temperature: 0 };

const unit = (factor: number, dimension: Dimension, angle = 0): UnitValue => ({ factor, dimension, angle });
const length = (factor: number) => [unit(factor, DIMENSIONS.length)];
const force = (factor: number) => [unit(factor, DIMENSIONS.force)];
const stress = (factor: number) => [unit(factor, DIMENSIONS.stress)];
const mass = (factor: number) => [unit(factor, MASS)];
const angle = (factor: number) => [unit(factor, DIMENSIONS.rotation, 1)];
const ratio = (factor: number) => [unit(factor, DIMENSIONS.ratio)];
const temperature = (factor: number) => [unit(factor, DIMENSIONS.temperature)];

/** Each symbol with its readings, the usual one first. A pound is a force unless a mass is asked for. */
const ATOMS: Readonly<Record<string, readonly UnitValue[]>> = {
  m: length(1),
  mm: length(1e-3),
  cm: length(1e-2),
  dm: length(1e-1),
  km: length(1e3),
  in: length(INCH),
  ft: length(FOOT),
  yd: length(3 * FOOT),
  N: force(1),
  kN: force(1e3),
  MN: force(1e6),
  lbf: force(POUND_FORCE),
  kip: force(KIP),
  Pa: stress(1),
  kPa: stress(1e3),
  MPa: stress(1e6),
  GPa: stress(1e9),
  psi: stress(POUND_FORCE / INCH ** 2),
  ksi: stress(KIP / INCH ** 2),
  psf: stress(POUND_FORCE / FOOT ** 2),
  ksf: stress(KIP / FOOT ** 2),
  plf: [unit(POUND_FORCE / FOOT, DIMENSIONS.line_load), unit(POUND / FOOT, DIMENSIONS.mass_per_length)],
  klf: [unit(KIP / FOOT, DIMENSIONS.line_load)],
  pcf: [unit(POUND / FOOT ** 3, DIMENSIONS.density)],
  lb: [...force(POUND_FORCE), ...mass(POUND)],
  lbm: mass(POUND),
  g: mass(1e-3),
  kg: mass(1),
  t: mass(1e3),
  s: [unit(1, TIME)],
  K: temperature(1),
  C: temperature(1),
  F: temperature(5 / 9),
  rad: angle(1),
  mrad: angle(1e-3),
  deg: angle(Math.PI / 180),
  '%': ratio(1e-2),
  '‰': ratio(1e-3),
  '1': ratio(1),
};

const SPELLINGS: Readonly<Record<string, string>> = {
  meter: 'm',
  meters: 'm',
  metre: 'm',
  metres: 'm',
  millimetre: 'mm',
  millimetres: 'mm',
  millimeter: 'mm',
  millimeters: 'mm',
  inch: 'in',
  inches: 'in',
  ins: 'in',
  foot: 'ft',
  feet: 'ft',
  "'": 'ft',
  '"': 'in',
  lbs: 'lb',
  pound: 'lb',
  pounds: 'lb',
  k: 'kip',
  kips: 'kip',
  kipf: 'kip',
  '°C': 'C',
  degC: 'C',
  '°F': 'F',
  degF: 'F',
  '°': 'deg',
  degree: 'deg',
  degrees: 'deg',
};

/** Lower-case spellings that only one symbol can mean; "MN" and "mN", "K" and "k" stay apart. */
const FOLDED: ReadonlyMap<string, string> = new Map(
  [...Object.keys(ATOMS), ...Object.keys(SPELLINGS)]
    .filter((symbol) => symbol.length > 1 && symbol !== 'MN')
    .map((symbol) => [symbol.toLowerCase(), symbol]),
);

/** The readings of one symbol as written, or undefined. */
export function findAtom(symbol: string): readonly UnitValue[] | undefined {
  const spelled =
    Object.hasOwn(ATOMS, symbol) || Object.hasOwn(SPELLINGS, symbol)
      ? symbol
      : FOLDED.get(symbol.toLowerCase());
  if (spelled === undefined) return undefined;
  return ATOMS[SPELLINGS[spelled] ?? spelled];
}
