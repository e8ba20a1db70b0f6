import { and, eq } from 'drizzle-orm';
import { createDraft, type Draft, takeStep } from '@/features/review/review.server';
import type { Tx } from '../client';
import { document, revision } from '../schema/library';
import { withPractice } from '../tenancy';
import type { DemoPeople, DemoPerson } from './people';

export type Shipped = Omit<Draft, 'changeNote' | 'changeClass' | 'consequence'>;

const FIRST_ISSUE = {
  changeNote: 'First issue.',
  changeClass: 'improvement',
  consequence: 'safety',
} as const;

/**
 * Puts a shipped document into the demo's library: written by the librarian, reviewed and issued by the checker. A
 * document that is there is left as it is, unless a start was cut off between its first steps: then they go on.
 * `fill` writes what belongs to the draft besides its body.
 */
export async function issueShipped(
  people: DemoPeople,
  shipped: Shipped,
  fill: (tx: Tx, author: DemoPerson, revisionId: string) => Promise<void> = async () => undefined,
): Promise<void> {
  const author = personOf(people, 'Priyanka Velloor');
  const reviewer = personOf(people, 'Imogen Fairlocke');
  const first = await withPractice(author, async (tx) => {
    const [found] = await tx
      .select({ id: revision.id, state: revision.state })
      .from(document)
      .innerJoin(
        revision,
        and(
          eq(revision.practiceId, document.practiceId),
          eq(revision.documentId, document.id),
          eq(revision.number, 1),
        ),
      )
      .where(
        and(
          eq(document.practiceId, author.practiceId),
          eq(document.kind, shipped.kind),
          eq(document.slug, shipped.slug),
        ),
      );
    if (found) return found;
    const { revisionId } = await createDraft(tx, author, { ...shipped, ...FIRST_ISSUE });
    await fill(tx, author, revisionId);
    return { id: revisionId, state: 'draft' as const };
  });
  if (first.state === 'draft') await takeStep(author, first.id, { step: 'submit' });
  if (first.state === 'draft' || first.state === 'in_review')
    await takeStep(reviewer, first.id, { step: 'issue' });
}

function personOf(people: DemoPeople, name: string): DemoPerson {
  const found = people.get(name);
  if (!found) throw new Error(`${name} is not among the demo’s people`);
  return found;
}
