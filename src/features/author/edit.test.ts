import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { applyEdit, applyEdits, type Edit } from './edit';
import { edited, newHistory, redone, undone } from './history';

const draft = {
  name: 'Two spans',
  parameters: [{ symbol: 'L' }, { symbol: 'w' }],
  beam: { supports: [{ at: '0' }, { at: 'L' }], loads: [] },
};

describe('an edit', () => {
  test('sets a value and leaves alone what it does not touch', () => {
    const { document } = applyEdit(draft, { do: 'set', at: '/beam/supports/1/at', value: 'L + a' });
    expect(document).toEqual({ ...draft, beam: { ...draft.beam, supports: [{ at: '0' }, { at: 'L + a' }] } });
    expect(document['parameters']).toBe(draft.parameters);
    expect(Object(document['beam']).supports[0]).toBe(draft.beam.supports[0]);
  });

  test('makes the list that is missing on the way, and its inverse takes it away again', () => {
    const { document, inverse } = applyEdit(draft, {
      do: 'insert',
      at: '/beam/hinges/-',
      value: { at: 'L/2' },
    });
    expect(document['beam']).toEqual({ ...draft.beam, hinges: [{ at: 'L/2' }] });
    expect(applyEdit(document, inverse).document).toEqual(draft);
  });

  test('inserts before an entry, moves one, and removes one', () => {
    const { document } = applyEdits(draft, [
      { do: 'insert', at: '/parameters/0', value: { symbol: 'a' } },
      { do: 'move', at: '/parameters/2', to: 0 },
      { do: 'remove', at: '/parameters/1' },
    ]);
    expect(document['parameters']).toEqual([{ symbol: 'w' }, { symbol: 'L' }]);
  });

  test('that finds nothing leaves the very same document', () => {
    for (const edit of [
      { do: 'remove', at: '/beam/loads/3' },
      { do: 'remove', at: '/nothing/here' },
      { do: 'move', at: '/parameters/0', to: 9 },
      { do: 'insert', at: '/parameters/7', value: 1 },
    ] satisfies Edit[])
      expect(applyEdit(draft, edit).document).toBe(draft);
  });

  test('of a key that names a prototype makes a field of its own', () => {
    const { document } = applyEdit({}, { do: 'set', at: '/__proto__/polluted', value: true });
    expect(Object.prototype).not.toHaveProperty('polluted');
    expect(Object.keys(document)).toEqual(['__proto__']);
  });
});

const key = fc.constantFrom('a', 'b', 'list', '0', '1', '2', '-');
const at = fc.array(key, { minLength: 1, maxLength: 4 }).map((keys) => keys.map((one) => `/${one}`).join(''));
const value = fc.oneof(
  fc.string({ maxLength: 3 }),
  fc.constant({ a: 'x' }),
  fc.constant(['p', 'q']),
  fc.constant(null),
);
const edit: fc.Arbitrary<Edit> = fc.oneof(
  fc.record({ do: fc.constant('set' as const), at, value }),
  fc.record({ do: fc.constant('insert' as const), at, value }),
  fc.record({ do: fc.constant('remove' as const), at }),
  fc.record({ do: fc.constant('move' as const), at, to: fc.integer({ min: -1, max: 4 }) }),
);
const start = { a: { list: [1, 2, 3] }, b: ['u', ['v']], list: [{ a: 'y' }] };

describe('undo', () => {
  test('after any edits leads back to the start, and redo to where they led', () => {
    fc.assert(
      fc.property(fc.array(fc.array(edit, { minLength: 1, maxLength: 3 }), { maxLength: 12 }), (steps) => {
        let history = newHistory(start);
        // Far apart in time: no step goes on with another.
        for (const [index, step] of steps.entries()) history = edited(history, step, index * 10_000);
        const { document: end, past } = history;
        const trail = [end];
        for (const _ of past) {
          history = undone(history);
          trail.push(history.document);
        }
        expect(history.document).toEqual(start);
        for (const before of trail.reverse()) {
          expect(history.document).toEqual(before);
          history = redone(history);
        }
        expect(history.document).toEqual(end);
        expect(history.future).toEqual([]);
      }),
      { numRuns: 400 },
    );
  });

  test('takes a word that was typed in one go away at once', () => {
    let history = newHistory({ name: '' });
    for (const [index, text] of ['B', 'Be', 'Bea', 'Beam'].entries())
      history = edited(history, [{ do: 'set', at: '/name', value: text }], index * 200);
    expect(history.past).toHaveLength(1);
    expect(undone(history).document).toEqual({ name: '' });
    expect(redone(undone(history)).document).toEqual({ name: 'Beam' });
  });

  test('keeps apart what was typed after a pause, or in another field', () => {
    let history = newHistory({ name: '', summary: '' });
    history = edited(history, [{ do: 'set', at: '/name', value: 'a' }], 0);
    history = edited(history, [{ do: 'set', at: '/name', value: 'ab' }], 2000);
    history = edited(history, [{ do: 'set', at: '/summary', value: 's' }], 2100);
    expect(history.past).toHaveLength(3);
  });

  test('is forgotten about as soon as something else is done', () => {
    let history = edited(newHistory({ name: '' }), [{ do: 'set', at: '/name', value: 'a' }], 0);
    history = edited(undone(history), [{ do: 'set', at: '/name', value: 'b' }], 100);
    expect(redone(history).document).toEqual({ name: 'b' });
  });
});
