import type { APIRoute } from 'astro';
import { createContext } from 'astro/middleware';
import { onRequest } from '@/middleware';
import { ORIGIN } from './env';

type Module = Readonly<Record<string, APIRoute | undefined>>;

const files = import.meta.glob<Module>('/src/pages/{api/**/*,healthz,readyz,sign-out}.ts');

/** Every endpoint as Astro would find it: fixed addresses before those with a parameter, the catch-all last. */
const routes = Object.entries(files)
  .map(([file, load]) => {
    const pattern = file.replace(/^\/src\/pages|(?:\/index)?\.ts$/g, '');
    const source = pattern
      .replaceAll('.', '\\.')
      .replaceAll(/\[\\\.\\\.\\\.(\w+)\]/g, '(?<$1>.*)')
      .replaceAll(/\[(\w+)\]/g, '(?<$1>[^/]+)');
    const rank = (pattern.match(/\[/g)?.length ?? 0) + (pattern.includes('[...') ? 100 : 0);
    return { pattern, load, rank, matcher: new RegExp(`^${source}$`) };
  })
  .sort((a, b) => a.rank - b.rank);

export interface Ask {
  readonly cookie?: string | undefined;
  readonly token?: string;
  readonly origin?: string | null;
  readonly json?: unknown;
  readonly body?: BodyInit | undefined;
  readonly headers?: Readonly<Record<string, string>>;
  readonly address?: string;
}

export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  readonly cookies: readonly string[];
  // biome-ignore lint/suspicious/noExplicitAny: each test knows the shape of the answer that it asks about
  readonly json: any;
}

/** One request through the middleware to its endpoint, as the built server would serve it. */
export async function ask(method: string, path: string, given: Ask = {}): Promise<Answer> {
  const url = new URL(path, ORIGIN);
  const found = routes.find(({ matcher }) => matcher.test(url.pathname));
  if (!found) throw new Error(`No endpoint for ${path}`);
  const module = await found.load();
  const request = toRequest(method, url, given);
  const params = { ...found.matcher.exec(url.pathname)?.groups };
  const locals = { user: null, refusal: null, theme: null, origin: ORIGIN };
  const context = createContext({ request, params, locals, defaultLocale: 'en' });
  Object.assign(context, { routePattern: found.pattern });
  const handler = module[method] ?? module['ALL'] ?? (method === 'HEAD' ? module['GET'] : undefined);
  const response = await onRequest(context, async () =>
    handler ? handler(context) : new Response(null, { status: 404 }),
  );
  if (!response) throw new Error('The middleware answers every request');
  const text = await response.text();
  const isJson = /json(;|$)/.test(response.headers.get('content-type') ?? '');
  return {
    status: response.status,
    headers: response.headers,
    cookies: [...context.cookies.headers()],
    json: isJson ? JSON.parse(text) : text,
  };
}

function toRequest(
  method: string,
  url: URL,
  { cookie, token, origin, json, body, headers, address }: Ask,
): Request {
  const sent = new Headers({ 'x-forwarded-for': address ?? '192.0.2.1', ...headers });
  if (cookie) sent.set('cookie', cookie);
  if (token) sent.set('authorization', `Bearer ${token}`);
  const from = origin === undefined && cookie && method !== 'GET' ? ORIGIN : origin;
  if (from) sent.set('origin', from);
  if (json !== undefined) sent.set('content-type', 'application/json');
  const content = json === undefined ? body : JSON.stringify(json);
  return new Request(url, {
    method,
    headers: sent,
    // A stream is sent as it comes.
    ...(content !== undefined && { body: content, duplex: 'half' as const }),
  });
}

/** Signs in over the interface and gives the cookie to send from then on. */
export async function signInAs(email: string, password: string, address?: string): Promise<string> {
  const { status, cookies, json } = await ask('POST', '/api/v1/session', {
    json: { email, password },
    ...(address && { address }),
  });
  const [pair] = cookies[0]?.split(';') ?? [];
  if (status !== 200 || !pair)
    throw new Error(`${email} was not signed in: ${status} ${JSON.stringify(json)}`);
  return pair;
}
