import { describe, expect, test } from 'vitest';
import { halfDigit, readCell } from './cells';
import type { DecimalMark } from './contract';
import { decimalMarkOf, thousandsMarksOf } from './marks';

const MM = { quantity: 'length', unit: 'mm', scale: 0.001 } as const;
const INCHES = { quantity: 'length', unit: 'in', scale: 0.0254 } as const;

describe('a cell of millimetres', () => {
  test.each<[string, DecimalMark, number]>([
    ['178', '.', 178],
    ['7.6', '.', 7.6],
    ['7,6', ',', 7.6],
    ['.25', '.', 0.25],
    [' 12 ', '.', 12],
    ['14 899', ',', 14899],
    ['14\u202f899,5', ',', 14899.5],
    ['14\u2009899', '.', 14899],
    ["14'899", '.', 14899],
    ['14’899.25', '.', 14899.25],
    ['1.234.567', ',', 1_234_567],
    ['1,234.5', '.', 1234.5],
    ['6.7E-03', '.', 0.0067],
    ['1 in', '.', 25.4],
    ['2,5 cm', ',', 25],
  ])('%j, decimals by %j, is %d', (text, mark, millimetres) => {
    expect(readCell(text, MM, mark)).toBeCloseTo(millimetres / 1000, 12);
  });

  test.each<[string, DecimalMark, number, string, string]>([
    ['32.3', ',', 28, 'decimal_mark', 'error'],
    ['32,3', '.', 28, 'decimal_mark', 'error'],
    ['1 48 99', '.', 29, 'thousands', 'warning'],
    ['12\ufffd', '.', 30, 'replacement_character', 'error'],
    ['3-Apr', '.', 34, 'date', 'error'],
    ['2026-04-03', '.', 34, 'date', 'error'],
    ['1.2E+03', '.', 34, 'scientific', 'warning'],
    ["'178", '.', 34, 'hidden_apostrophe', 'warning'],
    ['#REF!', '.', 34, 'not_a_number', 'error'],
    ['two', '.', 34, 'not_a_number', 'error'],
    ['9'.repeat(400), '.', 34, 'not_a_number', 'error'],
    ['7 1/2', '.', 35, 'fraction', 'warning'],
    ['2O4', '.', 37, 'letter_for_digit', 'warning'],
    ['1l,5', ',', 37, 'letter_for_digit', 'warning'],
    ['=1+1', '.', 38, 'formula', 'error'],
    ['@SUM(A1)', '.', 38, 'formula', 'error'],
    ['+cmd', '.', 38, 'formula', 'error'],
    ['12\u0007', '.', 38, 'control_character', 'error'],
    ['12 furlong', '.', 26, 'unit_unknown', 'error'],
  ])('%j, decimals by %j, breaks rule %d: %s', (text, mark, rule, cause, severity) => {
    expect(readCell(text, MM, mark)).toMatchObject({ rule, cause, severity });
  });

  test('what is read all the same, and how the cell should read', () => {
    expect(readCell('2O4', MM, '.')).toMatchObject({ value: expect.closeTo(0.204, 12), suggestion: '204' });
    expect(readCell('3-Apr', MM, '.')).toMatchObject({ value: null, suggestion: '3/4' });
    expect(readCell('32.3', MM, ',')).toMatchObject({ value: null, suggestion: '32,3' });
    expect(readCell('10.1 cm', MM, ',')).toMatchObject({ suggestion: '10,1 cm' });
    expect(readCell('1.2E+03', MM, ',')).toMatchObject({ cause: 'decimal_mark', suggestion: '1,2E+03' });
  });
});

test.each([
  ['7/16', 0.4375],
  ['1 1/2', 1.5],
  ['1-1/2', 1.5],
  ['½', 0.5],
  ['5⅛', 5.125],
  ['1\'-6"', 18],
])('%s in a column of inches is %d in, without a word', (text, inches) => {
  expect(readCell(text, INCHES, '.')).toBeCloseTo(inches * 0.0254, 12);
});

test('half a unit of the last digit', () => {
  expect(['26', '26.0', '0.067', '1.2E+03'].map((text) => halfDigit(text, '.'))).toEqual([
    0.5, 0.05, 0.0005, 50,
  ]);
});

describe('the decimal mark of a file', () => {
  const cells = (count: number, text: string) => Array.from({ length: count }, () => text);
  test('is what most cells can only mean', () => {
    expect(decimalMarkOf([...cells(20, '7,6'), ...cells(19, '7.6')]).mark).toBe(',');
    expect(decimalMarkOf([...cells(25, '14.899,5'), '7,25']).mark).toBe(',');
    expect(decimalMarkOf(cells(3, '1,234.5')).mark).toBe('.');
    expect(decimalMarkOf(['178', '90']).mark).toBe('.');
  });
  test('is asked with three samples on a tie, of few cells that disagree, and where every cell may be either', () => {
    const tie = decimalMarkOf([...cells(20, '7,6'), ...cells(20, '7.6')]);
    expect(tie).toEqual({ mark: null, points: cells(3, '7.6'), commas: cells(3, '7,6') });
    expect(decimalMarkOf(['7,6', '7,7', '7.6']).mark).toBeNull();
    expect(decimalMarkOf(['1,234', '2,345']).mark).toBeNull();
  });
  test('thousands marks are named', () => {
    expect(thousandsMarksOf(['14\u202f899', '1.234,5', "2'000"], ',')).toEqual([
      'no-break space',
      'apostrophe',
      'point',
    ]);
  });
});
