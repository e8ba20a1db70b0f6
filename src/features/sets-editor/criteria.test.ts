import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import type { CombinationSet } from '@/engine/combination';
import { applyEdits, type Edit } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';
import { SET_READERS } from '@/features/review/read-set';
import { shippedSet } from '../../../tests/support/criteria';
import old from '../../../tests/support/criteria-schema-1.json';
import {
  chosenGroups,
  type IssuedSet,
  limitLines,
  newLimit,
  referredFaults,
  referredTo,
  withoutUnknown,
} from './criteria';

const written: Written = JSON.parse(readFileSync('data/criteria/steel-elastic-en.json', 'utf8'));
const issued = (document: CombinationSet, revision = 1): IssuedSet => ({
  slug: document.slug,
  revision,
  document,
});
const sets = ['en-1990-6-10', 'asce-7-16-strength', 'en-1990-equ'].map((slug) => issued(shippedSet(slug)));
const edited = (...edits: Edit[]): Written => applyEdits(written, edits).document;
const refer = (set: string, revision = 1): Edit => ({
  do: 'set',
  at: '/combinations',
  value: { set, revision },
});
const faultsOf = (document: Written, known = sets) =>
  referredFaults(document, known).map(({ pointer, code }) => `${pointer} ${code}`);

describe('the set that criteria refer to', () => {
  test('is one that is issued, and fits', () => {
    expect(referredTo(written, sets)?.slug).toBe('en-1990-6-10');
    expect(faultsOf(written)).toEqual([]);
    expect(faultsOf(edited(refer('en-1990-equ')))).toEqual([]);
  });

  test('is asked for anew when another revision is issued, or it is none', () => {
    expect(faultsOf(edited(refer('en-1990-6-10', 2)))).toEqual(['/combinations not_issued']);
    expect(faultsOf(edited(refer('none')))).toEqual(['/combinations not_issued']);
  });

  test('says at their fields what it does not have', () => {
    const limits = Array.isArray(written['deflection']) ? written['deflection'].length : 0;
    expect(faultsOf(edited(refer('asce-7-16-strength')))).toEqual(
      Array.from({ length: limits }, (_, index) => `/deflection/${index}/combination/id does_not_fit`),
    );
    const category: Edit = { do: 'set', at: '/categories/Q', value: 'z' };
    expect(faultsOf(edited(category))).toEqual(['/categories/Q does_not_fit']);
  });
});

test('a category is chosen where there is a choice, and where one that is gone must be taken out', () => {
  const set = shippedSet('asce-7-16-strength');
  const without = { ...set, categories: {} };
  expect(chosenGroups(written, shippedSet('en-1990-6-10'))).toEqual(expect.arrayContaining(['Q', 'S']));
  expect(chosenGroups({}, without)).toEqual([]);
  expect(chosenGroups({ categories: { Q: 'z', G: 'z' } }, without)).toEqual(['G', 'Q']);
});

describe('limits as they are used', () => {
  const set = sets[0]?.document;

  // EN 1990, 6.14b without G by Q and S: Q + ψ0 S, ψ0 of snow to 1000 m 0.5, from memory.
  test('have their combination in numbers, of their groups alone', () => {
    expect(limitLines(written, set, 'metric')[0]).toEqual({
      at: '/deflection/0',
      name: 'Imposed load',
      combination: 'Q + 0.5 S',
      limits: 'L/360, a/180 of overhangs',
      source: expect.any(String),
    });
  });

  test.each([
    ['metric', 0.025, 'L/360, a/180 of overhangs, at most 25 mm'],
    ['us', 0.01905, 'L/360, a/180 of overhangs, at most 0.75 in'],
  ] as const)('say their cap in %s units', (system, value, limits) => {
    const capped = edited({ do: 'set', at: '/deflection/0/cap', value });
    expect(limitLines(capped, set, system)[0]?.limits).toBe(limits);
  });

  // Table A1.1, from memory: storage has ψ0 = 1.0; the second limit is snow leading.
  test('follow the categories that the criteria choose', () => {
    const storage = edited({ do: 'set', at: '/categories/Q', value: 'e' });
    expect(limitLines(storage, set, 'metric')[1]?.combination).toBe('Q + S');
  });

  test('say what is missing', () => {
    const unknown = edited({ do: 'set', at: '/deflection/0/combination/id', value: 'none' });
    expect(limitLines(unknown, set, 'metric')[0]?.combination).toBeNull();
    expect(
      limitLines({ deflection: [{ overhang_factor: 2, overhang_ratio: 360 }] }, undefined, 'metric')[0],
    ).toMatchObject({
      combination: null,
      limits: '2a/360 of overhangs',
    });
  });
});

test('a further limit has the source of the last', () => {
  expect(newLimit(written)).toMatchObject({
    name: '',
    overhang_factor: 1,
    source: { publication: expect.any(String), from_memory: expect.any(Boolean) },
  });
});

test('what an older schema said is taken out in one step, and nothing else', () => {
  const before: Written = { ...old['steel-elastic-en'], schema_version: 2 };
  const reading = SET_READERS.criteria(before);
  const faults = reading.ok ? [] : reading.faults;
  const after = applyEdits(before, withoutUnknown(faults)).document;
  expect(after).not.toHaveProperty('patterns');
  expect(after['strength']).not.toHaveProperty('combinations');
  expect(after['strength']).toHaveProperty('bending', old['steel-elastic-en'].strength.bending);
  const again = SET_READERS.criteria(after);
  expect(again.ok ? [] : again.faults.filter(({ code }) => code === 'unknown_field')).toEqual([]);
});
