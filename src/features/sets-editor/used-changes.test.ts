import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { applyEdits, type Edit } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';
import { usedChanges } from './used-changes';

const written: Written = JSON.parse(readFileSync('data/combinations/en-1990-6-10.json', 'utf8'));
const changes = (...edits: Edit[]) => usedChanges(written, applyEdits(written, edits).document);

test('the same set changes nothing', () => {
  expect(changes()).toEqual([]);
  expect(changes({ do: 'set', at: '/summary', value: 'Another summary.' })).toEqual([]);
});

// ψ0 of offices from 0.7 to 0.5: 1.5 · 0.7 = 1.05 and 1.5 · 0.5 = 0.75, where imposed loads accompany.
test('of a changed ψ0 the combinations are said in which it accompanies', () => {
  const found = changes({ do: 'set', at: '/categories/Q/0/psi0', value: 0.5 });
  expect(found.map(({ name }) => name)).toEqual([
    '6.10, snow leading',
    '6.10, wind leading',
    '6.10, snow leading, no wind',
    'Characteristic, snow leading',
    'Characteristic, wind leading',
  ]);
  expect(found[0]).toMatchObject({
    before: '1.35 G + 1.05 Q + 1.5 S + 0.9 W',
    after: '1.35 G + 0.75 Q + 1.5 S + 0.9 W',
    of: null,
  });
});

// Storage, category E, has ψ0 = 1.0 (Table A1.1, from memory): 1.5 · 0.9 = 1.35.
test('of a category that is not the usual one it is said of which', () => {
  const storage = (written['categories'] as { Q: { id: string }[] }).Q.findIndex(({ id }) => id === 'e');
  const found = changes({ do: 'set', at: `/categories/Q/${storage}/psi0`, value: 0.9 });
  expect(found[0]).toMatchObject({
    of: 'imposed as E: storage',
    before: '1.35 G + 1.5 Q + 1.5 S + 0.9 W',
    after: '1.35 G + 1.35 Q + 1.5 S + 0.9 W',
  });
});

// As above; storage stands with its ψ0 = 1.0 in what accompanies, and there is none of it where imposed loads lead.
test('of a category that is gone the combinations are said that it reduced', () => {
  const storage = (written['categories'] as { Q: { id: string }[] }).Q.findIndex(({ id }) => id === 'e');
  const found = changes({ do: 'remove', at: `/categories/Q/${storage}` });
  expect(found[0]).toEqual({
    list: '/strength',
    name: '6.10, snow leading',
    clause: expect.any(String),
    of: 'imposed as E: storage, a category that is gone',
    before: '1.35 G + 1.5 Q + 1.5 S + 0.9 W',
    after: null,
  });
  expect(found.map(({ name }) => name)).not.toContain('6.10, imposed leading');
  expect(new Set(found.map(({ of }) => of)).size).toBe(1);
});

test('a combination that came, and one that went', () => {
  const value = {
    id: 'new',
    name: 'New',
    factors: { G: 1.2 },
    clause: '1',
    when: 'Always.',
    from_memory: true,
  };
  expect(changes({ do: 'insert', at: '/strength/-', value })).toEqual([
    { list: '/strength', name: 'New', clause: '1', of: null, before: null, after: '1.2 G' },
  ]);
  expect(changes({ do: 'remove', at: '/strength/0' })).toMatchObject([{ before: '1.35 G', after: null }]);
});
