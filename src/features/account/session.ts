import { z } from 'zod';

/** Hours a session lasts without use, and at most. */
export const SESSION_HOURS = { idle: 2, absolute: 12 } as const;

/** Where a request comes from, as far as it says. */
export interface RequestSource {
  readonly address: string;
  readonly agent: string | null;
}

/** A session as its owner sees it. */
export const SessionView = z.strictObject({
  id: z.uuid(),
  device: z.string(),
  address: z.string(),
  started_at: z.iso.datetime(),
  last_seen_at: z.iso.datetime(),
  ends_at: z.iso.datetime(),
  current: z.boolean(),
});
export type SessionView = z.output<typeof SessionView>;

/** A bearer token as its owner sees it: never the token. */
export const TokenView = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  created_at: z.iso.datetime(),
  last_used_at: z.iso.datetime().nullable(),
  ends_at: z.iso.datetime().nullable(),
});
export type TokenView = z.output<typeof TokenView>;

/** How long a token holds, and how many a person keeps. */
export const TOKEN_DAYS = 90;
export const MOST_TOKENS = 20;

export const NewToken = z.strictObject({
  name: z.string().trim().min(1, 'Say what it is for, so that you know it again.').max(60),
});
export type NewToken = z.output<typeof NewToken>;

/** Later ones claim the names of earlier ones in their User-Agent. */
const BROWSERS = [
  ['Edge', /\bEdg(?:e|A|iOS)?\//],
  ['Firefox', /\b(?:Firefox|FxiOS)\//],
  ['Chrome', /(?:Chrome|CriOS)\//],
  ['Safari', /\bSafari\//],
] as const;

const SYSTEMS = [
  ['Android', /\bAndroid\b/],
  ['iOS', /\b(?:iPhone|iPad)\b/],
  ['Windows', /\bWindows\b/],
  ['macOS', /\bMacintosh\b/],
  ['Linux', /\bLinux\b/],
] as const;

/** A device in the words that its owner knows it by. */
export function deviceName(agent: string | null): string {
  const browser = BROWSERS.find(([, pattern]) => pattern.test(agent ?? ''))?.[0];
  const system = SYSTEMS.find(([, pattern]) => pattern.test(agent ?? ''))?.[0];
  return browser && system ? `${browser} on ${system}` : (browser ?? system ?? 'Unknown device');
}
