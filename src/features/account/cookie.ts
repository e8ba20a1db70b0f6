import { SESSION_HOURS } from './session';

/** The part of a request's cookies that signing in and out needs. */
export interface CookieJar {
  get(name: string): { readonly value: string } | undefined;
  set(name: string, value: string, options: CookieOptions): void;
  delete(name: string, options: CookieOptions): void;
}

interface CookieOptions {
  readonly path: '/';
  readonly httpOnly: true;
  readonly sameSite: 'lax';
  readonly secure: boolean;
  readonly maxAge?: number;
}

const isHttps = (origin: string): boolean => origin.startsWith('https:');

/** The prefix makes the browser refuse the cookie from anywhere but this very host over https. */
const nameFor = (origin: string): string => (isHttps(origin) ? '__Host-putlog' : 'putlog');

const optionsFor = (origin: string): CookieOptions => ({
  path: '/',
  httpOnly: true,
  sameSite: 'lax',
  secure: isHttps(origin),
});

export const readSessionCookie = (cookies: CookieJar, origin: string): string | null =>
  cookies.get(nameFor(origin))?.value ?? null;

export function setSessionCookie(cookies: CookieJar, origin: string, token: string): void {
  cookies.set(nameFor(origin), token, { ...optionsFor(origin), maxAge: SESSION_HOURS.absolute * 3600 });
}

export const clearSessionCookie = (cookies: CookieJar, origin: string): void =>
  cookies.delete(nameFor(origin), optionsFor(origin));
