import { and, asc, count, desc, eq, gte, inArray, lte, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { designationParts } from '@/engine/section';
import {
  LIGHTEST,
  nearestDesignations,
  type SectionField,
  type SectionPlace,
  type SectionQuery,
} from './query';
import { itemDimensions, type SectionItem } from './section';

const size = (symbol: string, ofTube?: string): SQL =>
  ofTube === undefined
    ? sql`1000 * (${section.dimensions} ->> ${symbol})::float8`
    : sql`1000 * coalesce(${section.dimensions} ->> ${symbol}, ${section.dimensions} ->> ${ofTube})::float8`;

/** What each field is in the table; those that are not columns as measureOf finds them. */
const FIELDS: Record<SectionField, SQL> = {
  depth_mm: sql`${section.depthMm}`,
  width_mm: sql`${section.widthMm}`,
  mass_kg_m: sql`${section.massKgM}`,
  area_cm2: sql`${section.areaCm2}`,
  i_major_cm4: sql`${section.iMajorCm4}`,
  i_minor_cm4: sql`${section.iMinorCm4}`,
  w_el_cm3: sql`${section.wElCm3}`,
  w_pl_cm3: sql`${section.wPlCm3}`,
  j_cm4: sql`${section.jCm4}`,
  iw_cm6: sql`${section.iwCm6}`,
  tw_mm: sql`round((${size('tw', 't')})::numeric, 9)::float8`,
  tf_mm: sql`round((${size('tf')})::numeric, 9)::float8`,
  r_mm: sql`round((${size('r', 'ro')})::numeric, 9)::float8`,
  r_major_cm: sql`sqrt(${section.iMajorCm4} / ${section.areaCm2})`,
  r_minor_cm: sql`sqrt(${section.iMinorCm4} / ${section.areaCm2})`,
};

const familyOf = (key: SQL): SQL => sql`substring(${key} from '^[a-z]*') collate "C"`;
const sizesTextOf = (key: SQL): SQL => sql`regexp_replace(${key}, '^[a-z]*', '')`;
const sizesOf = (key: SQL): SQL => sql`string_to_array(${sizesTextOf(key)}, 'x')::float8[]`;

const KEY = sql`${section.designationKey}`;
const FAMILY = familyOf(KEY);
const SIZES_TEXT = sizesTextOf(KEY);

/** designationRank of the engine, as the database finds it. Null where the designation does not answer. */
function rankOf(q: string): SQL<number | null> {
  if (q === '') return sql`1::int`; // a bare 1 in ORDER BY means the first column
  const { family, sizes } = designationParts(q);
  if (family === '' && sizes.length === 0) return sql`null::int`;
  const together = sizes.join('x');
  const begins = sql`starts_with(${SIZES_TEXT}, ${together})`;
  const occur = sizes.map((one) => sql`strpos('x' || ${SIZES_TEXT}, ${`x${one}`}) > 0`);
  const alone = family === '' ? sql`when ${SIZES_TEXT} = ${together} then 1` : sql``;
  const bare = family === '' ? sql`when ${begins} then 3` : sql``;
  return sql`case when ${KEY} = ${family + together} then 0 ${alone}
    when ${FAMILY} = ${family} and ${begins} then 2 ${bare}
    when ${and(sql`starts_with(${FAMILY}, ${family})`, ...occur)} then 4 end`;
}

function conditions({ table, shapes, ranges }: SectionQuery): (SQL | undefined)[] {
  return [
    table === null ? undefined : eq(section.tableSlug, table),
    shapes === null ? undefined : inArray(section.shape, [...shapes]),
    ...ranges.flatMap(({ field, min, max }) => [
      min === undefined ? undefined : gte(FIELDS[field], min),
      max === undefined ? undefined : lte(FIELDS[field], max),
    ]),
  ];
}

const COLUMNS = {
  id: section.id,
  table: section.tableSlug,
  edition: revision.number,
  designation: section.designation,
  printed: section.printed,
  shape: section.shape,
  depth_mm: section.depthMm,
  width_mm: section.widthMm,
  mass_kg_m: section.massKgM,
  area_cm2: section.areaCm2,
  i_major_cm4: section.iMajorCm4,
  i_minor_cm4: section.iMinorCm4,
  w_el_cm3: section.wElCm3,
  w_pl_cm3: section.wPlCm3,
  j_cm4: section.jCm4,
  iw_cm6: section.iwCm6,
  computed: section.computed,
  dimensions: section.dimensions,
};

/** Rows with their edition: of every edition, unless narrowed. */
export const selectRows = <T extends Record<string, SQL | SQL.Aliased>>(tx: Tx, more: T) =>
  tx
    .select({ ...COLUMNS, ...more })
    .from(section)
    .innerJoin(
      revision,
      and(eq(revision.practiceId, section.practiceId), eq(revision.id, section.revisionId)),
    );

type Row = Omit<SectionItem, 'dimensions_mm'> & {
  id: string;
  dimensions: (typeof section.$inferSelect)['dimensions'];
};

export function toItem(row: Row): SectionItem {
  const { id: _id, dimensions, ...shown } = row;
  return { ...shown, ...itemDimensions(dimensions) };
}

export interface Found {
  readonly items: readonly SectionItem[];
  readonly next: SectionPlace | null;
  readonly total: number;
}

/** The order as one tuple that only rises, or for a descending designation only falls; nulls are the last. */
function orderOf({ q, sort }: SectionQuery, rank: SQL) {
  const { field, descending } = sort ?? LIGHTEST;
  const falls = field === 'designation' && descending;
  const grade = q === '' || !sort ? rank : sql`least(${rank}, 1)`;
  const value =
    field === 'designation'
      ? sql`0::float8`
      : sql`coalesce(${descending ? sql`-` : sql``}${FIELDS[field]}, 'Infinity')`;
  return {
    grade: falls ? sql<number>`-(${grade})` : sql<number>`${grade}`,
    value: sql<number>`${value}`.mapWith(Number),
    falls,
  };
}

function pageOf(tx: Tx, where: SQL | undefined, order: ReturnType<typeof orderOf>, limit: number) {
  const turn = order.falls ? desc : asc;
  return selectRows(tx, {
    grade: order.grade.as('grade'),
    value: order.value.as('value'),
    key: sql<string>`${KEY}`.as('key'),
  })
    .where(where)
    .orderBy(turn(order.grade), turn(order.value), turn(FAMILY), turn(sizesOf(KEY)), turn(section.tableSlug))
    .limit(limit);
}

function after(place: SectionPlace, { grade, value, falls }: ReturnType<typeof orderOf>): SQL {
  const [placeGrade, placeValue, key, table] = place;
  const at = sql`${key}::text`;
  return sql`(${grade}, ${value}, ${FAMILY}, ${sizesOf(KEY)}, ${section.tableSlug}) ${falls ? sql`<` : sql`>`}
    (${placeGrade}::int, ${placeValue ?? 'Infinity'}::float8, ${familyOf(at)}, ${sizesOf(at)}, ${table}::text)`;
}

interface Page {
  readonly place: SectionPlace | null;
  readonly limit: number;
}

/** One page of the rows of issued editions that answer a query, after a place in the list; else the nearest. */
export async function searchRows(
  tx: Tx,
  practiceId: string,
  query: SectionQuery,
  page: Page,
): Promise<Found> {
  const found = await namedRows(tx, practiceId, query, page);
  if (found.total > 0 || query.q === '' || (await isCalled(tx, practiceId, rankOf(query.q)))) return found;
  return nearest(tx, issuedRows(practiceId, query), query.q, page.limit);
}

const issuedRows = (practiceId: string, query: SectionQuery): SQL | undefined =>
  and(eq(section.practiceId, practiceId), eq(revision.state, 'issued'), ...conditions(query));

/** The same, and none where no section is called so. */
export async function namedRows(
  tx: Tx,
  practiceId: string,
  query: SectionQuery,
  { place, limit }: Page,
): Promise<Found> {
  const rank = rankOf(query.q);
  const order = orderOf(query, rank);
  const where = and(issuedRows(practiceId, query), query.q === '' ? undefined : sql`${rank} is not null`);
  const [[counted], rows] = await Promise.all([
    tx
      .select({ total: count() })
      .from(section)
      .innerJoin(
        revision,
        and(eq(revision.practiceId, section.practiceId), eq(revision.id, section.revisionId)),
      )
      .where(where),
    pageOf(tx, place ? and(where, after(place, order)) : where, order, limit + 1),
  ]);
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  const next =
    rows.length > limit && last
      ? ([last.grade, Number.isFinite(last.value) ? last.value : null, last.key, last.table] as const)
      : null;
  return {
    items: shown.map(({ grade: _g, value: _v, key: _k, ...row }) => toItem(row)),
    next,
    total: counted?.total ?? 0,
  };
}

/** Whether any section is called so, whatever else is asked of it. */
async function isCalled(tx: Tx, practiceId: string, rank: SQL): Promise<boolean> {
  const [found] = await selectRows(tx, {})
    .where(and(eq(section.practiceId, practiceId), eq(revision.state, 'issued'), sql`${rank} is not null`))
    .limit(1);
  return found !== undefined;
}

/** Nobody is left with nothing for a slip of the finger. */
async function nearest(tx: Tx, met: SQL | undefined, q: string, limit: number): Promise<Found> {
  const order = orderOf({ q: '', table: null, shapes: null, ranges: [], sort: null }, sql`1::int`);
  const all = await selectRows(tx, {})
    .where(met)
    .orderBy(asc(order.value), asc(FAMILY), asc(sizesOf(KEY)), asc(section.tableSlug));
  const items = nearestDesignations(q, all).slice(0, limit).map(toItem);
  return { items, next: null, total: items.length };
}
