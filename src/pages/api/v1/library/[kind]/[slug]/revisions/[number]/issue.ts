import { endpoint } from '@/http/endpoint';
import { StepView, takeStepHere } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Issue a revision',
    description:
      'By a checker or a librarian who did not write or change it; a template only when it is proven as it stands. It takes the place of the one before it.',
    answer: StepView,
  },
  ({ params }, { user }) => takeStepHere(params, user, { step: 'issue' }),
);
