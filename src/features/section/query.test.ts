import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { sectionQueryFields, selectSections, toSectionQuery } from './query';
import type { SectionItem } from './section';

const schema = z.strictObject(sectionQueryFields);
const query = (fields: Record<string, string>) => toSectionQuery(schema.parse(fields));

const item = (
  designation: string,
  mass: number,
  depth: number,
  change: Partial<SectionItem> = {},
): SectionItem => ({
  table: 'american-wide-flange',
  edition: 1,
  designation,
  printed: designation,
  shape: 'i',
  depth_mm: depth,
  width_mm: 150,
  mass_kg_m: mass,
  area_cm2: mass / 0.785,
  i_major_cm4: 1000,
  i_minor_cm4: 100,
  w_el_cm3: 100,
  w_pl_cm3: 110,
  j_cm4: 1,
  iw_cm6: 1,
  computed: [],
  dimensions_mm: {},
  ...change,
});

const ITEMS = [
  item('W12x260', 387, 360),
  item('W12x26', 38.7, 310),
  item('W12x14', 20.8, 303),
  item('CHS 100x5', 11.7, 100, { table: 'hollow-round', shape: 'chs', iw_cm6: null }),
  item('47x200', 3.9, 200, { table: 'sawn-timber', shape: 'rectangle' }),
];
const found = (fields: Record<string, string>) =>
  selectSections(ITEMS, query(fields)).map((one) => one.designation);

describe('selectSections', () => {
  test.each<[Record<string, string>, string[]]>([
    [{}, ['47x200', 'CHS 100x5', 'W12x14', 'W12x26', 'W12x260']],
    [{ q: 'w12x26' }, ['W12x26', 'W12x260']],
    [{ q: 'W 12 × 26', sort: '-mass' }, ['W12x26', 'W12x260']],
    [{ q: 'w12', sort: '-mass' }, ['W12x260', 'W12x26', 'W12x14']],
    [{ depth_min: '303', depth_max: '310' }, ['W12x14', 'W12x26']],
    [{ depth_mm_min: '303', depth_mm_max: '310' }, ['W12x14', 'W12x26']],
    [{ mass_min: '', mass_max: '11.7' }, ['47x200', 'CHS 100x5']],
    [{ shape: 'I' }, ['W12x14', 'W12x26', 'W12x260']],
    [{ shape: 'hollow' }, ['CHS 100x5']],
    [{ table: 'sawn-timber' }, ['47x200']],
    [{ iw_min: '0', shape: 'chs' }, []],
    [{ sort: 'designation' }, ['47x200', 'CHS 100x5', 'W12x14', 'W12x26', 'W12x260']],
    [{ sort: '-depth_mm' }, ['W12x260', 'W12x26', 'W12x14', '47x200', 'CHS 100x5']],
    [{ sort: 'iw' }, ['47x200', 'W12x14', 'W12x26', 'W12x260', 'CHS 100x5']],
  ])('%j', (fields, expected) => {
    expect(found(fields)).toEqual(expected);
  });
});

test.each([
  { sort: 'colour' },
  { shape: 'hexagon' },
  { depth_min: 'tall' },
  { q: 'x'.repeat(101) },
  { nonsense: '1' },
])('%j is refused', (fields) => {
  expect(schema.safeParse(fields).success).toBe(false);
});
