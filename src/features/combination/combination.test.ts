import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { type CombinationSet, serviceOf, strengthOf } from '@/engine/combination';
import { read } from '@/lib/read';
import { combinationSetDocument } from './combination';

const shipped = new Map(
  readdirSync('data/combinations').map((file): [string, unknown] => [
    file.replace('.json', ''),
    JSON.parse(readFileSync(`data/combinations/${file}`, 'utf8')),
  ]),
);

function setOf(slug: string): CombinationSet {
  const reading = read(combinationSetDocument, shipped.get(slug));
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

const namesOf = (slug: string, chosen = {}): string[] =>
  strengthOf(setOf(slug), chosen).map(({ name }) => name);

test.each([...shipped])('%s is read as it is written', (slug, written) => {
  expect(setOf(slug)).toEqual(written);
  expect(setOf(slug).slug).toBe(slug);
});

// ASCE 7-16, 2.3.1 and 2.4.1, from memory.
test('ASCE 7-16 gives its basic combinations', () => {
  expect(namesOf('asce-7-16-strength')).toEqual([
    '1.4 D',
    '1.2 D + 1.6 L + 0.5 S',
    '1.2 D + L + 1.6 S',
    '1.2 D + 1.6 S + 0.5 W',
    '1.2 D + L + 0.5 S + W',
    '1.2 D + W',
    '0.9 D + W',
  ]);
  expect(namesOf('asce-7-16-allowable')).toEqual([
    'D',
    'D + L',
    'D + S',
    'D + 0.75 L + 0.75 S',
    'D + 0.6 W',
    'D + 0.75 L + 0.75 S + 0.45 W',
    '0.6 D + 0.6 W',
  ]);
});

// ASCE 7-22, 2.3.1 and 2.4.1, from memory: snow is at strength level.
test('ASCE 7-22 takes snow at strength level, and says that an old map with it is dangerous', () => {
  expect(namesOf('asce-7-22-strength').slice(1, 4)).toEqual([
    '1.2 D + 1.6 L + 0.3 S',
    '1.2 D + L + S',
    '1.2 D + S + 0.5 W',
  ]);
  expect(namesOf('asce-7-22-allowable').slice(2, 4)).toEqual(['D + 0.7 S', 'D + 0.75 L + 0.525 S']);
  for (const slug of ['asce-7-22-strength', 'asce-7-22-allowable'])
    expect(setOf(slug).snow).toMatchObject({
      basis: 'strength_level',
      caution: expect.stringContaining('dangerously low'),
    });
  expect(setOf('asce-7-16-strength').snow.basis).toBe('nominal');
});

describe('EN 1990', () => {
  // Table A1.2(B) with ψ0 of offices 0.7, snow to 1000 m 0.5 and wind 0.6, from memory: 1.5 · 0.7 = 1.05.
  test('6.10 with the recommended values', () => {
    expect(namesOf('en-1990-6-10')).toEqual([
      '1.35 G',
      '1.35 G + 1.5 Q + 0.75 S + 0.9 W',
      '1.35 G + 1.05 Q + 1.5 S + 0.9 W',
      '1.35 G + 1.05 Q + 0.75 S + 1.5 W',
      '1.35 G + 1.5 Q + 0.75 S',
      '1.35 G + 1.05 Q + 1.5 S',
      'G + 1.5 Q',
      'G + 1.5 S',
      'G + 1.5 W',
    ]);
  });

  // 0.85 · 1.35 = 1.1475, and with the UK's 0.925 1.24875.
  test.each([
    ['en-1990-6-10ab', '1.1475 G + 1.5 Q + 0.75 S + 0.9 W'],
    ['en-1990-6-10ab-uk', '1.24875 G + 1.5 Q + 0.75 S + 0.75 W'],
  ])('%s reduces the permanent load of 6.10b by ξ, and every variable load of 6.10a by ψ', (slug, name) => {
    expect(namesOf(slug)).toContain(name);
    expect(namesOf(slug)[0]).toMatch(/^1\.35 G \+ 1\.05 Q \+ 0\.75 S/);
  });

  test('equilibrium has 1.10 and 0.90 of the permanent load', () => {
    const factors = new Set(strengthOf(setOf('en-1990-equ'), {}).map(({ factors: { G } }) => G));
    expect(factors).toEqual(new Set([1.1, 0.9]));
  });

  // Table A1.1, from memory: storage 1.0, 0.9, 0.8.
  test('the category of an action is chosen', () => {
    expect(namesOf('en-1990-6-10', { Q: 'e' })).toContain('1.35 G + 1.5 Q + 1.5 S + 0.9 W');
    const quasi = serviceOf(setOf('en-1990-6-10'), 'quasi-permanent', { Q: 'e' });
    expect(quasi).toEqual({ name: 'G + 0.8 Q', factors: { G: 1, Q: 0.8 } });
  });

  // EN 1991-1-1, 3.3.2(1), from memory.
  test.each(['en-1990-6-10', 'en-1990-6-10ab-uk', 'en-1990-equ'])(
    'in %s a roof’s imposed load is combined neither with snow nor with wind',
    (slug) => {
      const found = strengthOf(setOf(slug), { Q: 'h' });
      for (const { factors } of found)
        expect('Q' in factors && ('S' in factors || 'W' in factors)).toBe(false);
      expect(found.some(({ factors }) => factors['Q'] === 1.5)).toBe(true);
      expect(found.some(({ factors }) => factors['S'] === 1.5 && 'W' in factors)).toBe(true);
    },
  );

  test('a service combination is taken of some of its groups alone', () => {
    const set = setOf('en-1990-6-10');
    expect(serviceOf(set, 'characteristic-q', {}, ['Q', 'S'])?.name).toBe('Q + 0.5 S');
    expect(serviceOf(set, 'frequent-q', {})?.name).toBe('G + 0.5 Q');
    expect(serviceOf(set, 'none', {})).toBeUndefined();
  });
});

describe('a set is refused at its place', () => {
  const written = shipped.get('en-1990-6-10') as CombinationSet;
  const [first, ...rest] = written.strength;
  test.each<[string, object, string]>([
    [
      'ψ without a table',
      { categories: { S: written.categories.S, W: written.categories.W } },
      '/strength/2/factors/Q',
    ],
    [
      'ξ without its value',
      { strength: [{ ...first, factors: { G: { factor: 1.35, by: 'xi' } } }, ...rest] },
      '/strength/0/factors/G',
    ],
    ['an id twice', { strength: [first, first] }, '/strength/1/id'],
    ['no factor', { strength: [{ ...first, factors: {} }] }, '/strength/0/factors'],
    ['a factor of 13.5', { strength: [{ ...first, factors: { G: 13.5 } }] }, '/strength/0/factors/G'],
    ['a group that is none', { strength: [{ ...first, factors: { E: 1 } }] }, '/strength/0/factors'],
    ['no snow basis', { snow: undefined }, '/snow'],
    ['nothing for service', { service: [] }, '/service'],
  ])('%s', (_, change, at) => {
    const reading = read(combinationSetDocument, { ...written, ...change });
    expect(reading.ok ? [] : reading.faults.map(({ pointer }) => pointer)).toContainEqual(
      expect.stringContaining(at),
    );
  });
});
