import { z } from 'zod';
import { NewRequest, RequestItem, RequestView, requestQuery } from '@/features/review/request';
import { listRequests, raiseRequest } from '@/features/review/request.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';
import { paths } from '@/paths';

export const GET = endpoint(
  {
    summary: 'Requests and defects, the newest first',
    description: 'All of them for a librarian, their own for everybody else.',
    query: z.strictObject({ ...listQuery, ...requestQuery }),
    answer: listOf(RequestItem),
  },
  async (_, { user, query: { limit, cursor, ...query } }) => {
    const before = cursor === undefined ? undefined : readCursor(cursor, z.int());
    const { next, ...found } = await listRequests(user, query, { before, limit });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);

export const POST = endpoint(
  {
    summary: 'Ask for a document, or report a fault in one',
    description: 'The librarians are told. `context`: where it was raised, and what stood on the screen.',
    body: NewRequest,
    answer: RequestView,
    status: 201,
  },
  async (_, { user, body }) => {
    const made = await raiseRequest(user, body);
    return answer(made, {
      status: 201,
      headers: { ETag: etag(made.version), Location: paths.api.request(made.number) },
    });
  },
);
