import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { applyEdits } from './edit';
import { decide, merge } from './merge';

const base = {
  name: 'Two spans',
  tags: ['roof'],
  parameters: [
    { symbol: 'L', name: 'Span', default: '6 m' },
    { symbol: 'w', name: 'Load', default: '5 kN/m' },
  ],
  beam: {
    length: '2*L',
    loads: [
      { kind: 'line', w0: 'w' },
      { kind: 'point', p: 'P' },
    ],
  },
};

describe('a merge of two drafts', () => {
  test('takes each change that only one of them made', () => {
    const mine = { ...base, name: 'Two equal spans' };
    const theirs = { ...base, parameters: [{ ...base.parameters[0], default: '7 m' }, base.parameters[1]] };
    expect(merge(base, mine, theirs)).toEqual({
      merged: { ...theirs, name: 'Two equal spans' },
      conflicts: [],
    });
  });

  test('keeps mine where both changed one place, and says what theirs is', () => {
    const { merged, conflicts } = merge(base, { ...base, name: 'Mine' }, { ...base, name: 'Theirs' });
    expect(merged).toEqual({ ...base, name: 'Mine' });
    expect(conflicts).toEqual([{ at: '/name', mine: 'Mine', theirs: 'Theirs' }]);
  });

  test('finds an entry by its symbol, wherever the other moved it', () => {
    const mine = { ...base, parameters: [{ symbol: 'a', name: 'Overhang' }, ...base.parameters] };
    const theirs = {
      ...base,
      parameters: [base.parameters[0], { ...base.parameters[1], default: '9 kN/m' }],
    };
    const { merged, conflicts } = merge(base, mine, theirs);
    expect(conflicts).toEqual([]);
    expect(Object(merged).parameters).toEqual([
      { symbol: 'a', name: 'Overhang' },
      base.parameters[0],
      { symbol: 'w', name: 'Load', default: '9 kN/m' },
    ]);
  });

  test('of lists without names joins an entry that one added and one that the other changed', () => {
    const [line, point] = base.beam.loads;
    const mine = { ...base, beam: { ...base.beam, loads: [line, point, { kind: 'couple', m: 'M' }] } };
    const theirs = { ...base, beam: { ...base.beam, loads: [{ kind: 'line', w0: '2*w' }, point] } };
    const { merged, conflicts } = merge(base, mine, theirs);
    expect(conflicts).toEqual([]);
    expect(Object(merged).beam.loads).toEqual([
      { kind: 'line', w0: '2*w' },
      point,
      { kind: 'couple', m: 'M' },
    ]);
  });

  test('keeps an entry in view that I removed and they changed, until one is chosen', () => {
    const [first, second] = base.parameters;
    const mine = { ...base, parameters: [second] };
    const theirs = {
      ...base,
      parameters: [
        { ...first, default: '8 m' },
        { ...second, default: '1 kN/m' },
      ],
    };
    const { merged, conflicts } = merge(base, mine, theirs);
    expect(conflicts).toEqual([
      { at: '/parameters/0', mine: undefined, theirs: { symbol: 'L', name: 'Span', default: '8 m' } },
    ]);
    const [conflict] = conflicts;
    if (!conflict) throw new Error('there is one');
    const decided = decide(conflicts, conflict, 'mine');
    expect(Object(applyEdits(Object(merged), decided.edits).document).parameters).toEqual([
      { ...second, default: '1 kN/m' },
    ]);
  });

  test('moves up the places behind an entry that a decision removes', () => {
    const conflicts = [
      { at: '/loads/0', mine: undefined, theirs: 1 },
      { at: '/loads/2/p', mine: 'P', theirs: 'Q' },
    ];
    const [first] = conflicts;
    if (!first) throw new Error('there is one');
    expect(decide(conflicts, first, 'mine').rest).toEqual([{ at: '/loads/1/p', mine: 'P', theirs: 'Q' }]);
  });
});

const entry = fc.record({
  symbol: fc.constantFrom('a', 'b', 'c', 'd', 'e'),
  n: fc.integer({ min: 0, max: 2 }),
});
const document = fc.record({
  name: fc.constantFrom('x', 'y', 'z'),
  parameters: fc.uniqueArray(entry, { selector: ({ symbol }) => symbol, maxLength: 5 }),
  tags: fc.array(fc.constantFrom('p', 'q', 'r'), { maxLength: 4 }),
});

describe('a merge of any two drafts', () => {
  test('does not depend on whose is whose where nothing conflicts', () => {
    let clean = 0;
    fc.assert(
      fc.property(document, document, document, (one, two, three) => {
        const there = merge(one, two, three);
        const back = merge(one, three, two);
        expect(there.conflicts.length).toBe(back.conflicts.length);
        if (there.conflicts.length > 0) return;
        clean++;
        expect(there.merged).toEqual(back.merged);
      }),
      { numRuns: 4000 },
    );
    expect(clean).toBeGreaterThan(100);
  });

  test('with one who changed nothing is what the other made', () => {
    fc.assert(
      fc.property(document, document, (one, two) => {
        expect(merge(one, two, one)).toEqual({ merged: two, conflicts: [] });
        expect(merge(one, one, two)).toEqual({ merged: two, conflicts: [] });
      }),
    );
  });

  test('decided all one way is that one’s at every place of a conflict', () => {
    fc.assert(
      fc.property(document, document, document, (one, two, three) => {
        const { merged, conflicts } = merge(one, two, three);
        let left = conflicts;
        let result = Object(merged);
        for (let [next] = left; next; [next] = left) {
          const { edits, rest } = decide(left, next, 'theirs');
          result = applyEdits(result, edits).document;
          left = rest;
        }
        if (conflicts.some(({ at }) => at === '/name')) expect(result.name).toBe(three.name);
        for (const { theirs } of conflicts)
          if (typeof theirs === 'object' && theirs !== null && 'symbol' in theirs)
            expect(result.parameters).toContainEqual(theirs);
      }),
    );
  });
});
