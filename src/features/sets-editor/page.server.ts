import { withPractice } from '@/db/tenancy';
import { issuedSets } from '@/features/combination/combination.server';
import type { DocumentView } from '@/features/review/document';
import { readDraft } from '@/features/review/draft.server';
import { isSetKind } from '@/features/review/read-set';
import type { Actor } from '@/features/review/rows.server';
import type { SetPageData } from './page';

/** What the form of a set's draft shows beside it; null for a document of another kind. */
export async function readSetPage(
  actor: Actor,
  { slug, revisions }: Pick<DocumentView, 'slug' | 'revisions'>,
  page: Omit<SetPageData, 'kind' | 'issued' | 'sets'>,
): Promise<SetPageData | null> {
  const { kind } = page.draft;
  if (!isSetKind(kind)) return null;
  const issued = revisions.find(({ state }) => state === 'issued');
  const before = issued && (await readDraft(actor, { kind, slug, number: issued.number }));
  return {
    ...page,
    kind,
    issued: before ? { revision: before.revision, document: before.document } : null,
    sets: kind === 'criteria' ? await setsToReferTo(actor) : [],
  };
}

const setsToReferTo = (actor: Actor) =>
  withPractice(actor, async (tx) =>
    (await issuedSets(tx, actor.practiceId)).map(({ slug, number, document }) => ({
      slug,
      revision: number,
      document,
    })),
  );
