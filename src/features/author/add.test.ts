import { describe, expect, test } from 'vitest';
import type { Written } from '@/features/review/draft';
import { readTemplate } from '@/features/review/read-template';
import {
  type Added,
  addCouple,
  addCurvature,
  addHinge,
  addLine,
  addOverhang,
  addPoint,
  addPointRows,
  addSegment,
  addSettlement,
  addSpan,
  addSupport,
  noOverhang,
} from './add';
import { baysOf } from './bays';
import { applyEdits, listAt, textAt, valueAt } from './edit';
import { addressOf, STARTS, type Start, startDocument } from './start';

const starts = Object.keys(STARTS) as Start[];

/** What only an author can say, said: the rest must stand by itself. */
const completed = (document: Written): Written => ({
  schema_version: 1,
  slug: 'draft',
  reference: 'Span 90',
  ...document,
  use: ['Floor beams.'],
  do_not_use: ['Crane girders.'],
  method: 'By the force method.',
  sources: [{ id: 'own', publication: 'Own derivation', table: '1', from_memory: false }],
  proof_cases: ['One', 'Two', 'Three'].map((name) => ({
    name,
    parameters: {},
    source: 'own',
    expect: [{ quantity: { moment: '0' }, exact: '0' }],
  })),
});

const faultsOf = (document: Written): string[] => {
  const reading = readTemplate(completed(document));
  return reading.ok ? [] : reading.faults.map(({ pointer, message }) => `${pointer} ${message}`);
};

const added = (document: Written, ...adds: ((document: Written) => Added)[]): Written =>
  adds.reduce((before, add) => {
    const { edits, select } = add(before);
    const { document: after } = applyEdits(before, edits);
    expect(valueAt(after, select), select).toBeDefined();
    return after;
  }, document);

const texts = (document: Written, list: string, key: string) =>
  listAt(document, list).map((entry) => textAt(entry, `/${key}`));

describe('a new template', () => {
  test.each(starts)('that starts as %s is sound but for what its author must say', (start) => {
    expect(faultsOf(startDocument('A title', start))).toEqual([]);
  });

  test.each([
    ['cantilever', 'cantilever', []],
    ['propped', 'propped-cantilever', ['L']],
    ['fixed-ends', 'fixed-ends', ['L']],
    ['double-overhang', 'overhang', ['L', 'a', 'a2']],
    ['spans', 'multi-span', ['L1', 'L2', 'L3', 'L4']],
  ] as const)('%s says that it is arranged as %s', (start, arrangement, symbols) => {
    const document = startDocument('A title', start, 4);
    expect(document['arrangement']).toBe(arrangement);
    expect(texts(document, '/parameters', 'symbol')).toEqual(expect.arrayContaining([...symbols]));
  });

  test('of three spans stands on four supports, with the moments over the inner ones released', () => {
    const document = startDocument('Three', 'spans', 3);
    expect(texts(document, '/beam/supports', 'at')).toEqual(['0', 'L1', 'L1 + L2', 'L1 + L2 + L3']);
    expect(texts(document, '/beam/redundants', 'at')).toEqual(['L1', 'L1 + L2']);
    expect(textAt(document, '/beam/loads/0/to')).toBe('L1 + L2 + L3');
  });
});

describe('one press', () => {
  test('adds an overhang and a point load at its tip to two spans', () => {
    const document = added(
      startDocument('Two spans', 'two-spans'),
      (before) => addOverhang(before, 'right'),
      (before) => addPoint(before, null),
    );
    expect(textAt(document, '/beam/length')).toBe('L1 + L2 + a');
    expect(valueAt(document, '/beam/loads/1')).toEqual({ kind: 'point', at: 'L1 + L2 + a', p: 'P' });
    expect(document['load_kinds']).toEqual(['uniform', 'point']);
    expect(document['you_give']).toBe(
      'span 1 L1, span 2 L2, uniform load w, overhang a, point load at the tip P',
    );
    expect(faultsOf(document)).toEqual([]);
  });

  test('adds the first span of a draft that began empty, with all that a beam must have', () => {
    const document = added(
      { name: 'Empty' },
      addSpan,
      (before) => addOverhang(before, 'left'),
      (before) => addLine(before, 'uniform', null),
    );
    expect(texts(document, '/beam/supports', 'at')).toEqual(['a', 'a + L']);
    expect(faultsOf(document)).toEqual([]);
  });

  test('adds a span before an overhang, which stays at the end', () => {
    const document = added(startDocument('One', 'overhang'), addSpan);
    expect(textAt(document, '/beam/length')).toBe('L + L2 + a');
    expect(texts(document, '/beam/supports', 'at')).toEqual(['0', 'L', 'L + L2']);
    expect(baysOf(document).map(({ is, symbol }) => [is, symbol])).toEqual([
      ['span', 'L'],
      ['span', 'L2'],
      ['right', 'a'],
    ]);
    expect(faultsOf(document)).toEqual([]);
  });

  test('props the free end of a cantilever', () => {
    const document = added(startDocument('One', 'cantilever'), addSpan);
    expect(document['arrangement']).toBe('propped-cantilever');
    expect(faultsOf(document)).toEqual([]);
  });

  test('moves everything on by an overhang at the left', () => {
    const document = added(startDocument('Two', 'two-spans'), (before) => addOverhang(before, 'left'));
    expect(texts(document, '/beam/supports', 'at')).toEqual(['a', 'a + L1', 'a + L1 + L2']);
    expect(valueAt(document, '/beam/loads/0')).toMatchObject({ from: '0', to: 'a + L1 + L2' });
    expect(noOverhang(document, 'left')).not.toBeNull();
    expect(faultsOf(document)).toEqual([]);
  });

  const anywhere: [string, (document: Written) => Added][] = [
    ['a uniform load', (document) => addLine(document, 'uniform', null)],
    [
      'a triangular load on one length',
      (document) => addLine(document, 'triangular', baysOf(document)[0] ?? null),
    ],
    ['a point load', (document) => addPoint(document, null)],
    ['a point load in the first length', (document) => addPoint(document, baysOf(document)[0] ?? null)],
    ['a list of point loads', addPointRows],
    ['a couple', (document) => addCouple(document, null)],
    ['a temperature difference', (document) => addCurvature(document, null)],
    ['a settlement', addSettlement],
    ['another stiffness', (document) => addSegment(document, null)],
    ['a span', addSpan],
  ];
  test.each(anywhere)('adds %s to any beam, soundly', (_, add) => {
    for (const start of starts) expect(faultsOf(added(startDocument('One', start), add)), start).toEqual([]);
  });

  test('adds a hinge where the beam has a redundant to spare', () => {
    for (const start of ['propped', 'fixed-ends', 'two-spans'] as const)
      expect(
        faultsOf(added(startDocument('One', start), (document) => addHinge(document, null))),
        start,
      ).toEqual([]);
  });

  test('adds a support at a free end', () => {
    const document = added(startDocument('One', 'overhang'), addSupport);
    expect(texts(document, '/beam/supports', 'at')).toEqual(['0', 'L', 'L + a']);
    expect(document['arrangement']).toBe('multi-span');
  });

  test('leaves alone a summary and redundants that the author wrote', () => {
    const before = {
      ...startDocument('Two', 'two-spans'),
      summary: 'Ours.',
    };
    const own = applyEdits(before, [
      { do: 'set', at: '/beam/redundants', value: [{ support: 'B', component: 'vertical' }] },
    ]).document;
    const document = added(own, (one) => addPoint(one, null));
    expect(document['summary']).toBe('Ours.');
    expect(valueAt(document, '/beam/redundants')).toEqual([{ support: 'B', component: 'vertical' }]);
  });
});

test.each([
  ['Two spans, uniform load', 'two-spans-uniform-load'],
  ['  3 Spans – Größe ', 'spans-gro-e'],
  ['???', ''],
])('the address of %s is %s', (title, address) => {
  expect(addressOf(title)).toBe(address);
});
