import { and, desc, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { watch } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import type { DocumentView } from './document';
import { unfinishedOf } from './draft';
import { factsOf } from './facts.server';
import { stepsFor } from './review';
import {
  type Actor,
  type DocumentKey,
  type DocumentRow,
  type RevisionRow,
  requireDocument,
  selectRevisions,
} from './rows.server';
import { dayOf, reviewStanding } from './standing';
import { derivedFrom, relativeRevision, usesOfDocument, withdrawnAncestor } from './uses.server';

/** A document of any kind with every revision, what may be done with each, and what hangs on it. */
export function readDocument(actor: Actor, key: DocumentKey): Promise<DocumentView> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) =>
    toDocumentView(tx, actor, await requireDocument(tx, actor.practiceId, key)),
  );
}

export async function toDocumentView(tx: Tx, actor: Actor, of: DocumentRow): Promise<DocumentView> {
  const { practiceId } = actor;
  const rows = await selectRevisions(tx, practiceId, eq(revision.documentId, of.id), [desc(revision.number)]);
  const uses = await usesOfDocument(tx, practiceId, of.id);
  const parent = of.derivedFromId ? await relativeRevision(tx, practiceId, of.derivedFromId) : null;
  const ancestor = await withdrawnAncestor(tx, practiceId, of.id);
  return {
    ...namedOf(of),
    review_by: of.reviewBy,
    grace_days: of.graceDays,
    review: reviewStanding(of.reviewBy, of.graceDays, dayOf(new Date())),
    watching: await isWatching(tx, actor, of.id),
    uses: new Set(uses.map(({ memberId }) => memberId)).size,
    derived_from: parent && { ...namedOf(parent), revision: parent.revision, state: parent.state },
    withdrawn_ancestor: ancestor && {
      ...namedOf(ancestor),
      revision: ancestor.revision,
      reason: ancestor.reason ?? '',
      recall: ancestor.recall,
    },
    derived: await derivedOf(tx, practiceId, rows),
    revisions: await entriesOf(tx, actor, rows),
  };
}

export const namedOf = ({
  kind,
  slug,
  reference,
  name,
}: Pick<DocumentRow, 'kind' | 'slug' | 'reference' | 'name'>) => ({ kind, slug, reference, name });

async function derivedOf(tx: Tx, practiceId: string, rows: readonly RevisionRow[]) {
  const found = new Map<string, DocumentView['derived'][number]>();
  for (const { id } of rows)
    for (const one of await derivedFrom(tx, practiceId, id)) found.set(one.documentId, namedOf(one));
  return [...found.values()];
}

async function entriesOf(tx: Tx, actor: Actor, rows: readonly RevisionRow[]) {
  const facts = await factsOf(tx, actor.practiceId, rows);
  return rows.map((row): DocumentView['revisions'][number] => {
    const own = facts(row);
    return {
      number: row.number,
      state: row.state,
      unfinished: unfinishedOf(row.body) !== null,
      abandoned: row.abandonedAt !== null,
      author: own.name(row.authorId),
      editors: row.editorIds.map(own.name),
      reviewer: row.reviewerId && own.name(row.reviewerId),
      created_at: row.createdAt.toISOString(),
      submitted_at: row.submittedAt?.toISOString() ?? null,
      issued_at: row.issuedAt?.toISOString() ?? null,
      superseded_at: row.supersededAt?.toISOString() ?? null,
      withdrawn_at: row.withdrawnAt?.toISOString() ?? null,
      change_note: row.changeNote,
      change_class: row.changeClass,
      consequence: row.consequence,
      withdrawal: withdrawalOf(row, own.name),
      sha256: row.sha256,
      engine_version: row.engineVersion,
      proven: own.proven,
      confirmed: own.confirmed,
      open_comments: own.openComments,
      recall: own.recall,
      steps: [...stepsFor(actor, row)],
    };
  });
}

function withdrawalOf(row: RevisionRow, name: (id: string) => string) {
  const { withdrawalReason: reason, withdrawalSeverity: severity, withdrawnById } = row;
  return reason && severity && withdrawnById ? { reason, severity, by: name(withdrawnById) } : null;
}

async function isWatching(tx: Tx, { practiceId, personId }: Actor, documentId: string): Promise<boolean> {
  const [found] = await tx
    .select({ since: watch.since })
    .from(watch)
    .where(
      and(eq(watch.practiceId, practiceId), eq(watch.documentId, documentId), eq(watch.personId, personId)),
    );
  return found !== undefined;
}
