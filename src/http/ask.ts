/** How a page asks the interface, and what it makes of the answer. For browsers. */
import { z } from 'zod';
import type { Fault } from '@/lib/app-error';

export interface Refused {
  readonly kind: 'refused';
  readonly message: string;
  readonly faults: readonly Fault[];
}

export type Answer =
  /** `json` is null where there is nothing to tell. */
  | { readonly kind: 'done'; readonly json: unknown }
  /** Somebody else acted before: what was asked about, as it stands now. */
  | { readonly kind: 'stale'; readonly current: unknown }
  | Refused;

const problem = z.object({
  detail: z.string(),
  errors: z.array(z.object({ pointer: z.string(), code: z.string(), message: z.string() })),
  current: z.unknown().optional(),
});

const LOST = 'The server does not answer. Nothing typed is lost; try again in a moment.';
const ENDED = 'The session has ended. Sign in in another tab, then try again; nothing typed is lost.';

export const refused = (message: string, faults: readonly Fault[] = []): Refused => ({
  kind: 'refused',
  message,
  faults,
});

export function toAnswer(status: number, json: unknown): Answer {
  if (status >= 200 && status < 300) return { kind: 'done', json };
  const reading = problem.safeParse(json);
  if (!reading.success) return refused(LOST);
  const { detail, errors, current } = reading.data;
  if (status === 412 && current !== undefined) return { kind: 'stale', current };
  return status === 401 ? refused(ENDED) : refused(detail, errors);
}

interface Asked {
  readonly json?: unknown;
  /** The version that was read, where another's is not to be written over. */
  readonly version?: number | undefined;
}

export async function ask(method: string, url: string, { json, version }: Asked = {}): Promise<Answer> {
  const response = await fetch(url, {
    method,
    headers: {
      ...(json !== undefined && { 'Content-Type': 'application/json' }),
      ...(version !== undefined && { 'If-Match': `"${version}"` }),
    },
    ...(json !== undefined && { body: JSON.stringify(json) }),
  }).catch(() => null);
  return response ? toAnswer(response.status, await response.json().catch(() => null)) : refused(LOST);
}
