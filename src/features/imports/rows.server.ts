import { and, asc, desc, eq, inArray, ne, type SQL } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { importAcceptance, sectionImport } from '@/db/schema/import';
import { document, revision } from '@/db/schema/library';
import { may, requirePermission } from '@/features/account/permission';
import type { Actor } from '@/features/review/rows.server';
import { openCount, openQuestions } from '@/features/section/import';
import type { Acceptance, Edit, FileFacts, Mapping } from '@/features/section/import/contract';
import { AppError, notFound, stale } from '@/lib/app-error';
import { guessesOf } from './guesses';
import type { CheckedReport, FixRecord, ImportLine, ImportView, Recognised } from './imports';
import { type ImportState, OPEN, UNDER_WAY } from './state';

/** An import's row with the documents in it as what they are. */
export interface ImportRow extends Stored {
  readonly recognised: Recognised;
  readonly about: ImportView['about'];
  readonly mapping: Mapping;
  readonly edits: readonly Edit[];
  readonly fixes: readonly FixRecord[];
  readonly facts: FileFacts | null;
  readonly report: CheckedReport | null;
}
type Raw = typeof sectionImport.$inferSelect;
type Stored = Omit<Raw, 'recognition' | 'about' | 'mapping' | 'edits' | 'fixes' | 'facts' | 'report'>;

/** Only this feature writes them, by the types that they are read with. */
const toRow = ({ recognition, about, mapping, edits, fixes, facts, report, ...row }: Raw): ImportRow => {
  const recognised = recognition as Recognised;
  return {
    ...row,
    recognised,
    about: (about ?? {}) as ImportView['about'],
    mapping: (mapping ?? recognised.mapping) as Mapping,
    edits: edits as readonly Edit[],
    fixes: fixes as readonly FixRecord[],
    facts: facts as FileFacts | null,
    report: report as CheckedReport | null,
  };
};

export const ofImport = (practiceId: string, id: string): SQL | undefined =>
  and(eq(sectionImport.practiceId, practiceId), eq(sectionImport.id, id));

export async function findImport(tx: Tx, practiceId: string, id: string): Promise<ImportRow> {
  const [found] = await tx.select().from(sectionImport).where(ofImport(practiceId, id));
  if (!found) throw notFound('This import');
  return toRow(found);
}

/** The same, held for this transaction; of two people who act at once one waits. */
async function holdImport(tx: Tx, practiceId: string, id: string): Promise<ImportRow> {
  const [found] = await tx.select().from(sectionImport).where(ofImport(practiceId, id)).for('update');
  if (!found) throw notFound('This import');
  return toRow(found);
}

/** The same as it was read, or 412 with what it is by now. */
export async function holdVersion(tx: Tx, actor: Actor, id: string, version: number): Promise<ImportRow> {
  const row = await holdImport(tx, actor.practiceId, id);
  if (row.version !== version) throw stale(await toView(tx, actor, id));
  return row;
}

/** The same for a worker: null where another one holds it. */
export async function holdFree(tx: Tx, practiceId: string, id: string): Promise<ImportRow | null> {
  const [found] = await tx
    .select()
    .from(sectionImport)
    .where(ofImport(practiceId, id))
    .for('update', { skipLocked: true });
  return found ? toRow(found) : null;
}

const STATE_WORDS: Readonly<Record<ImportState, string>> = {
  mapping: 'waiting for its columns',
  checking: 'being checked',
  findings: 'checked',
  committing: 'being written into an edition',
  committed: 'an edition by now',
  cancelled: 'cancelled',
  failed: 'broken off',
};

/** Refuses what cannot be done of an import as it stands now. */
export function requireState(row: ImportRow, states: readonly ImportState[] = OPEN): void {
  if (states.includes(row.state)) return;
  throw new AppError('illegal_step', `This import is ${STATE_WORDS[row.state]}. Read it again.`);
}

export async function acceptancesOf(tx: Tx, { practiceId, id }: Pick<ImportRow, 'practiceId' | 'id'>) {
  const found = await tx
    .select({
      key: importAcceptance.key,
      reason: importAcceptance.reason,
      by: person.name,
      at: importAcceptance.at,
    })
    .from(importAcceptance)
    .innerJoin(person, eq(person.id, importAcceptance.personId))
    .where(and(eq(importAcceptance.practiceId, practiceId), eq(importAcceptance.importId, id)))
    .orderBy(asc(importAcceptance.at), asc(importAcceptance.key));
  return found.map((one) => ({ ...one, at: one.at.toISOString() }));
}

const LINE = {
  id: sectionImport.id,
  state: sectionImport.state,
  fileName: sectionImport.fileName,
  bytes: sectionImport.bytes,
  sha256: sectionImport.sha256,
  about: sectionImport.about,
  createdAt: sectionImport.createdAt,
  changedAt: sectionImport.changedAt,
  by: person.name,
  number: revision.number,
  editionState: revision.state,
  documentName: document.name,
  documentReference: document.reference,
};

const selectLines = (tx: Tx, practiceId: string, where?: SQL) =>
  tx
    .select(LINE)
    .from(sectionImport)
    .innerJoin(person, eq(person.id, sectionImport.createdById))
    .leftJoin(
      revision,
      and(eq(revision.practiceId, sectionImport.practiceId), eq(revision.id, sectionImport.revisionId)),
    )
    .leftJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .where(and(eq(sectionImport.practiceId, practiceId), where));

type Line = Awaited<ReturnType<typeof selectLines>>[number];

function toLine(found: Line): ImportLine {
  const about = (found.about ?? {}) as ImportView['about'];
  const table = about.table && {
    slug: about.table,
    name: found.documentName ?? about.name ?? about.table,
    reference: found.documentReference ?? about.reference ?? '',
  };
  return {
    id: found.id,
    state: found.state,
    file: { name: found.fileName, bytes: found.bytes, sha256: found.sha256 },
    supplier: about.supplier ?? null,
    table: table || null,
    edition:
      found.number !== null && found.editionState !== null
        ? { number: found.number, state: found.editionState }
        : null,
    by: found.by,
    created_at: found.createdAt.toISOString(),
    changed_at: found.changedAt.toISOString(),
  };
}

/** The newest first. */
export async function linesOf(
  tx: Tx,
  practiceId: string,
  from: number,
  limit: number,
): Promise<ImportLine[]> {
  const found = await selectLines(tx, practiceId)
    .orderBy(desc(sectionImport.createdAt), desc(sectionImport.id))
    .limit(limit)
    .offset(from);
  return found.map(toLine);
}

export async function toView(tx: Tx, actor: Actor, id: string): Promise<ImportView> {
  requirePermission(actor, 'library.read');
  const { practiceId } = actor;
  const row = await findImport(tx, practiceId, id);
  const [line] = await selectLines(tx, practiceId, eq(sectionImport.id, id));
  if (!line) throw notFound('This import');
  const acceptances = await acceptancesOf(tx, row);
  const { recognised, report, sourceName, sourceSha256 } = row;
  const { questions, language, bom, thousandsMarks, preview, remembered } = recognised;
  return {
    ...toLine(line),
    version: row.version,
    source_document: sourceName && sourceSha256 ? { name: sourceName, sha256: sourceSha256 } : null,
    columns: recognised.columns.map(({ index, heading, samples }) => ({ index, heading, samples })),
    guesses: guessesOf(recognised),
    recognised: {
      questions,
      language,
      bom,
      thousands_marks: thousandsMarks,
      preview,
      delimiter: recognised.mapping.delimiter,
      remembered,
    },
    mapping: row.mapping,
    open_questions: openQuestions(row.mapping),
    about: row.about,
    phase: row.phase,
    done: row.done,
    total: row.total,
    rows: row.facts?.rowCount ?? null,
    report,
    unchecked: report !== null && report.version !== row.version,
    open: report && openIn(report, acceptances),
    acceptances,
    fixes: row.fixes.map(({ label, findings, by, at }) => ({ label, place: placeOf(findings), by, at })),
    error: row.error,
    twin: await twinOf(tx, row),
    may_act: may(actor, 'library.import'),
  };
}

/** Where what was put right stands: its line, or its column. */
function placeOf([found]: FixRecord['findings']): string {
  if (!found) return '';
  return found.line === null ? found.heading : `line ${found.line}`;
}

/** Errors, and warnings that nobody has answered for. */
export function openIn(report: CheckedReport, acceptances: readonly Acceptance[]): number {
  const { errors, warnings } = openCount(report, acceptances);
  return errors + warnings;
}

async function twinOf(tx: Tx, { practiceId, id, sha256 }: ImportRow): Promise<ImportView['twin']> {
  const [found] = await tx
    .select({ id: sectionImport.id, state: sectionImport.state, createdAt: sectionImport.createdAt })
    .from(sectionImport)
    .where(
      and(
        eq(sectionImport.practiceId, practiceId),
        eq(sectionImport.sha256, sha256),
        ne(sectionImport.id, id),
        ne(sectionImport.state, 'cancelled'),
      ),
    )
    .orderBy(desc(sectionImport.createdAt))
    .limit(1);
  return found ? { id: found.id, state: found.state, created_at: found.createdAt.toISOString() } : null;
}

/** The imports that a worker has in hand, or had when it was killed. */
export const underWay = (tx: Tx, practiceId: string) =>
  tx
    .select({ id: sectionImport.id })
    .from(sectionImport)
    .where(and(eq(sectionImport.practiceId, practiceId), inArray(sectionImport.state, [...UNDER_WAY])))
    .execute();
