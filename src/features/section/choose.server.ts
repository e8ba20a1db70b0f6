import { and, desc, eq } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { designationKey } from '@/engine/section';
import type { RevisionState } from '@/features/review/review';
import { type Fault, invalid } from '@/lib/app-error';
import type { SectionValues } from './resolve';

/** A row of a section table with the edition that it stands in. */
export interface ChosenSection {
  readonly id: string;
  readonly table: string;
  readonly tableName: string;
  readonly edition: number;
  readonly editionState: RevisionState;
  readonly withdrawalReason: string | null;
  readonly revisionId: string;
  readonly sha256: string;
  readonly documentId: string;
  readonly values: SectionValues;
  /** Columns that were computed from the dimensions, not supplied. */
  readonly computed: readonly string[];
}

const COLUMNS = {
  id: section.id,
  table: section.tableSlug,
  tableName: document.name,
  edition: revision.number,
  editionState: revision.state,
  withdrawalReason: revision.withdrawalReason,
  revisionId: section.revisionId,
  sha256: revision.sha256,
  documentId: revision.documentId,
  computed: section.computed,
  values: {
    designation: section.designation,
    dimensions: section.dimensions,
    massKgM: section.massKgM,
    iMajorCm4: section.iMajorCm4,
    wElCm3: section.wElCm3,
  },
};

const select = (tx: Tx) =>
  tx
    .select(COLUMNS)
    .from(section)
    .innerJoin(
      revision,
      and(eq(revision.practiceId, section.practiceId), eq(revision.id, section.revisionId)),
    )
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    );

/** The row that a member pins, whatever became of its edition since. */
export async function pinnedSection(
  tx: Tx,
  practiceId: string,
  id: string,
): Promise<ChosenSection | undefined> {
  const [found] = await select(tx).where(and(eq(section.practiceId, practiceId), eq(section.id, id)));
  return found;
}

export interface SectionKey {
  readonly designation: string;
  readonly table?: string | undefined;
}

/**
 * The section of an issued edition by its designation, however typed, or 422 at `at`: unknown, or in several tables
 * when none is named.
 */
export async function chooseSection(
  tx: Tx,
  practiceId: string,
  { designation, table }: SectionKey,
  at = '/section',
): Promise<ChosenSection> {
  const found = await select(tx).where(
    and(
      eq(section.practiceId, practiceId),
      eq(revision.state, 'issued'),
      eq(section.designationKey, designationKey(designation)),
      table === undefined ? undefined : eq(section.tableSlug, table),
    ),
  );
  const [first, ...others] = found;
  if (first && others.length === 0) return first;
  if (!first) await refuseWithdrawn(tx, practiceId, { designation, table }, at);
  const tables = found.map((one) => `“${one.table}”`).join(', ');
  throw invalid([
    first
      ? fault(
          at,
          'table',
          'ambiguous_section',
          `“${designation}” is in several tables. Name one of ${tables}.`,
        )
      : fault(
          at,
          'designation',
          'unknown_section',
          `There is no section “${designation}” in ${table === undefined ? 'the issued tables' : `the table “${table}”`}. Search the sections for it.`,
        ),
  ]);
}

/** A section that stands in a withdrawn edition alone is refused with the reason of the withdrawal. */
async function refuseWithdrawn(
  tx: Tx,
  practiceId: string,
  { designation, table }: SectionKey,
  at: string,
): Promise<void> {
  const [found] = await select(tx)
    .where(
      and(
        eq(section.practiceId, practiceId),
        eq(revision.state, 'withdrawn'),
        eq(section.designationKey, designationKey(designation)),
        table === undefined ? undefined : eq(section.tableSlug, table),
      ),
    )
    .orderBy(desc(revision.number))
    .limit(1);
  if (!found) return;
  const message = `“${designation}” stands in edition ${found.edition} of ${found.tableName}, which was withdrawn: ${found.withdrawalReason} Choose a section of another table.`;
  throw invalid([fault(at, 'designation', 'withdrawn', message)]);
}

const fault = (at: string, field: string, code: string, message: string): Fault => ({
  pointer: `${at}/${field}`,
  code,
  message,
});
