import { useState } from 'react';
import type { ChangeSavedSearch, NewSavedSearch, SavedSearchView } from './saved';
import { type Kept, savedApi } from './saved.api';

/** One's own first, each by name: as the server lists them. */
const inOrder = (searches: readonly SavedSearchView[]): SavedSearchView[] =>
  searches.toSorted(
    (a, b) => Number(b.mine) - Number(a.mine) || a.name.localeCompare(b.name, 'en', { sensitivity: 'base' }),
  );

/** The saved searches that a person sees, as they are changed here; what is refused changes nothing. */
export function useSaved(first: readonly SavedSearchView[]) {
  const [searches, setSearches] = useState(first);
  const taken = <T>(
    kept: Kept<T>,
    change: (value: T) => (now: readonly SavedSearchView[]) => SavedSearchView[],
  ) => {
    if (kept.kind === 'kept') setSearches(change(kept.value));
    return kept;
  };
  const others = (now: readonly SavedSearchView[], id: string) => now.filter((one) => one.id !== id);
  return {
    searches,
    save: async (body: NewSavedSearch) =>
      taken(await savedApi.save(body), (made) => (now) => inOrder([...now, made])),
    change: async (id: string, body: ChangeSavedSearch) =>
      taken(await savedApi.change(id, body), (changed) => (now) => inOrder([...others(now, id), changed])),
    remove: async (id: string) => taken(await savedApi.remove(id), () => (now) => others(now, id)),
  };
}
export type Saved = ReturnType<typeof useSaved>;
