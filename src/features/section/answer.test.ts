import { describe, expect, test } from 'vitest';
import { isNearest, ofKey, type Read, withPage } from './answer';
import { toSectionQuery } from './query';
import { type SectionItem, sectionItemSchema } from './section';

const item = (designation: string): SectionItem =>
  sectionItemSchema.parse({
    table: 'wide',
    edition: 1,
    designation,
    printed: designation,
    shape: 'i',
    depth_mm: 310,
    width_mm: 165,
    mass_kg_m: 39,
    area_cm2: 49,
    i_major_cm4: 8500,
    i_minor_cm4: 720,
    w_el_cm3: 549,
    w_pl_cm3: 610,
    j_cm4: 12,
    iw_cm6: 160_000,
    computed: [],
    dimensions_mm: { h: 310, b: 165, tw: 5.8, tf: 9.7, r: 8 },
  });

describe('withPage(read, page)', () => {
  const read: Read = { asked: '?q=w12', rows: [item('W12x26')], next: 'after-1', total: 3 };
  const page = { asked: '?q=w12', cursor: 'after-1', items: [item('W12x30')], next: 'after-2', total: 3 };

  test('reads on', () => {
    const { rows, next } = withPage(read, page);
    expect(rows.map(({ designation }) => designation)).toEqual(['W12x26', 'W12x30']);
    expect(next).toBe('after-2');
  });

  test('leaves out a page of another question, and one that is there already', () => {
    expect(withPage(read, { ...page, asked: '?q=w14' })).toBe(read);
    const further = withPage(read, page);
    expect(withPage(further, page)).toBe(further);
  });
});

test('ofKey(key) parts a key at its first slash', () => {
  expect(ofKey('american-wide-flange/W12x26')).toEqual({
    table: 'american-wide-flange',
    designation: 'W12x26',
  });
  expect(ofKey('angles/L3x3x1/4')).toEqual({ table: 'angles', designation: 'L3x3x1/4' });
  for (const key of ['', 'W12x26', '/W12x26', 'angles/']) expect(ofKey(key)).toBeNull();
});

test('isNearest(query, rows) is so where the best row is not called as was typed', () => {
  expect(isNearest(toSectionQuery({ q: 'w12x27' }), [item('W12x26')])).toBe(true);
  expect(isNearest(toSectionQuery({ q: 'w12' }), [item('W12x26')])).toBe(false);
  expect(isNearest(toSectionQuery({}), [item('W12x26')])).toBe(false);
  expect(isNearest(toSectionQuery({ q: 'w12x27' }), [])).toBe(false);
});
