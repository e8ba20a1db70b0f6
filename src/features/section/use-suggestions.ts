import { useEffect, useState } from 'react';
import type { SectionItem } from './section';
import { fetchSections } from './section.api';

const REST_MS = 120;
const OFFERED = '12';

export type Suggestions =
  | { readonly state: 'idle' }
  | { readonly state: 'reading' }
  | { readonly state: 'found'; readonly items: readonly SectionItem[]; readonly total: number }
  | { readonly state: 'failed'; readonly message: string };

/** What answers a designation as it is typed; asked for when the typing rests. */
export function useSuggestions(q: string): Suggestions {
  const [suggestions, setSuggestions] = useState<Suggestions>({ state: 'idle' });
  useEffect(() => {
    if (q.trim() === '') {
      setSuggestions({ state: 'idle' });
      return;
    }
    const leaving = new AbortController();
    const timer = setTimeout(() => {
      setSuggestions((before) => (before.state === 'found' ? before : { state: 'reading' }));
      fetchSections({ q, limit: OFFERED }, leaving.signal).then(
        ({ items, total }) => setSuggestions({ state: 'found', items, total }),
        (error: unknown) => {
          if (!leaving.signal.aborted)
            setSuggestions({
              state: 'failed',
              message: String(error instanceof Error ? error.message : error),
            });
        },
      );
    }, REST_MS);
    return () => {
      clearTimeout(timer);
      leaving.abort();
    };
  }, [q]);
  return suggestions;
}
