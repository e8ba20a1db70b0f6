import type { AstroCookies } from 'astro';

/** Single-letter keys can be turned off (WCAG 2.1.4); the choice travels as a cookie and is read before the first paint. */
export const KEYS_COOKIE = 'keys';

export const readKeysChoice = (cookies: AstroCookies): 'on' | 'off' =>
  cookies.get(KEYS_COOKIE)?.value === 'off' ? 'off' : 'on';
