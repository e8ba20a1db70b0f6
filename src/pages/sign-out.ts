import type { APIRoute } from 'astro';
import { clearSessionCookie } from '@/features/account/cookie';
import { endSession } from '@/features/account/session.server';
import { paths } from '@/paths';

export const POST: APIRoute = async ({ locals, cookies, redirect }) => {
  if (locals.user?.via.kind === 'session') await endSession(locals.user, locals.user.via.id);
  clearSessionCookie(cookies, locals.origin);
  return redirect(paths.signIn, 303);
};
