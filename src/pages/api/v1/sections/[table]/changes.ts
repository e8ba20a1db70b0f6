import { z } from 'zod';
import { EditionChangesView, ROW_CHANGES } from '@/features/section/edition-changes';
import { readEditionChanges } from '@/features/section/edition-changes.server';
import { endpoint } from '@/http/endpoint';
import { listQuery, readCursor, writeCursor } from '@/http/list';

const number = z.coerce.number().pipe(z.int().positive());

export const GET = endpoint(
  {
    summary: 'What an edition of a section table changes, row by row',
    query: z.strictObject({ ...listQuery, from: number, to: number, what: z.enum(ROW_CHANGES).optional() }),
    answer: EditionChangesView,
  },
  async ({ params }, { user, query: { from, to, what, limit, cursor } }) => {
    const place = cursor ? readCursor(cursor, z.int().nonnegative()) : 0;
    const found = await readEditionChanges(user, {
      table: params['table'] ?? '',
      from,
      to,
      what,
      place,
      limit,
    });
    return { ...found, next: found.next === null ? null : writeCursor(found.next) };
  },
);
