import { expect, test } from 'vitest';
import { type Compared, valuesChanged } from './edition-changes';

const row: Compared = {
  mass_kg_m: 40,
  depth_mm: 300,
  width_mm: 150,
  area_cm2: 51,
  i_major_cm4: 8000,
  i_minor_cm4: 600,
  w_el_cm3: 533,
  w_pl_cm3: null,
  j_cm4: 20,
  iw_cm6: 0,
};

test('valuesChanged(older, newer) names the columns that differ, with their share', () => {
  expect(valuesChanged(row, { ...row, mass_kg_m: 42, w_pl_cm3: 600, iw_cm6: 5 })).toEqual([
    { column: 'mass_kg_m', from: 40, to: 42, share: 0.05 },
    { column: 'w_pl_cm3', from: null, to: 600, share: null },
    { column: 'iw_cm6', from: 0, to: 5, share: null },
  ]);
});

test('valuesChanged(older, newer) passes over what rounding in binary leaves', () => {
  expect(valuesChanged(row, { ...row, area_cm2: 51 * (1 + 1e-12) })).toEqual([]);
});
