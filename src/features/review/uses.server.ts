import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { member } from '@/db/schema/member';
import { recall } from '@/db/schema/review';
import { may } from '@/features/account/permission';
import type { Actor } from './rows.server';

/** A member that uses a revision, or did when it was recalled: where it is and whose, nothing of its loads. */
export interface Use {
  readonly memberId: string;
  readonly job: string;
  readonly jobName: string;
  readonly mark: string;
  readonly status: string;
  readonly ownerId: string;
}

interface UseRow extends Record<string, unknown> {
  member_id: string;
  job_number: string;
  job_name: string;
  mark: string;
  status: string;
  owner_id: string;
}

const toUse = (row: UseRow): Use => ({
  memberId: row.member_id,
  job: row.job_number,
  jobName: row.job_name,
  mark: row.mark,
  status: row.status,
  ownerId: row.owner_id,
});

/** Every member that pins a revision. As usesOfDocument. */
export async function usesOfRevision(tx: Tx, revisionId: string): Promise<Use[]> {
  const rows = await tx.execute<UseRow>(sql`select * from uses_of_revision(${revisionId})`);
  return rows.map(toUse);
}

/** Every member that pins a revision of a document, with the revision's number; jobs for named people included, so not to be shown to all. */
export async function usesOfDocument(
  tx: Tx,
  practiceId: string,
  documentId: string,
): Promise<(Use & { readonly revision: number })[]> {
  const rows = await tx.execute<UseRow & { number: number }>(
    sql`select used.*, revision.number from revision, lateral uses_of_revision(revision.id) as used
      where revision.practice_id = ${practiceId} and revision.document_id = ${documentId} and revision.state <> 'draft'
      order by used.job_number, used.mark, revision.number`,
  );
  return rows.map((row) => ({ ...toUse(row), revision: row.number }));
}

/** Members by their ids, with the revisions that they pin by now. As usesOfDocument. */
export async function membersById(
  tx: Tx,
  ids: readonly string[],
): Promise<(Use & { readonly pinned: readonly string[] })[]> {
  if (ids.length === 0) return [];
  const rows = await tx.execute<UseRow & { pinned: string[] }>(
    sql`select * from members_by_id(${sql.param([...ids])}::uuid[])`,
  );
  return rows.map((row) => ({ ...toUse(row), pinned: row.pinned }));
}

/** Which of these members the person may know of: those in open jobs, or all for who answers for the library. */
export async function visibleTo(tx: Tx, actor: Actor, ids: readonly string[]): Promise<ReadonlySet<string>> {
  if (ids.length === 0 || may(actor, 'library.trace')) return new Set(ids);
  const found = await tx
    .select({ id: member.id })
    .from(member)
    .where(
      and(eq(member.practiceId, actor.practiceId), sql`${member.id} = any(${sql.param([...ids])}::uuid[])`),
    );
  return new Set(found.map(({ id }) => id));
}

export interface Relative {
  readonly documentId: string;
  readonly kind: (typeof document.$inferSelect)['kind'];
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
}

/** Documents that were made from a revision, and those made from them. */
export async function derivedFrom(tx: Tx, practiceId: string, revisionId: string): Promise<Relative[]> {
  const rows = await tx.execute<{ id: string }>(sql`
    with recursive derived as (
      select id from document where practice_id = ${practiceId} and derived_from_id = ${revisionId}
      union
      select child.id from derived
        join revision on revision.practice_id = ${practiceId} and revision.document_id = derived.id
        join document child on child.practice_id = ${practiceId} and child.derived_from_id = revision.id)
    select id from derived`);
  if (rows.length === 0) return [];
  return tx
    .select({
      documentId: document.id,
      kind: document.kind,
      slug: document.slug,
      reference: document.reference,
      name: document.name,
    })
    .from(document)
    .where(
      and(
        eq(document.practiceId, practiceId),
        inArray(
          document.id,
          rows.map(({ id }) => id),
        ),
      ),
    )
    .orderBy(document.reference);
}

/** A withdrawn revision that a document goes back to, the nearest; null where there is none. */
export async function withdrawnAncestor(tx: Tx, practiceId: string, documentId: string) {
  const [nearest] = await tx.execute<{ id: string }>(sql`
    with recursive line as (
      select derived_from_id as id, 1 as step from document where practice_id = ${practiceId} and id = ${documentId}
      union
      select parent.derived_from_id, line.step + 1 from line
        join revision on revision.practice_id = ${practiceId} and revision.id = line.id
        join document parent on parent.practice_id = ${practiceId} and parent.id = revision.document_id
        where line.step < ${MOST_STEPS})
    select revision.id from line join revision on revision.practice_id = ${practiceId} and revision.id = line.id
      where revision.state = 'withdrawn' order by line.step limit 1`);
  return nearest ? relativeRevision(tx, practiceId, nearest.id) : null;
}

const MOST_STEPS = 20;

/** A revision of another document, as it is shown beside one: its parent, or the ancestor that was withdrawn. */
export async function relativeRevision(tx: Tx, practiceId: string, revisionId: string) {
  const [found] = await tx
    .select({
      kind: document.kind,
      slug: document.slug,
      reference: document.reference,
      name: document.name,
      revision: revision.number,
      state: revision.state,
      reason: revision.withdrawalReason,
      recall: recall.id,
    })
    .from(revision)
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .leftJoin(recall, and(eq(recall.practiceId, revision.practiceId), eq(recall.revisionId, revision.id)))
    .where(and(eq(revision.practiceId, practiceId), eq(revision.id, revisionId)));
  return found ?? null;
}
