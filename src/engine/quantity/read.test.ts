import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type DimensionName, readQuantity } from './index';

const value = (text: string, name: DimensionName, unit?: string) => {
  const reading = readQuantity(text, name, { unit });
  if (!reading.ok) throw new Error(`${text}: ${reading.code}`);
  return reading.value;
};
const refusal = (text: string, name: DimensionName, unit?: string) => {
  const reading = readQuantity(text, name, { unit });
  return reading.ok ? `read as ${reading.value}` : reading.code;
};

test('a quantity beyond every number is none', () => {
  expect(refusal('1e308 km', 'length')).toBe('not_a_number');
  expect(refusal('1e999 m', 'length')).toBe('not_a_number');
});

describe('a length', () => {
  test.each([
    ['7.2 m', 7.2],
    ['7.2m', 7.2],
    ['7,2 m', 7.2],
    ['7200 mm', 7.2],
    ['12 ft 6 in', 3.81],
    ['12ft 6in', 3.81],
    ['12 feet 6 inches', 3.81],
    ['12\'-6"', 3.81],
    ["12'-6", 3.81],
    ['12\'-6 1/2"', 3.8227],
    ['12′ 6½″', 3.8227],
    ['12’ 6 1/2”', 3.8227],
    ["12' 6½''", 3.8227],
    ['12-6.5', 3.8227],
    ['12-6 1/2', 3.8227],
    ['150.5 in', 3.8227],
    ['12.542 ft', 3.8228016],
    ["12'", 3.6576],
    ['6.5"', 0.1651],
    ['½ in', 0.0127],
    ['7/16 in', 0.0111125],
    ['1 1/2 in', 0.0381],
    ['1-1/2 in', 0.0381],
    ['1½ in', 0.0381],
    ['−12\'-6"', -3.81],
    ['1 234 mm', 1.234],
    ['1\u2009234 mm', 1.234],
    ['1\u202f234,5 mm', 1.2345],
    ["12'345 mm", 12.345],
    ['1,234.5 mm', 1.2345],
    ['1.234,5 mm', 1.2345],
    ['1,234,567 mm', 1234.567],
    ['0,125 m', 0.125],
    ['1234,567 mm', 1.234567],
    ['.5 m', 0.5],
    ['7.20E+03 mm', 7.2],
    ['7.2×10³ mm', 7.2],
    ['１２ m', 12],
  ])('%s is %d m', (text, metres) => {
    expect(value(text, 'length')).toBe(metres);
  });

  test.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['7,2,3 m', 'not_a_number'],
    ['7.2.3 m', 'not_a_number'],
    ['seven m', 'not_a_number'],
    ['--5 m', 'not_a_number'],
    ['1/0 m', 'not_a_number'],
    ['1e999 m', 'not_a_number'],
    ['NaN m', 'not_a_number'],
    ['12 34 m', 'not_a_number'],
    ['12\'-13"', 'not_a_number'],
    [`${'9'.repeat(70)} m`, 'not_a_number'],
    ['12.5', 'unit_missing'],
    ['12.5 furlong', 'unit_unknown'],
    ['12.5 kN', 'unit_wrong_dimension'],
    ['12.5 m m', 'unit_wrong_dimension'],
    ['1,234 m', 'ambiguous_number'],
    ['1,234', 'ambiguous_number'],
    ['1-1/2', 'ambiguous_feet'],
  ])('"%s" is refused: %s', (text, code) => {
    expect(refusal(text, 'length')).toBe(code);
  });

  test('in a field of feet and inches a bare 12.6 is asked back, and both choices are read', () => {
    const reading = readQuantity('12.6', 'length', { unit: 'ft-in' });
    expect(reading).toMatchObject({ ok: false, code: 'ambiguous_feet', choices: ['12.6 ft', '12\'-6"'] });
    if (reading.ok) return;
    expect(reading.choices?.map((choice) => value(choice, 'length'))).toEqual([3.84048, 3.81]);
  });

  test.each([
    ['12', 3.6576],
    ['12.125', 3.6957],
    ['12-6', 3.81],
    ['7.2 m', 7.2],
  ])('in a field of feet and inches %s is plain', (text, metres) => {
    expect(value(text, 'length', 'ft-in')).toBe(metres);
  });

  test.each([
    ['12.10', 'ambiguous_feet'],
    ['12,6', 'ambiguous_feet'],
    ['6 1/2', 'ambiguous_feet'],
  ])('in a field of feet and inches %s is asked back', (text, code) => {
    expect(refusal(text, 'length', 'ft-in')).toBe(code);
  });

  test('12-6.5 in a metric field is asked back', () => {
    expect(refusal('12-6.5', 'length', 'm')).toBe('ambiguous_feet');
    expect(value('12-6.5', 'length', 'ft')).toBe(3.8227);
  });
});

describe('other quantities', () => {
  test.each<[string, DimensionName, number]>([
    ['3,8 kN/m', 'line_load', 3800],
    ['12.5 kn/m', 'line_load', 12500],
    ['-5 kN', 'force', -5000],
    ['−5 kN', 'force', -5000],
    ['5 kN.m', 'moment', 5000],
    ['5 kN m', 'moment', 5000],
    ['5 kNm', 'moment', 5000],
    ['5 kN·m', 'moment', 5000],
    ['210000 N/mm2', 'modulus', 2.1e11],
    ['210000 N/mm²', 'modulus', 2.1e11],
    ['210 GPa', 'modulus', 2.1e11],
    ['2,5 kN/m²', 'area_load', 2500],
    ['8356 cm4', 'second_moment', 8.356e-5],
    ['8356 cm⁴', 'second_moment', 8.356e-5],
    ['557 cm^3', 'section_modulus', 5.57e-4],
    ['0.126 dm6', 'warping', 1.26e-7],
    ['2e7 N·m²', 'bending_stiffness', 2e7],
    ['17548 kNm2', 'bending_stiffness', 1.7548e7],
    ['5 kNm/rad', 'rotational_spring', 5000],
    ['5 kNm', 'rotational_spring', 5000],
    ['2 mrad', 'rotation', 0.002],
    ['18°', 'rotation', 0.314159265358979],
    ['1e-4 1/m', 'curvature', 1e-4],
    ['12e-6 /K', 'expansion', 1.2e-5],
    ['20 °C', 'temperature', 20],
    ['36 °F', 'temperature', 20],
    ['42.2 kg/m', 'mass_per_length', 42.2],
    ['0.85', 'ratio', 0.85],
    ['85 %', 'ratio', 0.85],
  ])('%s as %s', (text, name, expected) => {
    expect(value(text, name)).toBe(expected);
  });

  // Printed factors: NIST Special Publication 811 (2008), Appendix B.8, seven figures, from memory.
  test.each<[string, DimensionName, string]>([
    ['1 kip', 'force', '4448.222'],
    ['1 lb', 'force', '4.448222'],
    ['1 lb/ft', 'line_load', '14.59390'],
    ['1 plf', 'line_load', '14.59390'],
    ['1 lb/ft', 'mass_per_length', '1.488164'],
    ['1 psf', 'area_load', '47.88026'],
    ['1 psi', 'stress', '6894.757'],
    ['1 ksi', 'stress', '6894757'],
    ['1 lb-ft', 'moment', '1.355818'],
    ['1 ft-lbf', 'moment', '1.355818'],
    ['1 lb/ft3', 'density', '16.01846'],
    ['1 in4', 'second_moment', '4.162314e-7'],
    ['1 in.^4', 'second_moment', '4.162314e-7'],
  ])('%s as %s is the printed %s', (text, name, printed) => {
    expect(value(text, name).toPrecision(7)).toBe(Number(printed).toPrecision(7));
  });

  test.each<[string, DimensionName, string]>([
    ['12.5', 'line_load', 'unit_missing'],
    ['5 kg', 'force', 'unit_wrong_dimension'],
    ['5 mN', 'force', 'unit_unknown'],
    ['5 kNm/rad', 'moment', 'unit_wrong_dimension'],
    ['2 %', 'rotation', 'unit_wrong_dimension'],
    ['3 rad', 'ratio', 'unit_wrong_dimension'],
  ])('%s as %s is refused: %s', (text, name, code) => {
    expect(refusal(text, name)).toBe(code);
  });

  test('the unit of the field is taken where the text has none, and only there', () => {
    expect(value('12.5', 'line_load', 'kN/m')).toBe(12500);
    expect(value('12.5 N/m', 'line_load', 'kN/m')).toBe(12.5);
  });

  test('the messages say what was read and what to write', () => {
    const message = (text: string, name: DimensionName) => {
      const reading = readQuantity(text, name);
      return reading.ok ? '' : reading.message;
    };
    expect(message('', 'line_load')).toBe('Give a line load, for example 12.5 kN/m.');
    expect(message('12.5', 'line_load')).toBe('"12.5" has no unit. Write, for example, 12.5 kN/m.');
    expect(message('30 kN', 'line_load')).toBe('"kN" is a force. Give a line load, for example 12.5 kN/m.');
    expect(message('7,2,3 m', 'length')).toBe(
      '"7,2,3 m" does not read as a length. Write, for example, 7.2 m.',
    );
    expect(message('1,234 m', 'length')).toBe('"1,234 m" can be 1234 m or 1.234 m. Write the one you mean.');
  });
});

describe('reading is safe', () => {
  test('any text gives a finite number or a fault with words', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 80 }), (text) => {
        const reading = readQuantity(text, 'length');
        expect(reading.ok ? Number.isFinite(reading.value) : reading.message.length > 0).toBe(true);
      }),
    );
  });

  test('every choice that is offered is read without question', () => {
    const texts = fc.stringMatching(/^-?\d{1,3}[-.,' ]\d{1,4}( \d\/[1-9])?$/);
    fc.assert(
      fc.property(texts, fc.constantFrom(undefined, 'm', 'ft-in'), (text, unit) => {
        const reading = readQuantity(text, 'length', { unit });
        const choices = reading.ok ? [] : (reading.choices ?? []);
        for (const choice of choices) expect(readQuantity(choice, 'length')).toMatchObject({ ok: true });
      }),
    );
  });
});
