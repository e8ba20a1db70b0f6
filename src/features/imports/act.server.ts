import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { importAcceptance, importMapping, sectionImport } from '@/db/schema/import';
import { document } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { requireOnlyDraft } from '@/features/review/begin.server';
import { keepUnfinished } from '@/features/review/draft';
import { isReferenceTaken } from '@/features/review/reference.server';
import { createDraft } from '@/features/review/review.server';
import { type Actor, findDocument } from '@/features/review/rows.server';
import { answer, applyFix, mayAccept, openQuestions } from '@/features/section/import';
import type { Finding, Mapping } from '@/features/section/import/contract';
import { AppError, type Fault, invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { publish } from '@/services/events';
import { send } from '@/services/queue';
import { dropDraft } from './draft.server';
import {
  About,
  type Accept,
  type Commit,
  type Fixes,
  type FixRecord,
  type ImportLine,
  type ImportProgress,
  type ImportView,
  type SaveMapping,
  type TableChoice,
} from './imports';
import { firstRowLine } from './report';
import {
  acceptancesOf,
  findImport,
  holdVersion,
  type ImportRow,
  linesOf,
  ofImport,
  openIn,
  requireState,
  toView,
} from './rows.server';
import { headingsHash, recogniseAs } from './upload.server';

export function readImport(actor: Actor, id: string): Promise<ImportView> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, (tx) => toView(tx, actor, id));
}

/** How far the worker is, without the rest. */
export function readProgress(actor: Actor, id: string): Promise<ImportProgress> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const { state, phase, done, total, version } = await findImport(tx, actor.practiceId, id);
    return { id, state, phase, done, total, version };
  });
}

/** The section tables that a file could be the next edition of, and a reference that is free for a new one. */
export function listTables(actor: Actor): Promise<{ tables: TableChoice[]; reference: string }> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const tables = await tx
      .select({ slug: document.slug, name: document.name, reference: document.reference })
      .from(document)
      .where(and(eq(document.practiceId, actor.practiceId), eq(document.kind, 'section-table')))
      .orderBy(document.reference);
    const taken = tables.map(({ reference }) => Number(/^ST-(\d+)$/.exec(reference)?.[1] ?? 0));
    return { tables, reference: `ST-${String(Math.max(0, ...taken) + 1).padStart(2, '0')}` };
  });
}

/** The newest first. */
export function listImports(
  actor: Actor,
  { from, limit }: { readonly from: number; readonly limit: number },
): Promise<{ items: ImportLine[]; next: number | null; total: number }> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const items = await linesOf(tx, actor.practiceId, from, limit);
    const total = await tx.$count(sectionImport, eq(sectionImport.practiceId, actor.practiceId));
    return { items, total, next: from + limit < total ? from + limit : null };
  });
}

/** Acts on an import as it was read (412 where it is another version by now), and answers with what it is then. */
function act(
  actor: Actor,
  id: string,
  version: number,
  work: (tx: Tx, row: ImportRow) => Promise<void>,
): Promise<ImportView> {
  requirePermission(actor, 'library.import');
  return withPractice(actor, async (tx) => {
    await work(tx, await holdVersion(tx, actor, id, version));
    return toView(tx, actor, id);
  });
}

type Change = Partial<typeof sectionImport.$inferInsert>;

const change = (tx: Tx, row: ImportRow, set: Change) =>
  tx
    .update(sectionImport)
    .set({ ...set, changedAt: sql`now()` })
    .where(ofImport(row.practiceId, row.id));

const record = (tx: Tx, actor: Actor, row: ImportRow, action: string, after?: unknown) =>
  recordAudit(tx, actor, { action: `import.${action}`, subjectKind: 'import', subjectId: row.id, after });

/**
 * Keeps what the librarian says of the table and of its columns, and begins the check where that is wanted and nothing
 * is left to be said. What was put right in cells stays.
 */
export const saveMapping = (actor: Actor, id: string, version: number, said: SaveMapping) =>
  act(actor, id, version, async (tx, row) => {
    requireState(row);
    const { answers, about = row.about } = said;
    // Headings may read otherwise in another encoding, and with them everything that follows from them.
    const encoding = answers.findLast((one) => one.kind === 'encoding');
    const reread = encoding ? await recogniseAs(row, encoding.value) : null;
    // It can still be answered otherwise.
    const asked = row.recognised.questions.filter(({ kind }) => kind === 'encoding');
    const mapping = answers.reduce(answer, reread?.mapping ?? row.mapping);
    const next = { about, mapping, version: row.version + 1 };
    await change(tx, row, {
      ...(reread && {
        recognition: { ...reread, questions: [...asked, ...reread.questions], remembered: null },
      }),
      ...next,
      state: 'mapping',
      facts: null,
      report: null,
      error: null,
    });
    await record(tx, actor, row, 'map', { about, mapping });
    const mapped = { ...row, ...next };
    if (said.check && (await unsaid(tx, mapped)).length === 0) await startCheck(tx, actor, mapped);
  });

/** Of a table that is not there yet: whether its reference is free. */
async function tableFaults(tx: Tx, practiceId: string, { table, reference }: About): Promise<Fault[]> {
  const known = await findDocument(tx, practiceId, { kind: 'section-table', slug: table });
  if (known || !(await isReferenceTaken(tx, practiceId, reference, NOBODY))) return [];
  const message = `The reference ${reference} belongs to another document. Choose another.`;
  return [{ pointer: '/reference', code: 'duplicate', message }];
}

const NOBODY = { id: '00000000-0000-0000-0000-000000000000' };

/** Asks for the dry run. */
export const askCheck = (actor: Actor, id: string, version: number) =>
  act(actor, id, version, async (tx, row) => {
    requireState(row);
    const faults = await unsaid(tx, row);
    if (faults.length > 0) throw invalid(faults);
    await startCheck(tx, actor, row);
  });

async function startCheck(tx: Tx, actor: Actor, row: ImportRow): Promise<void> {
  await beginCheck(tx, row, {});
  await record(tx, actor, row, 'check', { version: row.version });
}

/** What has to be said before the file can be checked. */
async function unsaid(tx: Tx, row: ImportRow): Promise<Fault[]> {
  const questions = openQuestions(row.mapping).map((kind) => ({
    pointer: `/mapping/${kind}`,
    code: 'required',
    message: QUESTIONS[kind],
  }));
  const reading = read(About, row.about);
  const about = reading.ok ? await tableFaults(tx, row.practiceId, reading.value) : reading.faults;
  return [...questions, ...about.map((fault) => ({ ...fault, pointer: `/about${fault.pointer}` }))];
}

const QUESTIONS: Readonly<Record<ReturnType<typeof openQuestions>[number], string>> = {
  encoding: 'Say in which encoding the file is.',
  decimal_mark: 'Say whether decimals have a point or a comma.',
  axes: 'Say which letters the file gives the axes. They mean opposite things by region.',
  unit: 'Say in which unit each column is.',
  shape: 'Say which shape the sections have.',
  column: 'Say which column holds each property that a section needs.',
};

async function beginCheck(tx: Tx, row: ImportRow, set: Change): Promise<void> {
  await change(tx, row, {
    ...set,
    state: 'checking',
    phase: 'reading',
    done: 0,
    total: row.bytes,
    facts: null,
    error: null,
  });
  await send(tx, 'run-import', { practiceId: row.practiceId, runId: row.id });
  await publish(tx, row.practiceId, null, { type: 'progress', id: row.id });
}

/** Puts right what the report offers, or what was typed anew, and checks again. The file itself stays as it is. */
export const applyFixes = (
  actor: Actor & { readonly name: string },
  id: string,
  version: number,
  body: Fixes,
) =>
  act(actor, id, version, async (tx, row) => {
    requireState(row, ['findings']);
    const made = chosenFixes(row, body);
    const before = { mapping: row.mapping, edits: row.edits };
    const after = made.reduce(applyFix, before);
    if (JSON.stringify(after) === JSON.stringify(before))
      throw new AppError('conflict', 'That was put right already. Look at what is left.');
    const at = new Date().toISOString();
    const records: FixRecord[] = made.map((one) => ({ ...one, by: actor.name, at }));
    await beginCheck(tx, row, {
      ...after,
      fixes: [...row.fixes, ...records],
      version: row.version + 1,
    });
    await record(tx, actor, row, 'fix', { fixes: made.map(({ label, edit }) => ({ label, edit })) });
  });

type Chosen = Pick<FixRecord, 'label' | 'findings' | 'edit'>;

function chosenFixes(row: ImportRow, { apply, cells, leave_out }: Fixes): Chosen[] {
  const findings = findingsOf(row);
  const offered = apply.map(({ finding, fix }, index): Chosen => {
    const found = findings.get(finding);
    const chosen = found?.fixes[fix];
    if (!found || !chosen)
      throw invalid([
        {
          pointer: `/apply/${index}`,
          code: 'not_found',
          message: 'The report does not offer this. Read it again.',
        },
      ]);
    return { label: chosen.label, findings: [found], edit: chosen.edit };
  });
  const all = [...findings.values()];
  const typed = cells.map(
    ({ line, column, value }): Chosen => ({
      label: `Line ${line}, “${row.mapping.columns[column]?.heading ?? ''}”: ${value}`,
      findings: all.filter((one) => one.line === line && one.column === column),
      edit: { kind: 'set_cell', line, column, value },
    }),
  );
  requireRows(row.mapping, leave_out);
  const dropped = leave_out.map(
    (line): Chosen => ({
      label: `Leave out line ${line}`,
      findings: all.filter((one) => one.line === line),
      edit: { kind: 'drop_row', line },
    }),
  );
  return [...offered, ...typed, ...dropped];
}

function requireRows(mapping: Mapping, lines: readonly number[]): void {
  const at = lines.findIndex((line) => line < firstRowLine(mapping));
  if (at < 0) return;
  const message = `Line ${lines[at]} belongs to the headings. Put it right instead.`;
  throw invalid([{ pointer: `/leave_out/${at}`, code: 'not_allowed', message }]);
}

const findingsOf = ({ report }: ImportRow): Map<string, Finding> =>
  new Map(report?.groups.flatMap(({ findings }) => findings.map((one): [string, Finding] => [one.key, one])));

/** Takes warnings as they are, with the reason, by name. */
export const acceptFindings = (actor: Actor, id: string, version: number, { keys, reason }: Accept) =>
  act(actor, id, version, async (tx, row) => {
    requireState(row, ['findings']);
    const findings = findingsOf(row);
    for (const [index, key] of keys.entries()) {
      const group = row.report?.groups.find((one) => one.group === key);
      const known = group ? group.findings : [findings.get(key)].filter((one) => one !== undefined);
      const refuse = (code: string, message: string) =>
        invalid([{ pointer: `/keys/${index}`, code, message }]);
      if (known.length === 0) throw refuse('not_found', 'The report has no such finding. Read it again.');
      if (!known.every(mayAccept))
        throw refuse('not_allowed', 'An error is put right or its row left out; it cannot be accepted.');
    }
    const given = { practiceId: row.practiceId, importId: row.id, reason, personId: actor.personId };
    await tx
      .insert(importAcceptance)
      .values(keys.map((key) => ({ ...given, key })))
      .onConflictDoNothing();
    await change(tx, row, {});
    await record(tx, actor, row, 'accept', { keys, reason });
  });

/** Ends an import. What it wrote into a draft goes; the file and the record of it stay. */
export const cancelImport = (actor: Actor, id: string, version: number) =>
  act(actor, id, version, async (tx, row) => {
    requireState(row, ['mapping', 'checking', 'findings', 'failed', 'committing']);
    await dropDraft(tx, row);
    await change(tx, row, { state: 'cancelled', phase: null, finishedAt: new Date() });
    await record(tx, actor, row, 'cancel');
    await publish(tx, row.practiceId, null, { type: 'progress', id: row.id });
  });

/** Has the checked rows written into a draft edition. */
export const askCommit = (actor: Actor, id: string, version: number, body: Commit) =>
  act(actor, id, version, async (tx, row) => {
    requireState(row, ['findings']);
    await requireAnswered(tx, row);
    const about = About.parse(row.about);
    const { practiceId } = actor;
    const known = await findDocument(tx, practiceId, { kind: 'section-table', slug: about.table });
    const made = await createDraft(tx, actor, {
      kind: 'section-table',
      slug: about.table,
      reference: known?.reference ?? about.reference,
      name: known?.name ?? about.name,
      body: keepUnfinished({ import: row.id }),
      schemaVersion: 1,
      changeNote: body.change_note,
      changeClass: body.change_class,
      consequence: body.consequence,
    });
    await requireOnlyDraft(tx, practiceId, made);
    await change(tx, row, {
      state: 'committing',
      phase: 'writing',
      done: 0,
      total: row.facts?.lineCount ?? 0,
      revisionId: made.revisionId,
    });
    await rememberMapping(tx, actor, row, about);
    await send(tx, 'run-import', { practiceId, runId: row.id });
    await record(tx, actor, row, 'commit', { revision: made.revisionId, number: made.number });
  });

async function requireAnswered(tx: Tx, row: ImportRow): Promise<void> {
  const { report } = row;
  if (!report || report.version !== row.version)
    throw new AppError('conflict', 'It was changed after it was checked. Check it again first.');
  const open = openIn(report, await acceptancesOf(tx, row));
  if (open > 0)
    throw new AppError(
      'conflict',
      `${open === 1 ? 'One finding is' : `${open} findings are`} open. Put each right, leave its row out, or accept a warning with a reason.`,
    );
  if ((row.facts?.rowCount ?? 0) === 0)
    throw new AppError('conflict', 'No row is left that could become a section. Look at what was left out.');
}

async function rememberMapping(tx: Tx, actor: Actor, row: ImportRow, about: About): Promise<void> {
  const { mapping } = row;
  const kept = { mapping, about, personId: actor.personId };
  await tx
    .insert(importMapping)
    .values({
      ...kept,
      practiceId: row.practiceId,
      supplier: about.supplier.toLowerCase(),
      headings: headingsHash(row.recognised.mapping),
    })
    .onConflictDoUpdate({
      target: [importMapping.practiceId, importMapping.supplier, importMapping.headings],
      set: { ...kept, usedAt: sql`now()` },
    });
}
