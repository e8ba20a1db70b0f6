import { requirePermission } from '@/features/account/permission';
import { solveAnswer, solveDocument, solveRequest } from '@/features/beam/beam';
import { endpoint } from '@/http/endpoint';
import { invalid } from '@/lib/app-error';

export const POST = endpoint(
  {
    summary: 'Solve any beam',
    description:
      'Force method with the redundants asked for, exact diagrams and extremes, proven by the direct stiffness method.',
    body: solveRequest,
    answer: solveAnswer,
  },
  (_, { user, body }) => {
    requirePermission(user, 'beam.solve');
    const outcome = solveDocument(body);
    if (!outcome.ok) throw invalid(outcome.errors);
    return outcome.answer;
  },
);
