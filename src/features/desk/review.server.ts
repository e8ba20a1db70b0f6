import { readImpact } from '@/features/impact/impact.server';
import { readProof } from '@/features/proof/proof.server';
import { listComments } from '@/features/review/comment.server';
import { readDocument } from '@/features/review/document.server';
import type { RevisionKey } from '@/features/review/draft';
import { readDraft } from '@/features/review/draft.server';
import { isProven } from '@/features/review/proof-run.server';
import type { Actor } from '@/features/review/rows.server';
import { AppError, notFound } from '@/lib/app-error';
import { changesBetween } from './changes';

/** Members that the review lists at once. */
const IMPACT_PAGE = 100;

/** A revision as it is reviewed: itself, what it changes, its proof and what was said of it. */
export async function readReview(actor: Actor, key: RevisionKey, impactFrom: number) {
  const [document, draft, comments, proof, impact] = await Promise.all([
    readDocument(actor, key),
    readDraft(actor, key),
    listComments(actor, key),
    isProven(key.kind) ? orNull(readProof(actor, key)) : null,
    orNull(readImpact(actor, key, { from: impactFrom, limit: IMPACT_PAGE, outcome: undefined })),
  ]);
  const entry = document.revisions.find(({ number }) => number === key.number);
  if (!entry) throw notFound('This revision');
  const base = comparedWith(document.revisions, key.number);
  const before = base === null ? null : await readDraft(actor, { ...key, number: base });
  return {
    document,
    entry,
    draft,
    comments,
    proof,
    impact,
    base,
    /** As its author wrote it. */
    before: before?.document ?? null,
    changes: before ? changesBetween(before.document, draft.document) : [],
  };
}
export type Review = Awaited<ReturnType<typeof readReview>>;

/** The revision that this one follows: the issued one before it, else the newest that was issued before it. */
function comparedWith(
  revisions: readonly { number: number; issued_at: string | null; state: string }[],
  number: number,
): number | null {
  const earlier = revisions.filter((one) => one.number < number && one.issued_at !== null);
  const found = earlier.find(({ state }) => state === 'issued') ?? earlier[0];
  return found?.number ?? null;
}

/** Null where nobody asked for it yet. */
async function orNull<T>(found: Promise<T>): Promise<T | null> {
  try {
    return await found;
  } catch (error) {
    if (error instanceof AppError && error.code === 'not_found') return null;
    throw error;
  }
}
