import { and, asc, count, eq, isNull, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { membership } from '@/db/schema/account';
import { revisionComment } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { tell } from '@/features/notice/notice.server';
import { AppError, invalid, notFound } from '@/lib/app-error';
import { paths } from '@/paths';
import type { CommentView, NewComment } from './comment';
import type { RevisionKey } from './draft';
import { namesOf } from './people.server';
import { type Actor, nameOfRevision, type RevisionRow, requireRevision } from './rows.server';

type Row = typeof revisionComment.$inferSelect;

/** What was said of a revision, the oldest first, each with its replies. */
export function listComments(actor: Actor, key: RevisionKey): Promise<CommentView[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const { id } = await requireRevision(tx, actor.practiceId, key);
    return toViews(tx, actor, await commentsOf(tx, actor.practiceId, id));
  });
}

const commentsOf = (tx: Tx, practiceId: string, revisionId: string): Promise<Row[]> =>
  tx
    .select()
    .from(revisionComment)
    .where(and(eq(revisionComment.practiceId, practiceId), eq(revisionComment.revisionId, revisionId)))
    .orderBy(asc(revisionComment.createdAt), asc(revisionComment.id))
    .execute();

async function toViews(tx: Tx, actor: Actor, rows: readonly Row[]): Promise<CommentView[]> {
  const names = await namesOf(
    tx,
    rows.map(({ authorId }) => authorId),
  );
  const said = ({ id, body, authorId, createdAt }: Row) => ({
    id,
    body,
    author: names.get(authorId) ?? '',
    at: createdAt.toISOString(),
  });
  return rows
    .filter(({ parentId }) => parentId === null)
    .map((row) => ({
      ...said(row),
      pointer: row.pointer,
      resolved_at: row.resolvedAt?.toISOString() ?? null,
      mine: row.authorId === actor.personId,
      replies: rows.filter(({ parentId }) => parentId === row.id).map(said),
    }));
}

/** Says something of a part of a revision, or answers what was said. Its author and those in the thread are told. */
export function addComment(actor: Actor, key: RevisionKey, given: NewComment): Promise<CommentView[]> {
  requirePermission(actor, 'library.comment');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, practiceId, key);
    const before = await commentsOf(tx, practiceId, row.id);
    const parent = given.reply_to === undefined ? null : threadOf(before, given.reply_to);
    const id = await insertComment(tx, actor, row, {
      body: given.body,
      pointer: parent?.pointer ?? given.pointer ?? '',
      parentId: parent?.id ?? null,
    });
    const thread = before.filter((one) => parent && (one.id === parent.id || one.parentId === parent.id));
    await tell(tx, actor, {
      people: [row.authorId, ...row.editorIds, ...thread.map(({ authorId }) => authorId)].filter(
        (one) => one !== actor.personId,
      ),
      kind: 'commented',
      title: `Comment on ${nameOfRevision(row)}`,
      detail: given.body,
      href: paths.review(row.of.kind, row.of.slug, row.number),
      dedupe: `comment ${id}`,
      mailData: { reference: row.of.reference },
    });
    return toViews(tx, actor, await commentsOf(tx, practiceId, row.id));
  });
}

function threadOf(rows: readonly Row[], id: string): Row {
  const found = rows.find((row) => row.id === id && row.parentId === null);
  if (found) return found;
  const message = 'This comment is not of this revision. Read its comments again.';
  throw invalid([{ pointer: '/reply_to', code: 'unknown_comment', message }]);
}

interface Said {
  readonly body: string;
  readonly pointer: string;
  readonly parentId: string | null;
}

/** The comment alone, in the caller's transaction, which tells whom it concerns. */
export async function insertComment(tx: Tx, actor: Actor, row: RevisionRow, said: Said): Promise<string> {
  const { practiceId, personId } = actor;
  const id = crypto.randomUUID();
  await tx
    .insert(revisionComment)
    .values({ practiceId, id, revisionId: row.id, authorId: personId, ...said });
  await recordAudit(tx, actor, {
    action: 'revision.comment',
    subjectKind: 'revision',
    subjectId: row.id,
    after: { comment: id, ...said },
  });
  return id;
}

/** Closes a comment, or opens it again: whoever raised it, and nobody else. */
export function resolveComment(
  actor: Actor,
  key: RevisionKey,
  commentId: string,
  isResolved: boolean,
): Promise<CommentView[]> {
  requirePermission(actor, 'library.comment');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, practiceId, key);
    const found = (await commentsOf(tx, practiceId, row.id)).find(
      ({ id, parentId }) => id === commentId && parentId === null,
    );
    if (!found) throw notFound('This comment');
    if (found.authorId !== personId)
      throw new AppError('forbidden', 'A comment is resolved by whoever raised it.');
    if ((found.resolvedAt !== null) !== isResolved) {
      await tx
        .update(revisionComment)
        .set(
          isResolved
            ? { resolvedAt: sql`now()`, resolvedById: personId }
            : { resolvedAt: null, resolvedById: null },
        )
        .where(and(eq(revisionComment.practiceId, practiceId), eq(revisionComment.id, commentId)));
      await recordAudit(tx, actor, {
        action: isResolved ? 'revision.resolve' : 'revision.reopen',
        subjectKind: 'revision',
        subjectId: row.id,
        after: { comment: commentId },
      });
    }
    return toViews(tx, actor, await commentsOf(tx, practiceId, row.id));
  });
}

/** Comments that stand in the way of issue: raised by people who are still there, and not resolved. */
export async function openComments(tx: Tx, practiceId: string, revisionId: string): Promise<number> {
  const [found] = await tx
    .select({ count: count() })
    .from(revisionComment)
    .innerJoin(
      membership,
      and(
        eq(membership.practiceId, revisionComment.practiceId),
        eq(membership.personId, revisionComment.authorId),
        eq(membership.active, true),
      ),
    )
    .where(
      and(
        eq(revisionComment.practiceId, practiceId),
        eq(revisionComment.revisionId, revisionId),
        isNull(revisionComment.parentId),
        isNull(revisionComment.resolvedAt),
      ),
    );
  return found?.count ?? 0;
}
