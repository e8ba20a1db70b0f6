import { and, asc, eq, isNull, ne, or, sql } from 'drizzle-orm';
import { document, revision } from '@/db/schema/library';
import { withPractice } from '@/db/tenancy';
import { may, requirePermission } from '@/features/account/permission';
import { listOpenRevisions, listReviewsDue } from '@/features/review/desk.server';
import { listRecalls } from '@/features/review/recall-view.server';
import { listRequests } from '@/features/review/request.server';
import { DOCUMENT_KINDS, type DocumentKind, type RevisionState } from '@/features/review/review';
import type { Actor } from '@/features/review/rows.server';
import type { DeskQuery } from './desk';

/** The longest list that the desk shows whole. */
const MOST = 200;

/** What waits in the library, for this person first. */
export async function readDesk(actor: Actor, query: DeskQuery) {
  const ofKind = ({ kind }: { readonly kind: DocumentKind }) =>
    query.kind === undefined || kind === query.kind;
  const [open, recalls, requests, due] = await Promise.all([
    listOpenRevisions(actor, { kind: query.kind }),
    listRecalls(actor, { state: query.recalls, mine: query.mine }, { limit: MOST }),
    listRequests(actor, requestQuery(actor, query), { limit: MOST }),
    listReviewsDue(actor),
  ]);
  const drafts = open.filter(({ state, mine }) => state === 'draft' && (mine || !query.mine));
  const inReview = open.filter(
    ({ state, mine, steps }) => state === 'in_review' && (!query.mine || mine || steps.includes('issue')),
  );
  return {
    drafts: first(drafts, ({ mine }) => mine),
    inReview: first(inReview, ({ steps }) => steps.includes('issue')),
    recalls: first(recalls.items.filter(ofKind), ({ mine }) => mine > 0),
    requests: requests.items,
    requestTotal: requests.total,
    due: due.filter(ofKind),
  };
}

/** Of the librarians' queue everything is theirs: `mine` narrows it to what is not finished. */
const requestQuery = (actor: Actor, { mine, requests }: DeskQuery) => ({
  state: requests === 'all' ? undefined : requests,
  mine: mine && !may(actor, 'request.answer'),
});

/** Those that wait for the reader, then the others, each in the order they came. */
const first = <T>(rows: readonly T[], isFirst: (row: T) => boolean): T[] => [
  ...rows.filter(isFirst),
  ...rows.filter((row) => !isFirst(row)),
];

export interface LibraryEntry {
  readonly kind: DocumentKind;
  readonly slug: string;
  readonly reference: string;
  readonly name: string;
  readonly reviewBy: string | null;
  /** The issued revision, else the newest. */
  readonly number: number;
  readonly state: RevisionState;
}

/** Every document of the library, by kind and reference. */
export function listDocuments(actor: Actor): Promise<LibraryEntry[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const rows = await tx
      .selectDistinctOn([document.kind, document.reference, document.id], {
        kind: document.kind,
        slug: document.slug,
        reference: document.reference,
        name: document.name,
        reviewBy: document.reviewBy,
        number: revision.number,
        state: revision.state,
      })
      .from(document)
      .innerJoin(
        revision,
        and(eq(revision.practiceId, document.practiceId), eq(revision.documentId, document.id)),
      )
      .where(
        and(
          eq(document.practiceId, actor.practiceId),
          or(ne(revision.state, 'draft'), isNull(revision.abandonedAt)),
        ),
      )
      .orderBy(
        asc(document.kind),
        asc(document.reference),
        asc(document.id),
        sql`${revision.state} = 'issued' desc`,
        sql`${revision.number} desc`,
      );
    return rows;
  });
}

/** How many documents there are of each kind. */
export const countByKind = (documents: readonly LibraryEntry[]) =>
  DOCUMENT_KINDS.map((kind) => ({ kind, count: documents.filter((one) => one.kind === kind).length }));
