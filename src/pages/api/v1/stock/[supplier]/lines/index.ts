import { z } from 'zod';
import { MOST_BYTES } from '@/features/stock/file';
import { addStockLine, readStockLines } from '@/features/stock/lines.server';
import { replaceStock } from '@/features/stock/replace.server';
import { NewStockLine, readingQuery, StockLine, StockListView } from '@/features/stock/stock';
import { readBytes } from '@/http/body';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'The lines of a stock list',
    description:
      'q is a part of a designation, however typed. The ETag is the list’s, for changes of a line.',
    query: z.strictObject({ ...listQuery, q: z.string().max(100).default('') }),
    answer: listOf(StockLine),
  },
  async ({ params: { supplier = '' } }, { user, query: { limit, cursor, q } }) => {
    const from = cursor ? readCursor(cursor, z.int().nonnegative()) : 0;
    const { items, next, total, version } = await readStockLines(user, supplier, { q, from, limit });
    const page = { items, total, next: next === null ? null : writeCursor(next) };
    return answer(page, { headers: { ETag: etag(version) } });
  },
);

export const POST = endpoint(
  { summary: 'Adds one line to a stock list', body: NewStockLine, answer: StockLine, status: 201 },
  async (context, { user, body }) => {
    const { line, list } = await addStockLine(user, context.params['supplier'] ?? '', ifMatch(context), body);
    return answer(line, { status: 201, headers: { ETag: etag(list.version) } });
  },
);

export const PUT = endpoint(
  {
    summary: 'Replaces all lines of a stock list by a CSV',
    description:
      'The body is the CSV, 5 MB and 20,000 lines at most: columns designation, table, stock lengths (m), lead time (days), price band and note, of which only the first is needed. as_of is the day that the stock was true of, mark as POST …/check takes it. One line with a fault refuses all; POST …/check lists them first.',
    query: z.strictObject({ as_of: z.iso.date(), ...readingQuery }),
    answer: StockListView,
  },
  async (context, { user, query }) => {
    const version = ifMatch(context);
    const bytes = await readBytes(context.request, MOST_BYTES);
    const given = { asOf: query.as_of, mark: query.mark, bytes };
    const view = await replaceStock(user, context.params['supplier'] ?? '', version, given);
    return answer(view, { headers: { ETag: etag(view.version) } });
  },
);
