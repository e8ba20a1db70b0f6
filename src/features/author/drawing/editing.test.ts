import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { checkRedundants } from '@/engine/model';
import type { Written } from '@/features/review/draft';
import { type Added, addOverhang, addSpan } from '../add';
import { applyEdits, type Edit, listAt, textAt, valueAt } from '../edit';
import { startDocument } from '../start';
import { addUsualRules } from '../usual-rules';
import { addAt, addOver, newPlaceAt, type PlaceTool, wholeOf } from './add';
import { beamOf } from './beam-reading';
import {
  choiceOf,
  draggedTo,
  handleOf,
  movedTo,
  removal,
  SUPPORT_CHOICES,
  supportEdits,
  whyKept,
} from './change';
import { drawnOf } from './parts';
import { type Place, placesOf, snapped } from './places';
import { type Sketch, sketchOf } from './sketch';

const edited = (document: Written, edits: readonly Edit[]): Written => applyEdits(document, edits).document;
const sketched = (document: Written): Sketch => {
  const sketch = sketchOf(document);
  if (!sketch) throw new Error('it can be drawn');
  return sketch;
};
const placeAt = (document: Written, text: string): Place => {
  const place = placesOf(sketched(document)).find((one) => one.text === text);
  if (!place) throw new Error(`${text} is a place`);
  return place;
};
const added = (document: Written, addition: Added): Written => edited(document, addition.edits);
const put = (document: Written, tool: PlaceTool, at: string): Written =>
  added(document, addAt(document, sketched(document), tool, placeAt(document, at)));
const texts = (document: Written, list: string, key = '/at'): string[] =>
  listAt(document, list).map((one) => textAt(one, key));

/** Two spans and an overhang, without its load. */
const start = startDocument('Two spans', 'two-spans-overhang');
const overhang = edited(start, removal(start, '/beam/loads/0'));

describe('what is added to a beam', () => {
  test('is a point load at the tip, with its parameter and its kind', () => {
    const loaded = put(overhang, 'point', 'L1 + L2 + a');
    expect(valueAt(loaded, '/beam/loads')).toEqual([{ kind: 'point', at: 'L1 + L2 + a', p: 'P' }]);
    expect(valueAt(loaded, '/load_kinds')).toEqual(['point']);
    expect(texts(loaded, '/parameters', '/symbol')).toEqual(['L1', 'L2', 'a', 'P']);
    expect(drawnOf(sketched(loaded)).parts.map(({ name }) => name)).toContain(
      'Point load P, group Q, at L1 + L2 + a',
    );
  });

  test('is released as the beam would itself, where it is more indeterminate for it', () => {
    expect(valueAt(overhang, '/beam/redundants')).toEqual([{ at: 'L1', component: 'moment' }]);
    const fixed = edited(overhang, supportEdits(overhang, '/beam/supports/0', 'fixed'));
    expect(listAt(fixed, '/beam/redundants')).toHaveLength(2);
    expect(textAt(fixed, '/arrangement')).toBe('multi-span');
  });

  test('is gone when all of it is taken back', () => {
    const { edits } = addAt(overhang, sketched(overhang), 'spring', placeAt(overhang, 'L1/2'));
    const { document, inverses } = applyEdits(overhang, edits);
    expect(edited(document, inverses)).toEqual(overhang);
  });
});

describe('places to put a part at', () => {
  const places = placesOf(sketched(overhang));

  test('are written as sums of the lengths', () => {
    const written = places.map(({ text }) => text);
    for (const text of ['0', 'L1/2', 'L1', 'L1 + L2/2', 'L1 + 2*L2/3', 'L1 + L2', 'L1 + L2 + a'])
      expect(written).toContain(text);
  });

  test('run from one end to the other, and each is where its expression says', () => {
    expect(places.map(({ x }) => x)).toEqual(places.map(({ x }) => x).toSorted((a, b) => a - b));
    fc.assert(
      fc.property(
        fc.integer({ min: 60, max: 3000 }),
        fc.integer({ min: 60, max: 3000 }),
        fc.integer({ min: 5, max: 1500 }),
        (L1, L2, a) => {
          const values = { L1: `${L1 / 100} m`, L2: `${L2 / 100} m`, a: `${a / 100} m` };
          const sketch = sketchOf(overhang, values);
          const whole = (L1 + L2 + a) / 100;
          const found = sketch ? placesOf(sketch) : [];
          expect(found.find(({ text }) => text === 'L1 + L2 + a')?.x).toBeCloseTo(whole, 9);
          expect(found.find(({ text }) => text === 'L1/2')?.x).toBeCloseTo(L1 / 200, 9);
          expect(found.every(({ x }) => x >= 0 && x <= whole + 1e-9)).toBe(true);
        },
      ),
    );
  });

  test('draw to the nearest, and to a support before what only divides a span', () => {
    expect(snapped(places, 5.9, 0.3)?.text).toBe('L1');
    expect(snapped(places, 4.4, 2)?.text).toBe('L1');
    expect(snapped(places, 4.4, 0.2)?.text).toBe('3*L1/4');
    expect(snapped(places, 5.2, 0.1)).toBeNull();
  });

  test('elsewhere have a length of their own, kept on their part of the beam by a rule', () => {
    const sketch = sketched(overhang);
    const target = newPlaceAt(sketch, 8.27, 0.05);
    if (!target) throw new Error('there is a bay');
    const loaded = added(overhang, addAt(overhang, sketch, 'point', target));
    expect(textAt(loaded, '/beam/loads/0/at')).toBe('L1 + x');
    expect(textAt(loaded, '/parameters/3/default')).toBe('2.25 m');
    expect(textAt(loaded, '/rules/0/expression')).toBe('L1 + x <= L1 + L2');
    const again = placesOf(sketched(loaded)).map(({ text }) => text);
    expect(again).toContain('x');
    expect(again).toContain('L1 + x');
    expect(edited(loaded, removal(loaded, '/beam/loads/0'))).toEqual(overhang);
  });
});

/** Results that speak of B and C, as a result, a rule and a proof case do. */
const spoken: Written = {
  ...overhang,
  results: [{ id: 'r', quantity: { reaction: 'C' }, expression: 'RC' }],
  rules: [{ id: 'up', expression: 'RB >= 0 and RC >= 0', message: 'The reaction {RB} lifts.' }],
  proof_cases: [{ name: 'p', expect: [{ quantity: { reaction: 'B' } }] }],
};

describe('supports and their letters', () => {
  test('one that is put between two moves the letters on', () => {
    const more = put(spoken, 'roller', 'L1/2');
    expect(texts(more, '/beam/supports')).toEqual(['0', 'L1/2', 'L1', 'L1 + L2']);
    expect(valueAt(more, '/results/0')).toEqual({ id: 'r', quantity: { reaction: 'D' }, expression: 'RD' });
    expect(textAt(more, '/rules/0/expression')).toBe('RC >= 0 and RD >= 0');
    expect(textAt(more, '/proof_cases/0/expect/0/quantity/reaction')).toBe('C');
    expect(listAt(more, '/beam/redundants')).toHaveLength(2);
  });

  test('one that others speak of stays until they do not', () => {
    expect(whyKept(spoken, '/beam/supports/1')).toBe(
      'Support B stays: results, rules or proof cases speak of its reaction. Change those first.',
    );
    expect(whyKept(spoken, '/beam/supports/0')).toBeUndefined();
  });

  test('one that is taken away moves the letters back, and its release goes with it', () => {
    const less = edited(spoken, removal(spoken, '/beam/supports/0'));
    expect(textAt(less, '/results/0/quantity/reaction')).toBe('B');
    expect(textAt(less, '/rules/0/expression')).toBe('RA >= 0 and RB >= 0');
  });

  test('one that is put past another changes places with it', () => {
    const edits = movedTo(spoken, sketched(spoken), '/beam/supports/1', 'at', placeAt(spoken, 'L1 + L2 + a'));
    const moved = edited(spoken, edits);
    expect(texts(moved, '/beam/supports')).toEqual(['0', 'L1 + L2', 'L1 + L2 + a']);
    expect(textAt(moved, '/results/0/quantity/reaction')).toBe('B');
    expect(textAt(moved, '/proof_cases/0/expect/0/quantity/reaction')).toBe('C');
  });

  test('none is put where another stands', () => {
    expect(movedTo(spoken, sketched(spoken), '/beam/supports/1', 'at', placeAt(spoken, '0'))).toEqual([]);
  });

  test.each(SUPPORT_CHOICES)('one becomes %s, and is read back as that', (choice) => {
    const changed = edited(overhang, supportEdits(overhang, '/beam/supports/2', choice));
    expect(choiceOf(valueAt(changed, '/beam/supports/2'))).toBe(choice);
    const restored = edited(changed, supportEdits(changed, '/beam/supports/2', 'roller'));
    expect(listAt(restored, '/parameters')).toEqual(listAt(overhang, '/parameters'));
  });
});

describe('whatever is added, moved and taken away', () => {
  const step = fc.record({
    act: fc.constantFrom(
      'span',
      'overhang',
      'pin',
      'roller',
      'hinge',
      'point',
      'over',
      'segment',
      'remove',
      'move',
    ),
    pick: fc.nat(),
  });

  test('it can be drawn, its symbols are its own, and releases fit wherever it stands', () => {
    fc.assert(
      fc.property(fc.array(step, { maxLength: 10 }), (steps) => {
        let document = overhang;
        for (const { act, pick } of steps) document = edited(document, editsOf(document, act, pick));
        const sketch = sketched(document);
        const symbols = texts(document, '/parameters', '/symbol');
        expect(new Set(symbols).size).toBe(symbols.length);
        const reading = beamOf(sketch);
        if ('beam' in reading)
          expect(checkRedundants(reading.beam, sketch.instance.beam.redundants ?? [])).toEqual([]);
        const supports = sketch.instance.beam.supports.map(({ at }) => at);
        expect(supports).toEqual(supports.toSorted((a, b) => a - b));
      }),
      { numRuns: 60 },
    );
  });

  function editsOf(document: Written, act: string, pick: number): readonly Edit[] {
    const sketch = sketched(document);
    const of = <T>(list: readonly T[]): T | undefined => list[pick % Math.max(1, list.length)];
    const place = of(placesOf(sketch));
    const part = of(drawnOf(sketch).parts);
    const whole = wholeOf(sketch);
    if (act === 'span') return addSpan(document).edits;
    if (act === 'overhang') return addOverhang(document, pick % 2 === 0 ? 'left' : 'right').edits;
    if (act === 'over' || act === 'segment')
      return whole ? addOver(document, sketch, act === 'over' ? 'uniform' : 'segment', whole).edits : [];
    if (act === 'remove') return part && part.kind !== 'dimension' ? removal(document, part.pointer) : [];
    if (act === 'move')
      return part && place && 'at' in Object(valueAt(document, part.pointer))
        ? movedTo(document, sketch, part.pointer, 'at', place)
        : [];
    return place ? addAt(document, sketch, act as PlaceTool, place).edits : [];
  }
});

test('the usual rule about lifting only remarks on a beam that lifts as it is meant to', () => {
  const severity = (document: Written) =>
    textAt(edited(document, addUsualRules(document).edits), '/rules/0/severity');
  expect(severity(start)).toBe('warn');
  // A load at the tip alone lifts B: three-moment equation.
  expect(severity(put(overhang, 'point', 'L1 + L2 + a'))).toBe('note');
});

describe('dragging', () => {
  const loaded = put(overhang, 'point', 'L1 + L2 + a');
  const sketch = sketched(loaded);
  const load = sketch.template.beam.loads[0];

  test('changes the length that a place ends with, to its step and within its range', () => {
    const handle = load && 'at' in load ? handleOf(sketch, load.at.tree) : null;
    if (!handle) throw new Error('a moves it');
    expect(handle.symbol).toBe('a');
    expect(draggedTo(sketch.template, {}, handle, 0.33)).toEqual({ a: '1.85 m' });
    expect(draggedTo(sketch.template, { L1: '4 m' }, handle, -9)).toEqual({ L1: '4 m', a: '0 m' });
    expect(draggedTo(sketch.template, {}, handle, 900)).toEqual({ a: '15 m' });
  });

  test('of a dimension changes the length that it is of', () => {
    const handle = handleOf(sketch, 'L2');
    expect(handle && draggedTo(sketch.template, {}, handle, -1.02)).toEqual({ L2: '5 m' });
  });

  test('has no hold on a place that no length ends', () => {
    const half = sketched(put(overhang, 'point', 'L1/2')).template.beam.loads[0];
    expect(half && 'at' in half ? handleOf(sketch, half.at.tree) : null).toBeNull();
  });
});
