import { and, asc, count, desc, eq, gte, inArray, lte, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document, revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { designationKey, designationParts } from '@/engine/section';
import { isStocked } from '@/features/stock/of-sections.server';
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

const KEY = sql`${section.designationKey}`;
const FAMILY = sql`${section.family} collate "C"`;
const SIZES = sql`${section.sizes}`;
const SIZES_TEXT = sql`substr(${KEY}, length(${section.family}) + 1)`;

/** designationRank of the engine, as the database finds it. Null where the designation does not answer. */
function rankOf(q: string): SQL<number | null> {
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

export const rangeConditions = ({ ranges }: SectionQuery): SQL[] =>
  ranges.flatMap(({ field, min, max }) => [
    ...(min === undefined ? [] : [gte(FIELDS[field], min)]),
    ...(max === undefined ? [] : [lte(FIELDS[field], max)]),
  ]);

const conditions = (query: SectionQuery): (SQL | undefined)[] => [
  query.table === null ? undefined : eq(section.tableSlug, query.table),
  query.shapes === null ? undefined : inArray(section.shape, [...query.shapes]),
  query.inStock ? isStocked(query.supplier) : undefined,
  ...rangeConditions(query),
];

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

/** Fields that no row leaves out: an index gives their order either way. */
const ALWAYS: ReadonlySet<SectionField> = new Set([
  'depth_mm',
  'width_mm',
  'mass_kg_m',
  'area_cm2',
  'i_major_cm4',
  'i_minor_cm4',
  'w_el_cm3',
]);

interface Order {
  /** How well the designation answers; null where none is asked for. */
  readonly grade: SQL<number> | null;
  /** What is sorted by; null where it is the designation. */
  readonly value: SQL<number | null> | null;
  readonly descending: boolean;
  readonly isAlwaysThere: boolean;
}

function orderOf({ q, sort }: SectionQuery, rank: SQL<number | null>): Order {
  const { field, descending } = sort ?? LIGHTEST;
  return {
    grade: q === '' ? null : sort ? sql<number>`least(${rank}, 1)` : sql<number>`${rank}`,
    value: field === 'designation' ? null : sql<number | null>`${FIELDS[field]}`,
    descending,
    isAlwaysThere: field === 'designation' || ALWAYS.has(field),
  };
}

/** What a table does not give stands last either way. Ties go by designation and table. */
function turnsOf({ grade, value, descending, isAlwaysThere }: Order): SQL[] {
  const turn = descending ? desc : asc;
  const byName = [FAMILY, SIZES, sql`${section.tableSlug}`];
  if (value === null) return [...(grade ? [asc(grade)] : []), ...byName.map((one) => turn(one))];
  const byValue = isAlwaysThere ? turn(value) : sql`${turn(value)} nulls last`;
  return [...(grade ? [asc(grade)] : []), byValue, ...byName.map((one) => asc(one))];
}

/** Of the rows in an order, those after a place: first by its grade, then by its value, then by name. */
function after(place: SectionPlace, { grade, value, descending }: Order): SQL {
  const [placeGrade, placeValue, key, table] = place;
  const at = sql`${key}::text`;
  const named = sql`(${FAMILY}, ${SIZES}, ${section.tableSlug})`;
  const placeNamed = sql`(substring(${at} from '^[a-z]*') collate "C", string_to_array(regexp_replace(${at}, '^[a-z]*', ''), 'x')::float8[], ${table}::text)`;
  const inGrade =
    value === null
      ? sql`${named} ${descending ? sql`<` : sql`>`} ${placeNamed}`
      : afterValue(value, placeValue, descending, sql`${named} > ${placeNamed}`);
  if (grade === null) return inGrade;
  return sql`(${grade} > ${placeGrade}::int or (${grade} = ${placeGrade}::int and (${inGrade})))`;
}

function afterValue(value: SQL, placeValue: number | null, descending: boolean, afterName: SQL): SQL {
  if (placeValue === null) return sql`${value} is null and ${afterName}`;
  const at = sql`${placeValue}::float8`;
  // Said twice, since an index is entered by the bound alone.
  const beyond = descending ? sql`${value} < ${at}` : sql`${value} > ${at}`;
  const within = descending ? sql`${value} <= ${at}` : sql`${value} >= ${at}`;
  return sql`((${within} and (${beyond} or ${afterName})) or ${value} is null)`;
}

function pageOf(tx: Tx, where: SQL | undefined, order: Order, limit: number) {
  return selectRows(tx, {
    grade: (order.grade ?? sql<number>`1`).as('grade'),
    value: (order.value ?? sql<number | null>`0::float8`).as('value'),
    key: sql<string>`${KEY}`.as('key'),
  })
    .where(where)
    .orderBy(...turnsOf(order))
    .limit(limit);
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
  if (found.total > 0 || query.q === '' || (await isCalled(tx, practiceId, query.q))) return found;
  return nearest(tx, await issuedRows(tx, practiceId, query), query.q, page.limit);
}

/** What answers a query, as searchRows finds it; of the nearest, all. */
export async function answering(tx: Tx, practiceId: string, query: SectionQuery): Promise<SQL | undefined> {
  const issued = await issuedRows(tx, practiceId, query);
  if (query.q === '') return issued;
  if (await isCalled(tx, practiceId, query.q)) return and(issued, sql`${rankOf(query.q)} is not null`);
  return and(issued, inArray(section.id, await nearestIds(tx, issued, query.q)));
}

/** Of the issued editions, by their ids: of two tables' worth of statistics the planner guesses badly. */
export async function issuedRows(tx: Tx, practiceId: string, query?: SectionQuery): Promise<SQL | undefined> {
  const editions = await tx
    .select({ id: revision.id })
    .from(revision)
    .innerJoin(
      document,
      and(eq(document.practiceId, revision.practiceId), eq(document.id, revision.documentId)),
    )
    .where(
      and(
        eq(revision.practiceId, practiceId),
        eq(revision.state, 'issued'),
        eq(document.kind, 'section-table'),
        query?.table ? eq(document.slug, query.table) : undefined,
      ),
    );
  return and(
    eq(section.practiceId, practiceId),
    inArray(
      section.revisionId,
      editions.map(({ id }) => id),
    ),
    ...(query ? conditions(query) : []),
  );
}

/** The same, and none where no section is called so. */
export async function namedRows(
  tx: Tx,
  practiceId: string,
  query: SectionQuery,
  { place, limit }: Page,
): Promise<Found> {
  const rank = rankOf(query.q);
  const order = orderOf(query, rank);
  const issued = await issuedRows(tx, practiceId, query);
  const where = and(issued, query.q === '' ? undefined : sql`${rank} is not null`);
  const [[counted], rows] = await Promise.all([
    tx.select({ total: count() }).from(section).where(where),
    pageOf(tx, place ? and(where, after(place, order)) : where, order, limit + 1),
  ]);
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  return {
    items: shown.map(({ grade: _g, value: _v, key: _k, ...row }) => toItem(row)),
    next: rows.length > limit && last ? ([last.grade, last.value, last.key, last.table] as const) : null,
    total: counted?.total ?? 0,
  };
}

/** Whether any section is called so, whatever else is asked of it. */
async function isCalled(tx: Tx, practiceId: string, q: string): Promise<boolean> {
  const [found] = await tx
    .select({ id: section.id })
    .from(section)
    .where(and(await issuedRows(tx, practiceId), sql`${rankOf(q)} is not null`))
    .limit(1);
  return found !== undefined;
}

/** Most alike by the letters to be changed, among which the nearest are looked for. */
const CANDIDATES = 300;
/** Letters that a key is compared by. */
const LONGEST = 40;

async function nearestIds(tx: Tx, met: SQL | undefined, q: string): Promise<string[]> {
  const asked = designationKey(q).slice(0, LONGEST);
  const near = await tx
    .select({ id: section.id, designation: section.designation })
    .from(section)
    .where(met)
    .orderBy(sql`levenshtein(left(${KEY}, ${LONGEST}), ${asked})`, asc(section.massKgM), FAMILY, SIZES)
    .limit(CANDIDATES);
  return nearestDesignations(q, near).map(({ id }) => id);
}

/** Nobody is left with nothing for a slip of the finger. */
async function nearest(tx: Tx, met: SQL | undefined, q: string, limit: number): Promise<Found> {
  const ids = (await nearestIds(tx, met, q)).slice(0, limit);
  const rows = ids.length === 0 ? [] : await selectRows(tx, {}).where(and(met, inArray(section.id, ids)));
  const byId = new Map(rows.map((row) => [row.id, toItem(row)]));
  const items = ids.flatMap((id) => byId.get(id) ?? []);
  return { items, next: null, total: items.length };
}
