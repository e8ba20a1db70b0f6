import { z } from 'zod';
import { ask, type Refused } from '@/http/ask';
import { paths } from '@/paths';
import { type ChangeSavedSearch, type NewSavedSearch, SavedSearchView } from './saved';

export type Kept<T> = { readonly kind: 'kept'; readonly value: T } | Refused;

async function keep<S extends z.ZodType>(
  method: string,
  url: string,
  answer: S,
  json?: unknown,
): Promise<Kept<z.output<S>>> {
  const told = await ask(method, url, { json });
  if (told.kind === 'stale') throw new Error('A saved search has no versions');
  return told.kind === 'done' ? { kind: 'kept', value: answer.parse(told.json) } : told;
}

export const savedApi = {
  save: (body: NewSavedSearch) => keep('POST', paths.api.savedSearches, SavedSearchView, body),
  change: (id: string, body: ChangeSavedSearch) =>
    keep('PATCH', paths.api.savedSearch(id), SavedSearchView, body),
  remove: (id: string) => keep('DELETE', paths.api.savedSearch(id), z.unknown()),
};
