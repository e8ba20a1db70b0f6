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
import type { DecidedView, RecallItem, RecallPlace, RecallView } from './recall';
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
  /** The same, as the list goes on after it. */
  readonly place: string;
  readonly closedBy: string | null;
  readonly closedAt: Date | null;
  readonly uses: number;
  readonly decided: number;
  /** The person's own that are not decided. */
  readonly mine: number;
}

const select = (
  tx: Tx,
  { practiceId, personId }: Actor,
  where: SQL | undefined,
  limit: number,
): Promise<RecallRow[]> =>
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
      // The driver's dates end at milliseconds; the place must not.
      place: sql<string>`${recall.openedAt}::text`,
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
    .limit(limit)
    .execute();

export async function findRecall(tx: Tx, actor: Actor, id: string): Promise<RecallRow> {
  const [found] = await select(tx, actor, eq(recall.id, id), 1);
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

interface ListPage {
  readonly after?: RecallPlace | undefined;
  readonly limit: number;
}

/** Recalls, the newest first. */
export function listRecalls(
  actor: Actor,
  { state, mine }: Narrowing,
  { after, limit }: ListPage,
): Promise<{ items: RecallItem[]; next: RecallPlace | null; total: number }> {
  requirePermission(actor, 'library.read');
  const matching = and(
    eq(recall.practiceId, actor.practiceId),
    state === 'open' ? isNull(recall.closedAt) : undefined,
    state === 'closed' ? isNotNull(recall.closedAt) : undefined,
    mine
      ? sql`${countUses(sql`recall_use.decision is null and recall_use.owner_id = ${actor.personId}`)} > 0`
      : undefined,
  );
  const onward =
    after && sql`(${recall.openedAt}, ${recall.id}) < (${after[0]}::timestamptz, ${after[1]}::uuid)`;
  return withPractice(actor, async (tx) => {
    const rows = await select(tx, actor, and(matching, onward), limit + 1);
    const shown = rows.slice(0, limit);
    const last = rows.length > limit ? shown.at(-1) : undefined;
    return {
      items: shown.map(toItem),
      next: last ? [last.place, last.id] : null,
      total: await tx.$count(recall, matching),
    };
  });
}

/** A part of the uses of a recall. */
export interface UsesPage {
  readonly from: number;
  readonly limit: number;
}

export type RecallRead = Omit<RecallView, 'next'> & { readonly next: number | null };

/** A recall with a part of the uses that the reader may know of: the reader's own, then by job and mark. */
export async function toRecallView(
  tx: Tx,
  actor: Actor,
  found: RecallRow,
  { from, limit }: UsesPage,
): Promise<RecallRead> {
  const uses = await usesOf(tx, actor, found);
  const page = uses.slice(from, from + limit);
  const derived = await derivedFrom(tx, actor.practiceId, found.revisionId);
  return {
    ...toItem(found),
    items: await toUseViews(tx, actor, found, page),
    next: from + limit < uses.length ? from + limit : null,
    hidden: found.uses - uses.length,
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
  const uses = await usesOf(tx, actor, found, eq(recallUse.memberId, memberId));
  const [use] = await toUseViews(tx, actor, found, uses);
  if (!use) throw notFound('This use of the recalled revision');
  return { recall: toItem(found), use };
}

type UseOf = Awaited<ReturnType<typeof membersById>>[number] & {
  readonly row: typeof recallUse.$inferSelect;
};

/** The uses that the reader may know of: the reader's own, then by job and mark. */
async function usesOf(tx: Tx, actor: Actor, found: RecallRow, where?: SQL): Promise<UseOf[]> {
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
  const rowOf = new Map(rows.map((row) => [row.memberId, row]));
  const uses = members.flatMap((use) => {
    const row = rowOf.get(use.memberId);
    return row ? [{ ...use, row }] : [];
  });
  const isOwn = ({ row }: UseOf) => row.ownerId === actor.personId;
  return [...uses.filter(isOwn), ...uses.filter((use) => !isOwn(use))];
}

async function toUseViews(
  tx: Tx,
  actor: Actor,
  { revisionId }: RecallRow,
  uses: readonly UseOf[],
): Promise<RecallView['items']> {
  const names = await namesOf(
    tx,
    uses.flatMap(({ row }) => [row.ownerId, row.decidedById]),
  );
  return uses.map(({ row, ...use }) => ({
    member: use.memberId,
    job: { number: use.job, name: use.jobName },
    mark: use.mark,
    status: MEMBER_STATUSES.find((one) => one === use.status) ?? 'draft',
    owner: names.get(row.ownerId) ?? '',
    mine: row.ownerId === actor.personId,
    pinned: use.pinned.includes(revisionId),
    decision: row.decision,
    note: row.note,
    decided_by: row.decidedById && (names.get(row.decidedById) ?? ''),
    decided_at: row.decidedAt?.toISOString() ?? null,
  }));
}
