import { requirePermission } from '@/features/account/permission';
import { frequencyAnswer, frequencyDocument, frequencyRequest } from '@/features/beam/frequency';
import { endpoint } from '@/http/endpoint';
import { invalid } from '@/lib/app-error';

export const POST = endpoint(
  {
    summary: 'First natural frequency of any beam',
    description: `Exact for the masses given and any supports, springs, hinges and steps, by the dynamic stiffness method; shear flexibility counts where \`ga\` is given, rotary inertia does not. The bounds prove that it is the first: below the lower one lies no natural frequency. Beside it the usual estimate from the deflection under the weight of the masses.

The beam is that of beams/solve. Its loads count only where their group is listed in \`permanent\`, as masses; the movements of its supports have no part in it. Supports, hinges, steps and masses may cut it into 400 pieces.`,
    body: frequencyRequest,
    answer: frequencyAnswer,
  },
  (_, { user, body }) => {
    requirePermission(user, 'beam.solve');
    const outcome = frequencyDocument(body);
    if (!outcome.ok) throw invalid(outcome.errors);
    return outcome.answer;
  },
);
