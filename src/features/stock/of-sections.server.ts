import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { LRUCache } from 'lru-cache';
import type { Tx } from '@/db/client';
import { stockLine, stockList } from '@/db/schema/stock';
import { designationKey } from '@/engine/section';
import { groupBy } from '@/lib/group-by';
import type { SectionStock, Supplier } from './stock';

type Names = ReadonlyMap<string, ReadonlySet<string>>;

/** Lines that are held in memory, of all practices; some 100 bytes each. */
const MOST = 500_000;
/** By the versions of the lists: a version that was read once never says anything else. */
const known = new LRUCache<string, { readonly names: Names; readonly lines: number }>({
  maxSize: MOST,
  sizeCalculation: ({ lines }) => lines + 1,
});

/** The keys of the sections that a supplier holds, or any, by their table. */
export async function stockedNames(tx: Tx, practiceId: string, supplier: string | null): Promise<Names> {
  const lists = await tx
    .select({ id: stockList.id, version: stockList.version })
    .from(stockList)
    .where(
      and(eq(stockList.practiceId, practiceId), supplier === null ? undefined : eq(stockList.slug, supplier)),
    )
    .orderBy(stockList.id);
  const of = lists.map(({ id, version }) => `${id} ${version}`).join(' ');
  const before = known.get(of);
  if (before) return before.names;
  const rows = await tx
    .select({ table: stockLine.tableSlug, key: stockLine.designationKey })
    .from(stockLine)
    .where(
      and(
        eq(stockLine.practiceId, practiceId),
        inArray(
          stockLine.listId,
          lists.map(({ id }) => id),
        ),
      ),
    );
  const byTable = groupBy(rows, ({ table }) => table);
  const names = new Map([...byTable].map(([table, held]) => [table, new Set(held.map(({ key }) => key))]));
  known.set(of, { names, lines: rows.length });
  return names;
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
