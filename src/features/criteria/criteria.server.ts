import { type Tenant, withPractice } from '@/db/tenancy';
import { type CriteriaDocument, criteriaDocument } from '@/engine/check';
import { type Person, requirePermission } from '@/features/account/permission';
import { currentRevisions, type LibraryRevision } from '@/features/review/library.server';

export interface IssuedCriteria {
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
  readonly revision: number;
  readonly document: CriteriaDocument;
}

/** A revision of criteria, read: of before there were combination sets too. */
export const asCriteria = (revision: LibraryRevision) => ({
  ...revision,
  document: criteriaDocument.parse(revision.body),
});

/** The criteria that a member may be judged by: the issued revision of each. */
export function listCriteria(actor: Person & Tenant): Promise<IssuedCriteria[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const revisions = await currentRevisions(tx, actor.practiceId, 'criteria');
    return revisions
      .filter(({ state }) => state === 'issued')
      .map(({ slug, reference, name, number, body }) => ({
        slug,
        reference,
        name,
        revision: number,
        document: criteriaDocument.parse(body),
      }));
  });
}

interface Referring {
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
  readonly revision: number;
  /** The revision of the set that they refer to. */
  readonly setRevision: number;
}

/** The criteria whose issued revision refers to a combination set. */
export async function criteriaReferringTo(actor: Person & Tenant, set: string): Promise<Referring[]> {
  const issued = await listCriteria(actor);
  return issued.flatMap(({ document, ...rest }) =>
    document.schema_version === 2 && document.combinations.set === set
      ? [{ ...rest, setRevision: document.combinations.revision }]
      : [],
  );
}
