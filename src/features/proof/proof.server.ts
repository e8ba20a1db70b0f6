import { aliasedTable, and, desc, eq, inArray, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { proofRun } from '@/db/schema/review';
import { withPractice } from '@/db/tenancy';
import type { ProofReport } from '@/engine/template/proof-run';
import { ENGINE_VERSION } from '@/engine/version';
import { requirePermission } from '@/features/account/permission';
import type { RevisionKey } from '@/features/review/draft';
import { unfinishedOf } from '@/features/review/draft';
import { isProven } from '@/features/review/proof-run.server';
import { type Actor, type RevisionRow, requireRevision } from '@/features/review/rows.server';
import { AppError, notFound } from '@/lib/app-error';
import { type Sending, send } from '@/services/queue';
import { type ProofView, toReportView } from './proof';

const asker = aliasedTable(person, 'asker');

type ProofRow = typeof proofRun.$inferSelect & { readonly asker: string };

const select = (tx: Tx, where: SQL | undefined): Promise<ProofRow[]> =>
  tx
    .select({ run: proofRun, asker: asker.name })
    .from(proofRun)
    .innerJoin(asker, eq(asker.id, proofRun.askedById))
    .where(where)
    .orderBy(desc(proofRun.createdAt))
    .limit(1)
    .then((rows) => rows.map(({ run, asker: name }) => ({ ...run, asker: name })));

/** A seed's proof is by the proof cases alone; a whole one has swept the parameter box. */
const isWhole = sql`(${proofRun.state} <> 'finished' or jsonb_exists(${proofRun.report}, 'sweep'))`;

const ofRevision = ({ practiceId, id }: RevisionRow): SQL | undefined =>
  and(eq(proofRun.practiceId, practiceId), eq(proofRun.revisionId, id));

const asItStands = (row: RevisionRow): SQL | undefined =>
  and(ofRevision(row), eq(proofRun.sha256, row.sha256), eq(proofRun.engineVersion, ENGINE_VERSION));

/** Asks for the proof of a template's revision as it stands. One that is under way or done is answered as it is. */
export function askProof(actor: Actor, key: RevisionKey): Promise<ProofView> {
  requirePermission(actor, 'library.prove');
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, actor.practiceId, key);
    if (!isProven(row.of.kind))
      throw new AppError('conflict', 'Only templates are proven: nothing else computes a beam.');
    if (unfinishedOf(row.body))
      throw new AppError(
        'conflict',
        `Revision ${row.number} has faults still. Put them right before it is proven.`,
      );
    return toProofView((await currentProof(tx, row)) ?? (await beginProof(tx, row, actor.personId)), row);
  });
}

/** The proof of a revision as it stands by the engine of today, whole, under way or done; of two at once, one is begun. */
export async function currentProof(tx: Tx, row: RevisionRow): Promise<ProofRow | undefined> {
  await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${row.id}, 0))`);
  const live = inArray(proofRun.state, ['queued', 'running', 'finished']);
  const [found] = await select(tx, and(asItStands(row), live, isWhole));
  return found;
}

export async function beginProof(
  tx: Tx,
  { practiceId, id: revisionId, sha256 }: RevisionRow,
  askedById: string,
  how: Sending = {},
): Promise<ProofRow> {
  const runId = crypto.randomUUID();
  await tx
    .insert(proofRun)
    .values({ practiceId, id: runId, revisionId, sha256, engineVersion: ENGINE_VERSION, askedById });
  await send(tx, 'run-proof', { practiceId, runId }, how);
  const [begun] = await select(tx, and(eq(proofRun.practiceId, practiceId), eq(proofRun.id, runId)));
  if (!begun) throw new Error(`Proof run ${runId} was not kept`);
  return begun;
}

/** The newest proof of a revision: as it stands, else of what it was. */
export function readProof(actor: Actor, key: RevisionKey): Promise<ProofView> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, actor.practiceId, key);
    const found = await newestProof(tx, row);
    if (!found) throw notFound('A proof of this revision');
    return toProofView(found, row);
  });
}

export async function newestProof(tx: Tx, row: RevisionRow): Promise<ProofRow | undefined> {
  const whole = await select(tx, and(asItStands(row), isWhole));
  const found = whole.length > 0 ? whole : await select(tx, asItStands(row));
  const [newest] = found.length > 0 ? found : await select(tx, ofRevision(row));
  return newest;
}

/** What a finished run found; null of one by its proof cases alone. Only the worker writes it. */
export const reportOf = ({ state, report }: Pick<ProofRow, 'state' | 'report'>): ProofReport | null =>
  state === 'finished' && typeof report === 'object' && report !== null && 'sweep' in report
    ? (report as ProofReport)
    : null;

export function toProofView(run: ProofRow, row: Pick<RevisionRow, 'sha256'>): ProofView {
  const report = reportOf(run);
  return {
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
    passed: run.passed,
    report: report && toReportView(report),
  };
}
