/** The worker's part: the file is read once as a whole, then its rows are checked, and later written into an edition. */
import type { Readable } from 'node:stream';
import { setImmediate } from 'node:timers/promises';
import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { sectionImport } from '@/db/schema/import';
import { withoutPractice, withPractice } from '@/db/tenancy';
import { recordAudit } from '@/features/audit/audit.server';
import { asWorker, eachPractice, type Run, takeTurn } from '@/features/proof/run.server';
import { fillEdition } from '@/features/section/edition.server';
import { addFindings, emptyReport, RowCheck, reportOf, Survey } from '@/features/section/import';
import type { CheckBatch, CheckedRow, FileFacts, Finding, Refusal } from '@/features/section/import/contract';
import { publish } from '@/services/events';
import { type Attempt, type RunTask, send } from '@/services/queue';
import { requireStore } from '@/services/store';
import { dropDraft, finishDraft } from './draft.server';
import { compareRows, identityOf } from './identity.server';
import { About } from './imports';
import { findImport, holdFree, type ImportRow, ofImport, underWay } from './rows.server';
import { UNDER_WAY } from './state';

/** Rows that are checked or written, and kept, together: what a crash may lose. */
const BATCH = 2000;
/** Milliseconds between two words of progress. */
const SAY_EVERY = 700;

/** What a turn holds in memory: the file as far as it is read, and the check of its rows. */
interface Turn {
  readonly row: ImportRow;
  /** Holds a connection to the store until it is read to its end or destroyed. */
  readonly content: Readable;
  readonly pieces: AsyncIterator<Uint8Array>;
  readonly check: RowCheck;
  /** Rows that are kept. */
  done: number;
  /** The next batch, which is read while the one before is kept. */
  ahead: Promise<Batch>;
}

export async function runImport(task: RunTask, attempt: Attempt): Promise<void> {
  const worker = asWorker(task.practiceId);
  const held: { turn?: Turn | null } = {};
  const run: Run = {
    chunk: async () => {
      held.turn ??= await begin(task);
      return held.turn ? keepNext(task, held.turn) : 'over';
    },
    again: () => withPractice(worker, (tx) => send(tx, 'run-import', task)),
    fail: (error) => withPractice(worker, (tx) => fail(tx, task, error)),
  };
  try {
    await takeTurn(task, run, attempt);
  } finally {
    held.turn?.content.destroy();
  }
}

/** Keeps the batch that is read, while the one after it is read ahead. */
async function keepNext({ practiceId, runId }: RunTask, turn: Turn): Promise<'more' | 'over'> {
  const batch = await turn.ahead;
  const { row, done } = turn;
  if (!batch.isLast) turn.ahead = readAhead(turn, batch.rowsDone);
  const kept = await withPractice(asWorker(practiceId), async (tx) => {
    const now = await holdFree(tx, practiceId, runId);
    if (!now || now.state !== row.state || now.version !== row.version || now.done !== done) return false;
    if (now.state === 'checking') await keepFindings(tx, now, batch);
    else await keepRows(tx, now, batch);
    await publish(tx, practiceId, null, { type: 'progress', id: runId });
    return true;
  });
  if (kept && batch.isLast && row.state === 'committing') await refreshStatistics();
  turn.done = batch.rowsDone;
  return kept && !batch.isLast ? 'more' : 'over';
}

/** Null where there is nothing to do. What has to be known of the whole file is found first. */
async function begin({ practiceId, runId }: RunTask): Promise<Turn | null> {
  const worker = asWorker(practiceId);
  const read = () => withPractice(worker, (tx) => findImport(tx, practiceId, runId));
  let row = await read();
  if (row.state === 'checking' && row.facts === null) {
    if (!(await survey(row))) return null;
    row = await read();
  }
  if ((row.state !== 'checking' && row.state !== 'committing') || row.facts === null) return null;
  const isSettled = row.state === 'committing';
  const check = new RowCheck(row.mapping, row.edits, row.facts, { fromRow: row.done, isSettled });
  const content = await open(row);
  const pieces = content[Symbol.asyncIterator]();
  return { row, content, pieces, check, done: row.done, ahead: readAhead({ pieces, check }, row.done) };
}

async function open({ fileKey, id }: ImportRow): Promise<Readable> {
  const content = await requireStore().read(fileKey);
  if (!content) throw new Error(`The file of import ${id} is not in the store`);
  return content;
}

/** The first reading. False where somebody has changed or ended the import meanwhile, or the file is refused. */
async function survey(row: ImportRow): Promise<boolean> {
  const reading = new Survey(row.mapping, row.edits);
  const content: AsyncIterable<Uint8Array> = await open(row);
  let bytes = 0;
  let said = Date.now();
  for await (const piece of content) {
    const refusal = reading.push(piece);
    if (refusal) return refuse(row, refusal);
    bytes += piece.byteLength;
    await setImmediate(); // the worker has other things to do as well
    if (Date.now() - said < SAY_EVERY) continue;
    said = Date.now();
    if (!(await say(row, { done: bytes }))) return false;
  }
  const result = reading.finish();
  if (!result.ok) return refuse(row, result.refusal);
  return say(row, { phase: 'checking', done: 0, ...known(row, result.facts) });
}

const known = (row: ImportRow, facts: FileFacts) => ({
  total: facts.lineCount,
  facts,
  report: { ...reportOf(facts), version: row.version, against: null },
});

/** Keeps how far the first reading is, where the import is still the one that was begun. */
async function say(row: ImportRow, set: Partial<typeof sectionImport.$inferInsert>): Promise<boolean> {
  const { practiceId, id, version } = row;
  return withPractice(asWorker(practiceId), async (tx) => {
    const kept = await tx
      .update(sectionImport)
      .set(set)
      .where(
        and(
          ofImport(practiceId, id),
          eq(sectionImport.state, 'checking'),
          eq(sectionImport.version, version),
          isNull(sectionImport.facts),
        ),
      )
      .returning({ id: sectionImport.id });
    await publish(tx, practiceId, null, { type: 'progress', id });
    return kept.length > 0;
  });
}

async function refuse(row: ImportRow, { message }: Refusal): Promise<false> {
  await say(row, { state: 'failed', phase: null, error: message });
  return false;
}

interface Batch extends CheckBatch {
  readonly isLast: boolean;
}

type Reading = Pick<Turn, 'pieces' | 'check'>;

/** Whoever waits for the batch hears of a fault in it; nobody may, where the turn ends before. */
function readAhead(reading: Reading, from: number): Promise<Batch> {
  const batch = nextBatch(reading, from);
  batch.catch(() => undefined);
  return batch;
}

async function nextBatch({ pieces, check }: Reading, from: number): Promise<Batch> {
  const rows: CheckedRow[] = [];
  const findings: Finding[] = [];
  let rowsDone = from;
  for (;;) {
    const piece = await pieces.next();
    const batch = piece.done ? check.finish() : check.push(piece.value);
    rows.push(...batch.rows);
    findings.push(...batch.findings);
    rowsDone = Math.max(rowsDone, batch.rowsDone);
    if (piece.done || rowsDone - from >= BATCH)
      return { rows, findings, rowsDone, isLast: piece.done === true };
    await setImmediate();
  }
}

async function keepFindings(
  tx: Tx,
  row: ImportRow,
  { rows, findings, rowsDone, isLast }: Batch,
): Promise<void> {
  const against = await compareRows(tx, row, rows);
  const found = isLast ? [...findings, ...(await identityOf(tx, row, against))] : findings;
  const report = { ...addFindings(row.report ?? emptyReport(), found), version: row.version, against };
  await tx
    .update(sectionImport)
    .set({
      report,
      done: rowsDone,
      ...(isLast && { state: 'findings' as const, phase: null, changedAt: sql`now()` }),
    })
    .where(ofImport(row.practiceId, row.id));
}

async function keepRows(tx: Tx, row: ImportRow, { rows, rowsDone, isLast }: Batch): Promise<void> {
  const { practiceId, id, revisionId } = row;
  if (revisionId === null) throw new Error(`Import ${id} is written without a draft`);
  const { table } = About.parse(row.about);
  await fillEdition(
    tx,
    { practiceId, revisionId, table },
    rows.map((one) => one.row),
  );
  const sha256 = isLast ? await finishDraft(tx, { ...row, revisionId }) : null;
  await tx
    .update(sectionImport)
    .set({
      done: rowsDone,
      ...(isLast && {
        state: 'committed' as const,
        phase: null,
        changedAt: sql`now()`,
        finishedAt: sql`now()`,
      }),
    })
    .where(ofImport(practiceId, id));
  if (isLast)
    await recordAudit(tx, asWorker(practiceId), {
      action: 'import.committed',
      subjectKind: 'import',
      subjectId: id,
      after: { revision: revisionId, sha256 },
    });
}

/** Until the database has counted anew it plans searches for a table without these rows. */
const refreshStatistics = () => withoutPractice().execute(sql`select refresh_section_statistics()`);

async function fail(tx: Tx, { practiceId, runId }: RunTask, error: string): Promise<void> {
  const row = await holdFree(tx, practiceId, runId);
  if (!row || !UNDER_WAY.some((state) => state === row.state)) return;
  await dropDraft(tx, row);
  await tx
    .update(sectionImport)
    .set({ state: 'failed', phase: null, error, revisionId: null, changedAt: sql`now()` })
    .where(ofImport(practiceId, runId));
  await publish(tx, practiceId, null, { type: 'progress', id: runId });
}

/** Asks again for the imports that a worker which is gone left behind. */
export const resumeImports = (): Promise<void> =>
  eachPractice((practiceId) =>
    withPractice(asWorker(practiceId), async (tx) => {
      for (const { id } of await underWay(tx, practiceId))
        await send(tx, 'run-import', { practiceId, runId: id });
    }),
  );
