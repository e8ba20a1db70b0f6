import { requirePermission } from '@/features/account/permission';
import { movingLoadAnswer, movingLoadDocument, movingLoadRequest } from '@/features/beam/moving-load';
import { endpoint } from '@/http/endpoint';
import { invalid } from '@/lib/app-error';

export const POST = endpoint(
  {
    summary: 'Worst positions of a train of wheels on any beam',
    description: `The largest and smallest value of a quantity over every position of the train, and the absolute largest and smallest moment at any section: exact, static, and of the train alone. Wheels off the beam have no effect.

The beam is that of beams/solve; its loads and the movements of its supports have no part in it. A wheel stands \`offset\` behind the front of the train; a train that runs to the left has its front at its left. Hundreds of supports are possible where there are no hinges and no guided supports; what would take too long is refused with what is possible.`,
    body: movingLoadRequest,
    answer: movingLoadAnswer,
  },
  (_, { user, body }) => {
    requirePermission(user, 'beam.solve');
    const outcome = movingLoadDocument(body);
    if (!outcome.ok) throw invalid(outcome.errors);
    return outcome.answer;
  },
);
