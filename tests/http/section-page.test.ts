import { beforeAll, expect, test } from 'vitest';
import { seedSections } from '@/db/seed/sections';
import { withPractice } from '@/db/tenancy';
import type { User } from '@/features/account/account';
import { createDraft, takeStep } from '@/features/review/review.server';
import { builtRow } from '@/features/section/build';
import { editionBody, fillEdition } from '@/features/section/edition.server';
import { readSectionPage } from '@/features/section/page.server';
import type { SectionRow } from '@/features/section/section';
import { foundPractice } from '../support/practice';

let librarian: User;
let checker: User;

beforeAll(async () => {
  [librarian, checker] = (await foundPractice(['librarian'], ['checker'])) as unknown as [User, User];
  await seedSections(
    new Map([
      ['Priyanka Velloor', librarian],
      ['Imogen Fairlocke', checker],
    ]) as never,
  );
}, 120_000);

const open = (table: string, designation: string, edition?: number) =>
  readSectionPage(librarian, { table, designation, edition }, 0);

const bar = (name: string, h: number): SectionRow => builtRow(name, { shape: 'rectangle', h, b: 0.01 }, 7850);

/** The next edition of a table of bars, issued. */
async function issue(number: number, rows: readonly SectionRow[]) {
  const meta = {
    slug: 'bars',
    reference: 'Bars',
    name: 'Bars',
    words: [],
    standard: 'none',
    source: 'test',
    edition: String(number),
    catalogue_date: '2026-01-05',
    conventions: '',
    licence: '',
    notes: [],
    density_kg_m3: 7850,
    tube_standard: 'EN 10210' as const,
  };
  const draft = await withPractice(librarian, async (tx) => {
    const made = await createDraft(tx, librarian, {
      kind: 'section-table',
      slug: meta.slug,
      reference: meta.reference,
      name: meta.name,
      body: editionBody(meta, rows),
      schemaVersion: 1,
      changeNote: `Edition ${number}`,
      changeClass: 'improvement',
      consequence: 'cosmetic',
    });
    const { practiceId } = librarian;
    await fillEdition(tx, { practiceId, revisionId: made.revisionId, table: meta.slug }, rows);
    return made.revisionId;
  });
  await takeStep(librarian, draft, { step: 'submit' });
  await takeStep(checker, draft, { step: 'issue' });
}

test.each([
  ['american-wide-flange', 'W12x26', 'W12x22', 'W12x30'],
  ['european-i', 'IPE 300', 'IPE 270', 'IPE 330'],
  ['equal-angles', 'L 100x100x10', 'L 100x100x8', 'L 100x100x12'],
  ['american-angles', 'L8x8x3/4', 'L8x8x5/8', 'L8x8x7/8'],
])('%s: beside %s in its series stand %s and %s', async (table, designation, lighter, heavier) => {
  const { series } = (await open(table, designation)).neighbours;
  // IPE A, O and R are families of their own: a series is one spelling with one size that differs
  expect([series.lighter?.designation, series.heavier?.designation]).toEqual([lighter, heavier]);
});

test('the same depth is that of every table with such shapes, by mass', async () => {
  const { depth } = (await open('european-i', 'IPE 300')).neighbours;
  for (const [found, way] of [
    [depth.lighter, -1],
    [depth.heavier, 1],
  ] as const) {
    expect(Math.abs((found?.depth_mm ?? 0) / 300 - 1)).toBeLessThanOrEqual(0.03);
    expect(Math.sign((found?.mass_kg_m ?? 0) - 42.2)).toBe(way);
  }
  const lightest = (await open('american-wide-flange', 'W4x13')).neighbours;
  expect(lightest.series.lighter).toBeNull();
});

test('going from neighbour to neighbour passes every section of a series once', async () => {
  const seen: string[] = [];
  let at: string | undefined = 'L 100x50x6';
  while (at) {
    seen.push(at);
    at = (await open('unequal-angles', at)).neighbours.series.heavier?.designation;
  }
  expect(seen).toEqual(['L 100x50x6', 'L 100x50x8']);
});

test('every edition says what became of the section in it', async () => {
  await issue(1, [bar('B 10x100', 0.1), bar('B 10x80', 0.08)]);
  await issue(2, [bar('B 10x100', 0.102), bar('B 10x80', 0.08), bar('B 10x60', 0.06)]);
  await issue(3, [bar('B 10x100', 0.102), bar('B 10x60', 0.06)]);
  const became = async (designation: string) =>
    (await open('bars', designation)).editions.map(({ edition, what }) => [edition, what]);
  expect(await became('B 10x100')).toEqual([
    [3, 'same'],
    [2, 'changed'],
    [1, 'first'],
  ]);
  expect(await became('B 10x80')).toEqual([
    [3, 'removed'],
    [2, 'same'],
    [1, 'first'],
  ]);
  expect(await became('B 10x60')).toEqual([
    [3, 'same'],
    [2, 'added'],
    [1, 'absent'],
  ]);
  const { editions } = await open('bars', 'B 10x100');
  expect(editions[1]?.values).toContainEqual({
    column: 'depth_mm',
    from: 100,
    to: 102,
    share: expect.closeTo(0.02, 9),
  });
});

test('a section that the edition in force no longer has opens in the last one that had it', async () => {
  const { edition, item } = await open('bars', 'b 10 x 80');
  expect([edition.edition, edition.state, item.designation]).toEqual([2, 'superseded', 'B 10x80']);
  await expect(open('bars', 'B 10x80', 3)).rejects.toMatchObject({ code: 'not_found' });
  await expect(open('bars', 'B 10x90')).rejects.toMatchObject({ code: 'not_found' });
});

test('of a former edition the neighbours are those of the edition in force, without the section itself', async () => {
  const { neighbours } = await open('bars', 'B 10x100', 1); // 102 mm deep in edition 3
  expect([neighbours.series.lighter?.designation, neighbours.series.heavier]).toEqual(['B 10x60', null]);
});

test('moduli about the minor axis are those of the table', async () => {
  const { minor } = await open('european-i', 'IPE 300');
  expect((minor.w_el_minor_cm3 ?? 0) / 80.5).toBeCloseTo(1, 2); // EN 10365: W_el,z of IPE 300 is 80.5 cm³
});
