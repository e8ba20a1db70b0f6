import { z } from 'zod';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';
import { type ChangeSavedSearch, type NewSavedSearch, SavedSearchView } from './saved';

export type Kept<T> =
  | { readonly kind: 'kept'; readonly value: T }
  | { readonly kind: 'refused'; readonly message: string; readonly faults: readonly Fault[] };

const problem = z.object({
  detail: z.string(),
  errors: z.array(z.object({ pointer: z.string(), code: z.string(), message: z.string() })),
});

const LOST = 'The server does not answer. Nothing typed is lost; try again in a moment.';
const ENDED = 'The session has ended. Sign in in another tab, then try again; nothing typed is lost.';

async function ask<S extends z.ZodType>(
  method: string,
  url: string,
  answer: S,
  body?: unknown,
): Promise<Kept<z.output<S>>> {
  const response = await fetch(url, {
    method,
    ...(body !== undefined && {
      headers: { 'Content-Type': 'application/json' },
      body: JSON.stringify(body),
    }),
  }).catch(() => null);
  const json: unknown = await response?.json().catch(() => null);
  if (response?.ok) return { kind: 'kept', value: answer.parse(json) };
  const reading = problem.safeParse(json);
  if (!reading.success) return { kind: 'refused', message: LOST, faults: [] };
  const { detail, errors } = reading.data;
  return response?.status === 401
    ? { kind: 'refused', message: ENDED, faults: [] }
    : { kind: 'refused', message: detail, faults: errors };
}

export const savedApi = {
  save: (body: NewSavedSearch) => ask('POST', paths.api.savedSearches, SavedSearchView, body),
  change: (id: string, body: ChangeSavedSearch) =>
    ask('PATCH', paths.api.savedSearch(id), SavedSearchView, body),
  remove: (id: string) => ask('DELETE', paths.api.savedSearch(id), z.unknown()),
};
