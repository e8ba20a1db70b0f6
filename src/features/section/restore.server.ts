import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { requireOnlyDraft } from '@/features/review/begin.server';
import type { RevisionKey } from '@/features/review/draft';
import { createDraft, takeStep } from '@/features/review/review.server';
import { type Actor, requireRevision } from '@/features/review/rows.server';
import { AppError } from '@/lib/app-error';
import type { Restore } from './edition';
import { copyRows } from './edition.server';

/**
 * Goes back to a former edition: its rows become the next edition, which is sent to review at once. Nothing is taken
 * from the editions in between, so that every member keeps the one that it has.
 */
export async function restoreEdition(actor: Actor, key: RevisionKey, { reason, consequence }: Restore) {
  requirePermission(actor, 'library.import');
  const { practiceId } = actor;
  const made = await withPractice(actor, async (tx) => {
    const former = await requireRevision(tx, practiceId, key);
    if (former.of.kind !== 'section-table' || former.state !== 'superseded')
      throw new AppError(
        'conflict',
        'Only an edition of a section table that was issued and superseded is issued again.',
      );
    const { slug, reference, name } = former.of;
    const draft = await createDraft(tx, actor, {
      kind: 'section-table',
      slug,
      reference,
      name,
      body: { ...Object(former.body), restored_from: former.number },
      schemaVersion: former.schemaVersion,
      changeNote: `Back to edition ${former.number}. ${reason}`,
      changeClass: 'error',
      consequence,
    });
    await requireOnlyDraft(tx, practiceId, draft);
    await copyRows(tx, practiceId, former.id, draft.revisionId);
    return draft;
  });
  const { number, state } = await takeStep(actor, made.revisionId, { step: 'submit' });
  return { number, state };
}
