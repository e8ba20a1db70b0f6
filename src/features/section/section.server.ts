import { and, count, eq, inArray, ne } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { member } from '@/db/schema/member';
import { section } from '@/db/schema/section';
import { withPractice } from '@/db/tenancy';
import type { UnitSystemName } from '@/engine/quantity';
import { designationKey } from '@/engine/section';
import type { User } from '@/features/account/account';
import { requirePermission } from '@/features/account/permission';
import {
  currentRevisions,
  findRevision,
  historyOf,
  type LibraryRevision,
} from '@/features/review/library.server';
import { withStock } from '@/features/stock/of-sections.server';
import { notFound } from '@/lib/app-error';
import { initialsOf } from '@/lib/initials';
import { type EditionView, editionDocument, type SectionDetail } from './edition';
import type { SectionPlace, SectionQuery } from './query';
import { countRows, type Found, searchRows, selectRows, spreadRows, toItem } from './search.server';
import type { Spread } from './spread';

const SECTION_TABLE = 'section-table';

/** Sections of the issued editions, a page at a time. */
export function searchSections(
  user: User,
  query: SectionQuery,
  page: { readonly place: SectionPlace | null; readonly limit: number },
): Promise<Found> {
  requirePermission(user, 'library.read');
  return withPractice(user, async (tx) => {
    const found = await searchRows(tx, user.practiceId, query, page);
    return { ...found, items: await withStock(tx, user.practiceId, found.items) };
  });
}

/** How many sections the issued editions have. */
export function countSections(user: User): Promise<number> {
  requirePermission(user, 'library.read');
  return withPractice(user, (tx) => countRows(tx, user.practiceId));
}

/** How the depth and mass of what answers a query are spread, in bins round in a unit system. */
export function spreadSections(user: User, query: SectionQuery, system: UnitSystemName): Promise<Spread> {
  requirePermission(user, 'library.read');
  return withPractice(user, (tx) => spreadRows(tx, user.practiceId, query, system));
}

export interface SectionKey {
  readonly table: string;
  /** However typed. */
  readonly designation: string;
  /** Without it the issued edition. */
  readonly edition?: number | undefined;
}

/** One section of one edition, with what the table does not show; 404 where there is none. */
export function findSection(user: User, key: SectionKey): Promise<SectionDetail> {
  requirePermission(user, 'library.read');
  return withPractice(user, async (tx) => (await openSection(tx, user.practiceId, key)).detail);
}

interface OpenSection {
  readonly detail: SectionDetail;
  readonly revisionId: string;
  /** Every edition of its table, newest first. */
  readonly history: readonly LibraryRevision[];
}

/**
 * The section that a key means, with its table's editions; 404 where there is none. With `former` a section that the
 * issued edition no longer has is that of the last one which has it.
 */
export async function openSection(
  tx: Tx,
  practiceId: string,
  key: SectionKey,
  { former = false } = {},
): Promise<OpenSection> {
  const standing = await findRevision(tx, practiceId, {
    kind: SECTION_TABLE,
    slug: key.table,
    number: key.edition,
  });
  if (!standing) throw notFound('This section table');
  const history = await historyOf(tx, practiceId, standing.documentId);
  const past = history.filter(({ state }) => state === 'superseded' || state === 'withdrawn');
  const editions = former && key.edition === undefined ? [standing, ...past] : [standing];
  const rows = await selectRows(tx).where(
    and(
      eq(section.practiceId, practiceId),
      inArray(
        section.revisionId,
        editions.map(({ revisionId }) => revisionId),
      ),
      eq(section.designationKey, designationKey(key.designation)),
    ),
  );
  for (const edition of editions) {
    const row = rows.find(({ revisionId }) => revisionId === edition.revisionId);
    if (!row) continue;
    const detail = { item: toItem(row), edition: toEditionView(edition, history) };
    return { detail, revisionId: edition.revisionId, history };
  }
  throw notFound('This section');
}

const DAY = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'short',
  year: 'numeric',
  timeZone: 'UTC',
});

const toEditionView = (found: LibraryRevision, history: readonly LibraryRevision[]): EditionView => ({
  ...editionDocument.parse(found.body),
  table: found.slug,
  name: found.name,
  reference: found.reference,
  edition: found.number,
  state: found.state,
  by: found.author,
  checked: found.reviewer,
  date: DAY.format(found.date),
  changeNote: found.changeNote,
  history: history.map((one) => ({
    edition: one.number,
    date: DAY.format(one.date),
    by: initialsOf(one.author),
    checked: one.reviewer && initialsOf(one.reviewer),
    change: one.changeNote,
  })),
});

/** Every table by the edition that stands for it, for title blocks and the choice of a table. */
export function listEditions(user: User): Promise<EditionView[]> {
  requirePermission(user, 'library.read');
  return withPractice(user, async (tx) => {
    const found = await currentRevisions(tx, user.practiceId, SECTION_TABLE);
    return found.map((one) => toEditionView(one, [one]));
  });
}

/** How many members use a section, of any edition, by table and designation; only those that are used. */
export function usesBySection(
  user: User,
): Promise<{ table: string; designation: string; members: number }[]> {
  requirePermission(user, 'library.read');
  return withPractice(user, (tx) =>
    tx
      .select({ table: section.tableSlug, designation: section.designation, members: count() })
      .from(member)
      .innerJoin(section, and(eq(section.practiceId, member.practiceId), eq(section.id, member.sectionId)))
      .where(and(eq(member.practiceId, user.practiceId), ne(member.status, 'removed')))
      .groupBy(section.tableSlug, section.designation)
      .execute(),
  );
}
