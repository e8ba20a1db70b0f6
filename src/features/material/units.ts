import {
  type DimensionName,
  formatQuantity,
  readQuantity,
  UNIT_SYSTEMS,
  type UnitSystemName,
} from '@/engine/quantity';

const US_UNIT = /\b(?:psi|ksi|lb|ft3|in|1\/F)\b|1\/F/;

/** Of a value whose rounding no system says: moduli are printed with up to four. */
const DIGITS = 4;

/** A value as its standard prints it, and in the other system of units. */
export function inBoth(text: string, dimension: DimensionName): { printed: string; other: string } {
  const reading = readQuantity(text, dimension);
  if (!reading.ok) return { printed: text, other: '' };
  const own: UnitSystemName = US_UNIT.test(text) ? 'us' : 'metric';
  const system = own === 'us' ? 'metric' : 'us';
  const { unit, ...rounding } = UNIT_SYSTEMS[system][dimension === 'length' ? 'section_size' : dimension];
  return {
    printed: text.replace('mm2', 'mm²').replace(/(kg\/m|lb\/ft)3/, '$1³'),
    other: formatQuantity(reading.value, unit, { significant: DIGITS, ...rounding }),
  };
}
