import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { applyEdits, type Edit } from '@/features/author/edit';
import type { Written } from '@/features/review/draft';
import { previewOf } from './preview';

const written: Written = JSON.parse(readFileSync('data/combinations/en-1990-6-10.json', 'utf8'));
const edited = (...edits: Edit[]): Written => applyEdits(written, edits).document;
const strength = (document: Written, chosen = {}) => previewOf(document, '/strength', chosen);

describe('the preview of EN 1990, 6.10', () => {
  // Table A1.2(B) and A1.1, from memory: offices ψ0 0.7, snow to 1000 m 0.5, wind 0.6, storage 1.0.
  test('says each combination in numbers, with its source', () => {
    expect(strength(written)[2]).toEqual({
      at: '/strength/2',
      id: '610-s',
      name: '6.10, snow leading',
      clause: expect.stringContaining('6.10'),
      fromMemory: true,
      combinations: ['1.35 G + 1.05 Q + 1.5 S + 0.9 W'],
      missing: null,
    });
    expect(strength(written, { Q: 'e' })[2]?.combinations).toEqual(['1.35 G + 1.5 Q + 1.5 S + 0.9 W']);
    expect(previewOf(written, '/service', {}).at(-1)?.combinations).toEqual(['G + 0.3 Q']);
  });

  // By hand: 1.5 · 0.5 = 0.75.
  test('follows a changed ψ0 in what accompanies, and nowhere else', () => {
    const changed = edited({ do: 'set', at: '/categories/Q/0/psi0', value: 0.5 });
    expect(strength(changed)[2]?.combinations).toEqual(['1.35 G + 0.75 Q + 1.5 S + 0.9 W']);
    expect(strength(changed)[1]?.combinations).toEqual(strength(written)[1]?.combinations);
  });

  // EN 1991-1-1, 3.3.2(1), from memory: category H is combined neither with snow nor with wind.
  test('shows both where groups are not combined', () => {
    expect(strength(written, { Q: 'h' })[2]?.combinations).toEqual(['1.35 G + 1.5 S + 0.9 W']);
    const both = edited({ do: 'set', at: '/strength/2/factors', value: { G: 1, Q: 1, S: 1 } });
    expect(strength(both, { Q: 'h' })[2]?.combinations).toEqual(['G + S', 'G + Q']);
  });

  test('uses the letters of the set', () => {
    expect(strength(edited({ do: 'set', at: '/letters/G', value: 'D' }))[0]?.combinations).toEqual([
      '1.35 D',
    ]);
  });
});

describe('of a draft that is not whole', () => {
  test.each<[string, Edit, string | null]>([
    [
      'a factor half typed',
      { do: 'set', at: '/strength/1/factors/Q', value: '1.5 p' },
      'The factor of Q cannot be read yet.',
    ],
    ['no factor', { do: 'set', at: '/strength/1/factors', value: {} }, 'No factor yet.'],
    ['no ψ of a group', { do: 'remove', at: '/categories/S' }, 'S has no ψ yet.'],
    ['a ψ half typed', { do: 'set', at: '/categories/W/0/psi0', value: '0.6x' }, 'W has no ψ yet.'],
    [
      'ξ without value',
      { do: 'set', at: '/strength/1/factors/G', value: { factor: 1.35, by: 'xi' } },
      'ξ has no value yet.',
    ],
    ['nothing wrong with it', { do: 'set', at: '/name', value: '' }, null],
  ])('%s is said of its line alone', (_, edit, missing) => {
    const lines = strength(edited(edit));
    expect(lines[1]?.missing).toBe(missing);
    expect(lines[0]?.combinations).toEqual(['1.35 G']);
  });

  test('nothing at all has no lines', () => {
    expect(strength({})).toEqual([]);
    expect(strength({ strength: [null, 'x'] }).map(({ missing }) => missing)).toEqual([
      'No factor yet.',
      'No factor yet.',
    ]);
  });
});
