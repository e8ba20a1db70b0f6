/** Every refusal that the product can answer with, and its HTTP status. A code without a status does not compile. */
const STATUS = {
  bad_json: 400,
  unauthenticated: 401,
  forbidden: 403,
  not_found: 404,
  method_not_allowed: 405,
  conflict: 409,
  illegal_step: 409,
  stale: 412,
  too_large: 413,
  unsupported_media_type: 415,
  invalid: 422,
  precondition_required: 428,
  too_many_requests: 429,
  internal: 500,
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof STATUS;

/** One thing wrong with what was sent: where (a JSON Pointer into it, '' for all of it), which, and what to do. */
export interface Fault {
  readonly pointer: string;
  readonly code: string;
  readonly message: string;
}

interface Details {
  readonly faults?: readonly Fault[];
  readonly headers?: Readonly<Record<string, string>>;
  /** What stands there now, for whoever wrote to what was there before. */
  readonly current?: unknown;
  readonly cause?: unknown;
}

/** A request that cannot be met. The message is shown to the person: what happened, then what to do. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly faults: readonly Fault[];
  readonly headers: Readonly<Record<string, string>>;
  readonly current: unknown;

  constructor(code: ErrorCode, message: string, details: Details = {}) {
    super(message, { cause: details.cause });
    this.name = 'AppError';
    this.code = code;
    this.faults = details.faults?.length ? details.faults : [{ pointer: '', code, message }];
    this.headers = details.headers ?? {};
    this.current = details.current;
  }

  get status(): number {
    return STATUS[this.code];
  }
}

/** The faults of a body, form or query as one refusal (422). */
export function invalid(faults: readonly Fault[]): AppError {
  const [first] = faults;
  const detail =
    faults.length === 1 && first
      ? first.message
      : `${faults.length} things are wrong. Each is listed with its place.`;
  return new AppError('invalid', detail, { faults });
}

/** Another practice's things, a job without access and what never was are told apart by nobody. */
export const notFound = (what: string): AppError =>
  new AppError('not_found', `${what} was not found. Check its name, or ask for access to it.`);

/** Of two people who change one document the second is told, shown what stands there now, and loses nothing. */
export const stale = (current?: unknown): AppError =>
  new AppError(
    'stale',
    'Somebody saved this after you opened it. Read it again and compare before you save.',
    { current },
  );
