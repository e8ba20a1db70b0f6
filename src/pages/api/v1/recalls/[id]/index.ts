import { RecallView } from '@/features/review/recall';
import { readRecall } from '@/features/review/recall.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const GET = endpoint(
  {
    summary: 'A recall with every use, its owner and its decision',
    description: 'Uses in jobs that are not open to the reader are counted and not listed.',
    answer: RecallView,
  },
  ({ params }, { user }) => readRecall(user, idParam(params, 'id', 'This recall')),
);
