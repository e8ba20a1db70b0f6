import { z } from 'zod';
import { UsesView } from '@/features/review/document';
import { whereUsed } from '@/features/review/where-used.server';
import { endpoint } from '@/http/endpoint';
import { documentKey } from '@/http/library';
import { listQuery, readCursor, writeCursor } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'The members that use a document, in closed jobs too',
    description:
      'Of one revision, or of all. Members in jobs that are not open to the reader are counted and not listed.',
    query: z.strictObject({ ...listQuery, revision: z.coerce.number().pipe(z.int().positive()).optional() }),
    answer: UsesView,
  },
  async ({ params }, { user, query: { limit, cursor, revision } }) => {
    const from = cursor === undefined ? 0 : readCursor(cursor, z.int().min(0));
    const { next, ...found } = await whereUsed(user, documentKey(params), { revision, from, limit });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);
