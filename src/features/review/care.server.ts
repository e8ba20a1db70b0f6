/** What is done to a document between its revisions: review dates, watching, confirmation. */
import { and, eq } from 'drizzle-orm';
import { document } from '@/db/schema/library';
import { revisionConfirmation, watch } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { AppError } from '@/lib/app-error';
import type { DocumentView, ReviewBy } from './document';
import { toDocumentView } from './document.server';
import type { RevisionKey } from './draft';
import {
  type Actor,
  type DocumentKey,
  nameOfRevision,
  requireDocument,
  requireRevision,
} from './rows.server';

/** Sets the day by which a document is to be looked at again, or takes it away. */
export function setReviewBy(actor: Actor, key: DocumentKey, given: ReviewBy): Promise<DocumentView> {
  requirePermission(actor, 'library.set-review');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const of = await requireDocument(tx, practiceId, key);
    await tx
      .update(document)
      .set({ reviewBy: given.review_by, graceDays: given.grace_days })
      .where(and(eq(document.practiceId, practiceId), eq(document.id, of.id)));
    const view = await toDocumentView(tx, actor, await requireDocument(tx, practiceId, key));
    await recordAudit(tx, actor, {
      action: 'document.set-review',
      subjectKind: 'document',
      subjectId: of.id,
      before: { review_by: of.reviewBy, grace_days: of.graceDays },
      after: given,
    });
    return view;
  });
}

/** From now on the person is told of every step of the document, or no longer. Their own choice, and no event. */
export function setWatching(actor: Actor, key: DocumentKey, isOn: boolean): Promise<void> {
  requirePermission(actor, 'library.read');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const { id: documentId } = await requireDocument(tx, practiceId, key);
    if (isOn) await tx.insert(watch).values({ practiceId, documentId, personId }).onConflictDoNothing();
    else
      await tx
        .delete(watch)
        .where(
          and(
            eq(watch.practiceId, practiceId),
            eq(watch.documentId, documentId),
            eq(watch.personId, personId),
          ),
        );
  });
}

/** Records that a librarian compared what a revision says with its printed source. Once: it names who did. */
export function confirmRevision(actor: Actor, key: RevisionKey, note: string): Promise<DocumentView> {
  requirePermission(actor, 'library.confirm');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, practiceId, key);
    if (row.state === 'draft' || row.state === 'in_review')
      throw new AppError(
        'illegal_step',
        `${nameOfRevision(row)} can change still. It is confirmed once it is issued.`,
      );
    const [made] = await tx
      .insert(revisionConfirmation)
      .values({ practiceId, revisionId: row.id, personId, note })
      .onConflictDoNothing()
      .returning({ at: revisionConfirmation.at });
    if (!made) throw new AppError('conflict', `${nameOfRevision(row)} is confirmed already.`);
    const view = await toDocumentView(tx, actor, row.of);
    await recordAudit(tx, actor, {
      action: 'revision.confirm',
      subjectKind: 'revision',
      subjectId: row.id,
      after: { note, sha256: row.sha256 },
    });
    return view;
  });
}
