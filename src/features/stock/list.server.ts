import { and, asc, count, eq, getTableColumns, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { person } from '@/db/schema/account';
import { stockLine, stockList } from '@/db/schema/stock';
import { withPractice } from '@/db/tenancy';
import { designationKey } from '@/engine/section';
import { requirePermission } from '@/features/account/permission';
import type { AuditEntry } from '@/features/audit/audit';
import { recordAudit } from '@/features/audit/audit.server';
import type { Actor } from '@/features/review/rows.server';
import { AppError, invalid, notFound, stale } from '@/lib/app-error';
import { paths } from '@/paths';
import { suppliersOf } from './of-sections.server';
import {
  daysBetween,
  type Holding,
  type NewStockList,
  type StockListChange,
  type StockListView,
  type Supplier,
  slugOf,
} from './stock';

type ListRow = typeof stockList.$inferSelect;

const select = (tx: Tx, practiceId: string) =>
  tx
    .select({
      ...getTableColumns(stockList),
      changedBy: person.name,
      lines: sql<number>`(${tx
        .select({ lines: count() })
        .from(stockLine)
        .where(
          and(eq(stockLine.practiceId, stockList.practiceId), eq(stockLine.listId, stockList.id)),
        )})`.mapWith(Number),
    })
    .from(stockList)
    .innerJoin(person, eq(person.id, stockList.changedById))
    .where(eq(stockList.practiceId, practiceId))
    .$dynamic();

type Found = Awaited<ReturnType<typeof select>>[number];

const toView = (row: Found): StockListView => ({
  slug: row.slug,
  supplier: row.supplier,
  note: row.note,
  as_of: row.asOf,
  lines: row.lines,
  version: row.version,
  changed_by: row.changedBy,
  changed_at: row.changedAt.toISOString(),
});

/** Every stock list of the practice, by supplier. */
export function listStock(actor: Actor): Promise<StockListView[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const rows = await select(tx, actor.practiceId).orderBy(asc(stockList.supplier), asc(stockList.slug));
    return rows.map(toView);
  });
}

/** Whose stock the practice knows, for filters. */
export function listSuppliers(actor: Actor): Promise<Supplier[]> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, (tx) => suppliersOf(tx, actor.practiceId));
}

interface HeldBy extends Holding {
  /** The address of the stock list, the supplier's name, and the day of the list. */
  readonly supplier: string;
  readonly name: string;
  readonly asOf: string;
}

/** Who holds a section, of how many stock lists. */
export function readSectionStock(
  actor: Actor,
  { table, designation }: { readonly table: string; readonly designation: string },
): Promise<{ readonly held: readonly HeldBy[]; readonly lists: number }> {
  requirePermission(actor, 'library.read');
  const { practiceId } = actor;
  return withPractice(actor, async (tx) => {
    const [held, lists] = await Promise.all([
      tx
        .select({
          supplier: stockList.slug,
          name: stockList.supplier,
          asOf: stockList.asOf,
          lengths_m: stockLine.lengthsM,
          lead_time_days: stockLine.leadTimeDays,
          price_band: stockLine.priceBand,
          note: stockLine.note,
        })
        .from(stockLine)
        .innerJoin(
          stockList,
          and(eq(stockList.practiceId, stockLine.practiceId), eq(stockList.id, stockLine.listId)),
        )
        .where(
          and(
            eq(stockLine.practiceId, practiceId),
            eq(stockLine.tableSlug, table),
            eq(stockLine.designationKey, designationKey(designation)),
          ),
        )
        .orderBy(asc(stockList.supplier), asc(stockList.slug)),
      suppliersOf(tx, practiceId),
    ]);
    return { held, lists: lists.length };
  });
}

export function readStockList(actor: Actor, slug: string): Promise<StockListView> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, (tx) => viewOf(tx, actor.practiceId, slug));
}

export async function viewOf(tx: Tx, practiceId: string, slug: string): Promise<StockListView> {
  const [row] = await select(tx, practiceId).where(
    and(eq(stockList.practiceId, practiceId), eq(stockList.slug, slug)),
  );
  if (!row) throw notFound('This stock list');
  return toView(row);
}

/** The row of a list, or 404. */
export async function requireList(tx: Tx, practiceId: string, slug: string): Promise<ListRow> {
  const [row] = await tx
    .select()
    .from(stockList)
    .where(and(eq(stockList.practiceId, practiceId), eq(stockList.slug, slug)));
  if (!row) throw notFound('This stock list');
  return row;
}

/** A day that is still to come in every time zone is a slip. */
export function requirePast(asOf: string): void {
  if (daysBetween(new Date().toISOString().slice(0, 10), asOf) <= 1) return;
  const message = 'This day is still to come. Give the day that the stock was true of.';
  throw invalid([{ pointer: '/as_of', code: 'out_of_range', message }]);
}

/** Begins the list of a supplier, empty. */
export async function createStockList(actor: Actor, given: NewStockList): Promise<StockListView> {
  requirePermission(actor, 'stock.edit');
  requirePast(given.as_of);
  const slug = slugOf(given.supplier);
  return withPractice(actor, async (tx) => {
    const holder = await sameName(tx, actor.practiceId, given.supplier);
    if (holder) throw taken(holder);
    const [made] = await tx
      .insert(stockList)
      .values({
        practiceId: actor.practiceId,
        slug,
        supplier: given.supplier,
        note: given.note,
        asOf: given.as_of,
        createdById: actor.personId,
        changedById: actor.personId,
      })
      .onConflictDoNothing({ target: [stockList.practiceId, stockList.slug] })
      .returning({ id: stockList.id });
    if (!made) throw taken(await viewOf(tx, actor.practiceId, slug));
    const after = { supplier: given.supplier, as_of: given.as_of, note: given.note };
    await record(tx, actor, made.id, { action: 'stock.create', after });
    return viewOf(tx, actor.practiceId, slug);
  });
}

type Named = Pick<ListRow, 'slug' | 'supplier'>;

/**
 * Another list whose supplier is called the same but for case, accents and marks. All lists are held until the
 * transaction ends, so that of two renamed at once the second sees the first.
 */
async function sameName(
  tx: Tx,
  practiceId: string,
  supplier: string,
  except?: string,
): Promise<Named | undefined> {
  const lists = await tx
    .select({ slug: stockList.slug, supplier: stockList.supplier })
    .from(stockList)
    .where(eq(stockList.practiceId, practiceId))
    .orderBy(asc(stockList.id))
    .for('update');
  return lists.find((one) => one.slug !== except && slugOf(one.supplier) === slugOf(supplier));
}

function taken({ slug, supplier }: Named): AppError {
  const message = `The stock list “${supplier}”, at ${paths.stockList(slug)}, has this name already. Change that one, or give another name.`;
  return new AppError('conflict', message, {
    faults: [{ pointer: '/supplier', code: 'taken', message }],
  });
}

/** Writes an event of a list: after everything else of the transaction. */
export const record = (
  tx: Tx,
  actor: Actor,
  id: string,
  entry: Omit<AuditEntry, 'subjectKind' | 'subjectId'>,
): Promise<void> => recordAudit(tx, actor, { ...entry, subjectKind: 'stock', subjectId: id });

type Change = Partial<Pick<ListRow, 'supplier' | 'note' | 'asOf'>>;

/**
 * Holds a list that a person changes, who has read this version of it: 404, or 412 with the list as it stands. Until
 * the transaction ends nobody else changes the list or its lines.
 */
export async function stepList(
  tx: Tx,
  actor: Actor,
  slug: string,
  version: number,
  change: Change = {},
): Promise<ListRow> {
  const { practiceId, personId } = actor;
  const [row] = await tx
    .update(stockList)
    .set({
      ...change,
      version: sql`${stockList.version} + 1`,
      changedById: personId,
      changedAt: sql`now()`,
    })
    .where(
      and(eq(stockList.practiceId, practiceId), eq(stockList.slug, slug), eq(stockList.version, version)),
    )
    .returning();
  if (row) return row;
  throw stale(await viewOf(tx, practiceId, slug));
}

/** Changes what is said of a list: its supplier's name, its day, its note. Its address stays. */
export async function changeStockList(
  actor: Actor,
  slug: string,
  version: number,
  { supplier, as_of: asOf, note }: StockListChange,
): Promise<StockListView> {
  requirePermission(actor, 'stock.edit');
  if (asOf !== undefined) requirePast(asOf);
  return withPractice(actor, async (tx) => {
    const before = await viewOf(tx, actor.practiceId, slug);
    const holder = supplier && (await sameName(tx, actor.practiceId, supplier, slug));
    if (holder) throw taken(holder);
    const change = {
      ...(supplier !== undefined && { supplier }),
      ...(asOf !== undefined && { asOf }),
      ...(note !== undefined && { note }),
    };
    const { id } = await stepList(tx, actor, slug, version, change);
    const after = await viewOf(tx, actor.practiceId, slug);
    await record(tx, actor, id, { action: 'stock.change', before: saidOf(before), after: saidOf(after) });
    return after;
  });
}

const saidOf = ({ supplier, as_of, note }: StockListView) => ({ supplier, as_of, note });

/** Removes a list with its lines; the record keeps that it was. */
export async function removeStockList(actor: Actor, slug: string, version: number): Promise<void> {
  requirePermission(actor, 'stock.edit');
  await withPractice(actor, async (tx) => {
    const before = await viewOf(tx, actor.practiceId, slug);
    const { id } = await stepList(tx, actor, slug, version);
    await tx
      .delete(stockLine)
      .where(and(eq(stockLine.practiceId, actor.practiceId), eq(stockLine.listId, id)));
    await tx.delete(stockList).where(and(eq(stockList.practiceId, actor.practiceId), eq(stockList.id, id)));
    await record(tx, actor, id, {
      action: 'stock.remove',
      before: { ...saidOf(before), lines: before.lines },
    });
  });
}
