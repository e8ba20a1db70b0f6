import { RecallView } from '@/features/review/recall';
import { closeRecall } from '@/features/review/recall.server';
import { endpoint } from '@/http/endpoint';
import { writeCursor } from '@/http/list';
import { idParam } from '@/http/params';

export const POST = endpoint(
  {
    summary: 'Close a recall',
    description: 'By a librarian or a principal, when every use has a decision (409 before).',
    answer: RecallView,
  },
  async ({ params }, { user }) => {
    const { next, ...closed } = await closeRecall(user, idParam(params, 'id', 'This recall'));
    return { ...closed, next: next === null ? null : writeCursor(next) };
  },
);
