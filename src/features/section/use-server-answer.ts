import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { UnitSystemName } from '@/engine/quantity';
import { useRestedValue } from '@/features/template/use-live';
import { askedOf, keyOf, type PageState, queryOf, readAddress } from './address';
import { type Answer, type FirstAnswer, ofKey, type Read, withPage } from './answer';
import type { SectionItem } from './section';
import { fetchSection, fetchSections, fetchSpread, MOST } from './section.api';
import type { Spread } from './spread';

const REST_MS = 80;

const wordsOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));
const fieldsOf = (asked: string): Record<string, string> => Object.fromEntries(new URLSearchParams(asked));

/** Answers of a library too long for the browser: the server finds them, and rows are read as they come into view. */
export function useServerAnswer(state: PageState, first: FirstAnswer, system: UnitSystemName): Answer {
  const now = askedOf(state);
  const asked = useRestedValue(now, REST_MS);
  const [known, setKnown] = useState<Read>({
    asked,
    rows: first.items,
    next: first.next,
    total: first.total,
  });
  const [failure, setFailure] = useState<string | null>(null);
  const [round, setRound] = useState(0);
  const isAnswered = known.asked === asked;
  // biome-ignore lint/correctness/useExhaustiveDependencies: another round asks again
  useEffect(() => {
    setFailure(null);
    if (isAnswered) return;
    const leaving = new AbortController();
    fetchSections({ ...fieldsOf(asked), limit: MOST }, leaving.signal).then(
      ({ items, next, total }) => setKnown({ asked, rows: items, next, total }),
      (error: unknown) => {
        if (!leaving.signal.aborted) setFailure(wordsOf(error));
      },
    );
    return () => leaving.abort();
  }, [asked, isAnswered, round]);

  const more = useMore(known, setKnown, setFailure);
  const spread = useSpread(asked, first.spread, system, round);
  const pins = usePinned(state.pins, known.rows, round);
  const query = useMemo(() => queryOf(readAddress(known.asked)), [known.asked]);
  const said = failure ?? spread.failure ?? pins.failure;
  return {
    query,
    rows: known.rows,
    total: known.total,
    spread: spread.found,
    pinned: pins.items,
    isSettled: known.asked === now,
    isReading: !isAnswered && said === null,
    failure: said,
    again: () => {
      setRound((before) => before + 1);
      if (isAnswered) more();
    },
    more,
  };
}

/** Counted over every section, and so slower than a page of rows, which does not wait for it. */
function useSpread(
  asked: string,
  first: Spread,
  system: UnitSystemName,
  round: number,
): { readonly found: Spread; readonly failure: string | null } {
  const [known, setKnown] = useState({ asked, found: first });
  const [failure, setFailure] = useState<string | null>(null);
  const isKnown = known.asked === asked;
  // biome-ignore lint/correctness/useExhaustiveDependencies: another round asks again
  useEffect(() => {
    setFailure(null);
    if (isKnown) return;
    const leaving = new AbortController();
    fetchSpread({ ...fieldsOf(asked), system }, leaving.signal).then(
      (found) => setKnown({ asked, found }),
      (error: unknown) => {
        if (!leaving.signal.aborted) setFailure(wordsOf(error));
      },
    );
    return () => leaving.abort();
  }, [asked, isKnown, round, system]);
  return { found: known.found, failure };
}

/** Reads the next page of what is known, one at a time. */
function useMore(
  known: Read,
  setKnown: (change: (known: Read) => Read) => void,
  setFailure: (words: string | null) => void,
): () => void {
  const reading = useRef<string | null>(null);
  const leaving = useRef<AbortController | null>(null);
  const { asked, next } = known;
  // biome-ignore lint/correctness/useExhaustiveDependencies: pages of another question are not waited for
  useEffect(
    () => () => {
      leaving.current?.abort();
      reading.current = null;
    },
    [asked],
  );
  return useCallback(() => {
    if (next === null || reading.current === next) return;
    reading.current = next;
    leaving.current = new AbortController();
    const { signal } = leaving.current;
    fetchSections({ ...fieldsOf(asked), limit: MOST, cursor: next }, signal).then(
      (page) => {
        setFailure(null);
        setKnown((before) => withPage(before, { ...page, asked, cursor: next }));
      },
      (error: unknown) => {
        reading.current = null;
        if (!signal.aborted) setFailure(wordsOf(error));
      },
    );
  }, [asked, next, setKnown, setFailure]);
}

/** The pinned sections: from the rows where they have been among them, else read by their keys. */
function usePinned(
  pins: readonly string[],
  rows: readonly SectionItem[],
  round: number,
): { readonly items: readonly SectionItem[]; readonly failure: string | null } {
  const [known, setKnown] = useState<ReadonlyMap<string, SectionItem | null>>(new Map());
  const [failure, setFailure] = useState<string | null>(null);
  const unknown = pins.filter((key) => !known.has(key)).join('\n');
  // biome-ignore lint/correctness/useExhaustiveDependencies: another round reads again; rows alone change nothing
  useEffect(() => {
    setFailure(null);
    if (unknown === '') return;
    const leaving = new AbortController();
    const find = async (key: string): Promise<readonly [string, SectionItem | null]> => {
      const name = ofKey(key);
      const found =
        rows.find((item) => keyOf(item) === key) ??
        (name && (await fetchSection(name.table, name.designation, leaving.signal)));
      return [key, found];
    };
    Promise.all(unknown.split('\n').map(find)).then(
      (found) => setKnown((before) => new Map([...before, ...found])),
      (error: unknown) => {
        if (!leaving.signal.aborted) setFailure(wordsOf(error));
      },
    );
    return () => leaving.abort();
  }, [unknown, round]);
  const items = useMemo(() => pins.flatMap((key) => known.get(key) ?? []), [pins, known]);
  return { items, failure };
}
