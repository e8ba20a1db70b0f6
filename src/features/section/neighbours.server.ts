import { and, asc, between, desc, eq, gte, inArray, lte, ne, or, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { section } from '@/db/schema/section';
import { designationKey, designationParts } from '@/engine/section';
import type { Neighbour, NeighbourPair, Neighbours } from './page';
import { shapeGroupOf } from './query';
import { issuedRows } from './search.server';
import type { SectionItem } from './section';

/** As deep: within this share of the depth, as sections of one nominal depth are. */
const AS_DEEP = 0.03;

/** The sections next to one in its series and in its depth; of a former edition's its own row in force is none of them. */
export async function findNeighbours(
  tx: Tx,
  practiceId: string,
  item: SectionItem,
  /** The edition of its table that is in force. */
  issuedId: string | undefined,
): Promise<Neighbours> {
  const key = designationKey(item.designation);
  const inSeries =
    issuedId === undefined
      ? sql`false`
      : and(
          eq(section.practiceId, practiceId),
          eq(section.revisionId, issuedId),
          ne(section.designationKey, key),
          seriesOf(item.designation),
        );
  const inDepth = and(
    await issuedRows(tx, practiceId),
    or(ne(section.tableSlug, item.table), ne(section.designationKey, key)),
    inArray(section.shape, [...shapeGroupOf(item.shape)]),
    between(section.depthMm, item.depth_mm * (1 - AS_DEEP), item.depth_mm * (1 + AS_DEEP)),
  );
  const pair = async (where: SQL | undefined): Promise<NeighbourPair> => ({
    lighter: await next(tx, where, item.mass_kg_m, key, 'lighter'),
    heavier: await next(tx, where, item.mass_kg_m, key, 'heavier'),
  });
  return { series: await pair(inSeries), depth: await pair(inDepth) };
}

/** The first beyond a mass; of equal masses the order is that of their keys, so that every one is passed on the way. */
async function next(
  tx: Tx,
  where: SQL | undefined,
  mass: number,
  key: string,
  way: 'lighter' | 'heavier',
): Promise<Neighbour | null> {
  const isLighter = way === 'lighter';
  // Said twice, since an index is entered by the bound alone.
  const bound = isLighter ? lte(section.massKgM, mass) : gte(section.massKgM, mass);
  const named = sql`(${section.massKgM}, ${section.designationKey} collate "C")`;
  const beyond = sql`${named} ${isLighter ? sql`<` : sql`>`} (${mass}::float8, ${key}::text collate "C")`;
  const turn = isLighter ? desc : asc;
  const [found] = await tx
    .select({
      table: section.tableSlug,
      designation: section.designation,
      depth_mm: section.depthMm,
      mass_kg_m: section.massKgM,
    })
    .from(section)
    .where(and(where, bound, beyond))
    .orderBy(turn(section.massKgM), turn(sql`${section.designationKey} collate "C"`))
    .limit(1);
  return found ?? null;
}

/**
 * The series of a designation: sections that differ in their last size alone (W12x26 and W12x30, 100x100x8 and
 * 100x100x10), or in the only one that they have (IPE 270 and IPE 300).
 */
function seriesOf(designation: string): SQL | undefined {
  const { family, sizes } = designationParts(designation);
  const alike = sizes.slice(0, -1);
  return and(
    eq(section.family, family),
    sql`cardinality(${section.sizes}) = ${sizes.length}`,
    alike.length === 0
      ? undefined
      : sql`${section.sizes}[1:${sql.raw(String(alike.length))}] = array[${sql.join(
          alike.map((one) => sql`${one}::float8`),
          sql`, `,
        )}]`,
  );
}
