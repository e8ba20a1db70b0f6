import { evaluateAnswer, evaluateRequest } from '@/features/template/request';
import { evaluate } from '@/features/template/template.server';
import { endpoint } from '@/http/endpoint';

export const POST = endpoint(
  {
    summary: 'Evaluate a template',
    description:
      'The template at given values: its beam, the proven result as beams/solve gives it, the worked derivation, and how each rule stands. Parameters that are left out take their default.',
    body: evaluateRequest,
    answer: evaluateAnswer,
  },
  ({ params }, { user, body }) => evaluate(user, params['slug'] ?? '', body),
);
