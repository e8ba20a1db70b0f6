import { and, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { type CriteriaOfSet, criteriaOfSet, unfitting } from '@/engine/check';
import { combinationSetDocument } from '@/features/combination/combination';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { stateName } from './review';
import type { RevisionRow } from './rows.server';

/** What is wrong with the revisions that a document refers to: criteria, to a combination set. */
export async function referredFaults(tx: Tx, { of, practiceId, body }: RevisionRow): Promise<Fault[]> {
  const reading = of.kind === 'criteria' ? criteriaOfSet.safeParse(body) : null;
  return reading?.success ? faultsOfSet(tx, practiceId, reading.data) : [];
}

async function faultsOfSet(tx: Tx, practiceId: string, criteria: CriteriaOfSet): Promise<Fault[]> {
  const { set, revision: number } = criteria.combinations;
  const [found] = await tx
    .select({ state: revision.state, body: revision.body })
    .from(revision)
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .where(
      and(
        eq(revision.practiceId, practiceId),
        eq(document.kind, 'combination-set'),
        eq(document.slug, set),
        eq(revision.number, number),
      ),
    );
  const at = '/combinations';
  if (!found)
    return [
      {
        pointer: at,
        code: 'unknown_revision',
        message: `There is no combination set “${set}” with a revision ${number}. Name one that is issued.`,
      },
    ];
  if (found.state !== 'issued')
    return [
      {
        pointer: at,
        code: 'not_issued',
        message: `Revision ${number} of “${set}” is ${stateName(found.state)}. Criteria refer to one that is issued.`,
      },
    ];
  return unfitting(criteria, combinationSetDocument.parse(found.body)).map(({ path, message }) => ({
    pointer: pointer(path),
    code: 'does_not_fit',
    message,
  }));
}
