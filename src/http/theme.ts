import type { AstroCookies } from 'astro';

/** Sheets in daylight or on the night shift. */
export const THEMES = ['day', 'night'] as const;
export type Theme = (typeof THEMES)[number];

/** Set by the page and read by the server, so that the first paint has the right ground. */
export const THEME_COOKIE = 'theme';

export function readTheme(cookies: AstroCookies): Theme | null {
  const value = cookies.get(THEME_COOKIE)?.value;
  return THEMES.find((theme) => theme === value) ?? null;
}
