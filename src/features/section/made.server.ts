import { and, eq, isNull } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { withPractice } from '@/db/tenancy';
import type { User } from '@/features/account/account';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { requireOnlyDraft } from '@/features/review/begin.server';
import { findRevision } from '@/features/review/library.server';
import { createDraft } from '@/features/review/review.server';
import { type Actor, requireRevisionById, selectRevisions } from '@/features/review/rows.server';
import { AppError, invalid } from '@/lib/app-error';
import { type ChosenSection, chooseSection } from './choose.server';
import { copyRows, fillEdition, sayEdition, storedRowsHash } from './edition.server';
import type { SectionRow, SectionTableMeta } from './section';

/** The one table of the sections that a practice makes itself; it lives as the tables of suppliers do. */
export const MADE = {
  slug: 'made-sections',
  reference: 'Made sections',
  name: 'Sections made here',
} as const;

/** The section of an issued table that a made one starts from; 422 at `beam` where there is none. */
export async function beamOf(user: User, designation: string): Promise<ChosenSection> {
  requirePermission(user, 'library.read');
  try {
    return await withPractice(user, (tx) => chooseSection(tx, user.practiceId, { designation }));
  } catch (error) {
    if (!(error instanceof AppError) || error.faults.length === 0) throw error;
    throw invalid(error.faults.map((fault) => ({ ...fault, pointer: '/beam' })));
  }
}

const metaOf = (day: string, notes: string[]): Omit<SectionTableMeta, 'edition'> => ({
  ...MADE,
  words: ['compound', 'own'],
  standard: 'Sections put together or measured in the practice',
  source: 'Computed from the outline, or values as supplied with their source; see the notes.',
  catalogue_date: day,
  conventions: 'Major is the axis across the web or the upright side, through the centroid.',
  licence: 'Of the practice.',
  notes,
  density_kg_m3: 7850,
  tube_standard: 'EN 10210',
});

/**
 * Adds a section to the draft of the next edition of the practice's own table, which is begun where none is open, and
 * answers with the number of the edition. Its note says where the section comes from: that is what its reviewer checks.
 */
export function addMadeSection(actor: Actor, row: SectionRow, source: string): Promise<number> {
  requirePermission(actor, 'library.import');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const open = (await openDraft(tx, practiceId)) ?? (await nextDraft(tx, actor));
    // One at a time: the draft says the rows of all.
    const isIt = and(eq(revision.practiceId, practiceId), eq(revision.id, open.id));
    await tx.select({ id: revision.id }).from(revision).where(isIt).for('update');
    await requireNewName(tx, practiceId, open.id, row);
    await fillEdition(tx, { practiceId, revisionId: open.id, table: MADE.slug }, [row]);
    await sayRows(tx, actor, open.id, `${row.printed}: ${source}`);
    return open.number;
  });
}

async function openDraft(tx: Tx, practiceId: string) {
  const [found] = await selectRevisions(
    tx,
    practiceId,
    and(
      eq(document.kind, 'section-table'),
      eq(document.slug, MADE.slug),
      eq(revision.state, 'draft'),
      isNull(revision.abandonedAt),
    ),
  );
  return found;
}

async function nextDraft(tx: Tx, actor: Actor): Promise<{ id: string; number: number }> {
  const issued = await findRevision(tx, actor.practiceId, { kind: 'section-table', slug: MADE.slug });
  const made = await createDraft(tx, actor, {
    kind: 'section-table',
    ...MADE,
    body: { ...metaOf(new Date().toISOString().slice(0, 10), notesOf(issued?.body)), rows: 0 },
    schemaVersion: 1,
    changeNote: '',
    changeClass: 'improvement',
    consequence: 'cosmetic',
  });
  await requireOnlyDraft(tx, actor.practiceId, made);
  if (issued) await copyRows(tx, actor.practiceId, issued.revisionId, made.revisionId);
  return { id: made.revisionId, number: made.number };
}

/** One a section: where each comes from. */
const notesOf = (body: unknown): string[] => (Object(body) as { notes?: string[] }).notes ?? [];

async function requireNewName(tx: Tx, practiceId: string, revisionId: string, { key, printed }: SectionRow) {
  const [taken] = await tx
    .select({ id: section.id })
    .from(section)
    .where(
      and(
        eq(section.practiceId, practiceId),
        eq(section.revisionId, revisionId),
        eq(section.designationKey, key),
      ),
    );
  if (!taken) return;
  const message = `The table has a section “${printed}” already. Give this one another name.`;
  throw invalid([{ pointer: '/designation', code: 'not_allowed', message }]);
}

/** The draft says what its rows are now, and what was added. */
async function sayRows(tx: Tx, actor: Actor, revisionId: string, added: string): Promise<void> {
  const { practiceId, personId } = actor;
  const draft = await requireRevisionById(tx, practiceId, revisionId);
  const { count, sha256: rowsHash } = await storedRowsHash(tx, practiceId, revisionId);
  const body = {
    ...Object(draft.body),
    edition: String(draft.number),
    notes: [...notesOf(draft.body), added],
    rows: count,
    rows_sha256: rowsHash,
  };
  const isEditor = personId === draft.authorId || draft.editorIds.includes(personId);
  const sha256 = await sayEdition(tx, draft, body, {
    editorIds: isEditor ? draft.editorIds : [...draft.editorIds, personId],
    changeNote: [draft.changeNote, `Added ${added}`].filter((line) => line !== '').join('\n'),
  });
  await recordAudit(tx, actor, {
    action: 'revision.save',
    subjectKind: 'revision',
    subjectId: revisionId,
    before: { sha256: draft.sha256 },
    after: { sha256, added },
  });
}
