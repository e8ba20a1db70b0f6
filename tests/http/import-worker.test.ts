import Papa from 'papaparse';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { withPractice } from '@/db/tenancy';
import { editionBody, storedRowsHash } from '@/features/section/edition.server';
import { sectionTableMetaSchema } from '@/features/section/section';
import { signInAs } from '../support/app';
import { ABOUT, importer } from '../support/imports';
import { PRINTED_HEADINGS, plausibleSections } from '../support/plausible-sections';
import { foundPractice, type Member, owner, PASSWORD } from '../support/practice';
import { importBytes } from '../support/section-import';
import { startWorker, type Worker } from '../support/worker';

/** So many that the worker needs several chunks for them. */
const ROWS = 30_000;

let librarian: Member;
let desk: ReturnType<typeof importer>;
let worker: Worker | undefined;

beforeAll(async () => {
  [librarian] = await foundPractice(['librarian']);
  desk = importer(await signInAs(librarian.email, PASSWORD), librarian.practiceId);
});
afterAll(() => worker?.stop());

const until = (id: string, is: (view: { state: string; phase: string | null; done: number }) => boolean) =>
  vi.waitFor(
    async () => {
      const { json } = await desk.act('GET', id, '/progress', undefined);
      expect(is(json), JSON.stringify(json)).toBe(true);
      return json;
    },
    { timeout: 180_000, interval: 15 },
  );

const stored = async (revisionId: string): Promise<number> => {
  const [found] = await owner.sql`select count(*)::int as n from section where revision_id = ${revisionId}`;
  return found?.['n'];
};

describe('a worker that is killed', () => {
  test('loses no row of an import and writes none twice', async () => {
    const rows = [...plausibleSections(ROWS, 7)].map((row) =>
      PRINTED_HEADINGS.map((heading) => row[heading]),
    );
    const csv = Papa.unparse([[...PRINTED_HEADINGS], ...rows]);
    const { id } = (await desk.upload(csv)).json;
    worker = await startWorker({});
    const mapped = await desk.act('PUT', id, '/mapping', { about: ABOUT }, 1);
    const { version } = mapped.json;
    expect(mapped.json.state).toBe('checking');

    await until(id, ({ phase, done }) => phase === 'checking' && done > 0);
    await worker.kill();
    const checked = await desk.read(id);
    expect(checked).toMatchObject({ state: 'checking', version });
    expect(checked.done).toBeLessThan(ROWS);
    worker = await startWorker({});
    await until(id, ({ state }) => state === 'findings');
    expect(await desk.read(id)).toMatchObject({ rows: ROWS, report: { errors: 0, warnings: 0 } });

    const body = { change_note: 'First issue.', change_class: 'improvement', consequence: 'service' };
    expect((await desk.act('POST', id, '/commit', body, version)).status).toBe(202);
    await until(id, ({ phase, done }) => phase === 'writing' && done > 0);
    await worker.kill();
    const [half] = await owner.sql`select state, done, revision_id from section_import where id = ${id}`;
    expect(half?.['state']).toBe('committing');
    // Every line is a row here: as many are stored as the import says.
    expect(await stored(half?.['revision_id'])).toBe(half?.['done']);
    expect(half?.['done']).toBeLessThan(ROWS);
    worker = await startWorker({});
    await until(id, ({ state }) => state === 'committed');

    expect(await stored(half?.['revision_id'])).toBe(ROWS);
    const whole = importBytes(Buffer.from(csv)).rows;
    const hash = await withPractice(librarian, (tx) =>
      storedRowsHash(tx, librarian.practiceId, half?.['revision_id']),
    );
    const { table: _, supplier: __, ...about } = ABOUT;
    const meta = sectionTableMetaSchema.parse({
      ...about,
      slug: ABOUT.table,
      words: [],
      edition: '1',
      conventions: '',
      notes: [],
    });
    expect(hash).toEqual({ count: ROWS, sha256: editionBody(meta, whole).rows_sha256 });
    const [statistics] = await owner.sql`select reltuples::int as n from pg_class where relname = 'section'`;
    expect(statistics?.['n']).toBeGreaterThanOrEqual(ROWS);
  }, 400_000);
});
