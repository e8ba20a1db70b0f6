import { AppError } from '@/lib/app-error';

const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]']);

/** On the machine itself the same server has several names. */
function isOurs(origin: string, ours: string): boolean {
  if (origin === ours) return true;
  if (!URL.canParse(origin)) return false;
  const [theirs, mine] = [new URL(origin), new URL(ours)];
  const local = LOOPBACK.has(theirs.hostname) && LOOPBACK.has(mine.hostname);
  return local && theirs.protocol === mine.protocol && theirs.port === mine.port;
}

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Refuses a write that another site made this browser send. With a session's cookie the Origin must be ours; without
 * one it may be missing (a program), but not be another's: a sign-in is not forged either. A bearer token is never
 * sent by a browser of its own accord, so it needs none.
 */
export function checkOrigin(request: Request, ours: string, signedBy: 'session' | 'token' | null): void {
  if (SAFE.has(request.method) || signedBy === 'token') return;
  const origin = request.headers.get('origin');
  if (origin === null ? signedBy === null : isOurs(origin, ours)) return;
  throw new AppError(
    'forbidden',
    origin === null
      ? 'The request does not say which site it comes from. Send the Origin header, or use a bearer token.'
      : 'The request comes from another site. Use Putlog’s own pages, or a bearer token.',
  );
}
