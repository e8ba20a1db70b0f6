import { z } from 'zod';
import { MemberItem, MemberView, NewMember } from '@/features/member/member';
import { createMember, listMembers } from '@/features/member/member.server';
import { answer, endpoint } from '@/http/endpoint';
import { etag } from '@/http/etag';
import { listOf, listQuery, readCursor, writeCursor } from '@/http/list';
import { paths } from '@/paths';

export const GET = endpoint(
  {
    summary: 'The members of a job by their marks, removed ones too',
    query: z.strictObject(listQuery),
    answer: listOf(MemberItem),
  },
  async ({ params }, { user, query: { cursor, limit } }) => {
    const after = cursor === undefined ? undefined : readCursor(cursor, z.string());
    const { next, ...found } = await listMembers(user, params['number'] ?? '', { after, limit });
    return { ...found, next: next === null ? null : writeCursor(next) };
  },
);

export const POST = endpoint(
  {
    summary: 'Place an issued template in a job',
    description: 'The member pins the template’s issued revision, a section and criteria, and is evaluated.',
    body: NewMember,
    answer: MemberView,
    status: 201,
  },
  async ({ params }, { user, body }) => {
    const member = await createMember(user, params['number'] ?? '', body);
    return answer(member, {
      status: 201,
      headers: { ETag: etag(member.version), Location: paths.api.member(member.job, member.mark) },
    });
  },
);
