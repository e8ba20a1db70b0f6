import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { job } from '@/db/schema/job';
import { member } from '@/db/schema/member';
import { recall, recallUse } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { recordAudit } from '@/features/audit/audit.server';
import { openJob } from '@/features/job/job.server';
import { tell } from '@/features/notice/notice.server';
import { AppError, invalid, notFound } from '@/lib/app-error';
import { paths } from '@/paths';
import { type Decide, type DecidedView, WITHOUT_USE } from './recall';
import {
  findRecall,
  type RecallRead,
  type RecallRow,
  toDecidedView,
  toRecallView,
  type UsesPage,
} from './recall-view.server';
import type { Consequence } from './review';
import { type Actor, nameOfRevision, type RevisionRow } from './rows.server';
import { membersById } from './uses.server';

/** What comes with the answer to a step. */
const FIRST_USES: UsesPage = { from: 0, limit: 50 };

interface Withdrawal {
  readonly reason: string;
  readonly severity: Consequence;
}

/**
 * Opens the case on a revision that was withdrawn just now: every member that pins it, each with its owner, who is
 * told. Null where nothing pins it. The revision's row is locked by its withdrawal, and whoever places it locks it
 * too: no use is missed.
 */
export async function openRecall(
  tx: Tx,
  actor: Actor,
  row: RevisionRow,
  withdrawal: Withdrawal,
): Promise<string | null> {
  const { practiceId, personId } = actor;
  const id = crypto.randomUUID();
  const [any] = await tx.execute(sql`select 1 from uses_of_revision(${row.id}) limit 1`);
  if (!any) return null;
  await tx.insert(recall).values({ practiceId, id, revisionId: row.id, openedById: personId });
  const uses = await tx.execute<{ owner: string; uses: number }>(sql`
    with listed as (
      insert into recall_use (practice_id, recall_id, member_id, owner_id)
      select ${practiceId}::uuid, ${id}::uuid, member_id, owner_id from uses_of_revision(${row.id})
      returning owner_id)
    select owner_id as owner, count(*)::int as uses from listed group by owner_id`);
  await tellOwners(tx, actor, row, { ...withdrawal, id, owners: uses });
  await recordAudit(tx, actor, {
    action: 'recall.open',
    subjectKind: 'recall',
    subjectId: id,
    after: { revision: row.id, uses: uses.reduce((sum, each) => sum + each.uses, 0) },
  });
  return id;
}

/** Each owner once, however many members: the list is on the recall's page. */
async function tellOwners(
  tx: Tx,
  actor: Actor,
  row: RevisionRow,
  given: Withdrawal & { id: string; owners: readonly { owner: string; uses: number }[] },
): Promise<void> {
  const telling = {
    kind: 'recall' as const,
    title: `${nameOfRevision(row)} is recalled`,
    href: paths.recall(given.id),
    dedupe: `recall ${given.id}`,
  };
  for (const { owner, uses } of given.owners)
    await tell(tx, actor, {
      ...telling,
      people: [owner],
      detail: `${given.reason} ${uses === 1 ? 'One member of yours uses it' : `${uses} members of yours use it`}: decide what becomes of ${uses === 1 ? 'it' : 'each'}.`,
      mailData: {
        reference: row.of.reference,
        facts: [
          { label: 'Document', value: row.of.name },
          { label: 'Reason', value: given.reason },
          { label: 'Severity', value: given.severity },
          { label: 'Your members', value: String(uses) },
        ],
      },
    });
}

export function readRecall(actor: Actor, id: string, page: UsesPage): Promise<RecallRead> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => toRecallView(tx, actor, await findRecall(tx, actor, id), page));
}

/** Records what becomes of one use, by name. It may be decided anew until the recall is closed. */
export function decideUse(actor: Actor, id: string, memberId: string, given: Decide): Promise<DecidedView> {
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const found = await lockRecall(tx, actor, id);
    const [use] = await tx
      .select({ decision: recallUse.decision, note: recallUse.note, job: job.number })
      .from(recallUse)
      .innerJoin(member, and(eq(member.practiceId, recallUse.practiceId), eq(member.id, recallUse.memberId)))
      .innerJoin(job, and(eq(job.practiceId, member.practiceId), eq(job.id, member.jobId)))
      .where(isUse(practiceId, id, memberId));
    if (!use) throw notFound('This use of the recalled revision');
    await openJob(tx, actor, use.job, 'recall.decide');
    await refuseUntrue(tx, found, memberId, given);
    await writeDecision(tx, actor, { recallId: id, memberId, was: use }, given);
    return toDecidedView(tx, actor, id, memberId);
  });
}

const isUse = (practiceId: string, recallId: string, memberId: string) =>
  and(
    eq(recallUse.practiceId, practiceId),
    eq(recallUse.recallId, recallId),
    eq(recallUse.memberId, memberId),
  );

async function refuseUntrue(
  tx: Tx,
  { revisionId, number }: RecallRow,
  memberId: string,
  { decision }: Decide,
): Promise<void> {
  if (!WITHOUT_USE.includes(decision)) return;
  const [use] = await membersById(tx, [memberId]);
  if (!use?.pinned.includes(revisionId)) return;
  throw invalid([
    {
      pointer: '/decision',
      code: 'still_used',
      message: `${use.mark} still uses revision ${number}. Upgrade it or choose another document first, then record the decision.`,
    },
  ]);
}

interface Deciding {
  readonly recallId: string;
  readonly memberId: string;
  readonly was: { readonly decision: string | null; readonly note: string };
}

async function writeDecision(
  tx: Tx,
  actor: Actor,
  { recallId, memberId, was }: Deciding,
  { decision, note }: Decide,
): Promise<void> {
  await tx
    .update(recallUse)
    .set({ decision, note, decidedById: actor.personId, decidedAt: sql`now()` })
    .where(isUse(actor.practiceId, recallId, memberId));
  await recordAudit(tx, actor, {
    action: 'recall.decide',
    subjectKind: 'recall',
    subjectId: recallId,
    before: { member: memberId, decision: was.decision, note: was.note },
    after: { member: memberId, decision, note },
  });
}

/** A member that was saved without the recalled revision has been upgraded: that is its owner's decision. */
export async function decideByUpgrade(tx: Tx, actor: Actor, memberId: string): Promise<void> {
  const open = await tx
    .select({ id: recall.id, revisionId: recall.revisionId })
    .from(recallUse)
    .innerJoin(recall, and(eq(recall.practiceId, recallUse.practiceId), eq(recall.id, recallUse.recallId)))
    .where(
      and(
        eq(recallUse.practiceId, actor.practiceId),
        eq(recallUse.memberId, memberId),
        isNull(recallUse.decision),
        isNull(recall.closedAt),
      ),
    );
  if (open.length === 0) return;
  const [now] = await membersById(tx, [memberId]);
  for (const { id, revisionId } of open)
    if (!now?.pinned.includes(revisionId))
      await writeDecision(
        tx,
        actor,
        { recallId: id, memberId, was: { decision: null, note: '' } },
        { decision: 'upgraded', note: '' },
      );
}

/** Closes a recall when every use has a decision. */
export function closeRecall(actor: Actor, id: string): Promise<RecallRead> {
  requirePermission(actor, 'recall.close');
  const { practiceId, personId } = actor;
  return withPractice(actor, async (tx) => {
    await lockRecall(tx, actor, id);
    const undecided = await tx.$count(
      recallUse,
      and(eq(recallUse.practiceId, practiceId), eq(recallUse.recallId, id), isNull(recallUse.decision)),
    );
    if (undecided > 0)
      throw new AppError(
        'conflict',
        `${undecided === 1 ? 'One use has' : `${undecided} uses have`} no decision yet. A recall closes when each has one.`,
      );
    await tx
      .update(recall)
      .set({ closedById: personId, closedAt: sql`now()` })
      .where(and(eq(recall.practiceId, practiceId), eq(recall.id, id)));
    const view = await toRecallView(tx, actor, await findRecall(tx, actor, id), FIRST_USES);
    await recordAudit(tx, actor, {
      action: 'recall.close',
      subjectKind: 'recall',
      subjectId: id,
      after: { uses: view.uses },
    });
    return view;
  });
}

/** The recall, locked until the transaction ends, so that none closes while a decision is written; 409 when closed. */
async function lockRecall(tx: Tx, actor: Actor, id: string): Promise<RecallRow> {
  await tx
    .select({ id: recall.id })
    .from(recall)
    .where(and(eq(recall.practiceId, actor.practiceId), eq(recall.id, id)))
    .for('update');
  const found = await findRecall(tx, actor, id);
  if (found.closedAt) throw new AppError('conflict', 'This recall is closed. Its decisions stand.');
  return found;
}
