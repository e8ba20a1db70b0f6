import { aliasedTable, and, desc, eq, inArray, ne, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { revision } from '@/db/schema/library';
import { member } from '@/db/schema/member';
import { impactMember, impactRun } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { ENGINE_VERSION } from '@/engine/version';
import { may, requirePermission } from '@/features/account/permission';
import type { RevisionKey } from '@/features/review/draft';
import { unfinishedOf } from '@/features/review/draft';
import { namesOf } from '@/features/review/people.server';
import {
  type Actor,
  type RevisionRow,
  requireRevision,
  selectRevisions,
} from '@/features/review/rows.server';
import { membersById } from '@/features/review/uses.server';
import { AppError, notFound } from '@/lib/app-error';
import { send } from '@/services/queue';
import type { ImpactItem, ImpactView, Outcome, Weighed } from './impact';

const asker = aliasedTable(person, 'asker');

type ImpactRow = typeof impactRun.$inferSelect & { readonly asker: string };

async function select(tx: Tx, where: SQL | undefined): Promise<ImpactRow | undefined> {
  const [found] = await tx
    .select({ run: impactRun, asker: asker.name })
    .from(impactRun)
    .innerJoin(asker, eq(asker.id, impactRun.askedById))
    .where(where)
    .orderBy(desc(impactRun.createdAt))
    .limit(1);
  return found && { ...found.run, asker: found.asker };
}

const ofRevision = ({ practiceId, id }: RevisionRow): SQL | undefined =>
  and(eq(impactRun.practiceId, practiceId), eq(impactRun.revisionId, id));

/** Asks what becomes of the members that pin the issued revision. One that is under way or done is answered as it is. */
export function askImpact(actor: Actor, key: RevisionKey, page: Page): Promise<Paged> {
  requirePermission(actor, 'library.prove');
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, actor.practiceId, key);
    const against = await issuedBeside(tx, row);
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${row.id}, 1))`);
    const asItStands = and(
      ofRevision(row),
      eq(impactRun.sha256, row.sha256),
      eq(impactRun.engineVersion, ENGINE_VERSION),
      eq(impactRun.againstId, against.id),
      inArray(impactRun.state, ['queued', 'running', 'finished']),
    );
    const run = (await select(tx, asItStands)) ?? (await begin(tx, row, against, actor.personId));
    return toPage(tx, actor, run, row, page);
  });
}

/** The issued revision that this one would take the place of. */
async function issuedBeside(tx: Tx, row: RevisionRow): Promise<RevisionRow> {
  if (row.state !== 'draft' && row.state !== 'in_review')
    throw new AppError(
      'conflict',
      'Only of a draft or a revision in review is it asked what it would change.',
    );
  if (unfinishedOf(row.body))
    throw new AppError(
      'conflict',
      `Revision ${row.number} has faults still. Put them right before it is weighed.`,
    );
  const [issued] = await selectRevisions(
    tx,
    row.practiceId,
    and(eq(revision.documentId, row.documentId), eq(revision.state, 'issued'), ne(revision.id, row.id)),
  );
  if (issued) return issued;
  throw new AppError(
    'conflict',
    'No revision of it is issued, so that no member uses it: there is nothing to weigh.',
  );
}

async function begin(tx: Tx, row: RevisionRow, against: RevisionRow, askedById: string): Promise<ImpactRow> {
  const { practiceId, id: revisionId, sha256 } = row;
  const runId = crypto.randomUUID();
  await tx.insert(impactRun).values({
    practiceId,
    id: runId,
    revisionId,
    sha256,
    againstId: against.id,
    engineVersion: ENGINE_VERSION,
    askedById,
  });
  await send(tx, 'run-impact', { practiceId, runId });
  const begun = await select(tx, and(eq(impactRun.practiceId, practiceId), eq(impactRun.id, runId)));
  if (!begun) throw new Error(`Impact run ${runId} was not kept`);
  return begun;
}

interface Page {
  readonly from: number;
  readonly limit: number;
  readonly outcome?: Outcome | undefined;
}

type Paged = Omit<ImpactView, 'next'> & { readonly next: number | null };

/** The newest impact of a revision, its members worst first. */
export function readImpact(actor: Actor, key: RevisionKey, page: Page): Promise<Paged> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, actor.practiceId, key);
    const run = await select(tx, ofRevision(row));
    if (!run) throw notFound('An impact of this revision');
    return toPage(tx, actor, run, row, page);
  });
}

/** What has no result any more is worse than anything that flips. */
const IS_WORST_FIRST = [
  desc(sql`${impactMember.largestChange} = 'Infinity'`),
  desc(impactMember.flips),
  desc(impactMember.largestChange),
  impactMember.memberId,
];

async function toPage(
  tx: Tx,
  actor: Actor,
  run: ImpactRow,
  row: RevisionRow,
  { from, limit, outcome }: Page,
): Promise<Paged> {
  const { practiceId } = actor;
  const ofRun = and(eq(impactMember.practiceId, practiceId), eq(impactMember.runId, run.id));
  const counts = await countsOf(tx, ofRun);
  // The policy of members applies inside the subquery: who may not see the job sees none of its members.
  const isOpen = sql<boolean>`exists (select from ${member} where ${member.practiceId} = ${practiceId} and ${member.id} = ${impactMember.memberId})`;
  const listed = and(
    ofRun,
    may(actor, 'library.trace') ? undefined : isOpen,
    outcome === undefined ? undefined : sql`${impactMember.report} ->> 'outcome' = ${outcome}`,
  );
  const [shown] = await tx.select({ count: sql<number>`count(*)::int` }).from(impactMember).where(listed);
  const rows = await tx
    .select({ row: impactMember, isOpen })
    .from(impactMember)
    .where(listed)
    .orderBy(...IS_WORST_FIRST)
    .limit(limit)
    .offset(from);
  const [against] = await selectRevisions(tx, practiceId, eq(revision.id, run.againstId));
  const count = shown?.count ?? 0;
  const all = outcome === undefined ? counts.all : counts[outcome];
  const { all: _, ...named } = counts;
  return {
    ...toRun(run, row),
    against: against?.number ?? 0,
    counts: named,
    items: await toItems(tx, rows),
    next: from + limit < count ? from + limit : null,
    total: all,
    hidden: all - count,
  };
}

async function countsOf(tx: Tx, ofRun: SQL | undefined) {
  const of = (outcome: Outcome) =>
    sql<number>`count(*) filter (where ${impactMember.report} ->> 'outcome' = ${outcome})::int`;
  const [counts] = await tx
    .select({
      all: sql<number>`count(*)::int`,
      unchanged: of('unchanged'),
      changed: of('changed'),
      lost: of('lost'),
      unread: of('unread'),
      flipped: sql<number>`count(*) filter (where ${impactMember.flips} > 0)::int`,
    })
    .from(impactMember)
    .where(ofRun);
  return counts ?? { all: 0, unchanged: 0, changed: 0, lost: 0, unread: 0, flipped: 0 };
}

const toRun = (run: ImpactRow, row: RevisionRow) => ({
  id: run.id,
  state: run.state,
  done: run.done,
  total: run.total,
  current: run.sha256 === row.sha256 && run.engineVersion === ENGINE_VERSION,
  sha256: run.sha256,
  engine_version: run.engineVersion,
  error: run.error,
  asked_by: run.asker,
  created_at: run.createdAt.toISOString(),
  finished_at: run.finishedAt?.toISOString() ?? null,
});

type Listed = { readonly row: typeof impactMember.$inferSelect; readonly isOpen: boolean };

async function toItems(tx: Tx, rows: readonly Listed[]): Promise<ImpactItem[]> {
  const members = await membersById(
    tx,
    rows.map(({ row }) => row.memberId),
  );
  const byId = new Map(members.map((one) => [one.memberId, one]));
  const names = await namesOf(
    tx,
    members.map(({ ownerId }) => ownerId),
  );
  return rows.flatMap(({ row, isOpen }): ImpactItem[] => {
    const use = byId.get(row.memberId);
    if (!use) return [];
    const report = row.report as Weighed;
    return [
      {
        member: row.memberId,
        job: { number: use.job, name: use.jobName },
        mark: use.mark,
        status: use.status,
        owner: names.get(use.ownerId) ?? '',
        open: isOpen,
        outcome: report.outcome,
        message: report.message,
        flips: row.flips,
        largest_change: Number.isFinite(row.largestChange) ? row.largestChange : null,
        ...toChanges(report, isOpen),
        parameters: { gone: [...report.gone], taken: [...report.taken] },
      },
    ];
  });
}

/** Of a job that is not open to the reader only how much changes is said, nothing of its loads. */
function toChanges({ changes: { figures, checks, findings } }: Weighed, isOpen: boolean) {
  const shown = (value: number | null) => (isOpen ? value : null);
  return {
    figures: figures.map((one) => ({ ...one, from: shown(one.from), to: shown(one.to) })),
    checks: checks.map((one) => ({ ...one, from: shown(one.from), to: shown(one.to) })),
    findings: { come: [...findings.come], go: [...findings.go] },
  };
}
