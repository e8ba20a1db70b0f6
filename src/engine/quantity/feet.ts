import { FOOT, INCH } from './atoms';
import { readNumber } from './number';

/** Feet and inches read from a length, or the two ways in which it can be read (none: 12 inches or more). */
export type FeetReading = { ok: true; value: number } | { ok: false; choices: readonly string[] };

const INCHES = String.raw`\d+[ -]\d+\/\d+|\d+\/\d+|\d*[.,]?\d+`;
const INCH_MARK = String.raw`(?:"|in\.?|ins|inch|inches)`;
const MARKED = new RegExp(
  String.raw`^(\d+) ?(?:'|ft\.?|feet|foot)[ -]{0,3}(?!\d{3})(${INCHES}) ?${INCH_MARK}?$`,
  'i',
);
const DASHED = new RegExp(String.raw`^(\d+)-(${INCHES}) ?(${INCH_MARK})?$`, 'i');

const isFraction = (text: string) => /^\d+\/\d+$/.test(text);

function sum(feet: string, inches: string): FeetReading {
  const read = readNumber(inches);
  return read.ok && read.value < 12
    ? { ok: true, value: Number(feet) * FOOT + read.value * INCH }
    : { ok: false, choices: [] };
}

/**
 * Feet with inches: 12 ft 6 in, 12'-6 1/2", 12-6.5. Null where the text has another form, so that a thousands
 * apostrophe (12'345) and a mixed fraction of inches (1-1/2 in) are left to the number. "1-1/2" alone is asked back.
 */
export function readFeetInches(text: string): FeetReading | null {
  const marked = MARKED.exec(text);
  if (marked) return sum(marked[1] ?? '', marked[2] ?? '');
  const dashed = DASHED.exec(text);
  if (!dashed) return null;
  const [, feet = '', inches = '', mark] = dashed;
  if (isFraction(inches)) {
    return mark ? null : { ok: false, choices: [`${feet} ${inches} in`, `${feet}'-0 ${inches}"`] };
  }
  return sum(feet, inches);
}

/** "12-6.5": feet and inches without any mark. */
export const isDashedFeet = (text: string): boolean => /^\d+-[\d.,/ ]+$/.test(text);

/**
 * The two readings of a bare number in a field of feet and inches: 12.6 is 12.6 ft or 12'-6". Null where only feet
 * can be meant: a whole number, or decimals that are no inches (12.125).
 */
export function bareFeetChoices(text: string): readonly [string, string] | null {
  if (text.includes('/')) return [`${text} ft`, `${text} in`];
  const decimal = /^(\d+)[.,](\d+)$/.exec(text);
  if (!decimal) return null;
  const [, feet = '', digits = ''] = decimal;
  const inches = [digits, digits.replace(/0+$/, '')].map(Number).find((value) => value > 0 && value < 12);
  return inches === undefined ? null : [`${feet}.${digits} ft`, `${feet}'-${inches}"`];
}
