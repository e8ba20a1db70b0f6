/** The worker's part: proving what was asked for, chunk by chunk. */
import { setImmediate } from 'node:timers/promises';
import { and, desc, eq, inArray, isNotNull, lt, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { proofRun } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import {
  beginProof as begin,
  type ProofProgress,
  type ProofSubject,
  proofReport,
  proveFurther,
} from '@/engine/template/proof-run';
import { ENGINE_VERSION } from '@/engine/version';
import { type RevisionRow, requireRevisionById, selectRevisions } from '@/features/review/rows.server';
import { templateOf } from '@/features/template/template.server';
import { publish } from '@/services/events';
import { type Attempt, type RunTask, send } from '@/services/queue';
import { beginProof, currentProof } from './proof.server';
import { asWorker, eachPractice, takeTurn } from './run.server';

/** Milliseconds of work that a crash may lose, and units of it between two looks at the clock. */
const CHUNK = 500;
const UNITS = 5;

const UNDER_WAY = ['queued', 'running'] as const;

export function runProof(task: RunTask, attempt: Attempt): Promise<void> {
  const { practiceId, runId } = task;
  const tenant = asWorker(practiceId);
  let subject: ProofSubject | undefined;
  const ofRun = and(eq(proofRun.practiceId, practiceId), eq(proofRun.id, runId));
  return takeTurn(
    task,
    {
      chunk: () =>
        withPractice(tenant, async (tx) => {
          const [run] = await tx
            .select()
            .from(proofRun)
            .where(and(ofRun, inArray(proofRun.state, [...UNDER_WAY])))
            .for('update', { skipLocked: true });
          if (!run) return 'over';
          const row = await requireRevisionById(tx, practiceId, run.revisionId);
          const isAsAsked = row.sha256 === run.sha256 && run.engineVersion === ENGINE_VERSION;
          subject ??= await subjectOf(tx, row);
          const progress = isAsAsked ? await work(subject, progressOf(run.report) ?? begin(subject)) : null;
          const kept = progress ? toColumns(subject, progress) : OUTDATED;
          await tx.update(proofRun).set(kept).where(ofRun);
          await publish(tx, practiceId, null, { type: 'progress', id: runId });
          return kept.state === 'running' ? 'more' : 'over';
        }),
      again: () => withPractice(tenant, (tx) => send(tx, 'run-proof', task)),
      fail: (error) =>
        withPractice(tenant, async (tx) => {
          await tx.update(proofRun).set({ state: 'failed', error, finishedAt: sql`now()` }).where(ofRun);
          await publish(tx, practiceId, null, { type: 'progress', id: runId });
        }),
    },
    attempt,
  );
}

/** The template, and the revision that it takes the place of: the issued one, else the newest that was issued before it. */
async function subjectOf(tx: Tx, row: RevisionRow): Promise<ProofSubject> {
  const { practiceId, documentId, number } = row;
  const issued = await selectRevisions(
    tx,
    practiceId,
    and(eq(revision.documentId, documentId), lt(revision.number, number), isNotNull(revision.issuedAt)),
    [desc(revision.number)],
  );
  const before = issued.find(({ state }) => state === 'issued') ?? issued[0];
  return { template: templateOf(row), issued: before ? templateOf(before) : null };
}

/** While a run is under way, its report holds how far it has come. */
function progressOf(report: unknown): ProofProgress | null {
  const kept = Object(report);
  return 'progress' in kept ? (kept.progress as ProofProgress) : null;
}

async function work(subject: ProofSubject, from: ProofProgress): Promise<ProofProgress> {
  const end = Date.now() + CHUNK;
  let progress = from;
  do {
    progress = proveFurther(subject, progress, UNITS);
    await setImmediate(); // the worker has other things to do as well
  } while (progress.done < progress.total && Date.now() < end);
  return progress;
}

function toColumns(subject: ProofSubject, progress: ProofProgress) {
  const { done, total } = progress;
  if (done < total) return { state: 'running' as const, done, total, report: { progress } };
  const report = proofReport(subject, progress);
  return {
    state: 'finished' as const,
    done,
    total,
    passed: report.passed,
    report,
    finishedAt: sql`now()`,
  };
}

const OUTDATED = {
  state: 'failed' as const,
  report: null,
  error: 'The revision or the engine was changed after the proof was asked for. Ask again.',
  finishedAt: sql`now()`,
};

/** Asks again for the runs that a worker which is gone left behind. */
export const resumeProofs = (): Promise<void> =>
  eachPractice((practiceId) =>
    withPractice(asWorker(practiceId), async (tx) => {
      const left = await tx
        .select({ id: proofRun.id })
        .from(proofRun)
        .where(and(eq(proofRun.practiceId, practiceId), inArray(proofRun.state, [...UNDER_WAY])));
      for (const { id } of left) await send(tx, 'run-proof', { practiceId, runId: id });
    }),
  );

/** What nobody waits for. */
const LOW = -1;

/** Has the engine of today prove what is issued and was not proven by it: what is shipped, and all after an upgrade. */
export const proveIssued = (): Promise<void> =>
  eachPractice((practiceId) =>
    withPractice(asWorker(practiceId), async (tx) => {
      const issued = await selectRevisions(
        tx,
        practiceId,
        and(
          eq(document.kind, 'template'),
          eq(revision.state, 'issued'),
          sql`not exists (select from ${proofRun} where ${proofRun.practiceId} = ${revision.practiceId}
            and ${proofRun.revisionId} = ${revision.id} and ${proofRun.sha256} = ${revision.sha256}
            and ${proofRun.engineVersion} = ${ENGINE_VERSION}
            and (${proofRun.state} <> 'finished' or jsonb_exists(${proofRun.report}, 'sweep')))`,
        ),
      );
      for (const row of issued)
        if (!(await currentProof(tx, row)))
          await beginProof(tx, row, row.reviewerId ?? row.authorId, { priority: LOW });
    }),
  );
