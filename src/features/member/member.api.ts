import { z } from 'zod';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';
import { MemberView, type SaveMember } from './member';

export type Saving =
  | { readonly kind: 'saved'; readonly member: MemberView }
  /** Somebody saved before: the member as it stands now. */
  | { readonly kind: 'stale'; readonly current: MemberView }
  | { readonly kind: 'refused'; readonly message: string; readonly faults: readonly Fault[] };

const problem = z.object({
  detail: z.string(),
  errors: z.array(z.object({ pointer: z.string(), code: z.string(), message: z.string() })),
  current: z.unknown().optional(),
});

const LOST = 'The server does not answer. Nothing typed is lost; save again in a moment.';

const refused = (message: string, faults: readonly Fault[] = []): Saving => ({
  kind: 'refused',
  message,
  faults,
});

/** Saves over the version that was read. */
export async function putMember(
  job: string,
  mark: string,
  version: number,
  body: SaveMember,
): Promise<Saving> {
  const response = await fetch(paths.api.member(job, mark), {
    method: 'PUT',
    headers: { 'Content-Type': 'application/json', 'If-Match': `"${version}"` },
    body: JSON.stringify(body),
  }).catch(() => null);
  if (!response) return refused(LOST);
  const json: unknown = await response.json().catch(() => null);
  if (response.ok) return { kind: 'saved', member: MemberView.parse(json) };
  const reading = problem.safeParse(json);
  if (!reading.success) return refused(LOST);
  const { detail, errors, current } = reading.data;
  if (response.status === 412 && current !== undefined)
    return { kind: 'stale', current: MemberView.parse(current) };
  if (response.status === 401)
    return refused('The session has ended. Sign in in another tab, then save again; nothing typed is lost.');
  return refused(detail, errors);
}
