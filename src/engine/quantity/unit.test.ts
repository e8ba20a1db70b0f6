import { describe, expect, test } from 'vitest';
import { readUnit, unitFactor, unitText } from './unit';

describe('readUnit', () => {
  test.each(['kN;m', 'kN/', '2m', 'kN m )', '(m)', 'furlong'])('%j is no unit', (text) => {
    expect(readUnit(text)).toEqual([]);
    expect(unitFactor(text, 'length')).toEqual({ ok: false, code: 'unit_unknown' });
  });

  test('nothing is the unit of a ratio, and one over a length that of a curvature', () => {
    expect(readUnit('')).toMatchObject([{ factor: 1 }]);
    expect(unitFactor('', 'ratio')).toEqual({ ok: true, factor: 1 });
    expect(unitFactor('/m', 'curvature')).toEqual({ ok: true, factor: 1 });
  });

  // 1 lbf = 0.45359237 kg · 9.80665 m/s², 1 ft = 0.3048 m: 1959 agreement and standard gravity.
  test('a pound is a force or a mass, as what is asked for has it', () => {
    const force = unitFactor('lb/ft', 'line_load');
    const mass = unitFactor('lb/ft', 'mass_per_length');
    expect(force).toEqual({ ok: true, factor: expect.closeTo((0.45359237 * 9.80665) / 0.3048, 12) });
    expect(mass).toEqual({ ok: true, factor: expect.closeTo(0.45359237 / 0.3048, 12) });
  });

  test('in a product that is run together the power belongs to the last symbol', () => {
    expect(unitFactor('kNm2', 'bending_stiffness')).toEqual({ ok: true, factor: 1000 });
    expect(unitFactor('rad/kNm', 'rotational_spring')).toMatchObject({ code: 'unit_wrong_dimension' });
    expect(unitFactor('1/kNm', 'ratio')).toMatchObject({ code: 'unit_wrong_dimension' });
  });
});

describe('unitText', () => {
  test.each([
    ['cm4', 'cm⁴'],
    ['lbf/ft', 'lb/ft'],
    ['C', '°C'],
    ['kip-ft', 'kip-ft'],
    ['ft-in', ''],
    ['', ''],
  ])('%j is read as %j', (unit, text) => {
    expect(unitText(unit)).toBe(text);
  });
});
