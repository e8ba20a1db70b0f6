import { aliasedTable, and, asc, countDistinct, desc, eq, inArray, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { document, revision } from '@/db/schema/library';
import { member } from '@/db/schema/member';
import { section } from '@/db/schema/section';
import type { ChangeClass, Consequence, DocumentKind, RevisionState } from './review';

const author = aliasedTable(person, 'author');
const reviewer = aliasedTable(person, 'reviewer');

/** A revision with its document and the people of its title block. */
export interface LibraryRevision {
  readonly documentId: string;
  readonly revisionId: string;
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
  readonly number: number;
  readonly state: RevisionState;
  readonly sha256: string;
  readonly engineVersion: string;
  readonly author: string;
  /** Null until somebody has reviewed it. */
  readonly reviewer: string | null;
  /** When it came to be what it is: issued, sent to review, withdrawn, or begun. */
  readonly date: Date;
  readonly issuedAt: Date | null;
  readonly changeNote: string;
  /** Null while a draft does not say. */
  readonly changeClass: ChangeClass | null;
  readonly consequence: Consequence | null;
  readonly withdrawalReason: string | null;
  readonly body: unknown;
}

const COLUMNS = {
  documentId: document.id,
  revisionId: revision.id,
  slug: document.slug,
  reference: document.reference,
  name: document.name,
  number: revision.number,
  state: revision.state,
  sha256: revision.sha256,
  engineVersion: revision.engineVersion,
  author: author.name,
  reviewer: reviewer.name,
  date: sql<Date>`coalesce(${revision.withdrawnAt}, ${revision.supersededAt}, ${revision.issuedAt}, ${revision.submittedAt}, ${revision.createdAt})`.mapWith(
    revision.createdAt,
  ),
  issuedAt: revision.issuedAt,
  changeNote: revision.changeNote,
  changeClass: revision.changeClass,
  consequence: revision.consequence,
  withdrawalReason: revision.withdrawalReason,
  body: revision.body,
};

const select = (tx: Tx, practiceId: string, where: SQL | undefined) =>
  tx
    .select(COLUMNS)
    .from(revision)
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .innerJoin(author, eq(author.id, revision.authorId))
    .leftJoin(reviewer, eq(reviewer.id, revision.reviewerId))
    .where(and(eq(revision.practiceId, practiceId), where));

/** What stands for a document when none of its revisions is asked for: the issued one, else the newest. */
const IS_ISSUED_FIRST = [desc(sql`${revision.state} = 'issued'`), desc(revision.number)];

/** A draft that has faults is for its author's eyes; one that was laid aside is for nobody's. */
const IS_WHOLE = sql`not jsonb_exists(${revision.body}, 'unfinished') and ${revision.abandonedAt} is null`;

/** Every document of a kind by the revision that stands for it, in the order of their references. */
export async function currentRevisions(
  tx: Tx,
  practiceId: string,
  kind: DocumentKind,
): Promise<LibraryRevision[]> {
  const rows = await select(tx, practiceId, and(eq(document.kind, kind), IS_WHOLE)).orderBy(
    asc(document.reference),
    ...IS_ISSUED_FIRST,
  );
  const seen = new Set<string>();
  return rows.filter(({ documentId }) => !seen.has(documentId) && seen.add(documentId));
}

/** One revision of a document by its number, or the one that stands for it. */
export async function findRevision(
  tx: Tx,
  practiceId: string,
  key: { readonly kind: DocumentKind; readonly slug: string; readonly number?: number | undefined },
): Promise<LibraryRevision | undefined> {
  const [found] = await select(
    tx,
    practiceId,
    and(
      eq(document.kind, key.kind),
      eq(document.slug, key.slug),
      key.number === undefined ? IS_WHOLE : eq(revision.number, key.number),
    ),
  )
    .orderBy(...IS_ISSUED_FIRST)
    .limit(1);
  return found;
}

/** Revisions by their ids, as pinned by members. */
export const revisionsById = (
  tx: Tx,
  practiceId: string,
  ids: readonly string[],
): Promise<LibraryRevision[]> =>
  ids.length === 0 ? Promise.resolve([]) : select(tx, practiceId, inArray(revision.id, [...ids])).execute();

/** All revisions of a document, newest first: what builds up from the title block. */
export const historyOf = (tx: Tx, practiceId: string, documentId: string): Promise<LibraryRevision[]> =>
  select(tx, practiceId, eq(revision.documentId, documentId)).orderBy(desc(revision.number)).execute();

export interface Uses {
  readonly members: number;
  readonly jobs: number;
}
export const NO_USES: Uses = { members: 0, jobs: 0 };

/** How many members pin a revision of each document, in how many jobs that the person may see. */
export async function usesByDocument(
  tx: Tx,
  practiceId: string,
  kind: PinnedKind,
): Promise<Map<string, Uses>> {
  const rows = await tx
    .select({ id: revision.documentId, members: countDistinct(member.id), jobs: countDistinct(member.jobId) })
    .from(member)
    .leftJoin(section, and(eq(section.practiceId, member.practiceId), eq(section.id, member.sectionId)))
    .innerJoin(revision, and(eq(revision.practiceId, member.practiceId), eq(revision.id, PINNED[kind])))
    .where(eq(member.practiceId, practiceId))
    .groupBy(revision.documentId);
  return new Map(rows.map(({ id, ...uses }) => [id, uses]));
}

/** Where a member pins a revision of each kind: a section table by its row. */
const PINNED = {
  template: member.templateRevisionId,
  'section-table': section.revisionId,
  criteria: member.criteriaRevisionId,
} as const;
type PinnedKind = keyof typeof PINNED;
