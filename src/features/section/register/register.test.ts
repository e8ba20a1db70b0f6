import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { designationKey } from '@/engine/section';
import { measureOf, sectionQueryFields, selectSections, toSectionQuery } from '../query';
import type { SectionItem } from '../section';
import { spreadOf } from '../spread';
import { find, named } from './find';
import { FIELDS, Register, RegisterRows } from './register';
import { spreadIn } from './spread';

const SHAPES = ['i', 'chs', 'rectangle'] as const;
const FAMILIES = ['W', 'HE', 'CHS ', '', 'UB '];

/** Sections in the order of their names, as the database reads them: every mass three times, some without a warping constant. */
const ITEMS: SectionItem[] = ['alpha', 'beta'].flatMap((table, t) =>
  FAMILIES.flatMap((family, f) =>
    Array.from({ length: 12 }, (_, i): SectionItem => {
      const designation = `${family}${100 + 50 * (i % 6)}x${10 + i + t}`;
      return {
        table,
        edition: 1,
        designation,
        printed: designation,
        shape: SHAPES[(f + i) % 3] ?? 'i',
        depth_mm: 100 + 50 * (i % 6),
        width_mm: 80 + i,
        mass_kg_m: 10 + (i % 4),
        area_cm2: 20 + i,
        i_major_cm4: 500 + 7 * i,
        i_minor_cm4: 90 + f,
        w_el_cm3: 40 + i,
        w_pl_cm3: i % 5 === 0 ? null : 50 + i,
        j_cm4: 3,
        iw_cm6: i % 3 === 0 ? null : 100 + i,
        computed: [],
        dimensions_mm: i % 2 === 0 ? { tw: 4 + f } : { t: 3 + f },
      };
    }),
  ),
);

const query = (fields: Record<string, string>) =>
  toSectionQuery(z.strictObject(sectionQueryFields).parse(fields));
const BY_NAME = selectSections(ITEMS, query({ sort: 'designation' }));
const rows = new RegisterRows();
for (const item of BY_NAME) {
  const values = Object.fromEntries(FIELDS.map((field) => [field, measureOf(item, field)]));
  rows.add({
    revisionId: item.table,
    table: item.table,
    key: designationKey(item.designation),
    shape: item.shape,
    values: values as Parameters<RegisterRows['add']>[0]['values'],
  });
}
const register = new Register(rows);
const names = (at: readonly number[]) => at.map((row) => `${register.table(row)} ${register.key(row)}`);
const expected = (fields: Record<string, string>) =>
  selectSections(ITEMS, query(fields)).map((item) => `${item.table} ${designationKey(item.designation)}`);

const QUERIES: Record<string, string>[] = [
  {},
  { sort: '-mass' },
  { sort: 'iw' },
  { sort: '-iw', shape: 'i' },
  { sort: '-designation' },
  { q: 'w 100' },
  { q: '100x10' },
  { q: 'ub', sort: '-depth' },
  { q: 'he 200x12', table: 'alpha' },
  { depth_min: '150', depth_max: '250', mass_max: '12' },
  { w_pl_min: '0', tw_max: '6' },
];

describe('a page of the register', () => {
  // The list that browsers hold is searched by other code: every row is compared with it.
  test.each(QUERIES)('%j walks what an exhaustive search finds, in its order', (fields) => {
    const all: string[] = [];
    let place: ReturnType<typeof find>['next'] = null;
    do {
      const page: ReturnType<typeof find> = find(register, query(fields), { place, limit: 7 });
      expect(page.total).toBe(expected(fields).length);
      all.push(...names(page.at));
      place = page.next;
    } while (place !== null);
    expect(all).toEqual(expected(fields));
    expect(all.length).toBeGreaterThan(0);
  });

  test('goes on after a row that is there no longer', () => {
    const place = [0, 11, designationKey('HE 275x11'), 'alpha'] as const;
    const { at } = find(register, query({}), { place, limit: 200 });
    const after = BY_NAME.filter(({ mass_kg_m: mass, designation }) => {
      if (mass !== 11) return mass > 11;
      const isLaterFamily = /^(UB|W)/.test(designation);
      const isLaterSize = designation.startsWith('HE') && Number(designation.slice(2).split('x')[0]) > 275;
      return isLaterFamily || isLaterSize;
    });
    expect(new Set(names(at))).toEqual(
      new Set(after.map((item) => `${item.table} ${designationKey(item.designation)}`)),
    );
  });
});

describe('a designation that nothing is called by', () => {
  test('brings the nearest, and none where only names count', () => {
    const slip = query({ q: 'W 100x19' });
    const found = find(register, slip, { place: null, limit: 50 });
    expect(names(found.at)).toContain('alpha w100x10');
    expect(found.next).toBeNull();
    expect(named(register, slip, { place: null, limit: 50 })).toEqual({ at: [], next: null, total: 0 });
  });
});

describe('rows that alone may answer', () => {
  test('are those of the names given, by table', () => {
    const key = designationKey('W100x10');
    const only = register.named(new Map([['alpha', new Set([key])]]));
    const found = find(register, { ...query({}), only }, { place: null, limit: 50 });
    expect([names(found.at), found.total]).toEqual([[`alpha ${key}`], 1]);
  });
});

describe('the spread', () => {
  test.each(QUERIES)('%j counts what an exhaustive count finds', (fields) => {
    const asked = query(fields);
    const base = selectSections(ITEMS, { ...asked, ranges: [] });
    expect(spreadIn(register, asked, 'metric')).toEqual(spreadOf(base, ITEMS, asked, 'metric'));
  });
});
