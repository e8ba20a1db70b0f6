/** What a member is judged by: its criteria, and the combinations that these are held against. */
import type { Tx } from '@/db/client';
import { unfitting } from '@/engine/check';
import { unknownCategories } from '@/engine/combination';
import { type ReadSet, readSet } from '@/features/combination/combination.server';
import { asCriteria } from '@/features/criteria/criteria.server';
import { findRevision } from '@/features/review/library.server';
import { holdForUse } from '@/features/review/pin.server';
import { invalid } from '@/lib/app-error';
import type { SaveMember } from './member';
import type { Pins } from './pins.server';
import { movedTo, refused, withdrawn } from './revision.server';

type Basis = Pick<Pins, 'criteria' | 'combinations'>;
type Asked = Pick<
  SaveMember,
  'criteria' | 'combinations' | 'categories' | 'criteria_revision' | 'combinations_revision'
>;

/** Criteria and combinations as they are named: what is pinned stays unless it is moved or another is named. */
export async function placeBasis(tx: Tx, practiceId: string, asked: Asked, pinned: Basis): Promise<Basis> {
  const criteria = await placeCriteria(tx, practiceId, asked, pinned.criteria);
  const combinations = await placeCombinations(tx, practiceId, asked, criteria, pinned);
  if (combinations) refuseUnknown(combinations, asked.categories);
  return { criteria, combinations };
}

function refuseUnknown({ reference, document }: ReadSet, chosen: Asked['categories']): void {
  const faults = unknownCategories(document, chosen).map((group) => ({
    pointer: `/categories/${group}`,
    code: 'unknown_category',
    message: `${reference} has no category “${chosen[group]}” of ${group}. Choose one of ${(document.categories[group] ?? []).map(({ id }) => id).join(', ') || 'none'}.`,
  }));
  if (faults.length > 0) throw invalid(faults);
}

async function placeCriteria(
  tx: Tx,
  practiceId: string,
  { criteria: slug, criteria_revision: number }: Asked,
  pinned: Pins['criteria'],
): Promise<Pins['criteria']> {
  if (slug === null) return null;
  if (pinned?.slug === slug)
    return number === undefined || number === pinned.number
      ? pinned
      : asCriteria(await movedTo(tx, practiceId, 'criteria', slug, number));
  const found = await findRevision(tx, practiceId, { kind: 'criteria', slug });
  if (found?.state === 'issued') {
    await holdForUse(tx, practiceId, found.revisionId, '/criteria');
    return asCriteria(found);
  }
  throw refused(
    '/criteria',
    found ? 'not_issued' : 'unknown_criteria',
    `There are no issued criteria “${slug}”${withdrawn(found)}. Choose from the list.`,
  );
}

async function placeCombinations(
  tx: Tx,
  practiceId: string,
  { combinations: slug, combinations_revision: number }: Asked,
  criteria: Pins['criteria'],
  pinned: Basis,
): Promise<ReadSet | null> {
  if (!criteria) return null;
  const { document } = criteria;
  if (document.schema_version === 1) {
    if (slug === null) return null;
    throw refused(
      '/combinations',
      'not_allowed',
      `${criteria.reference} revision ${criteria.number} has combinations of its own. Leave the choice to it, or choose other criteria.`,
    );
  }
  const kept = pinned.criteria?.slug === criteria.slug ? pinned.combinations?.slug : undefined;
  const wanted = slug ?? kept ?? document.combinations.set;
  const set = await setNamed(tx, practiceId, wanted, number, pinned.combinations);
  const [reason] = unfitting(document, set.document);
  if (!reason) return set;
  throw refused('/combinations', 'does_not_fit', `${reason.message} Choose another combination set.`);
}

async function setNamed(
  tx: Tx,
  practiceId: string,
  slug: string,
  number: number | undefined,
  pinned: ReadSet | null,
): Promise<ReadSet> {
  if (pinned?.slug === slug)
    return number === undefined || number === pinned.number
      ? pinned
      : readSet(await movedTo(tx, practiceId, 'combination-set', slug, number));
  const found = await findRevision(tx, practiceId, { kind: 'combination-set', slug });
  if (found?.state === 'issued') {
    await holdForUse(tx, practiceId, found.revisionId, '/combinations');
    return readSet(found);
  }
  throw refused(
    '/combinations',
    found ? 'not_issued' : 'unknown_combinations',
    `There is no issued combination set “${slug}”${withdrawn(found)}. Choose from the list.`,
  );
}
