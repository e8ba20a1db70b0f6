import { requirePermission } from '@/features/account/permission';
import { influenceAnswer, influenceDocument, influenceRequest } from '@/features/beam/influence';
import { endpoint } from '@/http/endpoint';
import { invalid } from '@/lib/app-error';

export const POST = endpoint(
  {
    summary: 'Influence line of any beam',
    description: `The line of a reaction, or of the shear, moment or deflection at a section, for a downward force of 1 N: exact cubics by the force method (Müller-Breslau), proven by the direct stiffness method, with their extremes and the areas under them.

The beam is that of beams/solve; its loads and the movements of its supports have no part in the line. Signs are those of the answers of beams/solve: deflection up, moment reactions anticlockwise. Hundreds of supports are possible where there are no hinges and no guided supports; what would take too long is refused with what is possible.`,
    body: influenceRequest,
    answer: influenceAnswer,
  },
  (_, { user, body }) => {
    requirePermission(user, 'beam.solve');
    const outcome = influenceDocument(body);
    if (!outcome.ok) throw invalid(outcome.errors);
    return outcome.answer;
  },
);
