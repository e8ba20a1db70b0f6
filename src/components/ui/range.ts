import {
  type DimensionName,
  formatFeetInches,
  formatNumber,
  formatQuantity,
  fromUnit,
  readQuantity,
  toUnit,
  unitText,
} from '@/engine/quantity';

/** What a field holds: the text exactly as typed, and the unit shown beside it. */
export interface QuantityEntry {
  text: string;
  unit: string;
}

/** Ends of a parameter's range, SI. */
export interface QuantityRange {
  low: number;
  high: number;
}

const STEPS_ACROSS = 100;
const LOG_RATIO = 500; // a range this wide is read along a logarithmic scale

const isLogarithmic = ({ low, high }: QuantityRange) => low > 0 && high / low > LOG_RATIO;
const clamp = (value: number, { low, high }: QuantityRange) => Math.min(high, Math.max(low, value));

/** Where the value's tick stands between the ends, 0 to 1. */
export function placeInRange(value: number, range: QuantityRange): number {
  const { low, high } = range;
  if (!(high > low)) return 0;
  const held = clamp(value, range);
  return isLogarithmic(range) ? Math.log(held / low) / Math.log(high / low) : (held - low) / (high - low);
}

/** The value at a place between the ends; the inverse of placeInRange. */
export function valueAtPlace(place: number, range: QuantityRange): number {
  const { low, high } = range;
  const held = Math.min(1, Math.max(0, place));
  return isLogarithmic(range) ? low * (high / low) ** held : low + (high - low) * held;
}

/** The nearest step of 1, 2 or 5 times a power of ten that is no larger than `size`. */
export function roundStep(size: number): number {
  const power = 10 ** Math.floor(Math.log10(size));
  const lead = size / power + 1e-9;
  return (lead >= 5 ? 5 : lead >= 2 ? 2 : 1) * power;
}

// Feet and inches are stepped in inches, and in the parts of a foot that a rule shows.
const INCH_STEPS = [12, 6, 3, 1, 1 / 2, 1 / 4, 1 / 8];
const stepUnit = (unit: string) => (unit === 'ft-in' ? 'in' : unit);

function stepAt(value: number, range: QuantityRange, unit: string): number {
  const span = isLogarithmic(range) ? Math.max(value, range.low) : range.high - range.low;
  const size = toUnit(span, stepUnit(unit)) / STEPS_ACROSS;
  return unit === 'ft-in' ? (INCH_STEPS.find((step) => step <= size) ?? 1 / 16) : roundStep(size);
}

/** The value on the unit's own round steps: a dragged span reads 7.2 m, never 7.1938 m. The ends stay reachable. */
export function snapToStep(value: number, range: QuantityRange, unit: string): number {
  if (value <= range.low || value >= range.high) return clamp(value, range);
  const step = stepAt(value, range, unit);
  const shown = Math.round(toUnit(value, stepUnit(unit)) / step) * step;
  return clamp(fromUnit(Number(shown.toPrecision(12)), stepUnit(unit)), range);
}

/** `steps` steps along the range from the value. */
export function nudge(value: number, steps: number, range: QuantityRange, unit: string): number {
  const moved = value + steps * fromUnit(stepAt(value, range, unit), stepUnit(unit));
  return snapToStep(moved, range, unit);
}

/** Text that reads back as the value: in the unit where that is exact, else in feet with decimals. */
export function entryFor(value: number, unit: string): QuantityEntry {
  if (unit !== 'ft-in') return { text: formatNumber(toUnit(value, unit)), unit };
  const text = formatFeetInches(value);
  const back = readQuantity(text, 'length', { unit });
  const exact = back.ok && Math.abs(back.value - value) <= 1e-9 * Math.abs(value);
  return { text: exact ? text : `${formatNumber(toUnit(value, 'ft'))} ft`, unit };
}

/** The same quantity in another unit; text that does not read is left as it was typed. */
export function changeUnit(entry: QuantityEntry, unit: string, dimension: DimensionName): QuantityEntry {
  const reading = readQuantity(entry.text, dimension, { unit: entry.unit });
  return reading.ok ? entryFor(reading.value, unit) : { text: entry.text, unit };
}

/** A range's end to four figures, without the zeros that would claim a precision nobody gave. */
export const endText = (value: number, unit: string): string =>
  unit === 'ft-in' ? formatQuantity(value, unit) : formatNumber(Number(toUnit(value, unit).toPrecision(4)));

/** What is wrong with a value outside its range; nothing within it. */
export function outOfRange(value: number, range: QuantityRange, unit: string): string | undefined {
  const slack = 1e-9 * Math.max(Math.abs(range.low), Math.abs(range.high)); // rounding of unit conversions
  if (value >= range.low - slack && value <= range.high + slack) return undefined;
  const shown = unit === 'ft-in' ? '' : ` ${unitText(unit)}`.trimEnd();
  return `Must be ${endText(range.low, unit)} to ${endText(range.high, unit)}${shown}.`;
}
