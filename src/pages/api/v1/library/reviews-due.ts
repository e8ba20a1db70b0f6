import { z } from 'zod';
import { listReviewsDue } from '@/features/review/desk.server';
import { ReviewDue } from '@/features/review/document';
import { endpoint } from '@/http/endpoint';
import { listOf, wholeList } from '@/http/list';

export const GET = endpoint(
  {
    summary: 'Issued documents whose review is due, the most overdue first',
    query: z.strictObject({ on: z.iso.date().optional().describe('As of this day; today unless said') }),
    answer: listOf(ReviewDue),
  },
  async (_, { user, query: { on } }) => wholeList(await listReviewsDue(user, on)),
);
