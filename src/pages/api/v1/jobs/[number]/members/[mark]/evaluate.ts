import { TriedView, TryMember } from '@/features/member/member';
import { tryMember } from '@/features/member/member.server';
import { endpoint } from '@/http/endpoint';

export const POST = endpoint(
  {
    summary: 'Evaluate a member at other values, saving nothing',
    description: 'What is left out of the body is as saved.',
    body: TryMember,
    answer: TriedView,
  },
  ({ params }, { user, body }) => tryMember(user, params['number'] ?? '', params['mark'] ?? '', body),
);
