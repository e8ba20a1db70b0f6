import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { withPractice } from '@/db/tenancy';
import { keepUnfinished } from '@/features/review/draft';
import { createDraft, takeStep } from '@/features/review/review.server';
import { editionBody, fillEdition, storedRowsHash } from '@/features/section/edition.server';
import { readSectionTable } from '@/features/section/import';
import { type SectionRow, sectionTableMetaSchema } from '@/features/section/section';
import { ask, signInAs } from '../support/app';
import { refusal } from '../support/database';
import { issueSections } from '../support/library';
import { foundPractice, type Member, PASSWORD } from '../support/practice';

const SLUG = 'european-i';
const read = (file: string) => readFileSync(`data/sections/${SLUG}.${file}`, 'utf8');
const meta = sectionTableMetaSchema.parse(JSON.parse(read('json')));
const { rows } = readSectionTable(read('csv'), meta);

let librarian: Member;
let checker: Member;
let cookie: string;

beforeAll(async () => {
  [librarian, checker] = await foundPractice(['librarian'], ['checker']);
  await issueSections({ author: librarian, reviewer: checker }, SLUG);
  cookie = await signInAs(librarian.email, PASSWORD);
});

const draft = (body: object, of: readonly SectionRow[]) =>
  withPractice(librarian, async (tx) => {
    const key = await createDraft(tx, librarian, {
      kind: 'section-table',
      slug: SLUG,
      reference: meta.reference,
      name: meta.name,
      body,
      schemaVersion: 1,
      changeNote: 'Next catalogue.',
      changeClass: 'improvement',
      consequence: 'service',
    });
    await fillEdition(tx, { practiceId: librarian.practiceId, revisionId: key.revisionId, table: SLUG }, of);
    return key;
  });

/** The table without its first section, its second heavier by a tenth, and one more. */
function nextRows(): SectionRow[] {
  const [, second, third, ...rest] = rows;
  if (!second || !third) throw new Error('The shipped table has rows');
  const more = { ...third, designation: 'IPE 999', printed: 'IPE 999', key: 'ipe999' };
  return [{ ...second, mass_kg_m: 1.1 * second.mass_kg_m }, third, ...rest, more];
}

describe('an edition of a section table', () => {
  test('tells row by row what it changes against the one before', async () => {
    await draft(editionBody(meta, nextRows()), nextRows());
    const { status, json } = await ask('GET', `/api/v1/sections/${SLUG}/changes?from=1&to=2`, { cookie });
    expect(status).toBe(200);
    expect(json.counts).toEqual({ changed: 1, added: 1, removed: 1, same: rows.length - 2 });
    expect(json.items).toEqual([
      {
        designation: rows[1]?.designation,
        what: 'changed',
        values: [
          {
            column: 'mass_kg_m',
            from: rows[1]?.mass_kg_m,
            to: 1.1 * (rows[1]?.mass_kg_m ?? 0),
            share: expect.closeTo(0.1, 9),
          },
        ],
        dimensions: false,
        members: 0,
      },
    ]);
    const added = await ask('GET', `/api/v1/sections/${SLUG}/changes?from=1&to=2&what=added`, { cookie });
    expect(added.json.items.map(({ designation }: { designation: string }) => designation)).toEqual([
      'IPE 999',
    ]);
    const removed = await ask('GET', `/api/v1/sections/${SLUG}/changes?from=1&to=2&what=removed`, { cookie });
    expect(removed.json.items[0].designation).toBe(rows[0]?.designation);
  });

  test('names its rows by a hash that the stored rows have as well', async () => {
    const { revisionId } = await draft(keepUnfinished({}), rows);
    const stored = await withPractice(librarian, (tx) =>
      storedRowsHash(tx, librarian.practiceId, revisionId),
    );
    const { rows: count, rows_sha256: sha256 } = editionBody(meta, rows);
    expect(stored).toEqual({ count, sha256 });
    expect(editionBody(meta, nextRows()).rows_sha256).not.toBe(sha256);
  });

  test('cannot be sent to review while its rows are being written', async () => {
    const { revisionId } = await draft(keepUnfinished({}), rows.slice(0, 3));
    await expect(takeStep(librarian, revisionId, { step: 'submit' })).rejects.toMatchObject({
      status: 422,
      message: 'Its rows are still being written. Wait until its import is done.',
    });
  });

  test('is frozen once it is in review', async () => {
    const { revisionId } = await draft(editionBody(meta, rows), rows);
    await takeStep(librarian, revisionId, { step: 'submit' });
    const more = nextRows().slice(-1);
    const { practiceId } = librarian;
    const write = withPractice(librarian, (tx) =>
      fillEdition(tx, { practiceId, revisionId, table: SLUG }, more),
    );
    expect(await refusal(write)).toBe('PL001');
  });
});

test('going back to a former edition makes its rows the next one, which a second person issues', async () => {
  const [writer, reviewer] = await foundPractice(['librarian'], ['checker']);
  const pair = { author: writer, reviewer };
  const first = await issueSections(pair, SLUG);
  await issueSections(pair, SLUG);
  const [ours, theirs] = await Promise.all([
    signInAs(writer.email, PASSWORD),
    signInAs(reviewer.email, PASSWORD),
  ]);
  const at = (number: number) => `/api/v1/library/section-table/${SLUG}/revisions/${number}`;
  const json = { reason: 'Edition 2 has the axes exchanged.', consequence: 'safety' };
  expect((await ask('POST', `${at(1)}/restore`, { cookie: theirs, json })).status).toBe(403);
  expect((await ask('POST', `${at(2)}/restore`, { cookie: ours, json })).status).toBe(409);
  const made = await ask('POST', `${at(1)}/restore`, { cookie: ours, json });
  expect([made.status, made.json]).toEqual([201, { number: 3, state: 'in_review' }]);
  expect((await ask('POST', `${at(3)}/issue`, { cookie: ours, json: {} })).status).toBe(403);
  expect((await ask('POST', `${at(3)}/issue`, { cookie: theirs, json: {} })).status).toBe(200);
  const { counts } = (await ask('GET', `/api/v1/sections/${SLUG}/changes?from=1&to=3`, { cookie: ours }))
    .json;
  expect(counts).toEqual({ changed: 0, added: 0, removed: 0, same: rows.length });
  const rowsOf = (revisionId: string) =>
    withPractice(writer, (tx) => storedRowsHash(tx, writer.practiceId, revisionId));
  expect((await rowsOf(first.revisionId)).count).toBe(rows.length);
});

test('a section that the next edition leaves out is hidden from new members and opens in the edition that had it', async () => {
  const [writer, reviewer] = await foundPractice(['librarian'], ['checker']);
  await issueSections({ author: writer, reviewer }, SLUG);
  const cookie = await signInAs(writer.email, PASSWORD);
  const gone = rows[0]?.designation ?? '';
  const kept = rows[2]?.designation ?? '';
  const found = async (designation: string) => {
    const { json } = await ask('GET', `/api/v1/sections?table=${SLUG}&q=${encodeURIComponent(designation)}`, {
      cookie,
    });
    return json.items.some((item: { designation: string }) => item.designation === designation);
  };
  expect([await found(gone), await found(kept)]).toEqual([true, true]);
  const { revisionId } = await withPractice(writer, async (tx) => {
    const key = await createDraft(tx, writer, {
      kind: 'section-table',
      slug: SLUG,
      reference: meta.reference,
      name: meta.name,
      body: editionBody(meta, nextRows()),
      schemaVersion: 1,
      changeNote: 'Next catalogue.',
      changeClass: 'improvement',
      consequence: 'service',
    });
    const { practiceId } = writer;
    await fillEdition(tx, { practiceId, revisionId: key.revisionId, table: SLUG }, nextRows());
    return key;
  });
  await takeStep(writer, revisionId, { step: 'submit' });
  await takeStep(reviewer, revisionId, { step: 'issue' });
  expect([await found(gone), await found(kept)]).toEqual([false, true]);
  const at = `/api/v1/sections/${SLUG}/${gone.replaceAll(' ', '')}`;
  expect((await ask('GET', at, { cookie })).status).toBe(404);
  const old = await ask('GET', `${at}?edition=1`, { cookie });
  expect([old.status, old.json.source.status]).toEqual([200, 'superseded']);
});
