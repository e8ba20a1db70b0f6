import { expect, test } from 'vitest';
import { sectionsCsv } from './csv';
import type { SectionItem } from './section';

const item = (designation: string): SectionItem => ({
  table: 'own',
  edition: 2,
  designation,
  printed: designation,
  shape: 'rectangle',
  depth_mm: 254,
  width_mm: 50.8,
  mass_kg_m: 5,
  area_cm2: 129,
  i_major_cm4: 1,
  i_minor_cm4: 1,
  w_el_cm3: 1,
  w_pl_cm3: null,
  j_cm4: null,
  iw_cm6: null,
  computed: ['area_cm2', 'w_el_cm3'],
  dimensions_mm: { h: 254, b: 50.8 },
});

test('figures stand in the units shown, and nothing where there is none', () => {
  expect(sectionsCsv([item('2x10')], ['depth_mm', 'w_pl_cm3'], 'us').split('\r\n')).toEqual([
    'designation,table,edition,depth (in),"plastic modulus, major axis (in3)",computed',
    '2x10,own,2,10,,area_cm2 w_el_cm3',
  ]);
});

test.each(['=1+1', '+1', '-1', '@SUM(A1)'])('a designation “%s” is no formula', (designation) => {
  expect(sectionsCsv([item(designation)], ['mass_kg_m'], 'metric').split('\r\n')[1]).toBe(
    `"'${designation}",own,2,5,area_cm2 w_el_cm3`,
  );
});
