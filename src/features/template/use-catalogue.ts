import { useCallback, useEffect, useMemo, useState } from 'react';
import { toggled, writeCatalogueQuery } from './catalogue-address';
import type { CatalogueCard } from './catalogue-card';
import { type CatalogueQuery, createFinder, EVERYTHING, type Facet, narrow } from './find';

/** What is asked of the catalogue, what it finds, and which of that is chosen. */
export function useCatalogue(cards: readonly CatalogueCard[], asked: CatalogueQuery) {
  const [query, setQuery] = useState(asked);
  const [chosen, setChosen] = useState<string | null>(null);
  const find = useMemo(() => createFinder(cards), [cards]);
  const found = useMemo(() => find(query.q), [find, query.q]);
  const shown = useMemo(() => narrow(found, query), [found, query]);
  const at = shown.findIndex(({ entry }) => entry.row.slug === chosen);
  const selected = shown[Math.max(at, 0)]?.entry ?? null;

  const search = useCallback((q: string) => setQuery((now) => ({ ...now, q })), []);
  const toggle = useCallback(
    (facet: Facet, value: string) => setQuery((now) => toggled(now, facet, value)),
    [],
  );
  const clear = useCallback(() => setQuery(EVERYTHING), []);
  const move = useCallback(
    (steps: number) => {
      const next = shown[Math.min(Math.max(Math.max(at, 0) + steps, 0), shown.length - 1)];
      if (next) setChosen(next.entry.row.slug);
    },
    [shown, at],
  );
  useAddress(writeCatalogueQuery(query));
  return { query, found, shown, selected, search, toggle, clear, move, choose: setChosen };
}

/** The address says what is asked, so that it can be kept and sent. */
function useAddress(query: string): void {
  useEffect(() => {
    if (query === new URLSearchParams(location.search).toString()) return;
    history.replaceState(history.state, '', query === '' ? location.pathname : `?${query}`);
  }, [query]);
}
