import { z } from 'zod';
import { listOpenRevisions } from '@/features/review/desk.server';
import { OpenRevision, openQuery } from '@/features/review/document';
import { endpoint } from '@/http/endpoint';
import { listOf, wholeList } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'Drafts and revisions in review, the longest waiting first',
    query: z.strictObject(openQuery),
    answer: listOf(OpenRevision),
  },
  async (_, { user, query }) => wholeList(await listOpenRevisions(user, query)),
);
