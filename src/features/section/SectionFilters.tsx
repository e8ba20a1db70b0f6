import type { UnitSystemName } from '@/engine/quantity';
import { StockFilter } from '@/features/stock/StockFilter';
import type { Supplier } from '@/features/stock/stock';
import { type Bound, type PageState, withBound } from './address';
import type { EditionView } from './edition';
import { RangeFilter } from './RangeFilter';
import { RequiredLines } from './RequiredLines';
import { Requirements } from './Requirements';
import { ShapeFilter } from './ShapeFilter';
import { SavedButtons, type SavedSearchesOf, SavedStrip, useSavedSearches } from './saved/SavedSearches';
import type { Spread } from './spread';

interface SectionFiltersProps {
  readonly state: PageState;
  readonly onState: (change: (state: PageState) => PageState) => void;
  readonly system: UnitSystemName;
  readonly editions: readonly EditionView[];
  readonly spread: Spread;
  readonly suppliers: readonly Supplier[];
  readonly today: string;
  readonly saved: SavedSearchesOf;
}

/** The head of the sections page: what a section is asked to be. */
export function SectionFilters(props: SectionFiltersProps) {
  const { state, onState, system, spread, saved } = props;
  const opened = useSavedSearches(saved);
  const onBound = (bounds: readonly (readonly [Bound, number | null])[]) =>
    onState((before) => bounds.reduce((now, [name, value]) => withBound(now, name, value), before));
  return (
    <search className="grid border-b-2 border-ink lg:grid-cols-[clamp(270px,23vw,330px)_minmax(0,1fr)_minmax(0,1fr)_292px] md:max-lg:grid-cols-2">
      <Designation {...props} />
      <RangeFilter measure="depth" {...{ state, system, onBound }} spread={spread.depth} />
      <RangeFilter measure="mass" {...{ state, system, onBound }} spread={spread.mass} />
      <Requirements {...{ state, system, onBound, onState }}>
        <SavedButtons opened={opened} />
      </Requirements>
      <RequiredLines {...{ state, system, onBound, onState }} />
      <SavedStrip {...saved} {...{ opened, state, onState }} />
    </search>
  );
}

function Designation({ state, onState, editions, suppliers, today }: SectionFiltersProps) {
  return (
    <div className="min-w-0 px-20 pt-14 pb-12 max-md:px-12">
      <h1 className="mb-8 text-sheet">Sections</h1>
      <input
        type="search"
        data-search
        aria-label="Designation"
        placeholder="Designation, e.g. W12x26"
        autoComplete="off"
        spellCheck={false}
        maxLength={100}
        className="input"
        value={state.q}
        onChange={(event) => {
          const q = event.target.value;
          onState((before) => ({ ...before, q }));
        }}
      />
      <ShapeFilter
        value={state.shape}
        onChange={(shape) => onState((before) => ({ ...before, shape, table: '' }))}
      />
      <div className="grid gap-x-12 md:grid-cols-[minmax(0,1fr)_minmax(0,1.25fr)]">
        <select
          aria-label="Section table"
          className="input text-schedule!"
          value={state.table}
          onChange={(event) => {
            const table = event.target.value;
            onState((before) => ({ ...before, table }));
          }}
        >
          <option value="">All tables</option>
          {editions.map(({ table, name }) => (
            <option key={table} value={table}>
              {name}
            </option>
          ))}
        </select>
        <StockFilter
          {...{ suppliers, today }}
          stock={state.stock}
          supplier={state.supplier}
          onChange={(asked) => onState((before) => ({ ...before, ...asked }))}
        />
      </div>
    </div>
  );
}
