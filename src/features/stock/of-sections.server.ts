import { and, asc, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { stockLine, stockList } from '@/db/schema/stock';
import { designationKey } from '@/engine/section';
import { groupBy } from '@/lib/group-by';
import type { SectionStock, Supplier } from './stock';

/** The keys of the sections that a supplier holds, or any, by their table. */
export async function stockedNames(
  tx: Tx,
  practiceId: string,
  supplier: string | null,
): Promise<ReadonlyMap<string, ReadonlySet<string>>> {
  const rows = await tx
    .select({ table: stockLine.tableSlug, key: stockLine.designationKey })
    .from(stockLine)
    .innerJoin(
      stockList,
      and(eq(stockList.practiceId, stockLine.practiceId), eq(stockList.id, stockLine.listId)),
    )
    .where(
      and(eq(stockLine.practiceId, practiceId), supplier === null ? undefined : eq(stockList.slug, supplier)),
    );
  const byTable = groupBy(rows, ({ table }) => table);
  return new Map([...byTable].map(([table, held]) => [table, new Set(held.map(({ key }) => key))]));
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
