import { and, asc, eq, type SQL, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { section } from '@/db/schema/section';
import { stockLine, stockList } from '@/db/schema/stock';
import { designationKey } from '@/engine/section';
import { groupBy } from '@/lib/group-by';
import type { SectionStock, Supplier } from './stock';

/** Of sections: that a supplier holds them, this one or any. */
export function isStocked(supplier: string | null): SQL {
  const bySupplier =
    supplier === null
      ? sql``
      : sql`and ${stockLine.listId} = (select ${stockList.id} from ${stockList}
          where ${stockList.practiceId} = ${section.practiceId} and ${stockList.slug} = ${supplier})`;
  return sql`exists (select from ${stockLine} where ${stockLine.practiceId} = ${section.practiceId}
    and ${stockLine.tableSlug} = ${section.tableSlug}
    and ${stockLine.designationKey} = ${section.designationKey} ${bySupplier})`;
}

interface Named {
  readonly table: string;
  readonly designation: string;
}

/** The same items, each with who holds it. */
export async function withStock<T extends Named>(
  tx: Tx,
  practiceId: string,
  items: readonly T[],
): Promise<(T & { stock?: SectionStock[] })[]> {
  if (items.length === 0) return [];
  const keys = items.map(({ designation }) => designationKey(designation));
  const tables = items.map(({ table }) => table);
  const rows = await tx
    .select({
      table: stockLine.tableSlug,
      key: stockLine.designationKey,
      supplier: stockList.slug,
      lengths_m: stockLine.lengthsM,
      lead_time_days: stockLine.leadTimeDays,
      price_band: stockLine.priceBand,
    })
    .from(stockLine)
    .innerJoin(
      stockList,
      and(eq(stockList.practiceId, stockLine.practiceId), eq(stockList.id, stockLine.listId)),
    )
    .where(
      and(
        eq(stockLine.practiceId, practiceId),
        sql`(${stockLine.tableSlug}, ${stockLine.designationKey}) in
          (select * from unnest(${sql.param(tables)}::text[], ${sql.param(keys)}::text[]))`,
      ),
    )
    .orderBy(asc(stockList.supplier), asc(stockList.slug));
  const held = groupBy(rows, ({ table, key }) => `${table}/${key}`);
  return items.map((item, at) => {
    const stock = held.get(`${item.table}/${keys[at]}`)?.map(({ table: _t, key: _k, ...one }) => one);
    return stock ? { ...item, stock } : item;
  });
}

/** Whose stock lists the practice keeps, by name. */
export function suppliersOf(tx: Tx, practiceId: string): Promise<Supplier[]> {
  return tx
    .select({ slug: stockList.slug, name: stockList.supplier, asOf: stockList.asOf })
    .from(stockList)
    .where(eq(stockList.practiceId, practiceId))
    .orderBy(asc(stockList.supplier), asc(stockList.slug))
    .execute();
}
