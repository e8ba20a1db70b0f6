import { describe, expect, test } from 'vitest';
import { Traces } from '@/engine/why';
import { shippedTemplate } from '../../../tests/support/templates';
import { subjectOf } from '../../../tests/support/traced';
import { afterKey, ROOT, rowsOf, toggled, trailOf } from './rows';

const traces = new Traces(subjectOf(shippedTemplate('propped-cantilever-uniform')));
const acting = { kind: 'all' } as const;
const root = traces.why({ kind: 'reaction', support: 0, component: 'moment', acting });

/** Keys pressed one after the other, from the root closed. */
function pressed(...keys: readonly string[]) {
  let state = { open: new Set<string>() as ReadonlySet<string>, active: ROOT };
  for (const key of keys) state = afterKey(rowsOf(root, state.open), state, key) ?? state;
  return { state, rows: rowsOf(root, state.open) };
}
const seen = (...keys: readonly string[]) => pressed(...keys).rows.map(({ name }) => name);

describe('the outline of a number', () => {
  test('begins closed, and opens part by part', () => {
    expect(seen()).toEqual(['M_{A}']);
    expect(seen('ArrowRight')).toEqual(['M_{A}', 'w', 'L', 'R_{B}']);
    expect(pressed('Enter').rows.map(({ depth, position, siblings }) => [depth, position, siblings])).toEqual(
      [
        [0, 1, 1],
        [1, 1, 3],
        [1, 2, 3],
        [1, 3, 3],
      ],
    );
  });

  test('is gone through by arrow keys, Home and End', () => {
    expect(pressed('ArrowRight', 'ArrowRight').state.active).toBe('0');
    expect(pressed('ArrowRight', 'End').state.active).toBe('2');
    expect(pressed('ArrowRight', 'End', 'ArrowUp').state.active).toBe('1');
    expect(pressed('ArrowRight', 'End', 'Home').state.active).toBe(ROOT);
    expect(pressed('ArrowRight', 'ArrowDown', 'ArrowDown', 'ArrowDown', 'ArrowDown').state.active).toBe('2');
    expect(seen('ArrowRight', 'End', 'ArrowRight')).toEqual([
      'M_{A}',
      'w',
      'L',
      'R_{B}',
      '\\delta_{B0}',
      'f_{BB}',
    ]);
  });

  test('closes to the left, then goes to what a number is part of', () => {
    expect(pressed('ArrowRight', 'End', 'ArrowRight', 'ArrowRight', 'ArrowLeft').state.active).toBe('2');
    expect(seen('ArrowRight', 'End', 'ArrowRight', 'ArrowLeft')).toHaveLength(4);
    expect(seen('ArrowRight', 'ArrowLeft')).toEqual(['M_{A}']);
    expect(seen('Enter', ' ')).toEqual(['M_{A}']);
  });

  test('a number that was given does not open', () => {
    const { rows, state } = pressed('ArrowRight', 'ArrowDown');
    expect(rows[1]).toMatchObject({ canOpen: false, isOpen: false });
    for (const key of ['ArrowRight', 'Enter', ' ', 'x']) expect(afterKey(rows, state, key)).toBeNull();
    expect(afterKey([], state, 'ArrowDown')).toBeNull();
  });

  test('an asterisk opens all its siblings', () => {
    expect(seen('ArrowRight', 'End', '*')).toContain('f_{BB}');
  });

  test('the trail leads from the number that was asked about', () => {
    const { rows, state } = pressed('ArrowRight', 'End', 'ArrowRight', 'ArrowDown');
    expect(trailOf(rows, state.active).map(({ name }) => name)).toEqual(['M_{A}', 'R_{B}', '\\delta_{B0}']);
  });

  test('a part that is used twice is shown once', () => {
    const once = root.parts[0]!;
    expect(rowsOf({ ...root, parts: [once, once] }, new Set([ROOT]))).toHaveLength(2);
    expect(toggled(new Set(['1']), '1').size).toBe(0);
  });
});
