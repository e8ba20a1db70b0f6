import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import type { UsesView } from './document';
import { namesOf } from './people.server';
import { type Actor, type DocumentKey, requireDocument } from './rows.server';
import { usesOfDocument, visibleTo } from './uses.server';

interface Asked {
  /** One revision alone. */
  readonly revision?: number | undefined;
  readonly from: number;
  readonly limit: number;
}

/** The members that use a document, by job and mark; those in jobs that are not open to the person are counted only. */
export function whereUsed(
  actor: Actor,
  key: DocumentKey,
  { revision, from, limit }: Asked,
): Promise<Omit<UsesView, 'next'> & { readonly next: number | null }> {
  requirePermission(actor, 'library.read');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const { id } = await requireDocument(tx, practiceId, key);
    const all = (await usesOfDocument(tx, practiceId, id)).filter(
      (use) => revision === undefined || use.revision === revision,
    );
    const visible = await visibleTo(
      tx,
      actor,
      all.map(({ memberId }) => memberId),
    );
    const shown = all.filter(({ memberId }) => visible.has(memberId));
    const page = shown.slice(from, from + limit);
    const names = await namesOf(
      tx,
      page.map(({ ownerId }) => ownerId),
    );
    return {
      items: page.map((use) => ({
        member: use.memberId,
        job: { number: use.job, name: use.jobName },
        mark: use.mark,
        status: use.status,
        owner: names.get(use.ownerId) ?? '',
        revision: use.revision,
      })),
      next: from + limit < shown.length ? from + limit : null,
      total: all.length,
      hidden: all.length - shown.length,
    };
  });
}
