import { and, desc, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { proofRun } from '@/db/schema/review';
import type { Tenant } from '@/db/tenancy';
import { ENGINE_VERSION } from '@/engine/version';
import { AppError, notFound } from '@/lib/app-error';
import type { DocumentKind } from './review';

/** Only what computes can be proven: templates. */
export const isProven = (kind: DocumentKind): boolean => kind === 'template';

interface Proven {
  readonly revisionId: string;
  readonly sha256: string;
}

/** The newest finished proof of a revision as it stands, by the engine of today; an older content's proof is none. */
async function proofOf(tx: Tx, practiceId: string, { revisionId, sha256 }: Proven) {
  const [found] = await tx
    .select({ id: proofRun.id, passed: proofRun.passed, finishedAt: proofRun.finishedAt })
    .from(proofRun)
    .where(
      and(
        eq(proofRun.practiceId, practiceId),
        eq(proofRun.revisionId, revisionId),
        eq(proofRun.sha256, sha256),
        eq(proofRun.engineVersion, ENGINE_VERSION),
        eq(proofRun.state, 'finished'),
      ),
    )
    .orderBy(desc(proofRun.createdAt))
    .limit(1);
  return found;
}

/** Refuses (409) to issue what has not been proven as it stands. */
export async function requireProof(tx: Tx, practiceId: string, proven: Proven): Promise<void> {
  const proof = await proofOf(tx, practiceId, proven);
  if (proof?.passed) return;
  throw new AppError(
    'conflict',
    proof
      ? 'The proof of this revision failed. Return it to its author with what the proof found.'
      : 'This revision has not been proven as it stands, by the engine of today. Run its proof first.',
  );
}

/** Keeps the outcome of a proof that was run at once, of the revision as it stands. */
export async function recordProof(
  tx: Tx,
  actor: Tenant & { readonly personId: string },
  revisionId: string,
  { passed, report }: { readonly passed: boolean; readonly report: unknown },
): Promise<void> {
  const { practiceId, personId } = actor;
  const [found] = await tx
    .select({ sha256: revision.sha256 })
    .from(revision)
    .where(and(eq(revision.practiceId, practiceId), eq(revision.id, revisionId)));
  if (!found) throw notFound('This revision');
  await tx.insert(proofRun).values({
    practiceId,
    revisionId,
    sha256: found.sha256,
    engineVersion: ENGINE_VERSION,
    state: 'finished',
    done: 1,
    total: 1,
    passed,
    report,
    askedById: personId,
    finishedAt: new Date(),
  });
}
