import { endpoint } from '@/http/endpoint';
import { StepView, takeStepHere } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Issue a revision',
    description:
      'By a checker or a librarian who did not write or change it; a template only when it is proven as it stands. It takes the place of the one before it. With If-Match and the ETag of the draft that was reviewed it is that very version, or 412.',
    answer: StepView,
  },
  (context, { user }) => takeStepHere(context, user, { step: 'issue' }),
);
