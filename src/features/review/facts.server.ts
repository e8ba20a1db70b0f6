import { and, count, eq, inArray, isNull } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { proofRun, recall, revisionComment, revisionConfirmation } from '@/db/schema/review';
import { ENGINE_VERSION } from '@/engine/version';
import { namesOf } from './people.server';
import { isProven } from './proof-run.server';
import type { RevisionRow } from './rows.server';

/** What other tables say of revisions, each asked once for all of them. */
export async function factsOf(tx: Tx, practiceId: string, rows: readonly RevisionRow[]) {
  const ids = rows.map(({ id }) => id);
  const proofs = await newestProofs(tx, practiceId, ids);
  const comments = await openCommentsOf(tx, practiceId, ids);
  const confirmations = await confirmationsOf(tx, practiceId, ids);
  const recalls = await recallsOf(tx, practiceId, ids);
  const names = await namesOf(tx, [
    ...rows.flatMap(({ authorId, editorIds, reviewerId, withdrawnById }) => [
      authorId,
      ...editorIds,
      reviewerId,
      withdrawnById,
    ]),
    ...[...confirmations.values()].map(({ personId }) => personId),
  ]);
  const name = (id: string): string => names.get(id) ?? '';
  return ({ id, sha256, of }: RevisionRow) => {
    const confirmed = confirmations.get(id);
    return {
      name,
      proven: isProven(of.kind) ? (proofs.get(`${id} ${sha256}`) ?? null) : null,
      openComments: comments.get(id) ?? 0,
      recall: recalls.get(id) ?? null,
      confirmed: confirmed
        ? { by: name(confirmed.personId), at: confirmed.at.toISOString(), note: confirmed.note }
        : null,
    };
  };
}

/** Whether each content was proven by the engine of today, by "revision sha256". */
async function newestProofs(tx: Tx, practiceId: string, ids: readonly string[]) {
  if (ids.length === 0) return new Map<string, boolean>();
  const found = await tx
    .select({ id: proofRun.revisionId, sha256: proofRun.sha256, passed: proofRun.passed })
    .from(proofRun)
    .where(
      and(
        eq(proofRun.practiceId, practiceId),
        inArray(proofRun.revisionId, [...ids]),
        eq(proofRun.engineVersion, ENGINE_VERSION),
        eq(proofRun.state, 'finished'),
      ),
    )
    .orderBy(proofRun.createdAt);
  return new Map(found.map(({ id, sha256, passed }) => [`${id} ${sha256}`, passed ?? false]));
}

async function openCommentsOf(tx: Tx, practiceId: string, ids: readonly string[]) {
  if (ids.length === 0) return new Map<string, number>();
  const found = await tx
    .select({ id: revisionComment.revisionId, count: count() })
    .from(revisionComment)
    .where(
      and(
        eq(revisionComment.practiceId, practiceId),
        inArray(revisionComment.revisionId, [...ids]),
        isNull(revisionComment.parentId),
        isNull(revisionComment.resolvedAt),
      ),
    )
    .groupBy(revisionComment.revisionId);
  return new Map(found.map(({ id, count: open }) => [id, open]));
}

async function confirmationsOf(tx: Tx, practiceId: string, ids: readonly string[]) {
  if (ids.length === 0) return new Map<string, typeof revisionConfirmation.$inferSelect>();
  const found = await tx
    .select()
    .from(revisionConfirmation)
    .where(
      and(
        eq(revisionConfirmation.practiceId, practiceId),
        inArray(revisionConfirmation.revisionId, [...ids]),
      ),
    );
  return new Map(found.map((one) => [one.revisionId, one]));
}

async function recallsOf(tx: Tx, practiceId: string, ids: readonly string[]) {
  if (ids.length === 0) return new Map<string, string>();
  const found = await tx
    .select({ id: recall.id, revisionId: recall.revisionId })
    .from(recall)
    .where(and(eq(recall.practiceId, practiceId), inArray(recall.revisionId, [...ids])));
  return new Map(found.map(({ id, revisionId }) => [revisionId, id]));
}
