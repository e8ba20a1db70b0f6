import { unitText } from '@/engine/quantity';
import { unitScale } from './cells';
import type { Cause, RuleNumber } from './contract';
import type { NumberColumn } from './plan';

/** A value that fits when it is read in another unit, or 10ⁿ times. `unit` is null where none is known that does. */
export type UnitSlip = {
  rule: RuleNumber;
  cause: Extract<Cause, 'power_of_ten' | 'inches' | 'mass_units'>;
  unit: string | null;
  factor: number;
  /** Of the unit: "mm⁴", "10³ cm⁶". */
  words: string;
  message: string;
  /** What a reading by the heading has to be multiplied by. */
  correction: number;
};

const NEAR = 0.03; // a slip leaves the value itself, so its factor is met within the table's own rounding
const LARGEST_POWER = 18;

const METRIC: Readonly<Record<string, readonly string[]>> = {
  length: ['mm', 'cm', 'm'],
  mass_per_length: ['kg/m'],
  area: ['mm2', 'cm2', 'm2'],
  second_moment: ['mm4', 'cm4', 'm4'],
  section_modulus: ['mm3', 'cm3', 'm3'],
  warping: ['mm6', 'cm6', 'dm6', 'm6'],
};
const INCHES: Readonly<Record<string, readonly string[]>> = {
  length: ['in', 'ft'],
  mass_per_length: ['lb/ft'],
  area: ['in2'],
  second_moment: ['in4'],
  section_modulus: ['in3'],
  warping: ['in6'],
};

/** Multipliers that headings carry: 10³ cm⁶, 10⁶ mm⁴. */
const MULTIPLIERS = [1, 1e3, 1e6, 1e4, 1e9] as const;

const isNear = (ratio: number, factor: number) => Math.abs(ratio / factor - 1) < NEAR;

const powerWords = (factor: number) => {
  if (factor === 1) return '';
  const digits = [...String(Math.round(Math.log10(factor)))];
  return `10${digits.map((digit) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(digit)] ?? digit).join('')} `;
};

/** The unit in which the value fits: `ratio` is what is read by the heading over what is expected. */
function fitting(ratio: number, { quantity, scale }: NumberColumn, units: readonly string[]) {
  for (const factor of MULTIPLIERS) {
    for (const unit of units) {
      const correction = (unitScale(unit, quantity) * factor) / scale;
      if (isNear(ratio * correction, 1)) return { unit, factor, correction };
    }
  }
  return null;
}

/** The slip of units that explains a value `ratio` times its expected one; null where none does. */
export function unitSlip(ratio: number, column: NumberColumn): UnitSlip | null {
  if (!(ratio > 0) || isNear(ratio, 1)) return null;
  const heading = `${powerWords(column.factor)}${unitText(column.unit)}`;
  const isImperial = (unit: string) => /in|ft|lb/.test(unit);
  const build = (found: NonNullable<ReturnType<typeof fitting>>): UnitSlip => {
    const { unit, factor, correction } = found;
    const isOther = isImperial(unit) !== isImperial(column.unit);
    const words = `${powerWords(factor)}${unitText(unit)}`;
    const cause = !isOther ? 'power_of_ten' : column.quantity === 'mass_per_length' ? 'mass_units' : 'inches';
    const message = `The value looks like ${words} under a heading of ${heading}.`;
    return { rule: isOther ? 19 : 18, cause, unit, factor, words, message, correction };
  };
  const own = isImperial(column.unit) ? INCHES : METRIC;
  const other = isImperial(column.unit) ? METRIC : INCHES;
  const found =
    fitting(ratio, column, own[column.quantity] ?? []) ??
    fitting(ratio, column, other[column.quantity] ?? []);
  if (found) return build(found);
  const exponent = Math.round(Math.log10(ratio));
  if (exponent === 0 || Math.abs(exponent) > LARGEST_POWER || !isNear(ratio, 10 ** exponent)) return null;
  const times = `10${powerWords(10 ** Math.abs(exponent))
    .slice(2)
    .trim()}`;
  const way = exponent > 0 ? 'large' : 'small';
  return {
    rule: 18,
    cause: 'power_of_ten',
    unit: column.unit,
    factor: column.factor * 10 ** -exponent,
    words: `${times} times ${exponent > 0 ? 'less' : 'more'}`,
    message: `The value is ${times} times too ${way}: a decimal mark has moved, or a multiplier is missing.`,
    correction: 10 ** -exponent,
  };
}
