import type { AstroCookies } from 'astro';
import { THEME_COOKIE, THEMES, type Theme } from '@/http/theme';

/** Single-letter keys can be turned off (WCAG 2.1.4). The choice is read before the first paint, as that of day or night. */
const KEYS_COOKIE = 'keys';
const YEAR = 31_536_000; // s

export const readKeysChoice = (cookies: AstroCookies): 'on' | 'off' =>
  cookies.get(KEYS_COOKIE)?.value === 'off' ? 'off' : 'on';

/** Not a secret, and the sheet's script sets it too: so it is open to script. */
const options = (origin: string) =>
  ({ path: '/', sameSite: 'lax', secure: origin.startsWith('https:'), maxAge: YEAR }) as const;

/** Keeps day or night; anything else follows the device again. */
export function keepTheme(cookies: AstroCookies, origin: string, choice: string): void {
  const theme: Theme | undefined = THEMES.find((known) => known === choice);
  if (theme) cookies.set(THEME_COOKIE, theme, options(origin));
  else cookies.delete(THEME_COOKIE, { path: '/' });
}

export function keepKeysChoice(cookies: AstroCookies, origin: string, choice: 'on' | 'off'): void {
  if (choice === 'off') cookies.set(KEYS_COOKIE, 'off', options(origin));
  else cookies.delete(KEYS_COOKIE, { path: '/' });
}
