import { and, eq, getTableColumns, ne, type SQL } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import type { Tenant } from '@/db/tenancy';
import type { Person } from '@/features/account/permission';
import { notFound } from '@/lib/app-error';
import type { RevisionKey } from './draft';
import { type DocumentKind, KIND_NAMES } from './review';

/** Who a use case acts for. */
export type Actor = Person & Tenant & { readonly personId: string };

export interface DocumentKey {
  readonly kind: DocumentKind;
  readonly slug: string;
}

export type DocumentRow = typeof document.$inferSelect;
/** A revision's row whole, with the document that it is of. */
export type RevisionRow = typeof revision.$inferSelect & { readonly of: DocumentRow };

export async function findDocument(
  tx: Tx,
  practiceId: string,
  { kind, slug }: DocumentKey,
): Promise<DocumentRow | undefined> {
  const [found] = await tx
    .select()
    .from(document)
    .where(and(eq(document.practiceId, practiceId), eq(document.kind, kind), eq(document.slug, slug)));
  return found;
}

export async function requireDocument(tx: Tx, practiceId: string, key: DocumentKey): Promise<DocumentRow> {
  const found = await findDocument(tx, practiceId, key);
  if (!found) throw notFound(`This ${KIND_NAMES[key.kind]}`);
  return found;
}

type Order = SQL | typeof revision.id | typeof revision.number;

/** Revisions whole, with their documents. */
export const selectRevisions = (
  tx: Tx,
  practiceId: string,
  where: SQL | undefined,
  order: readonly Order[] = [],
): Promise<RevisionRow[]> =>
  tx
    .select({ ...getTableColumns(revision), of: getTableColumns(document) })
    .from(revision)
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .where(and(eq(revision.practiceId, practiceId), where))
    .orderBy(...order)
    .execute();

export async function requireRevision(tx: Tx, practiceId: string, key: RevisionKey): Promise<RevisionRow> {
  const [found] = await selectRevisions(
    tx,
    practiceId,
    and(eq(document.kind, key.kind), eq(document.slug, key.slug), eq(revision.number, key.number)),
  );
  if (!found) throw notFound(`This revision of the ${KIND_NAMES[key.kind]}`);
  return found;
}

export async function requireRevisionById(tx: Tx, practiceId: string, id: string): Promise<RevisionRow> {
  const [found] = await selectRevisions(tx, practiceId, eq(revision.id, id));
  if (!found) throw notFound('This revision');
  return found;
}

/** Every revision of a document but one. */
export const otherRevisions = (tx: Tx, practiceId: string, documentId: string, but: string) =>
  selectRevisions(tx, practiceId, and(eq(revision.documentId, documentId), ne(revision.id, but)));

export const keyOf = ({ of, number }: RevisionRow): RevisionKey => ({
  kind: of.kind,
  slug: of.slug,
  number,
});

/** "Prop 3, revision 2". */
export const nameOfRevision = ({ of, number }: RevisionRow): string =>
  `${of.reference}, ${of.kind === 'section-table' ? 'edition' : 'revision'} ${number}`;
