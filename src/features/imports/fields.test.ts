import { describe, expect, test } from 'vitest';
import { readsAs } from './fields';

const column = (field: 'h' | 'iMajor' | 'designation' | null, unit: string | null) => ({
  index: 0,
  heading: 'x',
  field,
  unit,
  factor: 1,
});

describe('what a cell is read as', () => {
  test.each([
    ['4,4', ',', '4.4 mm'],
    ['13,0', ',', '13.0 mm'],
    ['1.208,5', ',', '1 208.5 mm'],
    ['1,208.5', '.', '1 208.5 mm'],
    ['0,00239', ',', '0.00239 mm'],
    // What is no number is shown as it stands; the check says why.
    ['17.6', ',', '17.6 mm'],
    ['–', ',', '– mm'],
  ] as const)('of %s with %s before decimals is %s', (cell, mark, words) => {
    expect(readsAs(cell, column('h', 'mm'), mark).replaceAll('\u202f', ' ')).toBe(words);
  });

  test('has its unit as it is printed', () => {
    expect(readsAs('616', column('iMajor', 'cm^4'), ',')).toBe('616 cm⁴');
  });

  test('is the cell where it is a text, or its unit or mark is open; nothing where it is left out', () => {
    expect(readsAs('OV 150', column('designation', null), ',')).toBe('OV 150');
    expect(readsAs('1,2', column('h', null), ',')).toBe('1,2');
    expect(readsAs('1,2', column('h', 'mm'), null)).toBe('1,2');
    expect(readsAs('1,2', column(null, 'mm'), ',')).toBe('–');
  });
});
