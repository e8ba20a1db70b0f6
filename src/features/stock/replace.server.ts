import { and, eq, sql } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { stockLine } from '@/db/schema/stock';
import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import type { Actor } from '@/features/review/rows.server';
import { invalid } from '@/lib/app-error';
import { contentHash } from '@/lib/fingerprint';
import { readStockFile, type StockFile } from './file';
import { readLibrary, withNearest } from './library.server';
import { record, requireList, requirePast, stepList, viewOf } from './list.server';
import { keysOf, type Matched, type MatchedLine, matchRows } from './match';
import type { MarkName, StockCheck, StockListView } from './stock';

const MOST_FAULTS = 500;

/** A CSV, and the decimal mark of its lengths where that is known already. */
interface GivenCsv {
  readonly bytes: Uint8Array;
  readonly mark?: MarkName | undefined;
}

function requireFile({ bytes, mark }: GivenCsv): StockFile {
  const reading = readStockFile(bytes, mark);
  if (reading.ok) return reading.file;
  throw invalid([{ pointer: '', ...reading.refusal }]);
}

const matchFile = async (tx: Tx, practiceId: string, { rows, as }: StockFile): Promise<Matched> =>
  matchRows(rows, as, await readLibrary(tx, practiceId, keysOf(rows)));

/** What a CSV of lines comes to. Nothing is kept. */
export function checkStock(actor: Actor, slug: string, csv: GivenCsv): Promise<StockCheck> {
  requirePermission(actor, 'stock.edit');
  const file = requireFile(csv);
  return withPractice(actor, async (tx) => {
    await requireList(tx, actor.practiceId, slug);
    const { lines, faults } = await matchFile(tx, actor.practiceId, file);
    const shown = await withNearest(tx, actor.practiceId, faults.slice(0, MOST_FAULTS));
    return {
      rows: file.rows.length,
      good: lines.length,
      fault_count: faults.length,
      faults: shown.map((fault) => ({
        ...fault,
        suggestions: fault.suggestions.map(({ table, designation }) => ({ table, designation })),
      })),
      read_as: {
        delimiter: file.delimiter,
        decimal_mark: file.as.mark,
        encoding: file.encoding,
        length_unit: file.as.lengthUnit,
        columns: file.columns.map(({ heading, field }) => ({ heading, field })),
      },
    };
  });
}

/** Puts a CSV in the place of all lines of a list, as of a day. A line with a fault refuses it whole (422). */
export function replaceStock(
  actor: Actor,
  slug: string,
  version: number,
  { asOf, ...csv }: GivenCsv & { readonly asOf: string },
): Promise<StockListView> {
  requirePermission(actor, 'stock.edit');
  requirePast(asOf);
  const file = requireFile(csv);
  return withPractice(actor, async (tx) => {
    const { practiceId } = actor;
    const before = await viewOf(tx, practiceId, slug);
    const { id } = await stepList(tx, actor, slug, version, { asOf });
    const { lines, faults } = await matchFile(tx, practiceId, file);
    if (faults.length > 0) throw invalid(faults.slice(0, MOST_FAULTS).map(toFault));
    const changes = await writeLines(tx, practiceId, id, lines);
    await record(tx, actor, id, {
      action: 'stock.replace',
      before: { supplier: slug, as_of: before.as_of, lines: before.lines },
      after: { supplier: slug, as_of: asOf, lines: lines.length, ...changes },
    });
    return viewOf(tx, practiceId, slug);
  });
}

const toFault = ({ line, field, value, code, message }: Matched['faults'][number]) => ({
  pointer: `/lines/${line}/${field}`,
  code,
  message: `Line ${line}${value === '' ? '' : `, “${value}”`}: ${message}`,
});

interface Changes {
  readonly added: number;
  readonly removed: number;
  readonly changed: number;
  /** Of the lines as they stand now. */
  readonly sha256: string;
}

const nameOf = (table: string, key: string): string => `${table}/${key}`;

/** What a line says, to be compared. */
const said = (lengths: readonly number[], lead: number | null, band: string | null, note: string): string =>
  JSON.stringify([lengths, lead, band, note]);

async function writeLines(
  tx: Tx,
  practiceId: string,
  listId: string,
  lines: readonly MatchedLine[],
): Promise<Changes> {
  const gone = await tx
    .delete(stockLine)
    .where(and(eq(stockLine.practiceId, practiceId), eq(stockLine.listId, listId)))
    .returning();
  await insertLines(tx, practiceId, listId, lines);
  return changesOf(
    new Map(
      gone.map((row) => [
        nameOf(row.tableSlug, row.designationKey),
        said(row.lengthsM, row.leadTimeDays, row.priceBand, row.note),
      ]),
    ),
    new Map(
      lines.map((line) => [
        nameOf(line.table, line.key),
        said(line.lengths_m, line.lead_time_days, line.price_band, line.note),
      ]),
    ),
  );
}

/** As one parameter: the query builder takes ten times as long over one for each cell. */
const insertLines = (tx: Tx, practiceId: string, listId: string, lines: readonly MatchedLine[]) =>
  tx.execute(sql`
    insert into stock_line (practice_id, list_id, table_slug, designation, designation_key, lengths_m, lead_time_days, price_band, note)
    select ${practiceId}::uuid, ${listId}::uuid, r."table", r.designation, r.key, r.lengths_m, r.lead_time_days, r.price_band, r.note
    from jsonb_to_recordset(${JSON.stringify(lines)}::text::jsonb) as r ("table" text, designation text, key text,
      lengths_m float8[], lead_time_days int, price_band text, note text)`);

function changesOf(before: ReadonlyMap<string, string>, after: ReadonlyMap<string, string>): Changes {
  const kept = [...after].filter(([name]) => before.has(name));
  return {
    added: after.size - kept.length,
    removed: before.size - kept.length,
    changed: kept.filter(([name, words]) => before.get(name) !== words).length,
    sha256: contentHash([...after].sort(([a], [b]) => (a < b ? -1 : 1))),
  };
}
