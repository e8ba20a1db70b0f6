/** The worker's part: every member that pins a revision, evaluated with another in its place, as its owner may. */
import { setImmediate } from 'node:timers/promises';
import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { impactMember, impactRun } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import { criteriaDocument } from '@/engine/check';
import { materialsOf } from '@/engine/section';
import { ENGINE_VERSION } from '@/engine/version';
import { combinationSetDocument } from '@/features/combination/combination';
import { referredSet } from '@/features/combination/combination.server';
import { materialSetDocument } from '@/features/material/material';
import { asWorker, eachPractice, takeTurn } from '@/features/proof/run.server';
import { type RevisionRow, requireRevisionById } from '@/features/review/rows.server';
import { type Use, usesOfRevision } from '@/features/review/uses.server';
import { templateOf } from '@/features/template/template.server';
import { publish } from '@/services/events';
import { type Attempt, type RunTask, send } from '@/services/queue';
import { EditionSections, Pinned, readMembers, storedFigures } from './members.server';
import { findFigures, type Ranked, type Replacement, unread, weigh } from './weigh';

/** Members of one owner that are read, weighed and kept together: what a crash may lose. */
const BATCH = 100;
const UNDER_WAY = ['queued', 'running'] as const;

/** Of an edition only the sections that members use are read. */
type Replacing =
  | Exclude<Replacement, { kind: 'section-table' }>
  | { readonly kind: 'section-table'; readonly sections: EditionSections };

/** What a turn holds in memory. */
interface Weighing {
  readonly replacement: Replacing;
  readonly pinned: Pinned;
  /** Members that are not weighed yet, an owner's together. */
  readonly left: Use[];
}

export function runImpact(task: RunTask, attempt: Attempt): Promise<void> {
  const { practiceId, runId } = task;
  const worker = asWorker(practiceId);
  let weighing: Weighing | null | undefined;
  return takeTurn(
    task,
    {
      chunk: async () => {
        weighing ??= await withPractice(worker, (tx) => begin(tx, practiceId, runId));
        if (!weighing) return 'over';
        const [first] = weighing.left;
        const mine = first ? weighing.left.findIndex(({ ownerId }) => ownerId !== first.ownerId) : 0;
        const batch = weighing.left.splice(0, Math.min(BATCH, mine < 0 ? BATCH : mine));
        const { replacement, pinned, left } = weighing;
        return withPractice({ practiceId, personId: first?.ownerId ?? null }, async (tx) => {
          if (!(await hold(tx, practiceId, runId))) return 'over';
          const known = await weighed(tx, practiceId, runId);
          const open = batch.filter(({ memberId }) => !known.has(memberId));
          const rows = await weighBatch(tx, { replacement, pinned, practiceId }, open);
          if (rows.length > 0)
            await tx.insert(impactMember).values(rows.map((row) => ({ practiceId, runId, ...row })));
          await keep(tx, practiceId, runId, left.length === 0);
          return left.length === 0 ? 'over' : 'more';
        });
      },
      again: () => withPractice(worker, (tx) => send(tx, 'run-impact', task)),
      fail: (error) => withPractice(worker, (tx) => end(tx, practiceId, runId, error)),
    },
    attempt,
  );
}

const ofRun = (practiceId: string, runId: string) =>
  and(eq(impactRun.practiceId, practiceId), eq(impactRun.id, runId));

/** The run, for this transaction alone; nothing where it is over or another worker is at it. */
async function hold(tx: Tx, practiceId: string, runId: string) {
  const [run] = await tx
    .select()
    .from(impactRun)
    .where(and(ofRun(practiceId, runId), inArray(impactRun.state, [...UNDER_WAY])))
    .for('update', { skipLocked: true });
  return run;
}

async function begin(tx: Tx, practiceId: string, runId: string): Promise<Weighing | null> {
  const run = await hold(tx, practiceId, runId);
  if (!run) return null;
  const row = await requireRevisionById(tx, practiceId, run.revisionId);
  if (row.sha256 !== run.sha256 || run.engineVersion !== ENGINE_VERSION) {
    await end(tx, practiceId, runId, OUTDATED);
    return null;
  }
  const uses = (await usesOfRevision(tx, run.againstId)).filter(({ status }) => status !== 'removed');
  const known = await weighed(tx, practiceId, runId);
  const left = uses
    .filter(({ memberId }) => !known.has(memberId))
    .sort((a, b) => a.ownerId.localeCompare(b.ownerId));
  await tx
    .update(impactRun)
    .set({ state: 'running', total: known.size + left.length })
    .where(ofRun(practiceId, runId));
  return { replacement: await replacementOf(tx, row), pinned: new Pinned(practiceId), left };
}

/** Members that are kept already: by the turn before, or by another worker between two chunks of this one. */
async function weighed(tx: Tx, practiceId: string, runId: string): Promise<ReadonlySet<string>> {
  const done = await tx
    .select({ id: impactMember.memberId })
    .from(impactMember)
    .where(and(eq(impactMember.practiceId, practiceId), eq(impactMember.runId, runId)));
  return new Set(done.map(({ id }) => id));
}

const OUTDATED = 'The revision or the engine was changed after the impact was asked for. Ask again.';

async function replacementOf(tx: Tx, row: RevisionRow): Promise<Replacing> {
  switch (row.of.kind) {
    case 'template':
      return { kind: 'template', template: templateOf(row) };
    case 'criteria':
      return criteriaReplacement(tx, row);
    case 'combination-set':
      return { kind: 'combination-set', set: combinationSetDocument.parse(row.body) };
    case 'material-set':
      return { kind: 'material-set', materials: materialsOf(materialSetDocument.parse(row.body)) };
    case 'section-table':
      return { kind: 'section-table', sections: new EditionSections(row.practiceId, row.id) };
  }
}

async function criteriaReplacement(tx: Tx, row: RevisionRow): Promise<Replacing> {
  const criteria = criteriaDocument.parse(row.body);
  const set =
    criteria.schema_version === 2 ? await referredSet(tx, row.practiceId, criteria.combinations) : undefined;
  return { kind: 'criteria', criteria, set: set?.document ?? null };
}

type Shared = Pick<Weighing, 'replacement' | 'pinned'> & { readonly practiceId: string };
type Kept = Pick<typeof impactMember.$inferInsert, 'memberId' | 'flips' | 'largestChange' | 'report'>;

async function weighBatch(
  tx: Tx,
  { replacement, pinned, practiceId }: Shared,
  batch: readonly Use[],
): Promise<Kept[]> {
  const rows = await readMembers(
    tx,
    practiceId,
    batch.map(({ memberId }) => memberId),
  );
  await pinned.load(tx, rows);
  if (replacement.kind === 'section-table') await replacement.sections.load(tx, pinned.sectionKeys(rows));
  const byId = new Map(rows.map((row) => [row.id, row]));
  const kept: Kept[] = [];
  for (const { memberId } of batch) {
    const row = byId.get(memberId);
    let found: Ranked = unread('Whoever changed it last can no longer open its job.');
    if (row) {
      const { inputs, held } = pinned.inputsOf(row);
      found = weigh(inputs, storedFigures(row) ?? findFigures(inputs), replacement, held);
    }
    kept.push({ memberId, ...found });
    await setImmediate(); // the worker has other things to do as well
  }
  return kept;
}

async function keep(tx: Tx, practiceId: string, runId: string, isOver: boolean): Promise<void> {
  await tx
    .update(impactRun)
    .set({
      done: sql`(select count(*) from ${impactMember} where ${impactMember.practiceId} = ${practiceId} and ${impactMember.runId} = ${runId})`,
      ...(isOver && { state: 'finished' as const, finishedAt: sql`now()` }),
    })
    .where(ofRun(practiceId, runId));
  await publish(tx, practiceId, null, { type: 'progress', id: runId });
}

async function end(tx: Tx, practiceId: string, runId: string, error: string): Promise<void> {
  await tx
    .update(impactRun)
    .set({ state: 'failed', error, finishedAt: sql`now()` })
    .where(ofRun(practiceId, runId));
  await publish(tx, practiceId, null, { type: 'progress', id: runId });
}

/** Asks again for the runs that a worker which is gone left behind. */
export const resumeImpacts = (): Promise<void> =>
  eachPractice((practiceId) =>
    withPractice(asWorker(practiceId), async (tx) => {
      const left = await tx
        .select({ id: impactRun.id })
        .from(impactRun)
        .where(and(eq(impactRun.practiceId, practiceId), inArray(impactRun.state, [...UNDER_WAY])));
      for (const { id } of left) await send(tx, 'run-impact', { practiceId, runId: id });
    }),
  );
