import { beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { readShipped, readShippedJson, shippedSlugs } from '@/db/seed/files';
import { seedSections } from '@/db/seed/sections';
import { createApiToken } from '@/features/account/token.server';
import { readSectionTable } from '@/features/section/import';
import {
  measureOf,
  SECTION_MEASURES,
  sectionQueryFields,
  selectSections,
  toSectionQuery,
} from '@/features/section/query';
import { type SectionItem, sectionTableMetaSchema, toSectionItem } from '@/features/section/section';
import { spreadSchema } from '@/features/section/spread';
import { ask } from '../support/app';
import { foundPractice } from '../support/practice';

let token: string;
let stranger: string;
/** What is shipped, read from its files: the lists are compared with it, row by row. */
let shipped: SectionItem[];

beforeAll(async () => {
  const [reader, librarian, checker] = await foundPractice(['reader'], ['librarian'], ['checker']);
  const [other] = await foundPractice(['engineer']);
  await seedSections(
    new Map([
      ['Priyanka Velloor', librarian],
      ['Imogen Fairlocke', checker],
    ]),
  );
  token = await createApiToken(reader.email);
  stranger = await createApiToken(other.email);
  const tables = await Promise.all((await shippedSlugs('sections')).map(readTable));
  shipped = tables.flat();
}, 120_000);

async function readTable(slug: string): Promise<SectionItem[]> {
  const meta = sectionTableMetaSchema.parse(await readShippedJson('sections', slug));
  const reading = readSectionTable(await readShipped('sections', `${slug}.csv`), meta);
  if (!reading.ok) throw new Error(`${slug} has faults`);
  return reading.rows.map((row) => toSectionItem(row, slug, 1));
}

type Query = Record<string, string>;
const get = (query: Query, by = token) =>
  ask('GET', `/api/v1/sections?${new URLSearchParams(query)}`, { token: by });

/** The whole list, page by page. */
async function walk(query: Query, limit = 200): Promise<{ items: SectionItem[]; totals: number[] }> {
  const items: SectionItem[] = [];
  const totals: number[] = [];
  for (let cursor: string | null = ''; cursor !== null; ) {
    const { status, json } = await get({ ...query, limit: String(limit), ...(cursor && { cursor }) });
    expect([status, json.errors]).toEqual([200, undefined]);
    items.push(...json.items);
    totals.push(json.total);
    cursor = json.next;
  }
  return { items, totals };
}

const names = (items: readonly SectionItem[]) => items.map((item) => `${item.table} ${item.designation}`);
const expected = (query: Query) =>
  names(selectSections(shipped, toSectionQuery(z.strictObject(sectionQueryFields).parse(query))));

describe('a designation', () => {
  test.each([
    ['w12x26', 'W12x26'],
    ['W 12 × 26', 'W12x26'],
    ['W12X26', 'W12x26'],
    ['hea200', 'HE 200 A'],
    ['HE 200 A', 'HE 200 A'],
    ['HE200A', 'HE 200 A'],
    ['ipe 300', 'IPE 300'],
    ['UB 533x210x92', '533x210x92 UB'],
    ['533 x 210 x 92 UB', '533x210x92 UB'],
    ['533×210×92', '533x210x92 UB'],
  ])('typed as “%s” is found first', async (q, designation) => {
    const { json } = await get({ q });
    expect(json.items[0]?.designation).toBe(designation);
    const { json: sorted } = await get({ q, sort: '-depth' });
    expect(sorted.items[0]?.designation).toBe(json.items[0].designation);
  });

  test('with a slip in it brings the nearest', async () => {
    const { json } = await get({ q: 'w12x25' });
    expect(json.items.map((item: SectionItem) => item.designation)).toContain('W12x26');
    expect([json.total, json.next]).toEqual([json.items.length, null]);
  });

  test('that exists outside the range brings nothing instead', async () => {
    expect((await get({ q: 'w12x26', depth_max: '100' })).json.total).toBe(0);
  });

  test('like no other brings nothing', async () => {
    expect((await get({ q: 'qqqqq 98765' })).json).toEqual({ items: [], next: null, total: 0 });
  });

  test.each(['w', 'he', 'ub 533', '300', '330 200', 'rhs 200x100', '2x10', 'IPE', '12', '---'])(
    '“%s” brings what the rule for designations says, best first',
    async (q) => {
      expect(names((await walk({ q })).items)).toEqual(expected({ q }));
    },
  );
});

describe('ranges', () => {
  test.each<[string, Query]>([
    ['≤ 310 deep, ≤ 45 kg/m', { depth_max: '310', mass_max: '45' }],
    ['just 310 deep', { depth_min: '310', depth_max: '310' }],
    ['wide flange of W12', { table: 'american-wide-flange', depth_min: '300', depth_max: '320' }],
    ['hollow, stiff', { shape: 'hollow', i_major_min: '5000' }],
    ['by their long names', { width_mm_min: '100', i_minor_cm4_max: '2000', w_pl_cm3_min: '500' }],
    ['thin webs', { shape: 'i', tw_max: '6.6', r_min: '12' }],
    ['slender', { r_minor_max: '3', r_major_min: '12', j_min: '10', iw_max: '100000' }],
    ['none at all', { depth_min: '5000' }],
  ])('%s: the set is that of an exhaustive filter', async (_, query) => {
    const found = await walk(query);
    expect(names(found.items)).toEqual(expected(query));
    expect(new Set(found.totals)).toEqual(new Set([found.items.length]));
  });

  test('hold their ends', async () => {
    const { json } = await get({ q: 'w12x26' });
    const { depth_mm: depth, mass_kg_m: mass } = json.items[0];
    const ends = {
      depth_min: String(depth),
      depth_max: String(depth),
      mass_min: String(mass),
      mass_max: String(mass),
    };
    expect(names((await get(ends)).json.items)).toContain('american-wide-flange W12x26');
  });
});

describe('sorting', () => {
  const sorts = [...Object.keys(SECTION_MEASURES), ...Object.values(SECTION_MEASURES), 'designation'];
  test.each(sorts.flatMap((name) => [name, `-${name}`]))(
    'by %s is the same as over all rows',
    async (sort) => {
      expect(names((await walk({ sort })).items)).toEqual(expected({ sort }));
    },
  );

  test('descends, what has no value last', async () => {
    const { items } = await walk({ sort: '-tf' });
    const values = items.map((item) => measureOf(item, 'tf_mm'));
    const given = values.filter((value) => value !== null);
    expect(values.slice(given.length).every((value) => value === null)).toBe(true);
    expect(given).toEqual([...given].sort((a, b) => b - a));
  });
});

describe('a cursor', () => {
  test.each(['mass', '-iw', '-designation', 'tf'])('walks every row once, sorted by %s', async (sort) => {
    const { items } = await walk({ sort }, 97);
    expect(items.length).toBe(shipped.length);
    expect(new Set(names(items)).size).toBe(shipped.length);
  });
});

describe('the spread of depth and mass', () => {
  const spread = (query: Query, by = token) =>
    ask('GET', `/api/v1/sections/spread?${new URLSearchParams(query)}`, { token: by });
  const OWN = {
    depth: { field: 'depth_mm', ends: ['depth_min', 'depth_max', 'depth_mm_min', 'depth_mm_max'] },
    mass: { field: 'mass_kg_m', ends: ['mass_min', 'mass_max', 'mass_kg_m_min', 'mass_kg_m_max'] },
  } as const;
  const isRange = (name: string) => /_(min|max)$/.test(name);
  const answers = (query: Query, keep: (name: string) => boolean) =>
    selectSections(
      shipped,
      toSectionQuery(
        z
          .strictObject(sectionQueryFields)
          .parse(Object.fromEntries(Object.entries(query).filter(([name]) => keep(name)))),
      ),
    );

  test.each<[string, Query]>([
    ['everything', {}],
    ['≤ 310 deep, ≤ 45 kg/m', { depth_max: '310', mass_max: '45' }],
    ['between ends that sections have', { depth_min: '203', depth_max: '310' }],
    ['wide flange of W12', { q: 'w12', depth_min: '300', depth_max: '320' }],
    ['hollow, stiff, of one table or none', { shape: 'hollow', i_major_min: '5000', mass_max: '100' }],
    ['by their long names', { table: 'european-i', width_mm_min: '100', depth_mm_max: '300' }],
    ['a slip of the finger', { q: 'w12x27', mass_max: '40' }],
  ])('%s: each bin has what an exhaustive count puts there', async (_, query) => {
    const { status, json } = await spread(query);
    expect([status, json.errors]).toEqual([200, undefined]);
    const found = spreadSchema.parse(json);
    const base = answers(query, (name) => !isRange(name));
    // A spread of nothing would agree with anything.
    expect(base.length).toBeGreaterThan(0);
    const ranged = answers(query, () => true);
    const names = new Set(base.map(({ table, designation }) => `${table} ${designation}`));
    const meeting = ranged.filter(({ table, designation }) => names.has(`${table} ${designation}`));
    for (const measure of ['depth', 'mass'] as const) {
      const { bin, all, meeting: met, within } = found[measure];
      const { field, ends } = OWN[measure];
      const inBin = (items: readonly SectionItem[], i: number) =>
        items.filter((item) => {
          const at = item[field] / bin + 1e-9;
          return at >= i && (at < i + 1 || i === all.length - 1);
        }).length;
      expect(all).toEqual(all.map((__, i) => inBin(base, i)));
      expect(met).toEqual(all.map((__, i) => inBin(meeting, i)));
      const own = answers(query, (name) => !isRange(name) || (ends as readonly string[]).includes(name));
      expect(within).toBe(own.filter((item) => names.has(`${item.table} ${item.designation}`)).length);
    }
  });

  test('has bins that are round in inches for who reads inches', async () => {
    const { json } = await spread({ system: 'us' });
    expect(json.depth.bin / 25.4).toBeCloseTo(Math.round((json.depth.bin / 25.4) * 2) / 2, 9);
    expect(json.depth.all.length).toBeLessThanOrEqual(64);
    expect(json.depth.all.reduce((sum: number, one: number) => sum + one, 0)).toBe(shipped.length);
  });

  test('keeps the axis of every section where a designation is like no other', async () => {
    const everything = (await spread({})).json;
    const { json } = await spread({ q: 'qqqqq 98765' });
    expect([json.depth.bin, json.depth.all.length]).toEqual([
      everything.depth.bin,
      everything.depth.all.length,
    ]);
    expect([...json.depth.all, json.depth.within].every((one: number) => one === 0)).toBe(true);
  });

  test('is refused with its place where the query cannot be read, and to nobody', async () => {
    const { status, json } = await spread({ depth_min: 'tall' });
    expect([status, json.errors[0].pointer]).toEqual([422, '/depth_min']);
    expect((await ask('GET', '/api/v1/sections/spread')).status).toBe(401);
  });

  test('tells another practice nothing', async () => {
    const { json } = await spread({}, stranger);
    expect([json.depth.all, json.mass.within]).toEqual([[0], 0]);
  });
});

describe('one section', () => {
  test('is found by its table and designation, with where it comes from', async () => {
    const { status, json } = await ask('GET', '/api/v1/sections/american-wide-flange/w12x26', { token });
    const { source, ...item } = json;
    expect(status).toBe(200);
    expect(item).toEqual(shipped.find(({ designation }) => designation === 'W12x26'));
    expect(source).toMatchObject({ reference: 'ST-05', status: 'issued', standard: 'ASTM A6/A6M' });
  });

  test.each(['american-wide-flange/W12x27', 'no-such-table/W12x26', 'american-wide-flange/W12x26?edition=9'])(
    '%s is not found',
    async (path) => {
      expect((await ask('GET', `/api/v1/sections/${path}`, { token })).status).toBe(404);
    },
  );
});

describe('another practice', () => {
  test('sees none of it', async () => {
    expect((await get({}, stranger)).json).toEqual({ items: [], next: null, total: 0 });
    const { status } = await ask('GET', '/api/v1/sections/american-wide-flange/W12x26', { token: stranger });
    expect(status).toBe(404);
  });
});

describe('a query that cannot be read', () => {
  test.each<[Query, string]>([
    [{ depth_min: 'tall' }, '/depth_min'],
    [{ mass_max: '45 kg/m' }, '/mass_max'],
    [{ sort: 'colour' }, '/sort'],
    [{ shape: 'hexagon' }, '/shape'],
    [{ limit: '0' }, '/limit'],
    [{ limit: '201' }, '/limit'],
    [{ cursor: 'elsewhere' }, '/cursor'],
    [{ width_least: '3' }, '/width_least'],
  ])('%j is refused with its place', async (query, pointer) => {
    const { status, json } = await get(query);
    expect([status, json.errors.map((error: { pointer: string }) => error.pointer)]).toEqual([
      422,
      [pointer],
    ]);
  });

  test('needs somebody who asks', async () => {
    expect((await ask('GET', '/api/v1/sections')).status).toBe(401);
  });
});
