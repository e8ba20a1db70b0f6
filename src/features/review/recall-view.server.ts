import { aliasedTable, and, desc, eq, isNotNull, isNull, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { document, revision } from '@/db/schema/library';
import { recall, recallUse } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { MEMBER_STATUSES } from '@/features/member/terms';
import { notFound } from '@/lib/app-error';
import { namesOf } from './people.server';
import type { DecidedView, RecallItem, RecallView } from './recall';
import type { Consequence, DocumentKind } from './review';
import type { Actor } from './rows.server';
import { derivedFrom, membersById, visibleTo } from './uses.server';

const opener = aliasedTable(person, 'opener');
const closer = aliasedTable(person, 'closer');

// By name: inside a statement of its own, drizzle writes a column without its table.
const countUses = (where: SQL) =>
  sql<number>`(select count(*)::int from recall_use where recall_use.practice_id = recall.practice_id and recall_use.recall_id = recall.id and ${where})`;

/** A recall with the revision that it is about and how far its uses are decided. */
export interface RecallRow {
  readonly id: string;
  readonly revisionId: string;
  readonly kind: DocumentKind;
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
  readonly number: number;
  readonly reason: string | null;
  readonly severity: Consequence | null;
  readonly openedBy: string;
  readonly openedAt: Date;
  readonly closedBy: string | null;
  readonly closedAt: Date | null;
  readonly uses: number;
  readonly decided: number;
  /** The person's own that are not decided. */
  readonly mine: number;
}

const select = (tx: Tx, { practiceId, personId }: Actor, where: SQL | undefined): Promise<RecallRow[]> =>
  tx
    .select({
      id: recall.id,
      revisionId: recall.revisionId,
      kind: document.kind,
      slug: document.slug,
      reference: document.reference,
      name: document.name,
      number: revision.number,
      reason: revision.withdrawalReason,
      severity: revision.withdrawalSeverity,
      openedBy: opener.name,
      openedAt: recall.openedAt,
      closedBy: closer.name,
      closedAt: recall.closedAt,
      uses: countUses(sql`true`),
      decided: countUses(sql`recall_use.decision is not null`),
      mine: countUses(sql`recall_use.decision is null and recall_use.owner_id = ${personId}`),
    })
    .from(recall)
    .innerJoin(revision, and(eq(revision.practiceId, recall.practiceId), eq(revision.id, recall.revisionId)))
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .innerJoin(opener, eq(opener.id, recall.openedById))
    .leftJoin(closer, eq(closer.id, recall.closedById))
    .where(and(eq(recall.practiceId, practiceId), where))
    .orderBy(desc(recall.openedAt), desc(recall.id))
    .execute();

export async function findRecall(tx: Tx, actor: Actor, id: string): Promise<RecallRow> {
  const [found] = await select(tx, actor, eq(recall.id, id));
  if (!found) throw notFound('This recall');
  return found;
}

const toItem = (row: RecallRow): RecallItem => ({
  id: row.id,
  kind: row.kind,
  slug: row.slug,
  reference: row.reference,
  name: row.name,
  revision: row.number,
  reason: row.reason ?? '',
  severity: row.severity ?? 'safety',
  opened_by: row.openedBy,
  opened_at: row.openedAt.toISOString(),
  closed_by: row.closedBy,
  closed_at: row.closedAt?.toISOString() ?? null,
  uses: row.uses,
  decided: row.decided,
  mine: row.mine,
});

interface Narrowing {
  readonly state: 'open' | 'closed' | 'all';
  readonly mine: boolean;
}

/** Recalls, the newest first. */
export function listRecalls(
  actor: Actor,
  { state, mine }: Narrowing,
  { from, limit }: { readonly from: number; readonly limit: number },
): Promise<{ items: RecallItem[]; next: number | null; total: number }> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const rows = await select(
      tx,
      actor,
      and(
        state === 'open' ? isNull(recall.closedAt) : undefined,
        state === 'closed' ? isNotNull(recall.closedAt) : undefined,
        mine
          ? sql`${countUses(sql`recall_use.decision is null and recall_use.owner_id = ${actor.personId}`)} > 0`
          : undefined,
      ),
    );
    const items = rows.slice(from, from + limit).map(toItem);
    const end = from + limit;
    return { items, next: end < rows.length ? end : null, total: rows.length };
  });
}

/** A recall with every use that the reader may know of. */
export async function toRecallView(tx: Tx, actor: Actor, found: RecallRow): Promise<RecallView> {
  const items = await usesOf(tx, actor, found);
  const derived = await derivedFrom(tx, actor.practiceId, found.revisionId);
  return {
    ...toItem(found),
    items,
    hidden: found.uses - items.length,
    derived: derived.map(({ documentId: _, ...rest }) => rest),
  };
}

/** One use as it is decided by now, with how far the recall has come. */
export async function toDecidedView(
  tx: Tx,
  actor: Actor,
  recallId: string,
  memberId: string,
): Promise<DecidedView> {
  const found = await findRecall(tx, actor, recallId);
  const [use] = await usesOf(tx, actor, found, eq(recallUse.memberId, memberId));
  if (!use) throw notFound('This use of the recalled revision');
  return { recall: toItem(found), use };
}

async function usesOf(tx: Tx, actor: Actor, found: RecallRow, where?: SQL): Promise<RecallView['items']> {
  const rows = await tx
    .select()
    .from(recallUse)
    .where(and(eq(recallUse.practiceId, actor.practiceId), eq(recallUse.recallId, found.id), where));
  const ids = rows.map(({ memberId }) => memberId);
  const visible = await visibleTo(tx, actor, ids);
  const members = await membersById(
    tx,
    ids.filter((id) => visible.has(id)),
  );
  const names = await namesOf(
    tx,
    rows.flatMap(({ ownerId, decidedById }) => [ownerId, decidedById]),
  );
  const decisions = new Map(rows.map((row) => [row.memberId, row]));
  return members.flatMap((use) => {
    const row = decisions.get(use.memberId);
    if (!row) return [];
    return [
      {
        member: use.memberId,
        job: { number: use.job, name: use.jobName },
        mark: use.mark,
        status: MEMBER_STATUSES.find((one) => one === use.status) ?? 'draft',
        owner: names.get(row.ownerId) ?? '',
        mine: row.ownerId === actor.personId,
        pinned: use.pinned.includes(found.revisionId),
        decision: row.decision,
        note: row.note,
        decided_by: row.decidedById && (names.get(row.decidedById) ?? ''),
        decided_at: row.decidedAt?.toISOString() ?? null,
      },
    ];
  });
}
