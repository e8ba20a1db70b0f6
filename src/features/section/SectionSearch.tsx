import { useCallback, useMemo, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { useKeys } from '@/components/ui/use-keys';
import type { UnitSystemName } from '@/engine/quantity';
import { EMPTY, keyOf, type PageState, withSort } from './address';
import { Comparison } from './Comparison';
import { COLUMN_FIELDS } from './columns';
import { EditionBlock } from './EditionBlock';
import type { EditionView } from './edition';
import { PinTray } from './PinTray';
import { ResultLine } from './ResultLine';
import { SectionFilters } from './SectionFilters';
import { SectionTable } from './SectionTable';
import type { SectionItem } from './section';
import { useSearch } from './use-search';

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

/** The sections page: filters, the schedule they leave, and what is pinned of it. */
export function SectionSearch(props: SectionSearchProps) {
  const { system, editions, practice } = props;
  const found = useSearch(props);
  const { state, setState, all, query, rows, chosen, pinned } = found;
  useKeys({
    p: () => chosen && found.pin(chosen),
    '[': () => found.nudge(-1),
    ']': () => found.nudge(1),
  });
  const [view, setView] = useState({ first: 1, last: 0 });
  const onView = useCallback((first: number, last: number) => setView({ first, last }), []);
  const uses = useMemo(() => new Map(props.uses), [props.uses]);

  return (
    <>
      <SectionFilters
        {...{ state, system, editions }}
        items={found.items}
        base={found.base}
        meeting={rows}
        onState={setState}
      />
      <ResultLine
        {...{ view, all, query, system }}
        said={found.said}
        nearest={found.nearest}
        found={all.whole ? rows.length : props.total}
        of={found.items.length}
        csv={{ rows, fields: COLUMN_FIELDS }}
        onSaid={found.setSaid}
      />
      {rows.length === 0 && all.whole ? (
        <NoSection state={state} onClear={() => setState({ ...EMPTY, pins: state.pins })} />
      ) : (
        <SectionTable
          {...{ rows, query, system, uses, onView }}
          pins={state.pins}
          chosen={chosen && keyOf(chosen)}
          onChoose={found.choose}
          onPin={found.pin}
          onSort={(name) => setState((before) => withSort(before, name))}
        />
      )}
      <div className="grid flex-1 border-t-2 border-ink lg:grid-cols-[minmax(0,1fr)_414px_var(--title-column)] md:max-lg:grid-cols-[minmax(0,1fr)_var(--title-column)] [&>*]:border-ink [&>.zone]:border-t-0 lg:[&>*+*]:border-l md:max-lg:[&>:first-child]:col-span-2 md:max-lg:[&>:first-child]:border-b md:max-lg:[&>:last-child]:border-l max-md:[&>*+*]:border-t">
        <PinTray
          {...{ pinned, chosen, editions, system }}
          onUnpinAll={() => {
            setState((before) => ({ ...before, pins: [] }));
            document.querySelector<HTMLElement>('[role="grid"]')?.focus({ preventScroll: true });
          }}
        />
        <Comparison {...{ pinned, chosen, system }} />
        <EditionBlock
          {...{ practice, chosen }}
          edition={editions.find(({ table }) => table === chosen?.table)}
        />
      </div>
    </>
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
      <Button
        onClick={() => {
          onClear();
          document.querySelector<HTMLElement>('[data-search]')?.focus();
        }}
      >
        Clear all
      </Button>
    </div>
  );
}
