import { useCallback, useDeferredValue, useEffect, useMemo, useState } from 'react';
import type { UnitSystemName } from '@/engine/quantity';
import { askedOf, keyOf, type PageState, queryOf, readAddress } from './address';
import type { Answer, FirstAnswer } from './answer';
import { meetsQuery, type SectionQuery, selectSections } from './query';
import type { SectionItem } from './section';
import { fetchAllSections } from './section.api';
import { spreadOf } from './spread';

interface AllSections {
  /** Null until every row is here. */
  readonly items: readonly SectionItem[] | null;
  readonly failure: string | null;
  readonly again: () => void;
}

function useAllSections(): AllSections {
  const [items, setItems] = useState<readonly SectionItem[] | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const [round, setRound] = useState(0);
  // biome-ignore lint/correctness/useExhaustiveDependencies: another round reads again
  useEffect(() => {
    const leaving = new AbortController();
    const read: SectionItem[] = [];
    setFailure(null);
    fetchAllSections(leaving.signal, (part) => read.push(...part)).then(
      () => setItems(read),
      (error: unknown) => {
        if (!leaving.signal.aborted) setFailure(error instanceof Error ? error.message : String(error));
      },
    );
    return () => leaving.abort();
  }, [round]);
  const again = useCallback(() => setRound((before) => before + 1), []);
  return { items, failure, again };
}

const NONE: readonly SectionItem[] = [];

/** Rows of the answer, and of the same answer without its ranges. */
function useRowsOf(items: readonly SectionItem[], query: SectionQuery) {
  const { q, table, shapes, inStock, supplier, sort } = query;
  const base = useMemo(
    () => selectSections(items, { q, table, shapes, inStock, supplier, sort, ranges: [] }),
    [items, q, table, shapes, inStock, supplier, sort],
  );
  const rows = useMemo(() => base.filter((item) => meetsQuery(item, query)), [base, query]);
  return { base, rows };
}

const nothing = () => {};

/** Answers of a library that is read once, whole, so that they come while a filter is moved. */
export function useAnswerHere(state: PageState, first: FirstAnswer, system: UnitSystemName): Answer {
  const { items, failure, again } = useAllSections();
  const asked = useDeferredValue(askedOf(state));
  const query = useMemo(() => queryOf(readAddress(asked)), [asked]);
  const every = items ?? NONE;
  const { base, rows } = useRowsOf(every, query);
  const spread = useMemo(
    () => (items === null ? first.spread : spreadOf(base, items, query, system)),
    [items, first.spread, base, query, system],
  );
  const byKey = useMemo(() => new Map(every.map((item) => [keyOf(item), item])), [every]);
  return {
    query,
    rows: items === null ? first.items : rows,
    total: items === null ? first.total : rows.length,
    spread,
    pinned: state.pins.flatMap((key) => byKey.get(key) ?? []),
    isSettled: items !== null,
    isReading: items === null && failure === null,
    failure,
    again,
    more: nothing,
  };
}
