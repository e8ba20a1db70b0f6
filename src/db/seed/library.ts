import { and, eq } from 'drizzle-orm';
import { recordProof } from '@/features/review/proof-run.server';
import type { DocumentKind, RevisionState } from '@/features/review/review';
import { createDraft, type Draft, takeStep } from '@/features/review/review.server';
import type { Tx } from '../client';
import { document, revision } from '../schema/library';
import { withPractice } from '../tenancy';
import type { DemoPeople, DemoPerson } from './people';

export type Shipped = Omit<Draft, 'changeNote' | 'changeClass' | 'consequence'>;

/** The outcome of a document's proof. */
export interface Proof {
  readonly passed: boolean;
  readonly report: unknown;
}

interface Making {
  /** Writes what belongs to the draft besides its body. */
  readonly fill?: (tx: Tx, practiceId: string, revisionId: string) => Promise<void>;
  /** Proves what computes, without which it is not issued. */
  readonly prove?: () => Proof;
}

const FIRST_ISSUE = {
  changeNote: 'First issue.',
  changeClass: 'improvement',
  consequence: 'safety',
} as const;

const QUIETLY = { quietly: true };

/** The librarian, who writes the demo's first issues, and the checker, who reviews them. */
const AUTHOR = 'Priyanka Velloor';
const REVIEWER = 'Imogen Fairlocke';

/**
 * Which of the documents of a kind are not in the demo's library yet. One that a start left half way, when it was cut
 * off between the first steps, is among them.
 */
export async function missingFrom(
  people: DemoPeople,
  kind: DocumentKind,
  slugs: readonly string[],
): Promise<string[]> {
  const there = await withPractice(personOf(people, AUTHOR), (tx) =>
    tx
      .select({ slug: document.slug, state: revision.state })
      .from(document)
      .innerJoin(revision, isFirst)
      .where(and(eq(document.practiceId, personOf(people, AUTHOR).practiceId), eq(document.kind, kind))),
  );
  const begun = new Map(there.map(({ slug, state }) => [slug, state]));
  return slugs.filter((slug) => UNFINISHED.includes(begun.get(slug)));
}

const UNFINISHED: readonly (RevisionState | undefined)[] = [undefined, 'draft', 'in_review'];

const isFirst = and(
  eq(revision.practiceId, document.practiceId),
  eq(revision.documentId, document.id),
  eq(revision.number, 1),
);

/** Takes a shipped document through all its steps. */
export async function issueShipped(
  people: DemoPeople,
  shipped: Shipped,
  { fill, prove }: Making = {},
): Promise<void> {
  const author = personOf(people, AUTHOR);
  const { id, state } = await withPractice(author, async (tx) => {
    const [found] = await tx
      .select({ id: revision.id, state: revision.state })
      .from(document)
      .innerJoin(revision, isFirst)
      .where(
        and(
          eq(document.kind, shipped.kind),
          eq(document.slug, shipped.slug),
          eq(document.practiceId, author.practiceId),
        ),
      );
    if (found) return found;
    const { revisionId } = await createDraft(tx, author, { ...shipped, ...FIRST_ISSUE });
    await fill?.(tx, author.practiceId, revisionId);
    return { id: revisionId, state: 'draft' as const };
  });
  if (state === 'draft') await takeStep(author, id, { step: 'submit' }, QUIETLY);
  const reviewer = personOf(people, REVIEWER);
  if (prove) await withPractice(reviewer, (tx) => recordProof(tx, reviewer, id, prove()));
  await takeStep(reviewer, id, { step: 'issue' }, QUIETLY);
}

function personOf(people: DemoPeople, name: string): DemoPerson {
  const found = people.get(name);
  if (!found) throw new Error(`${name} is not among the demo’s people`);
  return found;
}
