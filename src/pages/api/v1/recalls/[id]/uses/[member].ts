import { Decide, DecidedView } from '@/features/review/recall';
import { decideUse } from '@/features/review/recall.server';
import { endpoint } from '@/http/endpoint';
import { idParam } from '@/http/params';

export const PUT = endpoint(
  {
    summary: 'Record what becomes of a use',
    description:
      'Kept with the name of whoever decides. `upgraded` and `redesigned` need a member that uses the revision no longer; the others need a reason.',
    body: Decide,
    answer: DecidedView,
  },
  ({ params }, { user, body }) =>
    decideUse(
      user,
      idParam(params, 'id', 'This recall'),
      idParam(params, 'member', 'This use of the recalled revision'),
      body,
    ),
);
