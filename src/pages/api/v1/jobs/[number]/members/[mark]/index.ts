import { MemberView, SaveMember } from '@/features/member/member';
import { readMember, saveMember } from '@/features/member/member.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag, ifMatch } from '@/http/etag';

export const GET = endpoint(
  { summary: 'One member, with what it pins and its stored result', answer: MemberView },
  async ({ params }, { user }) => {
    const member = await readMember(user, params['number'] ?? '', params['mark'] ?? '');
    return answer(member, { headers: { ETag: etag(member.version) } });
  },
);

export const PUT = endpoint(
  {
    summary: 'Save a member; it is evaluated anew',
    description:
      'Needs If-Match with the ETag that was read: 428 without; 412 when stale, with the member as it stands now in `current`.',
    body: SaveMember,
    answer: MemberView,
  },
  async (context, { user, body }) => {
    const { number = '', mark = '' } = context.params;
    const member = await saveMember(user, number, mark, ifMatch(context), body);
    return answer(member, { headers: { ETag: etag(member.version) } });
  },
);
