import { useId, useMemo, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { useKeys } from '@/components/ui/use-keys';
import type { UnitSystemName } from '@/engine/quantity';
import type { Supplier } from '@/features/stock/stock';
import { cleared, keyOf, type PageState, withSort } from './address';
import type { Answer, FirstAnswer } from './answer';
import { ColumnChooser } from './ColumnChooser';
import { Comparison } from './Comparison';
import { EditionBlock } from './EditionBlock';
import type { EditionView } from './edition';
import { InView } from './in-view';
import { PinTray } from './PinTray';
import type { SectionMeasure } from './query';
import { ResultLine } from './ResultLine';
import { SectionFilters } from './SectionFilters';
import { SectionTable } from './SectionTable';
import type { SavedSearchesOf } from './saved/SavedSearches';
import { useAddress } from './use-address';
import { useAnswerHere } from './use-all-sections';
import { type ColumnChoosing, useColumns } from './use-columns';
import { useSearch } from './use-search';
import { useServerAnswer } from './use-server-answer';

export interface SectionSearchProps {
  readonly practice: string;
  readonly system: UnitSystemName;
  /** The page's own query, and what the server found for it. */
  readonly search: string;
  readonly first: FirstAnswer;
  /** How many sections the practice has. */
  readonly library: number;
  readonly editions: readonly EditionView[];
  /** Whose stock is known, and the day that it is held against. */
  readonly suppliers: readonly Supplier[];
  readonly today: string;
  /** How many members use a section, by its key. */
  readonly uses: readonly (readonly [string, number])[];
  readonly saved: SavedSearchesOf;
  /** Columns that the person has chosen; null: the usual ones. */
  readonly columns: readonly SectionMeasure[] | null;
}

/** Of a library no longer than this every row is read into the browser. */
const MOST_HERE = 5000;

/** The sections page: filters, the schedule they leave, and what is pinned of it. */
export const SectionSearch = (props: SectionSearchProps) =>
  props.library > MOST_HERE ? <SearchedByServer {...props} /> : <SearchedHere {...props} />;

function SearchedByServer(props: SectionSearchProps) {
  const [state, setState] = useAddress(props.search);
  const answer = useServerAnswer(state, props.first, props.system);
  return <Search {...props} {...{ state, setState, answer }} />;
}

function SearchedHere(props: SectionSearchProps) {
  const [state, setState] = useAddress(props.search);
  const answer = useAnswerHere(state, props.first, props.system);
  return <Search {...props} {...{ state, setState, answer }} />;
}

interface SearchProps extends SectionSearchProps {
  readonly state: PageState;
  readonly setState: (change: (state: PageState) => PageState) => void;
  readonly answer: Answer;
}

function Search(props: SearchProps) {
  const { system, editions, suppliers, today, practice, state, setState, answer } = props;
  const found = useSearch(answer, state, setState, system);
  const { chosen } = found;
  const choosing = useColumns(state, setState, props.columns);
  useKeys({
    p: () => chosen && found.pin(chosen),
    ...Object.fromEntries(found.actions.map((action) => [action.key.toLowerCase(), () => found.act(action)])),
    '[': () => found.nudge(-1),
    ']': () => found.nudge(1),
  });
  return (
    <>
      <SectionFilters
        {...{ state, system, editions, suppliers, today }}
        saved={props.saved}
        spread={answer.spread}
        onState={setState}
      />
      <Schedule {...props} found={found} choosing={choosing} />
      <div className="grid flex-1 border-t-2 border-ink lg:grid-cols-[minmax(0,1fr)_414px_var(--title-column)] md:max-lg:grid-cols-[minmax(0,1fr)_var(--title-column)] [&>*]:border-ink [&>.zone]:border-t-0 lg:[&>*+*]:border-l md:max-lg:[&>:first-child]:col-span-2 md:max-lg:[&>:first-child]:border-b md:max-lg:[&>:last-child]:border-l max-md:[&>*+*]:border-t">
        <PinTray
          {...{ chosen, editions, system }}
          pinned={answer.pinned}
          actions={found.actions}
          onAction={found.act}
          onUnpinAll={() => {
            setState((before) => ({ ...before, pins: [] }));
            document.querySelector<HTMLElement>('[role="grid"]')?.focus({ preventScroll: true });
          }}
        />
        <Comparison {...{ chosen, system }} columns={choosing.columns} pinned={answer.pinned} />
        <EditionBlock
          {...{ practice, chosen }}
          edition={editions.find(({ table }) => table === chosen?.table)}
        />
      </div>
    </>
  );
}

/** The line of what was found and its rows: apart from the rest of the page, which scrolling leaves alone. */
function Schedule({
  system,
  library,
  state,
  setState,
  answer,
  found,
  choosing,
  ...props
}: SearchProps & { found: ReturnType<typeof useSearch>; choosing: ColumnChoosing }) {
  const chooser = useId();
  const [isChoosing, setChoosing] = useState(false);
  const [inView] = useState(() => new InView());
  const uses = useMemo(() => new Map(props.uses), [props.uses]);
  // As they are drawn and numbered: a pin of what is no longer there has no number.
  const pins = useMemo(() => answer.pinned.map(keyOf), [answer.pinned]);
  return (
    <>
      <ResultLine
        {...{ inView, answer, system }}
        of={library}
        said={found.said}
        nearest={found.nearest}
        onSaid={found.setSaid}
        columns={choosing.columns}
        onChoosing={() => setChoosing((before) => !before)}
        {...{ chooser, isChoosing }}
      />
      {isChoosing && (
        <ColumnChooser
          {...{ choosing, system }}
          id={chooser}
          onClose={() => {
            setChoosing(false);
            document.querySelector<HTMLElement>('[data-columns]')?.focus();
          }}
        />
      )}
      {answer.total === 0 && answer.isSettled ? (
        <NoSection state={state} onClear={() => setState(cleared)} />
      ) : (
        <SectionTable
          {...{ system, uses, pins }}
          onView={inView.tell}
          rows={answer.rows}
          total={answer.total}
          query={answer.query}
          shown={choosing.columns}
          at={found.at}
          opensAtChosen={found.opensAtChosen}
          onChoose={found.choose}
          onPin={found.pin}
          onSort={(name) => setState((before) => withSort(before, name))}
          onNearEnd={answer.more}
        />
      )}
    </>
  );
}

function NoSection({ state, onClear }: { state: PageState; onClear: () => void }) {
  const bounds = Object.keys(state.bounds).length;
  const isStockAsked = state.stock !== '' || state.supplier !== '';
  return (
    <div className="grid min-h-240 place-content-center justify-items-center gap-10 px-20 py-28 text-center">
      <h2 className="text-[1.625rem] leading-32 font-light">No section meets all of this.</h2>
      <p className="text-zone font-normal text-ink-2">
        {isStockAsked
          ? 'It may be made all the same: look at what is not in stock too.'
          : bounds > 0
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
