import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam';
import { readBeam } from '@/engine/model';
import { instanceAt, shippedTemplate } from '../../../tests/support/templates';
import { figureKey, type Loading, stationKey, UNFACTORED } from './keys';

const instance = instanceAt(shippedTemplate('propped-cantilever-uniform'));
const reading = readBeam({ ...instance.beam, horizontal: 'ignore' });
if (!reading.ok) throw new Error('the template has a beam');
const solution = solveBeam(reading.value);
const acting = { kind: 'all' } as const;
const { max } = solution.extremes.moment;
const x = max.at[0] ?? 0;

describe('what is asked about a figure', () => {
  test('a reaction', () => {
    const figure = { kind: 'reaction', support: 1, component: 'vertical' } as const;
    expect(figureKey(figure, solution, UNFACTORED)).toEqual({ ...figure, acting });
  });

  test('the largest value of all, a lesser peak, and where the moment is zero', () => {
    const peak = { kind: 'peak', quantity: 'moment', x, value: max.value, isZero: false } as const;
    const key = { kind: 'extreme', quantity: 'moment', x, acting };
    expect(figureKey(peak, solution, UNFACTORED)).toEqual({ ...key, sense: 'max' });
    expect(figureKey({ ...peak, value: 1 }, solution, UNFACTORED)).toEqual({ ...key, sense: 'local' });
    expect(figureKey({ ...peak, isZero: true }, solution, UNFACTORED)).toEqual({
      kind: 'contraflexure',
      x,
      acting,
    });
  });

  test('a cell of the table: an extreme where it is one, else the value there', () => {
    const cell = { quantity: 'moment', x: 1, side: 'left', bound: null } as const;
    expect(stationKey(cell, solution, UNFACTORED)).toEqual({
      ...{ kind: 'value', quantity: 'moment', x: 1, side: 'left', acting },
    });
    expect(stationKey({ ...cell, x }, solution, UNFACTORED)).toMatchObject({ kind: 'extreme', sense: 'max' });
    const least = { ...cell, x: solution.extremes.moment.min.at[0] ?? 0 };
    expect(stationKey(least, solution, UNFACTORED)).toMatchObject({ sense: 'min' });
    expect(stationKey({ ...cell, x, bound: 'upper' }, solution, UNFACTORED)).toMatchObject({ kind: 'value' });
  });

  test('of an envelope, a side of it; where nothing acts, nothing is asked', () => {
    const asked: unknown[] = [];
    const sided: Loading = {
      at: (quantity, at, bound) => {
        asked.push([quantity, at, bound]);
        return bound === null ? null : acting;
      },
      reaction: () => null,
    };
    const peak = { kind: 'peak', quantity: 'moment', x, value: max.value, isZero: false } as const;
    expect(figureKey(peak, solution, sided)).toMatchObject({ sense: 'local' });
    expect(asked[0]).toEqual(['moment', x, 'upper']);
    expect(figureKey({ ...peak, value: -1 }, solution, sided)).not.toBeNull();
    expect(asked).toContainEqual(['moment', x, 'lower']);
    const reaction = { kind: 'reaction', support: 0, component: 'moment' } as const;
    expect(figureKey(reaction, solution, sided)).toBeNull();
    expect(stationKey({ quantity: 'moment', x, side: 'left', bound: null }, solution, sided)).toBeNull();
    const none: Loading = { at: () => null, reaction: () => null };
    expect(figureKey(peak, solution, none)).toBeNull();
  });
});
