import { and, count, max, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { section } from '@/db/schema/section';
import type { UnitSystemName } from '@/engine/quantity';
import type { SectionQuery } from './query';
import { answering, issuedRows, rangeConditions } from './search.server';
import { binsTo, type MeasureSpread, ON_BOUNDARY, type Ranged, type Spread, withRangesOf } from './spread';

const COLUMN = { depth: section.depthMm, mass: section.massKgM } as const;

/** How the depth and mass of the sections of the issued editions that answer a query are spread. */
export async function spreadRows(
  tx: Tx,
  practiceId: string,
  query: SectionQuery,
  system: UnitSystemName,
): Promise<Spread> {
  const base = await answering(tx, practiceId, withRangesOf(query));
  const greatest = (await greatestOf(tx, base)) ?? (await greatestOf(tx, await issuedRows(tx, practiceId)));
  const meeting = and(...rangeConditions(query)) ?? sql`true`;
  const of = (measure: Ranged) =>
    measureSpread(tx, {
      base,
      meeting,
      within: and(...rangeConditions(withRangesOf(query, measure))) ?? sql`true`,
      column: COLUMN[measure],
      ...binsTo(greatest?.[measure] ?? 0, measure, system),
    });
  const [depth, mass] = await Promise.all([of('depth'), of('mass')]);
  return { depth, mass };
}

async function greatestOf(
  tx: Tx,
  where: SQL | undefined,
): Promise<{ readonly depth: number; readonly mass: number } | null> {
  const [row] = await tx
    .select({ depth: max(section.depthMm), mass: max(section.massKgM) })
    .from(section)
    .where(where);
  return row && row.depth !== null && row.mass !== null ? { depth: row.depth, mass: row.mass } : null;
}

interface Counted {
  /** What is counted, what of it meets every range, and what the range of this measure. */
  readonly base: SQL | undefined;
  readonly meeting: SQL;
  readonly within: SQL;
  readonly column: (typeof COLUMN)[Ranged];
  readonly bin: number;
  readonly bins: number;
}

async function measureSpread(tx: Tx, counted: Counted): Promise<MeasureSpread> {
  const { base, meeting, within, column, bin, bins } = counted;
  // As countsOf does; width_bucket knows no tolerance.
  const place = sql<number>`least(floor(${column} / ${bin}::float8 + ${ON_BOUNDARY}::float8), ${bins - 1}::int)::int`;
  const rows = await tx
    .select({
      place: place.as('place'),
      all: count(),
      meeting: sql<number>`count(*) filter (where ${meeting})`.mapWith(Number),
      within: sql<number>`count(*) filter (where ${within})`.mapWith(Number),
    })
    .from(section)
    .where(base)
    .groupBy(sql`1`);
  const byPlace = new Map(rows.map((row) => [row.place, row]));
  const filled = (name: 'all' | 'meeting') =>
    Array.from({ length: bins }, (_, i) => byPlace.get(i)?.[name] ?? 0);
  return {
    bin,
    all: filled('all'),
    meeting: filled('meeting'),
    within: rows.reduce((sum, row) => sum + row.within, 0),
  };
}
