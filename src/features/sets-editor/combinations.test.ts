import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { applyEdits, type Edit, listAt, textAt, valueAt } from '@/features/author/edit';
import { combinationSetDocument } from '@/features/combination/combination';
import type { Written } from '@/features/review/draft';
import { read } from '@/lib/read';
import { duplication, exchange, fromPartialFactors, leadingVariants, partialFactorsOf } from './combinations';
import { previewOf } from './preview';
import { emptySet } from './start';

const written: Written = JSON.parse(readFileSync('data/combinations/en-1990-6-10.json', 'utf8'));
const edited = (document: Written, edits: readonly Edit[]): Written => applyEdits(document, edits).document;
const names = (document: Written) =>
  previewOf(document, '/strength', {}).flatMap(({ combinations }) => combinations);
const ids = (document: Written) => listAt(document, '/strength').map((one) => textAt(one, '/id'));
const isWhole = (document: Written) => read(combinationSetDocument, document).ok;

/** The first two of 6.10: permanent alone, and imposed leading. */
const two = { ...written, strength: listAt(written, '/strength').slice(0, 2) };

test('a duplicate stands behind its row, with an id of its own', () => {
  const copied = edited(written, duplication(written, '/strength/1'));
  expect(ids(copied).slice(0, 4)).toEqual(['g', '610-q', '610-q-2', '610-s']);
  expect(isWhole(copied)).toBe(true);
  const again = edited(copied, duplication(copied, '/strength/2'));
  expect(ids(again)[3]).toBe('610-q-3');
});

describe('the others leading', () => {
  // Table A1.2(B), from memory.
  test('are the combinations that the standard has for them', () => {
    const edits = leadingVariants(two, '/strength/1');
    expect(names(edited(two, edits))).toEqual(names(written).slice(0, 4));
    expect(ids(edited(two, edits))).toEqual(['g', '610-q', '610-s', '610-w']);
    expect(listAt(edited(two, edits), '/strength').map((one) => textAt(one, '/name'))[2]).toBe(
      '6.10, snow leading',
    );
    expect(isWhole(edited(two, edits))).toBe(true);
  });

  test('say in “when” which leads, from memory until somebody compares them', () => {
    const when = 'Where imposed loads lead.';
    const compared = edited(two, [
      { do: 'set', at: '/strength/1/when', value: when },
      { do: 'set', at: '/strength/1/from_memory', value: false },
    ]);
    const made = listAt(edited(compared, leadingVariants(compared, '/strength/1')), '/strength');
    expect(made.slice(1, 4)).toMatchObject([
      { when, from_memory: false },
      { when: 'Where snow loads lead.', from_memory: true },
      { when: 'Where wind loads lead.', from_memory: true },
    ]);
  });

  test('are none where the list has them, nothing accompanies by ψ0, or nothing leads', () => {
    expect(leadingVariants(written, '/strength/1')).toEqual([]);
    expect(leadingVariants(written, '/strength/6')).toEqual([]);
    const service = edited(written, []);
    expect(leadingVariants(service, '/service/6')).toEqual([]);
  });
});

describe('from partial factors', () => {
  const given = {
    permanent: 1.35,
    favourable: 1,
    variable: 1.5,
    groups: ['Q', 'S', 'W'],
    called: '6.10',
    clause: 'Table A1.2(B)',
  } as const;

  // The set of all three variable loads, by hand from expression 6.10 with offices 0.7, snow 0.5 and wind 0.6.
  test('the whole family is made', () => {
    const empty = { ...written, strength: [] };
    const made = edited(empty, fromPartialFactors(empty, '/strength', given));
    expect(names(made)).toEqual([
      '1.35 G',
      '1.35 G + 1.5 Q + 0.75 S + 0.9 W',
      '1.35 G + 1.05 Q + 1.5 S + 0.9 W',
      '1.35 G + 1.05 Q + 0.75 S + 1.5 W',
      'G + 1.5 Q',
      'G + 1.5 S',
      'G + 1.5 W',
    ]);
    expect(isWhole(made)).toBe(true);
  });

  test('what the list has is not made again, and without a favourable factor nothing lifts', () => {
    expect(fromPartialFactors(written, '/strength', given)).toEqual([]);
    const empty = { ...written, strength: [] };
    expect(
      fromPartialFactors(empty, '/strength', { ...given, favourable: null, groups: ['S'] }),
    ).toHaveLength(2);
  });
});

describe('a partial factor changed everywhere', () => {
  test('is changed where it is reduced too, and no other is', () => {
    expect(partialFactorsOf(written, '/strength', 'G')).toEqual([1, 1.35]);
    const edits = exchange(written, '/strength', 'Q', 1.5, 1.6);
    const changed = edited(written, edits);
    expect(partialFactorsOf(changed, '/strength', 'Q')).toEqual([1.6]);
    expect(partialFactorsOf(changed, '/strength', 'S')).toEqual([1.5]);
    expect(valueAt(changed, '/strength/2/factors/Q')).toEqual({ factor: 1.6, by: 'psi0' });
    // 1.6 · 0.7 = 1.12
    expect(names(changed)[2]).toBe('1.35 G + 1.12 Q + 1.5 S + 0.9 W');
  });
});

test('a new set lacks only what its author must say', () => {
  const reading = read(combinationSetDocument, {
    ...emptySet('combination-set'),
    schema_version: 1,
    slug: 'x',
  });
  const at = reading.ok ? [] : reading.faults.map(({ pointer }) => pointer);
  expect(at).toEqual(
    expect.arrayContaining([
      '/reference',
      '/name',
      '/summary',
      '/publication',
      '/basis',
      '/snow/caution',
      '/strength',
      '/service',
    ]),
  );
  expect(at).toHaveLength(8);
});
