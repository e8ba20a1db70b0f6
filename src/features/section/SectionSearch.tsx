import { useCallback, useDeferredValue, useMemo, useState } from 'react';
import { shifted } from '@/components/drawing/histogram/histogram';
import { Button } from '@/components/ui/Button';
import { useKeys } from '@/components/ui/use-keys';
import type { UnitSystemName } from '@/engine/quantity';
import { designationRank } from '@/engine/section';
import { EMPTY, keyOf, MOST_PINS, type PageState, queryOf, withBound, withPin, withSort } from './address';
import { Comparison } from './Comparison';
import { COLUMN_FIELDS } from './columns';
import { EditionBlock } from './EditionBlock';
import type { EditionView } from './edition';
import { PinTray } from './PinTray';
import { meetsQuery, type SectionQuery, selectSections } from './query';
import { binsOf, boundsOf, NUDGE, rangeOf, shownValues } from './RangeFilter';
import { ResultLine } from './ResultLine';
import { SectionFilters } from './SectionFilters';
import { SectionTable } from './SectionTable';
import type { SectionItem } from './section';
import { useAddress } from './use-address';
import { useAllSections } from './use-all-sections';

export interface SectionSearchProps {
  readonly practice: string;
  readonly system: UnitSystemName;
  /** The page's own query, and what the server found for it. */
  readonly search: string;
  readonly first: readonly SectionItem[];
  readonly total: number;
  readonly editions: readonly EditionView[];
  /** How many members use a section, by its key. */
  readonly uses: readonly (readonly [string, number])[];
}

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

/** The sections page: filters, the schedule they leave, and what is pinned of it. */
export function SectionSearch(props: SectionSearchProps) {
  const { system, editions, practice } = props;
  const [state, setState] = useAddress(props.search);
  const all = useAllSections();
  const items = all.whole ? all.items : props.first;
  const words = useDeferredValue(state);
  const query = useMemo(() => queryOf(words), [words]);
  const { base, rows } = useAnswer(items, query);
  const [chosenKey, setChosenKey] = useState<string | null>(null);
  const [said, setSaid] = useState('');
  const [view, setView] = useState({ first: 1, last: 0 });
  const uses = useMemo(() => new Map(props.uses), [props.uses]);
  const byKey = useMemo(() => new Map(items.map((item) => [keyOf(item), item])), [items]);
  const chosen = rows.find((item) => keyOf(item) === chosenKey) ?? rows[0] ?? null;
  const pinned = state.pins.flatMap((key) => byKey.get(key) ?? []);

  const pin = (item: SectionItem) => {
    const next = withPin(state, keyOf(item));
    setSaid(next ? '' : `${MOST_PINS} sections are compared at most. Unpin one first.`);
    if (next) setState(next);
  };
  const nudge = (turn: 1 | -1) =>
    setState((before) => nudged(before, shownValues(base, 'depth', system), turn, system));
  useKeys({
    p: () => chosen && pin(chosen),
    '[': () => nudge(-1),
    ']': () => nudge(1),
  });
  const onView = useCallback((first: number, last: number) => setView({ first, last }), []);
  const nearest =
    all.whole &&
    query.q !== '' &&
    rows[0] !== undefined &&
    designationRank(query.q, rows[0].designation) === null;

  return (
    <>
      <SectionFilters {...{ state, system, editions, base }} meeting={rows} onState={setState} />
      <ResultLine
        {...{ view, all, said, nearest, query, system }}
        found={all.whole ? rows.length : props.total}
        of={items.length}
        csv={{ rows, fields: COLUMN_FIELDS }}
        onSaid={setSaid}
      />
      {rows.length === 0 && all.whole ? (
        <NoSection state={state} onClear={() => setState({ ...EMPTY, pins: state.pins })} />
      ) : (
        <SectionTable
          {...{ rows, query, system, uses, onView }}
          pins={state.pins}
          chosen={chosen && keyOf(chosen)}
          onChoose={(item) => setChosenKey(keyOf(item))}
          onPin={pin}
          onSort={(name) => setState((before) => withSort(before, name))}
        />
      )}
      <div className="grid flex-1 border-t-2 border-ink lg:grid-cols-[minmax(0,1fr)_414px_var(--title-column)] md:max-lg:grid-cols-[minmax(0,1fr)_var(--title-column)] [&>*]:border-ink [&>.zone]:border-t-0 lg:[&>*+*]:border-l md:max-lg:[&>:first-child]:col-span-2 md:max-lg:[&>:first-child]:border-b md:max-lg:[&>:last-child]:border-l max-md:[&>*+*]:border-t">
        <PinTray
          {...{ pinned, editions, system }}
          onUnpinAll={() => setState((before) => ({ ...before, pins: [] }))}
        />
        <Comparison {...{ pinned, system }} />
        <EditionBlock
          {...{ practice, chosen }}
          edition={editions.find(({ table }) => table === chosen?.table)}
        />
      </div>
    </>
  );
}

/** The range of depth moved by a step, its width kept. */
function nudged(
  state: PageState,
  depths: readonly number[],
  turn: 1 | -1,
  system: UnitSystemName,
): PageState {
  const bins = binsOf(depths);
  const range = shifted(rangeOf(state, 'depth', bins, system), turn * 10 * NUDGE.depth[system], bins);
  return boundsOf(range, 'depth', bins, system).reduce(
    (now, [name, value]) => withBound(now, name, value),
    state,
  );
}

function NoSection({ state, onClear }: { state: PageState; onClear: () => void }) {
  const bounds = Object.keys(state.bounds).length;
  return (
    <div className="grid min-h-240 place-content-center justify-items-center gap-10 px-20 py-28 text-center">
      <h2 className="text-[1.625rem] leading-32 font-light">No section meets all of this.</h2>
      <p className="text-zone font-normal text-ink-2">
        {bounds > 0
          ? 'Widen a range, or take it out; the histograms show where the sections are.'
          : 'Check the designation, or choose another shape or table.'}
      </p>
      <Button onClick={onClear}>Clear all</Button>
    </div>
  );
}
