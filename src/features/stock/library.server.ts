import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { nearestDesignations } from '@/features/section/query';
import { groupBy } from '@/lib/group-by';
import type { Library, NamedSection, StockFault } from './match';

const ofRevision = and(
  eq(revision.practiceId, section.practiceId),
  eq(revision.id, section.revisionId),
  eq(revision.state, 'issued'),
);

/** What the issued editions have of these keys, and how their tables are called. */
export async function readLibrary(tx: Tx, practiceId: string, keys: readonly string[]): Promise<Library> {
  const [rows, tables] = await Promise.all([
    tx
      .select({
        table: section.tableSlug,
        designation: section.designation,
        key: section.designationKey,
      })
      .from(section)
      .innerJoin(revision, ofRevision)
      .where(
        and(
          eq(section.practiceId, practiceId),
          sql`${section.designationKey} = any(${sql.param([...keys])}::text[])`,
        ),
      )
      .orderBy(section.tableSlug),
    tx
      .select({ slug: document.slug, reference: document.reference, name: document.name })
      .from(document)
      .where(and(eq(document.practiceId, practiceId), eq(document.kind, 'section-table'))),
  ]);
  const sections = groupBy(
    rows.map(({ key, ...named }) => ({ key, named })),
    ({ key }) => key,
  );
  return {
    sections: new Map([...sections].map(([key, group]) => [key, group.map(({ named }) => named)])),
    tables: new Map(
      tables.flatMap(({ slug, reference, name }) =>
        [slug, reference, name].map((called) => [called.toLowerCase(), slug] as const),
      ),
    ),
  };
}

/** Of how many lines the nearest sections are looked for, and in how long a library: more takes too long. */
const MOST_NEAREST = 20;
const MOST_SECTIONS = 10_000;
const OFFERED = 3;

/** The same faults; where no section is called so, with the few that are called nearly so. */
export async function withNearest(
  tx: Tx,
  practiceId: string,
  faults: readonly StockFault[],
): Promise<readonly StockFault[]> {
  const lost = faults.filter(({ code, suggestions, value }) => isLost(code, suggestions, value));
  if (lost.length === 0) return faults;
  const every = await tx
    .select({ table: section.tableSlug, designation: section.designation })
    .from(section)
    .innerJoin(revision, ofRevision)
    .where(eq(section.practiceId, practiceId))
    .limit(MOST_SECTIONS);
  if (every.length === MOST_SECTIONS) return faults;
  const nearest = new Map(
    lost
      .slice(0, MOST_NEAREST)
      .map((fault) => [fault, nearestDesignations(fault.value, every).slice(0, OFFERED)] as const),
  );
  return faults.map((fault) => ({ ...fault, suggestions: nearest.get(fault) ?? fault.suggestions }));
}

const isLost = (code: string, suggestions: readonly NamedSection[], value: string): boolean =>
  code === 'unknown_section' && suggestions.length === 0 && value !== '';
