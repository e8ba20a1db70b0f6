import { z } from 'zod';
import { ProofView } from '@/features/proof/proof';
import { DraftView, type SaveDraft } from '@/features/review/draft';
import type { DocumentKind } from '@/features/review/review';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';

type DraftSaving =
  | { readonly kind: 'saved'; readonly draft: DraftView }
  /** Somebody saved before: the draft as it stands now. */
  | { readonly kind: 'stale'; readonly current: DraftView }
  | { readonly kind: 'unreachable' }
  | Refusal;

interface Refusal {
  readonly kind: 'refused';
  readonly message: string;
  readonly faults: readonly Fault[];
}

const problem = z.object({
  detail: z.string(),
  errors: z.array(z.object({ pointer: z.string(), code: z.string(), message: z.string() })),
  current: z.unknown().optional(),
});

const SESSION_ENDED =
  'The session has ended. Sign in in another tab, then go on here; nothing typed is lost.';

interface DraftAddress {
  readonly kind: DocumentKind;
  readonly slug: string;
  readonly revision: number;
}

const addressOf = ({ kind, slug, revision }: DraftAddress): string => paths.api.draft(kind, slug, revision);
const revisionOf = ({ kind, slug, revision }: DraftAddress): string =>
  paths.api.revision(kind, slug, revision);

/** Saves over the version that was read. `keepalive` lets the request outlive the page. */
export async function putDraft(
  of: DraftAddress,
  version: number,
  body: SaveDraft,
  keepalive = false,
): Promise<DraftSaving> {
  const response = await fetch(addressOf(of), {
    method: 'PUT',
    headers: { 'Content-Type': 'application/json', 'If-Match': `"${version}"` },
    body: JSON.stringify(body),
    keepalive,
  }).catch(() => null);
  const json: unknown = await response?.json().catch(() => null);
  if (response?.ok) {
    const saved = DraftView.safeParse(json);
    return saved.success ? { kind: 'saved', draft: saved.data } : { kind: 'unreachable' };
  }
  const reading = problem.safeParse(json);
  if (!response || response.status >= 500 || !reading.success) return { kind: 'unreachable' };
  const current = DraftView.safeParse(reading.data.current);
  if (response.status === 412 && current.success) return { kind: 'stale', current: current.data };
  return refusal(response.status, reading.data);
}

const refusal = (status: number, { detail, errors }: z.output<typeof problem>): Refusal =>
  status === 401
    ? { kind: 'refused', message: SESSION_ENDED, faults: [] }
    : { kind: 'refused', message: detail, faults: errors };

export type Answer<T> = { readonly kind: 'done'; readonly value: T } | Refusal;

const LOST = 'The server does not answer. Try again in a moment.';

async function ask<T>(
  method: string,
  url: string,
  read: (json: unknown) => T,
  version?: number,
): Promise<Answer<T>> {
  const headers = version === undefined ? {} : { 'If-Match': `"${version}"` };
  const response = await fetch(url, { method, headers }).catch(() => null);
  const json: unknown = await response?.json().catch(() => null);
  if (response?.ok) return { kind: 'done', value: read(json) };
  const reading = problem.safeParse(json);
  if (!response || !reading.success) return { kind: 'refused', message: LOST, faults: [] };
  return refusal(response.status, reading.data);
}

/** Sends the version that was saved to review. */
export const submitDraft = (of: DraftAddress, version: number) =>
  ask('POST', `${revisionOf(of)}/submit`, () => null, version);

export const layAside = (of: DraftAddress) => ask('DELETE', addressOf(of), () => null);

export const askProof = (of: DraftAddress) =>
  ask('POST', `${revisionOf(of)}/proof`, (json) => ProofView.parse(json));

/** The newest proof; refused where there is none. */
export const readProof = (of: DraftAddress) =>
  ask('GET', `${revisionOf(of)}/proof`, (json) => ProofView.parse(json));

export const bundleAddress = (of: DraftAddress): string => `${revisionOf(of)}/bundle`;
