import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import type { UnitSystemName } from '@/engine/quantity';
import { stockedNames } from '@/features/stock/of-sections.server';
import type { SectionPlace, SectionQuery } from './query';
import { find, named } from './register/find';
import type { Page, RowsFound } from './register/page';
import { registerOf } from './register/read.server';
import type { Asked, Register } from './register/register';
import { spreadIn } from './register/spread';
import { itemDimensions, type SectionItem } from './section';
import type { Spread } from './spread';

const COLUMNS = {
  revisionId: section.revisionId,
  key: section.designationKey,
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
export const selectRows = (tx: Tx) =>
  tx
    .select(COLUMNS)
    .from(section)
    .innerJoin(
      revision,
      and(eq(revision.practiceId, section.practiceId), eq(revision.id, section.revisionId)),
    );

type Row = Omit<SectionItem, 'dimensions_mm'> & {
  revisionId: string;
  key: string;
  dimensions: (typeof section.$inferSelect)['dimensions'];
};

export function toItem(row: Row): SectionItem {
  const { revisionId: _revision, key: _key, dimensions, ...shown } = row;
  return { ...shown, ...itemDimensions(dimensions) };
}

export interface Found {
  readonly items: readonly SectionItem[];
  readonly next: SectionPlace | null;
  readonly total: number;
}

/** One page of the rows of issued editions that answer a query, after a place in the list; else the nearest. */
export async function searchRows(
  tx: Tx,
  practiceId: string,
  query: SectionQuery,
  page: Page,
): Promise<Found> {
  const register = await registerOf(tx, practiceId);
  return itemsOf(
    tx,
    register,
    practiceId,
    find(register, await askedOf(tx, register, practiceId, query), page),
  );
}

/** The same, and none where no section is called so. */
export async function namedRows(tx: Tx, practiceId: string, query: SectionQuery, page: Page): Promise<Found> {
  const register = await registerOf(tx, practiceId);
  return itemsOf(
    tx,
    register,
    practiceId,
    named(register, await askedOf(tx, register, practiceId, query), page),
  );
}

/** How the depth and mass of the sections of the issued editions that answer a query are spread. */
export async function spreadRows(
  tx: Tx,
  practiceId: string,
  query: SectionQuery,
  system: UnitSystemName,
): Promise<Spread> {
  const register = await registerOf(tx, practiceId);
  return spreadIn(register, await askedOf(tx, register, practiceId, query), system);
}

/** How many sections the issued editions have. */
export const countRows = async (tx: Tx, practiceId: string): Promise<number> =>
  (await registerOf(tx, practiceId)).count;

/** What suppliers hold changes week by week: it is read with every search that asks for it. */
async function askedOf(tx: Tx, register: Register, practiceId: string, query: SectionQuery): Promise<Asked> {
  if (!query.inStock) return query;
  return { ...query, only: register.named(await stockedNames(tx, practiceId, query.supplier)) };
}

async function itemsOf(
  tx: Tx,
  register: Register,
  practiceId: string,
  { at, next, total }: RowsFound,
): Promise<Found> {
  const items = await itemsAt(tx, register, practiceId, at);
  return { items: at.flatMap((row) => items.get(row) ?? []), next, total };
}

/** The sections of rows of a register, by their row. */
export async function itemsAt(
  tx: Tx,
  register: Register,
  practiceId: string,
  at: readonly number[],
): Promise<ReadonlyMap<number, SectionItem>> {
  if (at.length === 0) return new Map();
  const revisions = at.map((row) => register.edition(row).revisionId);
  const keys = at.map(register.key);
  const rows = await selectRows(tx).where(
    and(
      eq(section.practiceId, practiceId),
      sql`(${section.revisionId}, ${section.designationKey}) in
        (select * from unnest(${sql.param(revisions)}::uuid[], ${sql.param(keys)}::text[]))`,
    ),
  );
  const byName = new Map(rows.map((row) => [`${row.revisionId} ${row.key}`, toItem(row)]));
  return new Map(
    at.flatMap((row, i) => {
      const item = byName.get(`${revisions[i]} ${keys[i]}`);
      return item ? [[row, item] as const] : [];
    }),
  );
}
