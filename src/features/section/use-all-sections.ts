import { useCallback, useEffect, useState } from 'react';
import type { SectionItem } from './section';
import { fetchAllSections } from './section.api';

export interface AllSections {
  readonly items: readonly SectionItem[];
  /** False until every row is here; until then the page shows what the server found. */
  readonly whole: boolean;
  readonly failure: string | null;
  readonly again: () => void;
}

/** Every section of the practice, read once, so that filters answer while they are moved. */
export function useAllSections(): AllSections {
  const [items, setItems] = useState<readonly SectionItem[]>([]);
  const [whole, setWhole] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const [round, setRound] = useState(0);
  // biome-ignore lint/correctness/useExhaustiveDependencies: another round reads again
  useEffect(() => {
    const leaving = new AbortController();
    const read: SectionItem[] = [];
    setFailure(null);
    fetchAllSections(leaving.signal, (part) => read.push(...part)).then(
      () => {
        setItems(read);
        setWhole(true);
      },
      (error: unknown) => {
        if (!leaving.signal.aborted) setFailure(error instanceof Error ? error.message : String(error));
      },
    );
    return () => leaving.abort();
  }, [round]);
  const again = useCallback(() => setRound((before) => before + 1), []);
  return { items, whole, failure, again };
}
