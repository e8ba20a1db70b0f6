import { z } from 'zod';
import { clearSessionCookie } from '@/features/account/cookie';
import { SessionView } from '@/features/account/session';
import { endAllSessions, listSessions } from '@/features/account/session.server';
import { endpoint } from '@/http/endpoint';
import { listOf, wholeList } from '@/http/list';

export const GET = endpoint(
  { summary: 'One’s own sessions, the last used first', answer: listOf(SessionView) },
  async (_, { user }) => wholeList(await listSessions(user)),
);

export const DELETE = endpoint(
  {
    summary: 'Sign out everywhere',
    description: 'Ends every session, this one too. Bearer tokens go on: withdraw them under /api/v1/tokens.',
    answer: z.strictObject({ ended: z.int() }),
  },
  async ({ cookies, locals }, { user }) => {
    const ended = await endAllSessions(user);
    clearSessionCookie(cookies, locals.origin);
    return { ended };
  },
);
