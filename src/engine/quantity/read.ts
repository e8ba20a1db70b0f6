import { FOOT } from './atoms';
import { DIMENSION_WORDS, type DimensionName, nameDimension } from './dimension';
import { bareFeetChoices, isDashedFeet, readFeetInches } from './feet';
import { NUMBER_PATTERN, plainText, readNumber } from './number';
import { UNIT_SYSTEMS } from './system';
import { unitFactor, unitText } from './unit';

type QuantityFaultCode =
  | 'empty'
  | 'not_a_number'
  | 'unit_missing'
  | 'unit_unknown'
  | 'unit_wrong_dimension'
  | 'ambiguous_number'
  | 'ambiguous_feet';

/** `value` is SI. `choices` are texts that would each be read without question. */
export type QuantityReading =
  | { ok: true; value: number }
  | { ok: false; code: QuantityFaultCode; message: string; choices?: readonly string[] };

export type ReadOptions = {
  /** The unit that the field shows, taken when the text has none; "ft-in" for feet and inches. */
  unit?: string | undefined;
};

const LONGEST = 64; // characters; the longest honest entry, a mixed feet-inch length in words, has about 40

const NUMBER = new RegExp(`^(${NUMBER_PATTERN}) ?(.*)$`);
const FEET_FIELDS: readonly (string | undefined)[] = [undefined, 'ft-in', 'ft', 'in'];

function usualUnits(name: DimensionName): string[] {
  const units = [UNIT_SYSTEMS.metric[name].unit, UNIT_SYSTEMS.us[name].unit.replace('ft-in', 'ft')];
  return [...new Set(units.map(unitText))];
}

const withUnit = (number: string, unit: string) => `${number} ${unit}`.trim();

const EXAMPLES: Readonly<Record<DimensionName, string>> = {
  length: '7.2 m',
  force: '30 kN',
  line_load: '12.5 kN/m',
  moment: '40 kNm',
  stress: '355 N/mm²',
  modulus: '210 GPa',
  area_load: '2.5 kN/m²',
  second_moment: '8360 cm⁴',
  section_modulus: '557 cm³',
  area: '53.8 cm²',
  warping: '126000 cm⁶',
  bending_stiffness: '17500 kNm²',
  shear_stiffness: '200 MN',
  spring: '5000 kN/m',
  rotational_spring: '2000 kNm/rad',
  curvature: '0.0002 1/m',
  rotation: '2 mrad',
  mass_per_length: '42.2 kg/m',
  density: '7850 kg/m³',
  temperature: '20 °C',
  expansion: '12e-6 1/K',
  ratio: '0.85',
};

function fault(code: QuantityFaultCode, message: string, choices?: readonly string[]): QuantityReading {
  return choices ? { ok: false, code, message, choices } : { ok: false, code, message };
}

const notANumber = (text: string, name: DimensionName) =>
  fault(
    'not_a_number',
    `"${text}" does not read as ${DIMENSION_WORDS[name]}. Write, for example, ${EXAMPLES[name]}.`,
  );

function askFeet(text: string, choices: readonly string[]): QuantityReading {
  return choices.length === 0
    ? fault('not_a_number', `"${text}" has 12 inches or more. Carry them into the feet.`)
    : fault('ambiguous_feet', `"${text}" can be ${choices.join(' or ')}. Write the one you mean.`, choices);
}

const TYPED_FIGURES = 15; // what a double holds of a decimal: 12 × 0.0254 is then 0.3048

function finite(value: number, text: string, name: DimensionName): QuantityReading {
  return Number.isFinite(value)
    ? { ok: true, value: Number(value.toPrecision(TYPED_FIGURES)) }
    : notANumber(text, name);
}

function readBare(number: string, value: number, name: DimensionName, field?: string): QuantityReading {
  if (name === 'ratio') return { ok: true, value };
  if (field === undefined) {
    const choices = usualUnits(name).map((unit) => withUnit(number, unit));
    return fault('unit_missing', `"${number}" has no unit. Write, for example, ${choices[0]}.`, choices);
  }
  if (field === 'ft-in') {
    const choices = bareFeetChoices(number);
    return choices ? askFeet(number, choices) : { ok: true, value: value * FOOT };
  }
  return scale(value, field, name);
}

function scale(value: number, unit: string, name: DimensionName): QuantityReading {
  const read = unitFactor(unit, name);
  if (read.ok) return { ok: true, value: value * read.factor };
  if (read.code === 'unit_unknown') {
    return fault('unit_unknown', `The unit "${unit}" is not known. Write, for example, ${EXAMPLES[name]}.`);
  }
  const is = nameDimension(read.dimension);
  return fault(
    'unit_wrong_dimension',
    `"${unit}" is ${is}. Give ${DIMENSION_WORDS[name]}, for example ${EXAMPLES[name]}.`,
  );
}

/** The unsigned rest of the text, after its sign. */
function readUnsigned(unsigned: string, text: string, name: DimensionName, field?: string): QuantityReading {
  if (name === 'length') {
    const feet = readFeetInches(unsigned);
    if (feet && !feet.ok) return askFeet(text, feet.choices);
    if (feet?.ok && isDashedFeet(unsigned) && !FEET_FIELDS.includes(field)) {
      const marked = `${unsigned.replace('-', "'-")}"`;
      return fault('ambiguous_feet', `"${text}" has no unit. If it is feet and inches, write ${marked}.`, [
        marked,
      ]);
    }
    if (feet?.ok) return finite(feet.value, text, name);
  }
  const [, number = '', unit = ''] = NUMBER.exec(unsigned) ?? [];
  if (/^(?!1\/[a-zA-Z°])[\d.,+-]/.test(unit)) return notANumber(text, name);
  const read = readNumber(number);
  if (!read.ok && read.code === 'ambiguous_number') {
    const shown = unit || (field ?? usualUnits(name)[0] ?? '').replace('ft-in', 'ft');
    const choices = read.values.map((value) => withUnit(value, shown));
    return fault(
      'ambiguous_number',
      `"${text}" can be ${choices.join(' or ')}. Write the one you mean.`,
      choices,
    );
  }
  if (!read.ok) return notANumber(text, name);
  return unit === '' ? readBare(number, read.value, name, field) : scale(read.value, unit, name);
}

/**
 * Reads what a person types as the named quantity, in SI: "7.2 m", "12'-6 1/2\"", "2 kip/ft", "3,8 kN/m", "29000 ksi".
 * Never guesses: a number without unit (and without a field's unit), "1,234", and a bare 12.6 in a field of feet and
 * inches are refused with the choices. A temperature is a difference: 20 °C is 20 K.
 */
export function readQuantity(text: string, name: DimensionName, options: ReadOptions = {}): QuantityReading {
  const plain = plainText(text);
  if (plain === '') return fault('empty', `Give ${DIMENSION_WORDS[name]}, for example ${EXAMPLES[name]}.`);
  if (plain.length > LONGEST) return notANumber(`${plain.slice(0, LONGEST)}…`, name);
  const [, sign = '', unsigned = ''] = /^([+-]?) ?(.*)$/.exec(plain) ?? [];
  const reading = readUnsigned(unsigned, text.trim(), name, options.unit);
  if (reading.ok)
    return finite(sign === '-' && reading.value !== 0 ? -reading.value : reading.value, plain, name);
  if (sign !== '-' || !reading.choices) return reading;
  return { ...reading, choices: reading.choices.map((choice) => `\u2212${choice}`) };
}
