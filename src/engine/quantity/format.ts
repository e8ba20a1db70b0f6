import { INCH } from './atoms';
import { type Purpose, type Rounding, UNIT_SYSTEMS, type UnitSystemName } from './system';
import { readUnit, unitText } from './unit';

export const MINUS = '\u2212';
/** Narrow no-break space: parts thousands, and never breaks a line. */
export const THIN_SPACE = '\u202f';
const NO_BREAK_SPACE = '\u00a0';

const EXACT_DIGITS = 12; // below the noise that a unit conversion leaves in the 16th digit
const SMALLEST_PLAIN = 1e-4; // smaller figures are shown with a power of ten
const LARGEST_PLAIN = 1e15;
const SIXTEENTHS = 16;

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const superscript = (text: string) =>
  text
    .replace('+', '')
    .replace('-', '⁻')
    .replaceAll(/\d/g, (digit) => SUPERSCRIPTS[Number(digit)] ?? digit);

function groupThousands(digits: string): string {
  const [whole = '', decimals] = digits.split('.');
  const grouped = whole.replaceAll(/\B(?=(\d{3})+$)/g, THIN_SPACE);
  return decimals === undefined ? grouped : `${grouped}.${decimals}`;
}

function decimalsFor(magnitude: number, { significant, places }: Rounding): number {
  if (significant === undefined) return places ?? 0;
  const wanted = magnitude === 0 ? 0 : significant - 1 - Math.floor(Math.log10(magnitude));
  if (places === undefined) return Math.max(0, wanted);
  return Math.min(Math.max(places, wanted), places + 2);
}

function unsigned(magnitude: number, rounding: Rounding): string {
  const { significant, places } = rounding;
  const isExtreme = magnitude !== 0 && (magnitude < SMALLEST_PLAIN || magnitude >= LARGEST_PLAIN);
  if (isExtreme && places === undefined) {
    const [mantissa, exponent = ''] = (
      significant === undefined
        ? Number(magnitude.toPrecision(EXACT_DIGITS)).toExponential()
        : magnitude.toExponential(significant - 1)
    ).split('e');
    return `${mantissa}×10${superscript(exponent)}`;
  }
  if (significant === undefined && places === undefined) {
    return groupThousands(String(Number(magnitude.toPrecision(EXACT_DIGITS))));
  }
  const rounded = magnitude.toFixed(decimalsFor(magnitude, rounding));
  return groupThousands(Number(rounded) === 0 ? (0).toFixed(places ?? 0) : rounded);
}

/**
 * A number for the screen: U+2212 minus (never of a zero), thousands parted by a thin space, integers never rounded.
 * `places`: that many decimals. `significant`: as many figures. Both: as many figures, with at least `places` and at
 * most `places` + 2 decimals, so that rounding noise shows as 0. Neither: as exactly as it was given.
 */
export function formatNumber(value: number, rounding: Rounding = {}): string {
  if (!Number.isFinite(value)) return '–';
  const text = unsigned(Math.abs(value), rounding);
  return value < 0 && /[1-9]/.test(text) ? MINUS + text : text;
}

/** Feet and inches to the nearest 1/16 in: 12'-6 1/2". A last 1/16 carries into inches and feet. */
export function formatFeetInches(metres: number): string {
  if (!Number.isFinite(metres)) return '–';
  const sixteenths = Math.round(Math.abs(metres) / (INCH / SIXTEENTHS));
  const whole = Math.floor(sixteenths / SIXTEENTHS);
  let numerator = sixteenths % SIXTEENTHS;
  let denominator = SIXTEENTHS;
  while (numerator > 0 && numerator % 2 === 0) {
    numerator /= 2;
    denominator /= 2;
  }
  const fraction = numerator > 0 ? ` ${numerator}/${denominator}` : '';
  const sign = metres < 0 && sixteenths > 0 ? MINUS : '';
  return `${sign}${groupThousands(String(Math.floor(whole / 12)))}'-${whole % 12}${fraction}"`;
}

/** An unknown display unit is our mistake, never the person's. */
export class UnknownUnit extends Error {
  constructor(unit: string) {
    super(`"${unit}" is no unit that can be displayed`);
    this.name = 'UnknownUnit';
  }
}

function factorOf(unit: string): number {
  const reading = readUnit(unit === 'ft-in' ? 'ft' : unit)[0];
  if (!reading) throw new UnknownUnit(unit);
  return reading.factor;
}

/** An SI value in the unit; a pound is a force ("lbm/ft" is a mass per length). Throws UnknownUnit. */
export const toUnit = (value: number, unit: string): number => value / factorOf(unit);

/** A value in the unit, in SI. Throws UnknownUnit. */
export const fromUnit = (value: number, unit: string): number => value * factorOf(unit);

/**
 * An SI value with its unit, "12.5 kN/m", "115.8 kNm", "12'-6 1/2\"", kept on one line. Rounding as formatNumber;
 * "ft-in" is feet and inches to 1/16 in. Throws UnknownUnit.
 */
export function formatQuantity(value: number, unit: string, rounding: Rounding = {}): string {
  if (unit === 'ft-in') return formatFeetInches(value);
  const number = formatNumber(toUnit(value, unit), rounding);
  const shown = unitText(unit);
  if (shown === '') return number;
  return shown === '°' ? number + shown : number + NO_BREAK_SPACE + shown;
}

/** An SI value as its purpose is shown in a unit system: UNIT_SYSTEMS. */
export const formatFor = (value: number, purpose: Purpose, system: UnitSystemName): string =>
  formatQuantity(value, UNIT_SYSTEMS[system][purpose].unit, UNIT_SYSTEMS[system][purpose]);

/** A utilisation to two decimals, always rounded up: 1.004 is 1.01, and 0.29 stays 0.29. */
export function formatUtilisation(ratio: number): string {
  if (!Number.isFinite(ratio)) return '–';
  const nearest = Number(ratio.toFixed(2));
  return formatNumber(nearest < ratio ? nearest + 0.01 : nearest, { places: 2 });
}
