import { describe, expect, test } from 'vitest';
import { completions, symbolNames, unitCompletions } from './complete';
import { type Expected, kindsIn, readAs, wantedWords } from './expression';

const draft = {
  parameters: [
    { kind: 'quantity', symbol: 'L', name: 'Span', dimension: 'length' },
    { kind: 'quantity', symbol: 'a', name: 'Overhang', dimension: 'length', default: 'nonsense' },
    { kind: 'quantity', symbol: 'w', name: 'Uniform load', dimension: 'line_load', group: 'G' },
    { kind: 'choice', symbol: 'ends', name: 'Ends', options: [{ value: 'one' }, { value: 'both' }] },
    {
      kind: 'rows',
      symbol: 'loads',
      name: 'Point loads',
      columns: [
        { kind: 'quantity', symbol: 'x', name: 'Place', dimension: 'length' },
        { kind: 'quantity', symbol: 'P', name: 'Load', dimension: 'force' },
      ],
    },
    { kind: 'quantity', symbol: '2bad', dimension: 'length' },
    { kind: 'quantity', symbol: 'odd', dimension: 'no such thing' },
  ],
  derived: [
    { symbol: 'W', name: 'Whole load', expression: 'w*L' },
    { symbol: 'V', expression: 'w* ' },
  ],
  beam: { supports: [{ at: '0' }, { at: 'L' }, { at: 'L + a', when: 'a > 0' }] },
};

const read = (text: string, wanted: Expected = 'any number', scene: 'beam' | 'rule' | 'figure' = 'beam') =>
  readAs(text, wanted, kindsIn(draft, scene));

describe('an expression while it is typed', () => {
  test.each([
    ['L + a', 'length', 'a length'],
    ['w*L', 'force', 'a force'],
    ['W/L', 'line_load', 'a force per length'],
    ['a <= L', 'condition', 'a condition'],
    ['sum(loads, P*x)/L', 'force', 'a force'],
    ['ends == "both" ? a : 0', 'length', 'a length'],
  ] as const)('%s says that it is fit for its place', (text, wanted, is) => {
    expect(read(text, wanted)).toEqual({ is, fault: undefined });
  });

  test.each([
    ['L + w', 'length', 'L + w is a length plus a force per length.'],
    ['w*L', 'length', 'w*L is a force. Give a length.'],
    ['L +', 'length', 'The end is missing.'],
    ['V', 'force', 'There is no “V”.'],
    ['odd', 'length', 'There is no “odd”.'],
    ['ends == "none"', 'condition', '“none” is no value here.'],
    ['RA', 'force', 'There is no “RA”.'],
    ['L', 'condition', 'L is a length. Give a condition.'],
  ] as const)('%s says what is wrong with it', (text, wanted, message) => {
    expect(read(text, wanted).fault).toContain(message);
  });

  test('may speak of reactions and the depth in a rule, and of those reactions only in a figure that are always there', () => {
    expect(read('RC/h', 'line_load', 'rule').fault).toBeUndefined();
    expect(read('RB', 'force', 'figure').fault).toBeUndefined();
    expect(read('RC', 'force', 'figure').fault).toContain('There is no “RC”');
  });

  test('may speak of the columns of the list that its part is repeated over', () => {
    expect(readAs('P', 'force', kindsIn(draft, 'beam', 'loads')).fault).toBeUndefined();
    expect(read('P', 'force').fault).toContain('There is no “P”');
  });

  test('that is empty has no fault of its own', () => {
    expect(read('  ')).toEqual({ is: '' });
    expect([wantedWords('line_load'), wantedWords('condition')]).toEqual([
      'a force per length',
      'a condition',
    ]);
  });
});

const offered = (text: string, wanted: Expected = 'any number', caret = text.length) =>
  completions(text, caret, { wanted, kinds: kindsIn(draft, 'beam'), names: symbolNames(draft) });
const texts = (...given: Parameters<typeof offered>) => offered(...given).map(({ text }) => text);

describe('completion', () => {
  test('offers in an empty place what alone would do, before anything else', () => {
    expect(texts('', 'length').slice(0, 2)).toEqual(['L', 'a']);
    expect(texts('', 'force')[0]).toBe('W');
  });

  test('goes on with the word before the caret, by symbol and by name', () => {
    expect(texts('L + s')).toEqual(expect.arrayContaining(['sqrt(', 'sum(']));
    expect(texts('2*over')).toEqual(['a']);
    expect(offered('w * l', 'force')).toContainEqual({ text: 'L', from: 4, to: 5, note: 'Span' });
  });

  test('offers nothing where a sign is missing', () => {
    expect(texts('2')).toEqual([]);
    expect(texts('2 L')).toEqual([]);
    expect(texts('(L + a)')).toEqual([]);
  });

  test('offers the named values of the choice that is compared, with the closing quote', () => {
    expect(offered('ends == "b')).toEqual([{ text: 'both"', from: 9, to: 10, note: 'of ends' }]);
    expect(offered('ends == ""', 'condition', 9).map(({ to }) => to)).toEqual([10, 10]);
  });

  test('offers the units of the dimension behind a figure', () => {
    const units = (text: string) =>
      unitCompletions(text, text.length, 'line_load').map((one) => text.slice(0, one.from) + one.text);
    expect(units('5')).toContain('5 kN/m');
    expect(units('5 ki')).toEqual(['5 kip/ft']);
    expect(units('')).toEqual([]);
  });
});
