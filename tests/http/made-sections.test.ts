import { beforeAll, expect, test } from 'vitest';
import { seedSections } from '@/db/seed/sections';
import { withPractice } from '@/db/tenancy';
import type { User } from '@/features/account/account';
import { takeStep } from '@/features/review/review.server';
import { requireRevision } from '@/features/review/rows.server';
import { build, builtRow } from '@/features/section/build';
import { storedRowsHash } from '@/features/section/edition.server';
import { addMadeSection, beamOf, MADE } from '@/features/section/made.server';
import { toSectionQuery } from '@/features/section/query';
import { findSection, searchSections } from '@/features/section/section.server';
import { foundPractice } from '../support/practice';

let librarian: User;
let checker: User;
let engineer: User;

beforeAll(async () => {
  [librarian, checker, engineer] = (await foundPractice(
    ['librarian'],
    ['checker'],
    ['engineer'],
  )) as unknown as [User, User, User];
  await seedSections(
    new Map([
      ['Priyanka Velloor', librarian],
      ['Imogen Fairlocke', checker],
    ]) as never,
  );
}, 120_000);

const PAGE = { place: null, limit: 5 };
const fieldsOf = (fields: Readonly<Record<string, string>>) => (name: string) => fields[name] ?? '';

async function made(name: string, count: string) {
  const { values } = await beamOf(librarian, 'ipe 300');
  const built = build('side', fieldsOf({ count, gap: '10' }), values, 'metric');
  if (!built.ok) throw new Error('not built');
  return builtRow(name, built.dimensions, 7850);
}

test('what is made goes into one draft, is reviewed by another person, and is found once it is issued', async () => {
  const edition = await addMadeSection(librarian, await made('2/IPE 300', '2'), 'Detail 14 of Q-2417');
  expect(await addMadeSection(librarian, await made('3/IPE 300', '3'), 'Detail 15')).toBe(edition);
  await expect(addMadeSection(librarian, await made('2/ IPE-300', '2'), 'Again')).rejects.toMatchObject({
    faults: [{ pointer: '/designation' }],
  });
  const before = await searchSections(engineer, toSectionQuery({ q: '2/IPE 300' }), PAGE);
  expect(before.items.map(({ designation }) => designation)).not.toContain('2/IPE 300');

  const key = { kind: 'section-table', slug: MADE.slug, number: edition } as const;
  const draft = await withPractice(librarian, (tx) => requireRevision(tx, librarian.practiceId, key));
  expect(draft.body).toMatchObject({
    rows: 2,
    notes: ['2/IPE 300: Detail 14 of Q-2417', '3/IPE 300: Detail 15'],
  });
  await takeStep(librarian, draft.id, { step: 'submit' });
  // Begun now, an edition would leave out what is in review.
  await expect(addMadeSection(librarian, await made('5/IPE 300', '5'), 'x')).rejects.toMatchObject({
    code: 'conflict',
    message: expect.stringContaining('in review'),
  });
  await takeStep(checker, draft.id, { step: 'issue' });

  const { item } = await findSection(engineer, { table: MADE.slug, designation: '2/IPE300' });
  expect(item.shape).toBe('outline');
  expect(item.i_major_cm4 / 8356).toBeCloseTo(2, 2); // EN 10365: I_y of IPE 300 is 8356 cm⁴
  const next = await addMadeSection(librarian, await made('4/IPE 300', '4'), 'Detail 16');
  expect(next).toBe(edition + 1);
  const after = await withPractice(librarian, (tx) =>
    requireRevision(tx, librarian.practiceId, { ...key, number: next }),
  );
  expect(after.body).toMatchObject({
    edition: String(next),
    rows: 3,
    notes: ['2/IPE 300: Detail 14 of Q-2417', '3/IPE 300: Detail 15', '4/IPE 300: Detail 16'],
  });
  const later = await findSection(engineer, { table: MADE.slug, designation: '2/IPE300', edition: next });
  expect(later.item.dimensions_si).toMatchObject({
    parts: [
      { name: 'IPE 300', rings: 1 },
      { name: 'IPE 300', rings: 1 },
    ],
  });
});

test('of sections kept at once the draft counts every one', async () => {
  const names = ['A', 'B', 'C'];
  const rows = await Promise.all(names.map((name) => made(`Pair ${name}`, '2')));
  const [number = 0] = await Promise.all(rows.map((row) => addMadeSection(librarian, row, 'At once')));
  await withPractice(librarian, async (tx) => {
    const key = { kind: 'section-table', slug: MADE.slug, number } as const;
    const { id, body } = await requireRevision(tx, librarian.practiceId, key);
    const said = body as { rows: number; notes: readonly string[]; rows_sha256: string };
    expect(said.notes.filter((note) => note.endsWith(': At once'))).toHaveLength(names.length);
    const stored = await storedRowsHash(tx, librarian.practiceId, id);
    expect([said.rows, said.rows_sha256]).toEqual([stored.count, stored.sha256]);
  });
});

test('only a librarian keeps a section', async () => {
  const row = await made('5/IPE 300', '5');
  expect(() => addMadeSection(engineer, row, 'x')).toThrow('imported by a librarian');
});

test('a beam that no table has is said at its field', async () => {
  await expect(beamOf(engineer, 'IPE 301')).rejects.toMatchObject({ faults: [{ pointer: '/beam' }] });
});
