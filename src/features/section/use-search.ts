import { useDeferredValue, useMemo, useState } from 'react';
import type { UnitSystemName } from '@/engine/quantity';
import { designationRank } from '@/engine/section';
import { keyOf, MOST_PINS, queryOf, withPin } from './address';
import { meetsQuery, type SectionQuery, selectSections } from './query';
import { nudged } from './RangeFilter';
import type { SectionItem } from './section';
import { useAddress } from './use-address';
import { useAllSections } from './use-all-sections';

/** Rows of the answer, and of the same answer without its ranges. */
function useAnswer(items: readonly SectionItem[], query: SectionQuery) {
  const { q, table, shapes, sort } = query;
  const base = useMemo(
    () => selectSections(items, { q, table, shapes, sort, ranges: [] }),
    [items, q, table, shapes, sort],
  );
  const rows = useMemo(() => base.filter((item) => meetsQuery(item, query)), [base, query]);
  return { base, rows };
}

/** What the sections page knows: its address, the rows that answer it, what is chosen and pinned of them. */
export function useSearch(props: {
  readonly search: string;
  readonly first: readonly SectionItem[];
  readonly system: UnitSystemName;
}) {
  const [state, setState] = useAddress(props.search);
  const all = useAllSections();
  const items = all.whole ? all.items : props.first;
  const settled = useDeferredValue(state);
  const query = useMemo(() => queryOf(settled), [settled]);
  const { base, rows } = useAnswer(items, query);
  const [chosenKey, setChosenKey] = useState<string | null>(null);
  const [said, setSaid] = useState('');
  const byKey = useMemo(() => new Map(items.map((item) => [keyOf(item), item])), [items]);
  const chosen = rows.find((item) => keyOf(item) === chosenKey) ?? rows[0] ?? null;

  const pin = (item: SectionItem) => {
    const next = withPin(state, keyOf(item));
    setSaid(next ? '' : `${MOST_PINS} sections are compared at most. Unpin one first.`);
    if (next) setState(next);
  };
  const nudge = (turn: 1 | -1) => setState((before) => nudged(before, base, turn, props.system));

  const [top] = rows;
  return {
    state,
    setState,
    all,
    items,
    query,
    base,
    rows,
    chosen,
    choose: (item: SectionItem) => setChosenKey(keyOf(item)),
    pinned: state.pins.flatMap((key) => byKey.get(key) ?? []),
    pin,
    nudge,
    said,
    setSaid,
    /** Nothing is called as was typed; the rows are only like it. */
    nearest:
      all.whole && query.q !== '' && top !== undefined && designationRank(query.q, top.designation) === null,
  };
}
