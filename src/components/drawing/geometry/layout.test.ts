import { describe, expect, test } from 'vitest';
import type { Beam, Load, Support } from '@/engine/model/index';
import { piecewise } from '@/engine/polynomial/index';
import { dimensionRows } from './dimensions';
import { peaksOf } from './peaks';
import { combRows, levels, oneWayParts } from './stacking';

const rigid = { kind: 'rigid', movement: 0 } as const;
const roller = (at: number): Support => ({
  at,
  kind: 'roller',
  vertical: rigid,
  rotation: { kind: 'free' },
  horizontal: false,
});
const beam = (length: number, at: number[], loads: Load[] = []): Beam => ({
  length,
  segments: [{ from: 0, to: length, ei: 1e7, ga: null }],
  supports: at.map(roller),
  hinges: [],
  loads,
  degree: 0,
});
const ends = (rows: ReturnType<typeof dimensionRows>) =>
  rows.map((row) => row.map(({ from, to }) => [from, to]));

describe('dimensionRows(beam)', () => {
  test('is one row, the whole, where nothing stands between the ends', () => {
    expect(ends(dimensionRows(beam(6, [0, 6], [{ kind: 'line', from: 0, to: 6, w0: 1, w1: 1 }])))).toEqual([
      [[0, 6]],
    ]);
  });

  test('has the parts inside and the whole outside', () => {
    expect(ends(dimensionRows(beam(7.2, [0, 7.2], [{ kind: 'point', at: 4.5, p: 1 }])))).toEqual([
      [
        [0, 4.5],
        [4.5, 7.2],
      ],
      [[0, 7.2]],
    ]);
  });

  test('has a row of spans where loads divide them further', () => {
    expect(ends(dimensionRows(beam(10, [0, 6, 10], [{ kind: 'point', at: 2, p: 1 }])))).toEqual([
      [
        [0, 2],
        [2, 6],
        [6, 10],
      ],
      [
        [0, 6],
        [6, 10],
      ],
      [[0, 10]],
    ]);
  });

  test('gives a named length that is no part a row of its own', () => {
    const loads: Load[] = [2, 5].map((at) => ({ kind: 'point', at, p: 1 }));
    const rows = dimensionRows(beam(8, [0, 8], loads), [{ symbol: 'b', from: 0, to: 5 }]);
    expect(ends(rows)).toEqual([
      [
        [0, 2],
        [2, 5],
        [5, 8],
      ],
      [[0, 5]],
      [[0, 8]],
    ]);
    expect(rows[1]?.[0]?.name?.symbol).toBe('b');
  });
});

describe('combRows(loads)', () => {
  const line = (from: number, to: number, group?: string): Load => ({
    kind: 'line',
    from,
    to,
    w0: 5,
    w1: 5,
    group,
  });

  test('stacks groups in the order in which they appear', () => {
    expect(
      combRows([line(0, 6, 'dead'), line(0, 6, 'snow'), line(2, 3, 'dead')]).map(({ group }) => group),
    ).toEqual(['dead', 'dead', 'snow']);
  });

  test('keeps loads that only touch in one row', () => {
    expect(combRows([line(0, 3), line(3, 6)])).toHaveLength(1);
  });

  test('draws no row for a load of nothing', () => {
    expect(combRows([{ kind: 'line', from: 0, to: 6, w0: 0, w1: 0 }])).toEqual([]);
  });
});

test('oneWayParts(load) cuts a load where it changes sense', () => {
  expect(oneWayParts({ kind: 'line', from: 0, to: 4, w0: -1, w1: 3 })).toEqual([
    { from: 0, to: 1, w0: -1, w1: 0 },
    { from: 1, to: 4, w0: 0, w1: 3 },
  ]);
});

test('levels(intervals) lifts an interval only over those that it meets', () => {
  expect(
    levels(
      [
        [0, 10],
        [5, 15],
        [12, 20],
        [40, 50],
      ],
      1,
    ),
  ).toEqual([0, 1, 0, 0]);
});

describe('peaksOf(curve)', () => {
  test('ranks the governing extreme first and finds the lesser peak of each span', () => {
    // Two equal spans of 4 under w = 8: −wL²/8 = −16 at the middle support, 9wL²/128 = 9 at 3L/8 from each end.
    const moment = piecewise(
      [0, 4, 8],
      [
        [0, 12, -4],
        [-16, 20, -4],
      ],
    );
    const peaks = peaksOf(
      moment,
      { max: { value: 9, at: [1.5, 6.5] }, min: { value: -16, at: [4] } },
      [3, 5],
    );
    expect(
      peaks.filter(({ kind }) => kind === 'extreme').map(({ x, value, rank }) => [x, value, rank]),
    ).toEqual([
      [4, -16, 0],
      [1.5, 9, 1],
      [6.5, 9, 3],
    ]);
    expect(peaks.filter(({ kind }) => kind === 'zero').map(({ x }) => x)).toEqual([3, 5]);
  });

  test('marks a constant stretch once, over its length', () => {
    const shear = piecewise([0, 2, 6], [[10], [0]]);
    const [peak] = peaksOf(shear, { max: { value: 10, at: [0, 2] }, min: { value: 0, at: [2, 6] } });
    expect(peak).toMatchObject({ x: 0, to: 2, value: 10 });
  });

  test('finds both sides of a jump', () => {
    const shear = piecewise(
      [0, 4, 8],
      [
        [12, -8],
        [20, -8],
      ],
    );
    const peaks = peaksOf(shear, { max: { value: 20, at: [4] }, min: { value: -20, at: [4] } });
    expect(peaks.map(({ x, value }) => [x, value])).toEqual([
      [4, 20],
      [4, -20],
      [0, 12],
      [8, -12],
    ]);
  });

  test('has nothing to mark on a diagram of zero', () => {
    expect(
      peaksOf(piecewise([0, 5], [[0]]), { max: { value: 0, at: [0, 5] }, min: { value: 0, at: [0, 5] } }),
    ).toEqual([]);
  });
});
