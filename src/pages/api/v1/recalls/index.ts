import { z } from 'zod';
import { RecallItem, RecallPlace, recallQuery } from '@/features/review/recall';
import { listRecalls } from '@/features/review/recall-view.server';
import { endpoint } from '@/http/endpoint';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'Recalls, the newest first',
    description: 'Open ones unless said. `mine`: only those with a use that is the reader’s to decide.',
    query: z.strictObject({ ...listQuery, ...recallQuery }),
    answer: listOf(RecallItem),
  },
  async (_, { user, query: { limit, cursor, ...query } }) => {
    const after = cursor === undefined ? undefined : readCursor(cursor, RecallPlace);
    const { next, ...found } = await listRecalls(user, query, { after, limit });
    return { ...found, next: next && writeCursor(next) };
  },
);
