/** Revisions as members use them: what may be placed, and what a member is told of what it pins. */
import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { recall, recallUse, revisionConfirmation } from '@/db/schema/review';
import { invalid } from '@/lib/app-error';
import type { PinFacts } from './pin';
import { stateName } from './review';
import { dayOf, lastDay, reviewStanding } from './standing';
import { withdrawnAncestor } from './uses.server';

const ofDocument = and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId));

/**
 * Refuses (422 at `at`) a revision that no new member may use: not issued, withdrawn, or with its review and grace
 * over. The row is held until the transaction ends, so that no withdrawal misses the member that is being placed.
 */
export async function holdForUse(
  tx: Tx,
  practiceId: string,
  revisionId: string,
  at: string,
  { isNew = true }: { readonly isNew?: boolean } = {},
): Promise<void> {
  const refused = (code: string, message: string) => invalid([{ pointer: at, code, message }]);
  const [found] = await tx
    .select({
      state: revision.state,
      number: revision.number,
      reason: revision.withdrawalReason,
      reference: document.reference,
      reviewBy: document.reviewBy,
      graceDays: document.graceDays,
    })
    .from(revision)
    .innerJoin(document, ofDocument)
    .where(and(eq(revision.practiceId, practiceId), eq(revision.id, revisionId)))
    .for('share', { of: revision });
  if (!found) throw refused('unknown_revision', 'There is no such revision. Choose one that is issued.');
  const { reference, number, state, reviewBy, graceDays } = found;
  if (state === 'withdrawn')
    throw refused(
      'withdrawn',
      `${reference} revision ${number} was withdrawn: ${found.reason} Choose another document, or a newer revision.`,
    );
  if (state !== 'issued')
    throw refused(
      'not_issued',
      `${reference} revision ${number} is ${stateName(state)}. Only an issued revision can be used; read the library again.`,
    );
  if (isNew && reviewStanding(reviewBy, graceDays, dayOf(new Date())) === 'expired')
    throw refused(
      'review_expired',
      `${reference} was to be reviewed by ${reviewBy}, and since ${lastDay(reviewBy, graceDays)} no new member may use it. Ask a librarian to review it.`,
    );
}

/** What a member is told of each revision that it pins, by revision. */
export async function factsOfPins(
  tx: Tx,
  practiceId: string,
  memberId: string,
  revisionIds: readonly string[],
): Promise<ReadonlyMap<string, PinFacts>> {
  const rows = await tx
    .select({
      id: revision.id,
      documentId: revision.documentId,
      derivedFromId: document.derivedFromId,
      reviewBy: document.reviewBy,
      graceDays: document.graceDays,
      recallId: recall.id,
      closedAt: recall.closedAt,
      decision: recallUse.decision,
      isUse: recallUse.memberId,
      confirmedBy: revisionConfirmation.personId,
    })
    .from(revision)
    .innerJoin(document, ofDocument)
    .leftJoin(recall, and(eq(recall.practiceId, revision.practiceId), eq(recall.revisionId, revision.id)))
    .leftJoin(
      recallUse,
      and(
        eq(recallUse.practiceId, recall.practiceId),
        eq(recallUse.recallId, recall.id),
        eq(recallUse.memberId, memberId),
      ),
    )
    .leftJoin(
      revisionConfirmation,
      and(
        eq(revisionConfirmation.practiceId, revision.practiceId),
        eq(revisionConfirmation.revisionId, revision.id),
      ),
    )
    .where(and(eq(revision.practiceId, practiceId), inArray(revision.id, [...revisionIds])));
  const today = dayOf(new Date());
  const facts = new Map<string, PinFacts>();
  for (const row of rows) {
    const ancestor = row.derivedFromId ? await withdrawnAncestor(tx, practiceId, row.documentId) : null;
    facts.set(row.id, {
      recall:
        row.recallId && row.isUse
          ? { id: row.recallId, decided: row.decision !== null, closed: row.closedAt !== null }
          : null,
      review: reviewStanding(row.reviewBy, row.graceDays, today),
      review_by: row.reviewBy,
      withdrawn_ancestor: ancestor && {
        reference: ancestor.reference,
        revision: ancestor.revision,
        reason: ancestor.reason ?? '',
      },
      confirmed: row.confirmedBy !== null,
    });
  }
  return facts;
}

/** Which of these members have a use to decide in an open recall. */
export async function recalledMembers(
  tx: Tx,
  practiceId: string,
  memberIds: readonly string[],
): Promise<ReadonlySet<string>> {
  if (memberIds.length === 0) return new Set();
  const found = await tx
    .select({ id: recallUse.memberId })
    .from(recallUse)
    .innerJoin(recall, and(eq(recall.practiceId, recallUse.practiceId), eq(recall.id, recallUse.recallId)))
    .where(
      and(
        eq(recallUse.practiceId, practiceId),
        sql`${recallUse.memberId} = any(${sql.param([...memberIds])}::uuid[])`,
        isNull(recallUse.decision),
        isNull(recall.closedAt),
      ),
    );
  return new Set(found.map(({ id }) => id));
}
