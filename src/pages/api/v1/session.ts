import { MeView, SignIn, toMeView } from '@/features/account/account';
import { clearSessionCookie, setSessionCookie } from '@/features/account/cookie';
import { userOfSession } from '@/features/account/identity.server';
import { endSession } from '@/features/account/session.server';
import { proveSignIn, signInRefusal, sourceOf } from '@/features/account/sign-in.server';
import { endpoint, openEndpoint } from '@/http/endpoint';

export const POST = openEndpoint(
  {
    summary: 'Sign in',
    description:
      'Begins a session and sets its cookie. 401: wrong e-mail address or password. 429: too many attempts.',
    body: SignIn,
    answer: MeView,
  },
  async (context, { body }) => {
    const result = await proveSignIn(body, sourceOf(context));
    if (!result.ok) throw signInRefusal(result);
    setSessionCookie(context.cookies, context.locals.origin, result.token);
    const user = await userOfSession(result.token);
    return user && toMeView(user);
  },
);

export const DELETE = endpoint(
  { summary: 'Sign out of this session' },
  async ({ cookies, locals }, { user }) => {
    if (user.via.kind === 'session') await endSession(user, user.via.id);
    clearSessionCookie(cookies, locals.origin);
  },
);
