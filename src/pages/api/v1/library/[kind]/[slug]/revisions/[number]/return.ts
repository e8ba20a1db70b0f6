import { ReturnStep } from '@/features/review/comment';
import { endpoint } from '@/http/endpoint';
import { StepView, takeStepHere } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Return a revision to its author',
    description: 'With a comment that says what has to change, pinned to its place in the document.',
    body: ReturnStep,
    answer: StepView,
  },
  (context, { user, body }) => takeStepHere(context, user, { step: 'return', ...body }),
);
