import { describe, expect, test } from 'vitest';
import { toSectionQuery } from './query';
import type { SectionItem } from './section';
import { binsTo, countsOf, spreadOf } from './spread';

const items = (sizes: readonly (readonly [depth: number, mass: number])[]): SectionItem[] =>
  sizes.map(([depth_mm, mass_kg_m], i) => ({
    table: 'wide',
    edition: 1,
    designation: `S ${i}`,
    printed: `S ${i}`,
    shape: 'i',
    depth_mm,
    width_mm: 100,
    mass_kg_m,
    area_cm2: 10,
    i_major_cm4: 100,
    i_minor_cm4: 10,
    w_el_cm3: 20,
    w_pl_cm3: null,
    j_cm4: null,
    iw_cm6: null,
    computed: [],
    dimensions_mm: {},
  }));

describe('binsTo(greatest)', () => {
  test('is round in the unit shown, and reaches the greatest', () => {
    expect(binsTo(640, 'depth', 'metric')).toEqual({ bin: 20, bins: 32 });
    expect(binsTo(641, 'depth', 'metric')).toEqual({ bin: 25, bins: 26 });
    // 32 in: one inch to a bin.
    expect(binsTo(812.8, 'depth', 'us')).toEqual({ bin: 25.4, bins: 32 });
  });

  test('is one bin of nothing where there is nothing', () => {
    expect(binsTo(0, 'mass', 'metric').bins).toBe(1);
  });
});

test('countsOf(values) puts a value on a boundary into the bin that it starts, and the last into the last bin', () => {
  expect(countsOf([0, 19.9, 20, 99, 100], 20, 5)).toEqual([2, 1, 0, 0, 2]);
  // 12 in of 1 in each, though 12 × 25.4 is less than 304.8 in doubles.
  expect(countsOf([304.79999999999995], 25.4, 32)[12]).toBe(1);
});

describe('spreadOf(base, every, query)', () => {
  const every = items([
    [100, 10],
    [310, 39],
    [320, 60],
    [640, 160],
  ]);

  test('counts all, those that meet every range, and those within its own', () => {
    const { depth, mass } = spreadOf(
      every,
      every,
      toSectionQuery({ depth_max: 320, mass_min: 20 }),
      'metric',
    );
    expect(depth.bin).toBe(20);
    expect(depth.all.flatMap((count, i) => (count > 0 ? [[i, count]] : []))).toEqual([
      [5, 1],
      [15, 1],
      [16, 1],
      [31, 1],
    ]);
    expect(depth.meeting.flatMap((count, i) => (count > 0 ? [[i, count]] : []))).toEqual([
      [15, 1],
      [16, 1],
    ]);
    expect([depth.within, mass.within]).toEqual([3, 3]);
  });

  test('keeps the axis of every section where none is left', () => {
    const { depth } = spreadOf([], every, toSectionQuery({}), 'metric');
    expect([depth.bin, depth.all.length, depth.within]).toEqual([20, 32, 0]);
  });
});
