import { WithdrawStep } from '@/features/review/recall';
import { endpoint } from '@/http/endpoint';
import { StepView, takeStepHere } from '@/http/library';

export const POST = endpoint(
  {
    summary: 'Withdraw a revision',
    description:
      'It cannot be placed any more. Where members use it, a recall is opened: each owner is told, and it stays open until each use has a decision by name.',
    body: WithdrawStep,
    answer: StepView,
  },
  (context, { user, body }) => takeStepHere(context, user, { step: 'withdraw', ...body }),
);
