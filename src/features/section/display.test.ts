import { describe, expect, test } from 'vitest';
import { axesOfTable, figureOf, fromShown, shownName, sizeLine, symbolOf, toShown } from './display';
import type { SectionItem } from './section';

/** W12x26 as the AISC manual prints it, converted by hand; from memory. */
const W12X26: SectionItem = {
  table: 'american-wide-flange',
  edition: 1,
  designation: 'W12x26',
  printed: 'W12X26',
  shape: 'i',
  depth_mm: 309.88,
  width_mm: 164.846,
  mass_kg_m: 38.69,
  area_cm2: 49.355,
  i_major_cm4: 8491,
  i_minor_cm4: 720,
  w_el_cm3: 547,
  w_pl_cm3: 610,
  j_cm4: 12.5,
  iw_cm6: 163000,
  computed: [],
  dimensions_mm: { h: 309.88, b: 164.846, tw: 5.842, tf: 9.652, r: 7.6 },
};

test.each([
  ['depth_mm', '309.9', '12.20'],
  ['mass_kg_m', '38.7', '26.0'],
  ['i_major_cm4', '8\u202f491', '204'],
  ['w_pl_cm3', '610', '37.2'],
  ['tw_mm', '5.8', '0.230'],
  ['iw_cm6', '0.163', '607'],
  ['r_minor_cm', '3.82', '1.50'],
] as const)('%s is %s, and %s in US units', (field, metric, us) => {
  expect([figureOf(W12X26, field, 'metric'), figureOf(W12X26, field, 'us')]).toEqual([metric, us]);
});

test('a bound comes back from inches as it was', () => {
  expect(fromShown('depth_mm', 12.5, 'us')).toBe(317.5);
  expect(toShown('depth_mm', 317.5, 'us')).toBe(12.5);
});

describe('words', () => {
  test('name the axes as the table does', () => {
    expect(symbolOf('i_major_cm4', axesOfTable('en', 'us'))).toBe('I_{y}');
    expect(symbolOf('w_pl_cm3', axesOfTable('us', 'metric'))).toBe('W_{pl,x}');
  });

  test('set sizes as in print', () => {
    expect(shownName('UB 533x210x92')).toBe('UB 533×210×92');
    expect(sizeLine(W12X26, 'metric')).toBe('309.9 × 164.8 mm, 38.7 kg/m');
  });

  test('a section without flanges has no flange', () => {
    const tube = { ...W12X26, dimensions_mm: { h: 100, b: 100, t: 5, ro: 7.5, ri: 5 } };
    expect(figureOf(tube, 'tf_mm', 'metric')).toBe('–');
    expect(figureOf(tube, 'tw_mm', 'metric')).toBe('5.0');
  });
});
