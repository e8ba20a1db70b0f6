import { z } from 'zod';
import { ComparisonView } from '@/features/proof/compare';
import { compareRevisions } from '@/features/proof/compare.server';
import { endpoint } from '@/http/endpoint';
import { documentKey } from '@/http/library';

const number = z.coerce.number().pipe(z.int().positive()).optional();

export const GET = endpoint(
  {
    summary: 'Compare two revisions of a document',
    description:
      'Part by part, and of a template every benchmark that moves: its proof cases worked by both. Without numbers the newest revision is compared with the issued one.',
    query: z.strictObject({ from: number, to: number }),
    answer: ComparisonView,
  },
  ({ params }, { user, query }) => compareRevisions(user, documentKey(params), query),
);
