/** What waits for somebody: drafts, revisions in review, reviews that are due. */
import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership } from '@/db/schema/account';
import { document, revision } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import type { OpenRevision, ReviewDue } from './document';
import { namedOf } from './document.server';
import { unfinishedOf } from './draft';
import { factsOf } from './facts.server';
import { type DocumentKind, type RevisionState, stepsFor } from './review';
import { type Actor, selectRevisions } from './rows.server';
import { dayOf, lastDay, reviewStanding } from './standing';

interface Narrowing {
  readonly state?: 'draft' | 'in_review' | undefined;
  readonly kind?: DocumentKind | undefined;
}

/** Drafts that are gone on with and revisions in review, the longest waiting first. */
export function listOpenRevisions(actor: Actor, { state, kind }: Narrowing): Promise<OpenRevision[]> {
  requirePermission(actor, 'library.read');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const states: RevisionState[] = state ? [state] : ['draft', 'in_review'];
    const rows = await selectRevisions(
      tx,
      practiceId,
      and(
        inArray(revision.state, states),
        isNull(revision.abandonedAt),
        kind ? eq(document.kind, kind) : undefined,
      ),
      [sql`coalesce(${revision.submittedAt}, ${revision.createdAt})`, revision.id],
    );
    const librarians = await rolesOf(
      tx,
      practiceId,
      rows.map(({ authorId }) => authorId),
    );
    const facts = await factsOf(tx, practiceId, rows);
    return rows.map((row) => {
      const own = facts(row);
      return {
        ...namedOf(row.of),
        number: row.number,
        state: row.state,
        unfinished: unfinishedOf(row.body) !== null,
        author: own.name(row.authorId),
        mine: row.authorId === actor.personId || row.editorIds.includes(actor.personId),
        proposal: !librarians.has(row.authorId),
        created_at: row.createdAt.toISOString(),
        submitted_at: row.submittedAt?.toISOString() ?? null,
        change_note: row.changeNote,
        change_class: row.changeClass,
        consequence: row.consequence,
        proven: own.proven,
        open_comments: own.openComments,
        steps: [...stepsFor(actor, row)],
      };
    });
  });
}

/** Which of these people are librarians. */
async function rolesOf(tx: Tx, practiceId: string, ids: readonly string[]): Promise<ReadonlySet<string>> {
  if (ids.length === 0) return new Set();
  const found = await tx
    .select({ id: membership.personId, roles: membership.roles })
    .from(membership)
    .where(and(eq(membership.practiceId, practiceId), inArray(membership.personId, [...ids])));
  return new Set(found.filter(({ roles }) => roles.includes('librarian')).map(({ id }) => id));
}

/** Issued documents whose review is due by `day` (today unless said), the most overdue first. */
export function listReviewsDue(actor: Actor, day: string = dayOf(new Date())): Promise<ReviewDue[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, (tx) => reviewsDue(tx, actor.practiceId, day));
}

export async function reviewsDue(tx: Tx, practiceId: string, day: string): Promise<ReviewDue[]> {
  const rows = await tx
    .select()
    .from(document)
    .where(
      and(
        eq(document.practiceId, practiceId),
        sql`${document.reviewBy} < ${day}`,
        sql`exists (select from revision where revision.practice_id = document.practice_id and revision.document_id = document.id and revision.state = 'issued')`,
      ),
    )
    .orderBy(document.reviewBy, document.reference);
  return rows.flatMap((of) => {
    const last = lastDay(of.reviewBy, of.graceDays);
    if (of.reviewBy === null || last === null) return [];
    const review = reviewStanding(of.reviewBy, of.graceDays, day);
    return [{ ...namedOf(of), review_by: of.reviewBy, last_day: last, review }];
  });
}
