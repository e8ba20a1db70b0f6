import { ORIGIN } from 'astro:env/server';
import type { APIContext, MiddlewareHandler } from 'astro';
import { readSessionCookie } from '@/features/account/cookie';
import { userOfSession, userOfToken } from '@/features/account/identity.server';
import { checkOrigin } from '@/http/origin';
import { toAppError, toProblem } from '@/http/problem';
import { methodsOf } from '@/http/registry';
import { secure } from '@/http/security';
import { readTheme } from '@/http/theme';
import { AppError } from '@/lib/app-error';
import { paths, signInPath } from '@/paths';

const origin = new URL(ORIGIN).origin;
const https = origin.startsWith('https:');

/** Asked by machines, and while the database is away: nobody is looked up for them. */
const PROBES: readonly string[] = [paths.healthz, paths.readyz];

export const onRequest: MiddlewareHandler = async (context, next) => {
  const { locals, cookies, url } = context;
  locals.origin = origin;
  locals.theme = readTheme(cookies);
  // Kept when the page that says why is rendered in place of the one that was refused.
  locals.user ??= null;
  locals.refusal ??= null;
  const answer = url.pathname.startsWith('/api/') ? answerApi : answerPage;
  return secure(await answer(context, next), https);
};

type Next = Parameters<MiddlewareHandler>[1];

/** Who asks, and whether a write may come from where it comes from. */
async function admit({ locals, cookies, request }: APIContext): Promise<void> {
  const authorization = request.headers.get('authorization');
  if (authorization !== null) {
    const token = /^Bearer +([\w.~+/-]+=*)$/i.exec(authorization)?.[1];
    locals.user = token ? await userOfToken(token) : null;
  } else {
    const token = readSessionCookie(cookies, origin);
    locals.user = token ? await userOfSession(token) : null;
  }
  checkOrigin(request, origin, locals.user?.via.kind ?? null);
}

async function answerApi(context: APIContext, next: Next): Promise<Response> {
  try {
    await admit(context);
    const response = await next();
    // Astro's own answer to a method that the endpoint's file does not have.
    if (response.status === 404 && response.body === null) throw await notThatMethod(context);
    return response;
  } catch (error) {
    return toProblem(toAppError(error, `${context.request.method} ${context.routePattern}`));
  }
}

async function notThatMethod({ routePattern, request }: APIContext): Promise<AppError> {
  const allowed = (await methodsOf(routePattern)).join(', ');
  return new AppError('method_not_allowed', `${request.method} is not possible here. Possible: ${allowed}.`, {
    headers: { Allow: allowed },
  });
}

async function answerPage(context: APIContext, next: Next): Promise<Response> {
  const { url, locals } = context;
  if (PROBES.includes(url.pathname) || locals.refusal) return next();
  try {
    await admit(context);
    if (!locals.user && url.pathname !== paths.signIn) {
      const asked = context.request.method === 'GET' ? url.pathname + url.search : paths.home;
      return context.redirect(signInPath(asked), 303);
    }
    return await next();
  } catch (error) {
    return refusePage(context, error);
  }
}

/** What a page threw, said by a page: nobody meets an empty answer or a trace. */
function refusePage(context: APIContext, error: unknown): Promise<Response> {
  const { request, routePattern, locals, url } = context;
  locals.refusal = toAppError(error, `${request.method} ${routePattern}`);
  // A request of its own: the body of the refused one may have been read.
  return context.rewrite(new Request(new URL(paths.refused, url), { headers: request.headers }));
}
