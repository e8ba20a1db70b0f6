import { and, count, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { revision } from '@/db/schema/library';
import { section } from '@/db/schema/section';
import { stockLine } from '@/db/schema/stock';
import { withPractice } from '@/db/tenancy';
import { designationKey } from '@/engine/section';
import { requirePermission } from '@/features/account/permission';
import type { Actor } from '@/features/review/rows.server';
import { AppError, invalid, notFound } from '@/lib/app-error';
import { BY_HAND } from './cells';
import { stockCsv } from './file';
import { readLibrary } from './library.server';
import { record, requireList, stepList, viewOf } from './list.server';
import { matchRows } from './match';
import type { Holding, NewStockLine, StockLine, StockListView } from './stock';

const ISSUED = sql`exists (select from ${section} join ${revision}
  on ${revision.practiceId} = ${section.practiceId} and ${revision.id} = ${section.revisionId}
  where ${section.practiceId} = ${stockLine.practiceId} and ${revision.state} = 'issued'
  and ${section.tableSlug} = ${stockLine.tableSlug} and ${section.designationKey} = ${stockLine.designationKey})`;
/** Inside another expression the columns keep the names of their tables. */
const IN_LIBRARY = sql<boolean>`(${ISSUED})`;

const COLUMNS = {
  id: stockLine.id,
  table: stockLine.tableSlug,
  designation: stockLine.designation,
  lengths_m: stockLine.lengthsM,
  lead_time_days: stockLine.leadTimeDays,
  price_band: stockLine.priceBand,
  note: stockLine.note,
};

/** By table, then as designations are sorted: letters, then sizes. */
const IN_ORDER = [
  stockLine.tableSlug,
  sql`substring(${stockLine.designationKey} from '^[a-z]*') collate "C"`,
  sql`string_to_array(regexp_replace(${stockLine.designationKey}, '^[a-z]*', ''), 'x')::float8[]`,
];

const ofList = (practiceId: string, listId: string) =>
  and(eq(stockLine.practiceId, practiceId), eq(stockLine.listId, listId));

interface Page {
  /** Part of a designation, however typed; empty for all. */
  readonly q: string;
  readonly from: number;
  readonly limit: number;
}

interface LinePage {
  readonly items: readonly StockLine[];
  readonly next: number | null;
  readonly total: number;
  readonly version: number;
}

/** The lines of a list, a page at a time. */
export function readStockLines(actor: Actor, slug: string, { q, from, limit }: Page): Promise<LinePage> {
  requirePermission(actor, 'library.read');
  const key = designationKey(q);
  return withPractice(actor, async (tx) => {
    const { id, version } = await requireList(tx, actor.practiceId, slug);
    const where = and(
      ofList(actor.practiceId, id),
      q.trim() === '' ? undefined : sql`${key} <> '' and strpos(${stockLine.designationKey}, ${key}) > 0`,
    );
    const [[counted], rows] = await Promise.all([
      tx.select({ total: count() }).from(stockLine).where(where),
      tx
        .select({ ...COLUMNS, in_library: IN_LIBRARY })
        .from(stockLine)
        .where(where)
        .orderBy(...IN_ORDER)
        .offset(from)
        .limit(limit + 1),
    ]);
    const next = rows.length > limit ? from + limit : null;
    return { items: rows.slice(0, limit), next, total: counted?.total ?? 0, version };
  });
}

/** A list's lines as a CSV that can be loaded again. */
export function exportStock(actor: Actor, slug: string): Promise<string> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const { id } = await requireList(tx, actor.practiceId, slug);
    const rows = await tx
      .select(COLUMNS)
      .from(stockLine)
      .where(ofList(actor.practiceId, id))
      .orderBy(...IN_ORDER);
    return stockCsv(rows);
  });
}

/** What is said of a section by hand, with the section that it names. */
async function requireSection(tx: Tx, practiceId: string, { designation, table = '' }: NewStockLine) {
  const texts = { designation, table, lengths: '', lead_time: '', price_band: '', note: '' };
  const library = await readLibrary(tx, practiceId, [designationKey(designation)]);
  const { lines, faults } = matchRows([{ line: 1, texts, spare: '' }], BY_HAND, library);
  const [found] = lines;
  if (found) return found;
  throw invalid(faults.map(({ field, code, message }) => ({ pointer: `/${field}`, code, message })));
}

const toRow = ({ lengths_m, lead_time_days, price_band, note }: Holding) => ({
  lengthsM: lengths_m,
  leadTimeDays: lead_time_days,
  priceBand: price_band,
  note,
});

interface Changed {
  readonly line: StockLine;
  readonly list: StockListView;
}

/** Adds one line by hand; 409 where the list has the section already. */
export function addStockLine(
  actor: Actor,
  slug: string,
  version: number,
  given: NewStockLine,
): Promise<Changed> {
  requirePermission(actor, 'stock.edit');
  const { designation: _d, table: _t, ...held } = given;
  return withPractice(actor, async (tx) => {
    const { practiceId } = actor;
    const list = await stepList(tx, actor, slug, version);
    const { table, designation, key } = await requireSection(tx, practiceId, given);
    const [made] = await tx
      .insert(stockLine)
      .values({
        practiceId,
        listId: list.id,
        tableSlug: table,
        designation,
        designationKey: key,
        ...toRow(held),
      })
      .onConflictDoNothing({
        target: [stockLine.practiceId, stockLine.listId, stockLine.tableSlug, stockLine.designationKey],
      })
      .returning({ id: stockLine.id });
    if (!made) {
      const message = `The list has ${designation} of ${table} already. Change its line instead.`;
      const faults = [{ pointer: '/designation', code: 'duplicate', message }];
      throw new AppError('conflict', message, { faults });
    }
    const after = { supplier: slug, table, designation, ...held };
    await record(tx, actor, list.id, { action: 'stock.add-line', after });
    return {
      line: { id: made.id, table, designation, ...held, in_library: true },
      list: await viewOf(tx, practiceId, slug),
    };
  });
}

/** Changes what a supplier holds of one section. */
export function changeStockLine(
  actor: Actor,
  slug: string,
  version: number,
  change: { readonly id: string; readonly held: Holding },
): Promise<Changed> {
  requirePermission(actor, 'stock.edit');
  return withPractice(actor, async (tx) => {
    const { practiceId } = actor;
    const list = await stepList(tx, actor, slug, version);
    const { in_library, ...before } = await requireLine(tx, practiceId, list.id, change.id);
    await tx
      .update(stockLine)
      .set(toRow(change.held))
      .where(and(ofList(practiceId, list.id), eq(stockLine.id, change.id)));
    const line = { ...before, ...change.held };
    await record(tx, actor, list.id, {
      action: 'stock.change-line',
      before: { supplier: slug, ...before },
      after: { supplier: slug, ...line },
    });
    return { line: { ...line, in_library }, list: await viewOf(tx, practiceId, slug) };
  });
}

/** Takes one line out of a list. */
export function removeStockLine(
  actor: Actor,
  slug: string,
  version: number,
  id: string,
): Promise<StockListView> {
  requirePermission(actor, 'stock.edit');
  return withPractice(actor, async (tx) => {
    const { practiceId } = actor;
    const list = await stepList(tx, actor, slug, version);
    const { in_library: _, ...before } = await requireLine(tx, practiceId, list.id, id);
    await tx.delete(stockLine).where(and(ofList(practiceId, list.id), eq(stockLine.id, id)));
    await record(tx, actor, list.id, {
      action: 'stock.remove-line',
      before: { supplier: slug, ...before },
    });
    return viewOf(tx, practiceId, slug);
  });
}

async function requireLine(tx: Tx, practiceId: string, listId: string, id: string): Promise<StockLine> {
  const [row] = await tx
    .select({ ...COLUMNS, in_library: IN_LIBRARY })
    .from(stockLine)
    .where(and(ofList(practiceId, listId), eq(stockLine.id, id)));
  if (!row) throw notFound('This stock line');
  return row;
}
