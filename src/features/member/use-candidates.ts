import { useEffect, useState } from 'react';
import type { MaterialChoice } from '@/features/material/choice';
import type { SectionItem } from '@/features/section/section';
import { fetchSections } from '@/features/section/section.api';
import { useRestedValue } from '@/features/template/use-live';
import {
  draftSection,
  type SectionSearch,
  sectionQuery,
  type Utilisation,
  utilisationWith,
} from './candidates';
import type { MemberInputs } from './evaluate';
import type { DraftSection } from './workspace';

export type Candidates =
  | { readonly state: 'none' | 'reading' }
  | { readonly state: 'found'; readonly items: readonly SectionItem[]; readonly total: number }
  | { readonly state: 'failed'; readonly message: string };

const SEARCH_REST_MS = 200;

/** The sections that answer the search, asked for when typing rests. */
export function useCandidates(search: SectionSearch, current: DraftSection | null): Candidates {
  const [found, setFound] = useState<Candidates>({ state: 'none' });
  const query = sectionQuery(search, current);
  const asked = useRestedValue(query && new URLSearchParams(query).toString(), SEARCH_REST_MS);
  useEffect(() => {
    if (asked === null) {
      setFound({ state: 'none' });
      return;
    }
    const leaving = new AbortController();
    setFound((before) => (before.state === 'found' ? before : { state: 'reading' }));
    fetchSections(Object.fromEntries(new URLSearchParams(asked)), leaving.signal).then(
      ({ items, total }) => setFound({ state: 'found', items, total }),
      (error: unknown) => {
        if (!leaving.signal.aborted)
          setFound({ state: 'failed', message: error instanceof Error ? error.message : String(error) });
      },
    );
    return () => leaving.abort();
  }, [asked]);
  return found;
}

const INPUTS_REST_MS = 250;

/** Each candidate's utilisations, one after the other between the browser's own tasks. */
export function useUtilisations(
  items: readonly SectionItem[],
  inputs: MemberInputs,
  current: DraftSection | null,
  materials: readonly MaterialChoice[],
): ReadonlyMap<SectionItem, Utilisation | string> {
  const rested = useRestedValue(inputs, INPUTS_REST_MS);
  const [found, setFound] = useState<ReadonlyMap<SectionItem, Utilisation | string>>(new Map());
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined;
    const results = new Map<SectionItem, Utilisation | string>();
    const next = (index: number) => {
      const item = items[index];
      if (!item) return setFound(new Map(results));
      results.set(item, utilisationWith(rested, draftSection(item, current, materials), materials));
      timer = setTimeout(() => next(index + 1));
    };
    timer = setTimeout(() => next(0));
    return () => clearTimeout(timer);
  }, [items, rested, current, materials]);
  return found;
}
