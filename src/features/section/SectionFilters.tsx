import { RichHtml } from '@/components/drawing/marks/RichHtml';
import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import { type Bound, EMPTY, type PageState, withBound } from './address';
import { axesOf, FIELD_WORDS, symbolOf } from './display';
import type { EditionView } from './edition';
import { NumberBound } from './NumberBound';
import type { SectionField } from './query';
import { RangeFilter } from './RangeFilter';
import { ShapeFilter } from './ShapeFilter';
import type { Spread } from './spread';

interface SectionFiltersProps {
  readonly state: PageState;
  readonly onState: (change: (state: PageState) => PageState) => void;
  readonly system: UnitSystemName;
  readonly editions: readonly EditionView[];
  readonly spread: Spread;
}

/** The head of the sections page: what a section is asked to be. */
export function SectionFilters(props: SectionFiltersProps) {
  const { state, onState, system, spread } = props;
  const onBound = (bounds: readonly (readonly [Bound, number | null])[]) =>
    onState((before) => bounds.reduce((now, [name, value]) => withBound(now, name, value), before));
  return (
    <search className="grid border-b-2 border-ink lg:grid-cols-[238px_minmax(0,1fr)_minmax(0,1fr)_292px] md:max-lg:grid-cols-2">
      <Designation {...props} />
      <RangeFilter measure="depth" {...{ state, system, onBound }} spread={spread.depth} />
      <RangeFilter measure="mass" {...{ state, system, onBound }} spread={spread.mass} />
      <Requirements state={state} system={system} onBound={onBound} onState={onState} />
    </search>
  );
}

function Designation({ state, onState, editions }: SectionFiltersProps) {
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
    </div>
  );
}

const REQUIRED: readonly { name: Bound; field: SectionField; words: string; end: 'least' | 'greatest' }[] = [
  { name: 'w_pl_min', field: 'w_pl_cm3', words: 'Plastic modulus', end: 'least' },
  { name: 'i_major_min', field: 'i_major_cm4', words: 'Second moment', end: 'least' },
  { name: 'width_max', field: 'width_mm', words: 'Width', end: 'greatest' },
];

interface RequirementsProps extends Pick<SectionFiltersProps, 'state' | 'system' | 'onState'> {
  readonly onBound: (bounds: readonly (readonly [Bound, number | null])[]) => void;
}

function Requirements({ state, system, onBound, onState }: RequirementsProps) {
  const axes = axesOf(system);
  return (
    <div className="min-w-0 border-rule px-18 pt-14 pb-12 max-lg:border-t lg:border-l max-md:px-12 md:max-lg:nth-2:border-t-0 md:max-lg:nth-[even]:border-l">
      <h2 className="caps mb-8">Also require</h2>
      <div className="grid grid-cols-[minmax(0,1fr)_72px_40px] items-center gap-x-8 gap-y-5 text-schedule">
        {REQUIRED.map(({ name, field, words, end }) => (
          <div key={name} className="contents">
            <span aria-hidden="true">
              {words}{' '}
              <i className="whitespace-nowrap">
                <RichHtml text={symbolOf(field, axes)} />
              </i>
              , {end}
            </span>
            <NumberBound
              label={`${FIELD_WORDS[field].name}, ${end}`}
              name={name}
              field={field}
              value={state.bounds[name]}
              system={system}
              withUnit
              onChange={(bound, value) => onBound([[bound, value]])}
            />
          </div>
        ))}
      </div>
      <div className="mt-8 text-schedule">
        <Button tone="text" onClick={() => onState(({ pins }) => ({ ...EMPTY, pins }))}>
          Clear all
        </Button>
      </div>
    </div>
  );
}
