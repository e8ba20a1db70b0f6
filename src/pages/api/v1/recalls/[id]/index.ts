import { z } from 'zod';
import { RecallView } from '@/features/review/recall';
import { readRecall } from '@/features/review/recall.server';
import { endpoint } from '@/http/endpoint';
import { listQuery, readCursor, writeCursor } from '@/http/list';
import { idParam } from '@/http/params';

export const GET = endpoint(
  {
    summary: 'A recall with its uses, each with its owner and its decision',
    description:
      'The uses in pages, the reader’s own first. `uses` counts all of them; those in jobs that are not open to the reader are counted as `hidden` and not listed.',
    query: z.strictObject(listQuery),
    answer: RecallView,
  },
  async ({ params }, { user, query: { limit, cursor } }) => {
    const from = cursor === undefined ? 0 : readCursor(cursor, z.int().min(0));
    const { next, ...found } = await readRecall(user, idParam(params, 'id', 'This recall'), { from, limit });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);
