import { endpoint } from '@/http/endpoint';
import { StepView, takeStepHere } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Send a draft to review',
    description:
      'Refused while the draft has faults, or does not say what changes, of which class and with what consequence.',
    answer: StepView,
  },
  (context, { user }) => takeStepHere(context, user, { step: 'submit' }),
);
