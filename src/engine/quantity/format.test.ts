import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  DIMENSION_NAMES,
  formatFeetInches,
  formatFor,
  formatNumber,
  formatQuantity,
  formatUtilisation,
  fromUnit,
  readQuantity,
  toUnit,
  UNIT_SYSTEMS,
  type UnitSystemName,
  UnknownUnit,
  unitText,
} from './index';

const plain = (text: string) => text.replaceAll(/[\u00a0\u202f]/g, ' ');

test('feet and inches are converted as feet', () => {
  expect(toUnit(3.048, 'ft-in')).toBeCloseTo(10, 12);
  expect(fromUnit(10, 'ft-in')).toBeCloseTo(3.048, 12);
});

test('what is no number is shown as a dash', () => {
  for (const nothing of [Number.NaN, Number.POSITIVE_INFINITY]) {
    expect([formatNumber(nothing), formatFeetInches(nothing), formatUtilisation(nothing)]).toEqual([
      '–',
      '–',
      '–',
    ]);
  }
});

describe('formatNumber', () => {
  test.each([
    [12.5, {}, '12.5'],
    [0.1 + 0.2, {}, '0.3'],
    [-7.25, {}, '−7.25'],
    [-0.0001, { places: 2 }, '0.00'],
    [19652, { places: 0 }, '19 652'],
    [1234567.891, { places: 1 }, '1 234 567.9'],
    [83.12, { significant: 3 }, '83.1'],
    [115.84, { significant: 3 }, '116'],
    [1234.5, { significant: 3 }, '1 235'],
    [115.84, { significant: 3, places: 1 }, '115.8'],
    [5.3641, { significant: 3, places: 1 }, '5.36'],
    [3e-15, { significant: 3, places: 1 }, '0.0'],
    [0.000012, { significant: 3 }, '1.20×10⁻⁵'],
    [2e20, {}, '2×10²⁰'],
    [0, { significant: 3 }, '0'],
    [Number.NaN, {}, '–'],
  ])('%d with %o is %s', (value, rounding, expected) => {
    expect(plain(formatNumber(value, rounding))).toBe(expected);
  });
});

describe('formatQuantity', () => {
  test.each([
    [115800, 'kNm', { places: 1 }, '115.8 kNm'],
    [12500, 'kN/m', {}, '12.5 kN/m'],
    [8.356e-5, 'cm4', { places: 0 }, '8 356 cm⁴'],
    [38.69226253280841, 'lbm/ft', { places: 1 }, '26.0 lb/ft'],
    [14593.902937206367, 'lbf/ft', { places: 0 }, '1 000 lb/ft'],
    [Math.PI / 4, 'deg', { places: 1 }, '45.0°'],
    [20, 'C', { places: 0 }, '20 °C'],
    [0.85, '%', {}, '85 %'],
  ])('%d in %s is %s', (value, unit, rounding, expected) => {
    expect(plain(formatQuantity(value, unit, rounding))).toBe(expected);
  });

  test('a unit that does not exist is our mistake', () => {
    expect(() => formatQuantity(1, 'furlong')).toThrow(UnknownUnit);
  });

  test('a number, its unit and its thousands are never broken over lines', () => {
    expect(formatQuantity(12345000, 'kN')).toBe('12\u202f345\u00a0kN');
  });
});

describe('formatFeetInches', () => {
  test.each([
    [3.81, '12\'-6"'],
    [3.8227, '12\'-6 1/2"'],
    [0.1524, '0\'-6"'],
    [3.6576, '12\'-0"'],
    [3.9624 - 0.0005, '13\'-0"'], // 12'-11 63/64": the last sixteenth carries twice
    [-3.8227, '−12\'-6 1/2"'],
    [-0.0001, '0\'-0"'],
    [0.0111125, '0\'-0 7/16"'],
  ])('%d m is %s', (metres, expected) => {
    expect(formatFeetInches(metres)).toBe(expected);
  });
});

test.each([
  [1.004, '1.01'],
  [1.1, '1.10'],
  [0.29, '0.29'],
  [0.57, '0.57'],
  [1.0000000001, '1.01'],
  [0.0001, '0.01'],
  [0, '0.00'],
])('a utilisation of %d is printed %s, rounded up', (ratio, expected) => {
  expect(formatUtilisation(ratio)).toBe(expected);
});

test.each([
  ['cm4', 'cm⁴'],
  ['N/mm2', 'N/mm²'],
  ['kip-in2', 'kip-in²'],
  ['1/K', '1/K'],
  ['F', '°F'],
  ['kNm/rad', 'kNm/rad'],
])('the unit %s is shown as %s', (unit, expected) => {
  expect(unitText(unit)).toBe(expected);
});

describe('round trips', () => {
  const systems: UnitSystemName[] = ['metric', 'us'];
  const finite = fc
    .double({ min: 1e-9, max: 1e9, noNaN: true })
    .chain((magnitude) => fc.constantFrom(magnitude, -magnitude, 0));

  test('a value taken to a unit and back is the same within 4 ε', () => {
    fc.assert(
      fc.property(
        finite,
        fc.constantFrom('mm', 'in', 'ft', 'kip', 'ksi', 'psf', 'in4', 'kip-ft'),
        (value, unit) => {
          const back = fromUnit(toUnit(value, unit), unit);
          expect(Math.abs(back - value)).toBeLessThanOrEqual(4 * Number.EPSILON * Math.abs(value));
        },
      ),
    );
  });

  test('what is shown exactly is read back as the same value, in both unit systems', () => {
    const shown = DIMENSION_NAMES.filter((name) => name !== 'ratio');
    fc.assert(
      fc.property(finite, fc.constantFrom(...systems), fc.constantFrom(...shown), (amount, system, name) => {
        const display = UNIT_SYSTEMS[system][name].unit;
        const unit = display === 'ft-in' ? 'ft' : display;
        const value = fromUnit(Number(amount.toPrecision(9)), unit);
        const reading = readQuantity(formatQuantity(value, unit), name);
        expect(reading.ok).toBe(true);
        if (reading.ok) expect(Math.abs(reading.value - value)).toBeLessThanOrEqual(1e-14 * Math.abs(value));
      }),
    );
  });

  test('feet and inches are read back within 1/32 in', () => {
    fc.assert(
      fc.property(fc.double({ min: -300, max: 300, noNaN: true }), (metres) => {
        const reading = readQuantity(formatFeetInches(metres), 'length');
        expect(reading.ok && Math.abs(reading.value - metres) <= 0.0254 / 32 + 1e-12).toBe(true);
      }),
    );
  });

  test('every purpose has a unit of its system that can be shown', () => {
    for (const system of systems) {
      for (const purpose of Object.keys(UNIT_SYSTEMS[system]) as (keyof (typeof UNIT_SYSTEMS)['metric'])[]) {
        expect(formatFor(1, purpose, system)).toMatch(/\d/);
      }
    }
  });
});
