import { describe, expect, test } from 'vitest';
import type { Written } from '@/features/review/draft';
import { readTemplate } from '@/features/review/read-template';
import { writtenTemplates } from '../../../tests/support/templates';
import { applyEdits, listAt, textAt } from './edit';
import { declaredSymbols, isOwnSymbol, renameEdits, replaced, texOf } from './rename';

test.each([
  ['L*L1 + L', 'L', 'S', 'S*L1 + S'],
  ['ends == "L" ? L : 0', 'L', 'S', 'ends == "L" ? S : 0'],
  ['max(m, 2)', 'max', 'S', 'S(m, 2)'],
])('%s with %s for %s is %s', (text, from, to, after) => {
  expect(replaced(text, from, to)).toBe(after);
});

test.each([
  ['L1', 'L_1'],
  ['L12', 'L_{12}'],
  ['ends', '\\text{ends}'],
  ['w', 'w'],
])('%s is written %s in a formula', (symbol, tex) => {
  expect(texOf(symbol)).toBe(tex);
});

/** Where a document declares a symbol. */
function declarationOf(document: Written, symbol: string): string {
  for (const list of ['/parameters', '/derived'])
    for (const [index, entry] of listAt(document, list).entries()) {
      if (textAt(entry, '/symbol') === symbol) return `${list}/${index}`;
      const column = listAt(entry, '/columns').findIndex((one) => textAt(one, '/symbol') === symbol);
      if (column >= 0) return `${list}/${index}/columns/${column}`;
    }
  throw new Error(`${symbol} is declared`);
}

describe('a symbol that is renamed', () => {
  test.each([...writtenTemplates])('leaves %s sound, and is renamed back to what it was', (_, written) => {
    const document = written as Written;
    const symbols = declaredSymbols(document);
    const renamed = (before: Written, names: readonly (readonly [from: string, to: string])[]) =>
      names.reduce(
        (one, [from, to]) => applyEdits(one, renameEdits(one, declarationOf(one, from), from, to)).document,
        before,
      );
    const after = renamed(
      document,
      symbols.map((symbol, index) => [symbol, `zz${index}`]),
    );
    const reading = readTemplate(after);
    expect(reading.ok ? [] : reading.faults).toEqual([]);
    const back = renamed(
      after,
      symbols.map((symbol, index) => [`zz${index}`, symbol]),
    );
    // How a formula writes a symbol may have been of its author's own making.
    const withTex = symbols.reduce((one, symbol) => {
      const at = `${declarationOf(one, symbol)}/tex`;
      return applyEdits(one, [{ do: 'set', at, value: textAt(document, at) }]).document;
    }, back);
    expect(withTex).toEqual(document);
  });

  const document = {
    parameters: [
      { symbol: 'L', tex: 'L' },
      { symbol: 'a', tex: 'a' },
    ],
    beam: { length: 'L + a' },
  };

  test('to what is no symbol, or is another’s, stands in its field alone', () => {
    for (const to of ['2L', 'a', 'sqrt', 'EI', 'RA', ''])
      expect(renameEdits(document, '/parameters/0', 'L', to)).toEqual([
        { do: 'set', at: '/parameters/0/symbol', value: to },
      ]);
  });

  test('after a text that was none is renamed from the last good one', () => {
    const broken = applyEdits(document, renameEdits(document, '/parameters/0', 'L', '2L')).document;
    const { document: after } = applyEdits(broken, renameEdits(broken, '/parameters/0', 'L', 'L2'));
    expect(after).toEqual({
      parameters: [
        { symbol: 'L2', tex: 'L_2' },
        { symbol: 'a', tex: 'a' },
      ],
      beam: { length: 'L2 + a' },
    });
  });

  test('after it stood as another’s leaves the other one alone', () => {
    const twice = applyEdits(document, renameEdits(document, '/parameters/1', 'a', 'L')).document;
    expect(isOwnSymbol(twice, 'L')).toBe(false);
    const { document: after } = applyEdits(twice, renameEdits(twice, '/parameters/1', 'a', 'c'));
    expect(after).toMatchObject({
      parameters: [{ symbol: 'L' }, { symbol: 'c' }],
      beam: { length: 'L + c' },
    });
  });
});
