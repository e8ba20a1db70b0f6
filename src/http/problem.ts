import { randomUUID } from 'node:crypto';
import { AppError, type ErrorCode } from '@/lib/app-error';
import { log } from '@/lib/log';

const TITLES: Readonly<Record<ErrorCode, string>> = {
  bad_json: 'Not JSON',
  unauthenticated: 'Not signed in',
  forbidden: 'Not allowed',
  not_found: 'Not found',
  method_not_allowed: 'Method not allowed',
  conflict: 'Conflict',
  illegal_step: 'Not a legal step',
  stale: 'Changed since it was read',
  too_large: 'Too large',
  unsupported_media_type: 'Unsupported content type',
  invalid: 'Refused as it stands',
  precondition_required: 'If-Match is missing',
  too_many_requests: 'Too many attempts',
  internal: 'Fault in Putlog',
  unavailable: 'Not available now',
};

export const titleOf = (code: ErrorCode): string => TITLES[code];

/** Of the driver and of PostgreSQL: the database is away, which is nobody's mistake and passes. */
const DATABASE_AWAY = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'CONNECT_TIMEOUT',
  'CONNECTION_CLOSED',
  'CONNECTION_ENDED',
  'CONNECTION_DESTROYED',
  '53300',
  '57P01',
  '57P02',
  '57P03',
]);

function databaseIsAway(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  return ('code' in error && DATABASE_AWAY.has(String(error.code))) || databaseIsAway(error.cause);
}

/** Whatever was thrown, as what may be said about it. Only what we did not expect is logged. */
export function toAppError(error: unknown, where: string): AppError {
  if (error instanceof AppError) return error;
  const reference = randomUUID();
  log.error('request failed', { where, reference, error });
  return databaseIsAway(error)
    ? new AppError('unavailable', 'The database does not answer. Try again in a minute.', {
        headers: { 'Retry-After': '60' },
      })
    : new AppError(
        'internal',
        `Putlog made a mistake here. Nothing was saved. Quote ${reference} when you report it.`,
      );
}

/** problem+json (RFC 9457). `errors` is never empty: each entry has a JSON Pointer into what was sent. */
export function toProblem(error: AppError): Response {
  const problem = {
    type: `urn:putlog:problem:${error.code}`,
    title: TITLES[error.code],
    status: error.status,
    detail: error.message,
    errors: error.faults,
    ...(error.current !== undefined && { current: error.current }),
  };
  return new Response(JSON.stringify(problem), {
    status: error.status,
    headers: {
      ...error.headers,
      'Content-Type': 'application/problem+json; charset=utf-8',
      'Cache-Control': 'no-store',
    },
  });
}
