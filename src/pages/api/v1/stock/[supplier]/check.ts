import { z } from 'zod';
import { MOST_BYTES } from '@/features/stock/file';
import { checkStock } from '@/features/stock/replace.server';
import { readingQuery, StockCheck } from '@/features/stock/stock';
import { readBytes } from '@/http/body';
import { endpoint } from '@/http/endpoint';

export const POST = endpoint(
  {
    summary: 'What a CSV of stock lines comes to, with nothing kept of it',
    description:
      'The body is the CSV as PUT …/lines takes it. Each line that matches no section of an issued edition, or several, is named with its value and the reason. mark is the decimal mark of its lengths: point, comma, or none where a comma may be meant either way; without it, the mark is recognised.',
    query: z.strictObject(readingQuery),
    answer: StockCheck,
  },
  async ({ request, params: { supplier = '' } }, { user, query: { mark } }) =>
    checkStock(user, supplier, { bytes: await readBytes(request, MOST_BYTES), mark }),
);
