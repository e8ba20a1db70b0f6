import { describe, expect, test } from 'vitest';
import type { How, Trace } from '@/engine/why';
import { leafWords, methodWords, sourcesOf } from './words';

const trace = (how: How): Trace => ({ label: '', symbol: '', value: 0, measure: 'ratio', how, parts: [] });
const input = {
  kind: 'input',
  parameter: 'w',
  group: 'G',
  row: null,
  typed: '5 kN/m',
  isDefault: false,
} as const;
const place = { designation: 'IPE 270', table: 'european-i', tableName: 'European I sections', edition: 2 };
const printed = { text: 'EN 1990, 6.10', fromMemory: true };

describe('where a chain ends, in words', () => {
  test.each([
    [input, 'typed, 5 kN/m', 'Given', []],
    [{ ...input, isDefault: true }, 'default, 5 kN/m', 'Given', []],
    [{ ...input, typed: null }, 'given', 'Given', []],
    [{ kind: 'station' }, 'chosen on the page', 'A place that was chosen on the page', []],
    [
      { kind: 'row', column: 'w_el_cm3', isComputed: false, ...place },
      'IPE 270, European I sections, edition 2',
      'A row of a section table',
      ['IPE 270, European I sections, edition 2'],
    ],
    [
      { kind: 'row', column: 'w_el_cm3', isComputed: true, ...place, edition: null },
      'IPE 270, European I sections',
      'Computed for the row of a section table',
      ['IPE 270, European I sections'],
    ],
    [
      { kind: 'material', material: 'S355', source: printed },
      'S355',
      'A material',
      ['EN 1990, 6.10 (from memory)'],
    ],
    [
      { kind: 'criteria', document: 'Steel 1', source: printed },
      'Steel 1',
      'The criteria',
      ['Steel 1', 'EN 1990, 6.10 (from memory)'],
    ],
    [
      { kind: 'constant', source: { text: 'CGPM 1901', fromMemory: false } },
      'CGPM 1901',
      'A constant',
      ['CGPM 1901'],
    ],
  ] as const satisfies readonly (readonly [How, string, string, readonly string[]])[])(
    '%o',
    (how, leaf, method, sources) => {
      expect(leafWords(trace(how))).toBe(leaf);
      expect(methodWords(trace(how))).toBe(method);
      expect(sourcesOf(trace(how))).toEqual(sources);
    },
  );

  test('what goes on says how it was found, and ends nowhere', () => {
    const formula = trace({ kind: 'formula', method: 'sum', tree: 0, sources: [printed], note: '' });
    expect([leafWords(formula), methodWords(formula), sourcesOf(formula)]).toEqual([
      '',
      'The sum of its parts',
      ['EN 1990, 6.10 (from memory)'],
    ]);
    const others: How[] = [
      { kind: 'solution', of: 0, unknowns: [], matrix: [], right: [] },
      { kind: 'root', from: 0, polynomial: [] },
      { kind: 'section', shape: 'i', property: 'area' },
    ];
    for (const how of others) {
      expect(methodWords(trace(how))).not.toBe('');
      expect([leafWords(trace(how)), sourcesOf(trace(how))]).toEqual(['', []]);
    }
  });
});
