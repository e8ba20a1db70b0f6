import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { criteriaDocument } from '@/engine/check';
import { MATERIALS } from '@/engine/section';
import { shippedSet } from '../../../tests/support/criteria';
import { type BasisData, basisWords, isBasisAmiss, patternWords } from './basis';
import { type Draft, judgedBy } from './workspace';

const named = (slug: string, name: string) => ({ slug, name, reference: slug, revision: 1 });
const steel = criteriaDocument.parse(JSON.parse(readFileSync('data/criteria/steel-elastic-en.json', 'utf8')));
const data: BasisData = {
  criteria: [{ ...named('steel-elastic-en', 'Steel beams'), document: steel }],
  sets: [{ ...named('en-1990-6-10', 'EN 1990, 6.10'), document: shippedSet('en-1990-6-10') }],
  materials: MATERIALS.map((material) => ({ key: material.id, material, set: null })),
};

const draft: Draft = {
  title: '',
  purpose: '',
  raw: {},
  section: null,
  criteria: 'steel-elastic-en',
  combinations: 'en-1990-6-10',
  categories: {},
  selfWeight: true,
  selfWeightReason: '',
  patterns: true,
  patternsReason: '',
  redundants: null,
};
const none = new Map();

describe('the basis in a line', () => {
  test('names the criteria, and in the rest the set, its categories and how the loads are taken', () => {
    const { criteria, rest } = basisWords(draft, data);
    expect(criteria).toBe('Steel beams');
    expect(rest.split('; ')).toEqual([
      'EN 1990, 6.10',
      'Q B: offices',
      'S Sites to 1000 m',
      'own weight in G',
      'Q and S where adverse',
    ]);
    const other: Draft = { ...draft, categories: { Q: 'e' }, selfWeight: false, patterns: false };
    expect(basisWords(other, data).rest).toMatch(
      /Q E: storage; .*; own weight left out; Q and S on the whole length$/,
    );
  });

  test('says that there are no criteria', () => {
    expect(basisWords({ ...draft, criteria: '' }, data).criteria).toBe('No criteria chosen');
  });
});

describe('the choice to take loads only where adverse', () => {
  const judged = judgedBy(draft, data);

  test('names the loads of the criteria', () => {
    expect(patternWords(draft, judged)?.label).toBe('Q and S only on the spans where adverse');
  });

  test('is left out where no load is, but not while it asks for a reason', () => {
    const none = judged && { ...judged, patterns: [] };
    expect(patternWords(draft, none)).toBeNull();
    expect(patternWords(draft, null)).toBeNull();
    expect(patternWords({ patterns: false }, none)?.label).toBe('Loads only on the spans where adverse');
  });
});

describe('a basis that is amiss', () => {
  test.each<[string, Partial<Draft>]>([
    ['without criteria', { criteria: '' }],
    ['without a set of combinations that fits', { combinations: 'unknown' }],
    ['without own weight and no reason', { selfWeight: false, selfWeightReason: ' ' }],
    ['without adverse patterns and no reason', { patterns: false }],
  ])('is one %s', (_, change) => {
    expect(isBasisAmiss(draft, data, none)).toBe(false);
    expect(isBasisAmiss({ ...draft, ...change }, data, none)).toBe(true);
  });

  test('is one with a fault at a field of its own', () => {
    expect(isBasisAmiss(draft, data, new Map([['L', 'Too long.']]))).toBe(false);
    expect(isBasisAmiss(draft, data, new Map([['section/material', 'Withdrawn.']]))).toBe(true);
  });
});
