import { describe, expect, test } from 'vitest';
import type { Written } from '@/features/review/draft';
import { readTemplate } from '@/features/review/read-template';
import { writtenTemplates } from '../../../tests/support/templates';
import { applyEdits, listAt, textAt, valueAt } from './edit';
import { placeWords } from './place-words';
import { addCase, addWorstCase } from './proof-cases';
import { beginningOf, QUANTITY_NAMES, quantityDimension, quantityName, quantityWords } from './selectors';
import { STARTS, type Start, startDocument } from './start';
import { addUsualRules } from './usual-rules';

const written = (slug: string) => writtenTemplates.get(slug) as Written;

describe('a proof case that is added', () => {
  test('stands at values of its own, within their ranges, and leaves the figure to its author', () => {
    let document = startDocument('Two', 'two-spans-overhang');
    for (let index = 0; index < 3; index++) ({ document } = applyEdits(document, addCase(document).edits));
    const cases = listAt(document, '/proof_cases');
    expect(cases.map((one) => textAt(one, '/parameters/L1'))).toEqual(['6 m', '4.5 m', '8.4 m']);
    for (const one of cases) expect(textAt(one, '/expect/0/printed')).toBe('');
  });

  const found = {
    name: 'Worst of the sweep',
    parameters: { L: '1 m' },
    source: 'aisc',
    expect: [{ quantity: { reaction: 'A' }, printed: '1.25 kN' }],
  };

  test('from the proof names the second method as its source where its figures were computed', () => {
    const document = written('overhang-uniform');
    const { document: once } = applyEdits(document, addWorstCase(document, found).edits);
    const added = listAt(once, '/proof_cases').at(-1);
    const source = listAt(once, '/sources').find((one) => textAt(one, '/id') === textAt(added, '/source'));
    expect(textAt(source, '/publication')).toContain('Direct stiffness');
    const { document: twice } = applyEdits(once, addWorstCase(once, found).edits);
    expect(listAt(twice, '/sources')).toHaveLength(2);
    expect(new Set(listAt(twice, '/proof_cases').map((one) => textAt(one, '/name'))).size).toBe(
      listAt(twice, '/proof_cases').length,
    );
  });

  test('from the proof by closed forms keeps their source', () => {
    const document = written('overhang-uniform');
    const byForm = { ...found, expect: [{ result: 'back' }] };
    const { document: after } = applyEdits(document, addWorstCase(document, byForm).edits);
    expect(listAt(after, '/sources')).toHaveLength(1);
    expect(textAt(listAt(after, '/proof_cases').at(-1), '/source')).toBe('aisc');
  });
});

test.each(Object.keys(STARTS) as Start[])(
  'the usual rules of %s hold at its defaults, and each can be broken',
  (start) => {
    const document = startDocument('One', start);
    const { edits } = addUsualRules(document);
    const { document: ruled } = applyEdits(document, edits);
    expect(listAt(ruled, '/rules').length).toBeGreaterThanOrEqual(3);
    const reading = readTemplate({
      schema_version: 1,
      slug: 'draft',
      reference: 'Span 90',
      ...ruled,
      use: ['Floors.'],
      do_not_use: ['Cranes.'],
      method: 'By the force method.',
      sources: [{ id: 'own', publication: 'Own', table: '1', from_memory: false }],
      proof_cases: ['One', 'Two', 'Three'].map((name) => ({
        name,
        parameters: {},
        source: 'own',
        expect: [{ quantity: { moment: '0' }, exact: '0' }],
      })),
    });
    expect(reading.ok ? [] : reading.faults).toEqual([]);
    // Pressed twice, nothing is there twice.
    expect(applyEdits(ruled, addUsualRules(ruled).edits).document).toEqual(ruled);
  },
);

describe('a quantity that is read off a beam', () => {
  test('of every kind is known by what it began as', () => {
    for (const name of Object.keys(QUANTITY_NAMES)) expect(quantityName(beginningOf(name))).toBe(name);
  });

  test('of every template is said in words, with its dimension', () => {
    for (const document of writtenTemplates.values())
      for (const result of listAt(document, '/results')) {
        expect(quantityWords(valueAt(result, '/quantity'))).not.toContain('?');
        expect(quantityDimension(valueAt(result, '/quantity'))).toMatch(
          /^(force|moment|length|rotation|line_load)$/,
        );
      }
  });
});

test.each([
  ['/parameters/0/max', 'Parameter L: largest'],
  ['/beam/supports/1/at', 'Support B: place'],
  ['/beam/loads/0', 'Load 1'],
  ['/beam/redundants', 'Redundants'],
  ['/name', 'Title'],
  ['/proof_cases/0/expect/2/printed', 'Proof case Closed forms at 6 m and 1.8 m: expect, value'],
  ['', 'The whole document'],
])('%s is said as %s', (pointer, words) => {
  expect(placeWords(written('overhang-uniform'), pointer)).toBe(words);
});
