import { describe, expect, test } from 'vitest';
import { applyEdits } from '@/features/author/edit';
import { type Column, cellEdit, cellText, cellValue, isTable, pastedRows, pasteEdits, unitOf } from './cells';

const factor: Column = { key: 'factors/Q', label: 'Q', kind: 'factor' };
const number: Column = { key: 'psi0', label: 'ψ0', kind: 'number' };
const stress: Column = { key: 'fy', label: 'f_y', kind: 'quantity', dimension: 'stress', unit: 'N/mm2' };
const length: Column = { key: 'cap', label: 'Cap', kind: 'si', dimension: 'length', unit: 'mm' };
const choice: Column = {
  key: 'combination/id',
  label: 'Combination',
  kind: 'choice',
  choices: [{ value: 'quasi-permanent', label: 'Quasi-permanent' }],
};
const name: Column = { key: 'name', label: 'Name', kind: 'text' };

describe('the text of a cell', () => {
  test.each<[string, Column, unknown]>([
    ['0,7', number, 0.7],
    ['0.', number, 0],
    ['seven', number, 'seven'],
    ['', number, undefined],
    ['1.5 p0', factor, { factor: 1.5, by: 'psi0' }],
    ['–', factor, undefined],
    ['1.5 p', factor, '1.5 p'],
    ['355', stress, '355 N/mm2'],
    ['51 ksi', stress, '51 ksi'],
    ['', stress, ''],
    ['', { ...stress, isOptional: true }, undefined],
    ['25', length, 0.025],
    ['1 in', length, 0.0254],
    ['far', length, 'far'],
    ['Quasi-permanent', choice, 'quasi-permanent'],
    ['else', choice, 'else'],
    ['', { ...name, isOptional: true }, undefined],
  ])('“%s” is what its column makes of it', (text, column, value) => {
    expect(cellValue(text, column)).toEqual(value);
  });

  test.each<[unknown, Column, string]>([
    [{ factor: 1.5, by: 'psi0' }, factor, '1.5 ψ₀'],
    ['1.5 p', factor, '1.5 p'],
    ['355 N/mm2', stress, '355'],
    ['51 ksi', stress, '51 ksi'],
    ['12e-6 1/K', { ...stress, dimension: 'expansion', unit: '1/K' }, '12e-6'],
    [0.0254, length, '25.4'],
    [{ a: 1 }, name, '{"a":1}'],
    [undefined, name, ''],
  ])('%j is shown', (value, column, text) => {
    expect(cellText(value, column)).toBe(text);
  });

  test('nothing that is typed is lost: it is shown as it was typed, or as the same', () => {
    for (const column of [factor, number, stress, length, name])
      for (const text of ['1.5', '0.7', 'abc', '1.5 p', '12 N', '7 m']) {
        const value = cellValue(text, column);
        expect(cellValue(cellText(value, column), column)).toEqual(value);
      }
  });
});

test('an emptied factor is taken out of its row', () => {
  const document = { strength: [{ factors: { G: 1.35, Q: 1.5 } }] };
  expect(applyEdits(document, [cellEdit('/strength/0', '', factor)]).document).toEqual({
    strength: [{ factors: { G: 1.35 } }],
  });
});

describe('a pasted table', () => {
  test('comes by tabs from a spreadsheet, by semicolons or commas from a file', () => {
    expect(pastedRows('A\t1,5\r\nB\t2\r\n')).toEqual([
      ['A', '1,5'],
      ['B', '2'],
    ]);
    expect(pastedRows('"A";1,5\nB;2')).toEqual([
      ['A', '1,5'],
      ['B', '2'],
    ]);
    expect(pastedRows('A,1.5\nB,2')).toEqual([
      ['A', '1.5'],
      ['B', '2'],
    ]);
  });

  test.each([
    ['of decimals with commas', '0,7\n1\n0,5', ['0,7', '1', '0,5']],
    ['of quantities with commas', '355,5 N/mm2\n275 N/mm2', ['355,5 N/mm2', '275 N/mm2']],
    ['of words with commas', 'Roofs, with snow\nOffices', ['Roofs, with snow', 'Offices']],
    ['in quotes', '"0,7"\n"0,5"', ['0,7', '0,5']],
  ])('of one column %s stays one', (_, text, cells) => {
    expect(pastedRows(text)).toEqual(cells.map((cell) => [cell]));
  });

  test('keeps what stands in quotes together', () => {
    expect(pastedRows('"C24, solid",24\n"5"" plank",16')).toEqual([
      ['C24, solid', '24'],
      ['5" plank', '16'],
    ]);
    expect(pastedRows('"two\nlines"\t1\n"a;b"\t2')).toEqual([
      ['two lines', '1'],
      ['a;b', '2'],
    ]);
  });

  test('is none where it is one cell’s text', () => {
    expect(['1.5', 'Roofs, with snow', 'Roofs\n'].map(isTable)).toEqual([false, false, false]);
    expect(isTable('1\t2')).toBe(true);
  });

  test('fills cells to the right and down, and says what had no row', () => {
    const rows = ['/categories/Q/1', '/categories/Q/2'];
    const filled = pasteEdits(
      [
        ['Homes', '0.7', 'beyond'],
        ['Storage', '1'],
        ['More', '0'],
      ],
      rows,
      [name, number],
    );
    expect(filled.left).toBe(1);
    expect(filled.edits).toEqual([
      { do: 'set', at: '/categories/Q/1/name', value: 'Homes' },
      { do: 'set', at: '/categories/Q/1/psi0', value: 0.7 },
      { do: 'set', at: '/categories/Q/2/name', value: 'Storage' },
      { do: 'set', at: '/categories/Q/2/psi0', value: 1 },
    ]);
  });
});

test('a column is in the unit that most of it is written in', () => {
  expect(unitOf(['355 N/mm2', '51 ksi', '275 N/mm2', 12, undefined], 'MPa')).toBe('N/mm2');
  expect(unitOf([], 'MPa')).toBe('MPa');
  expect(unitOf(['12e-6 1/K'], '1/F')).toBe('1/K');
});
