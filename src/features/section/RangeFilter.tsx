import { useMemo } from 'react';
import { roundStep } from '@/components/drawing/geometry/scale';
import { HistogramRange } from '@/components/drawing/HistogramRange';
import { type Bins, shifted } from '@/components/drawing/histogram/histogram';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { UnitSystemName } from '@/engine/quantity';
import { type Bound, type PageState, withBound } from './address';
import { FIELD_WORDS, fromShown, richUnitOf, toShown, unitOf } from './display';
import { NumberBound } from './NumberBound';
import { measureOf } from './query';
import type { SectionItem } from './section';

export type Ranged = 'depth' | 'mass';

interface RangeFilterProps {
  readonly measure: Ranged;
  readonly state: PageState;
  readonly system: UnitSystemName;
  /** Every section: the axis is theirs where none is left. */
  readonly items: readonly SectionItem[];
  /** The sections before any range, and those that meet every range. */
  readonly base: readonly SectionItem[];
  readonly meeting: readonly SectionItem[];
  readonly onBound: (bounds: readonly (readonly [Bound, number | null])[]) => void;
}

const FIELD = { depth: 'depth_mm', mass: 'mass_kg_m' } as const;
const NUDGE = { depth: { metric: 1, us: 0.25 }, mass: { metric: 1, us: 1 } } as const;
const BARS = 32;

function binsOf(values: readonly number[]): Bins {
  const bin = roundStep(Math.max(1, ...values) / BARS);
  return { from: 0, to: bin * Math.max(1, Math.ceil(Math.max(0, ...values) / bin)), bin };
}

/** The range that the cursors stand at, in the unit shown; an end without a bound is the histogram's. */
function rangeOf(state: PageState, measure: Ranged, bins: Bins, system: UnitSystemName) {
  const at = (end: 'min' | 'max', open: number) => {
    const bound = state.bounds[`${measure}_${end}`];
    return bound === undefined ? open : Number(toShown(FIELD[measure], bound, system).toPrecision(9));
  };
  const low = Math.min(at('min', bins.from), bins.to);
  return { low: Math.max(bins.from, low), high: Math.max(low, Math.min(bins.to, at('max', bins.to))) };
}

function boundsOf(
  { low, high }: { low: number; high: number },
  measure: Ranged,
  bins: Bins,
  system: UnitSystemName,
): (readonly [Bound, number | null])[] {
  const bound = (value: number, open: number) =>
    value === open ? null : fromShown(FIELD[measure], value, system);
  return [
    [`${measure}_min`, bound(low, bins.from)],
    [`${measure}_max`, bound(high, bins.to)],
  ];
}

const shownValues = (items: readonly SectionItem[], measure: Ranged, system: UnitSystemName): number[] =>
  items.map((item) => toShown(FIELD[measure], measureOf(item, FIELD[measure]) ?? 0, system));

const NUDGES = 10; // steps

/** The range of depth moved by some steps, its width kept; an open end stays open. */
export function nudged(
  state: PageState,
  items: readonly SectionItem[],
  turn: 1 | -1,
  system: UnitSystemName,
): PageState {
  const bins = binsOf(shownValues(items, 'depth', system));
  const { depth_min: least, depth_max: most } = state.bounds;
  const range = rangeOf(state, 'depth', bins, system);
  if (least === undefined && most === undefined) return state;
  const inner = {
    low: least === undefined ? range.high : range.low,
    high: most === undefined ? range.low : range.high,
  };
  const moved = shifted(inner, turn * NUDGES * NUDGE.depth[system], bins);
  const ends = {
    low: least === undefined ? bins.from : moved.low,
    high: most === undefined ? bins.to : moved.high,
  };
  return boundsOf(ends, 'depth', bins, system).reduce(
    (now, [name, value]) => withBound(now, name, value),
    state,
  );
}

/** Depth or mass: two cursors over a histogram, and a field at each end that does the same. */
export function RangeFilter({ measure, state, system, items, base, meeting, onBound }: RangeFilterProps) {
  const field = FIELD[measure];
  const values = useMemo(() => shownValues(base, measure, system), [base, measure, system]);
  const met = useMemo(() => shownValues(meeting, measure, system), [meeting, measure, system]);
  const bins = useMemo(
    () => binsOf(values.length > 0 ? values : shownValues(items, measure, system)),
    [values, items, measure, system],
  );
  const bound = (end: 'min' | 'max', word: string) => (
    <NumberBound
      label={`${word} ${measure}`}
      name={`${measure}_${end}`}
      field={field}
      value={state.bounds[`${measure}_${end}`]}
      system={system}
      placeholder="any"
      onChange={(name, value) => onBound([[name, value]])}
    />
  );
  return (
    <div className="min-w-0 border-rule px-18 pt-14 pb-12 max-lg:border-t lg:border-l max-md:px-12 md:max-lg:nth-2:border-t-0 md:max-lg:nth-[even]:border-l">
      <div className="flex items-center gap-8">
        <span className="mr-auto font-semibold">
          {measure === 'depth' ? 'Depth' : 'Mass'} <i className="font-normal">{FIELD_WORDS[field].symbol}</i>
        </span>
        {bound('min', 'Least')}
        <span className="text-ink-2">to</span>
        {bound('max', 'Greatest')}
        <span className="text-ink-2">
          <RichHtml text={richUnitOf(field, system)} />
        </span>
      </div>
      <HistogramRange
        values={values}
        meeting={met}
        bins={bins}
        range={rangeOf(state, measure, bins, system)}
        onRange={(range) => onBound(boundsOf(range, measure, bins, system))}
        step={NUDGE[measure][system]}
        name={measure}
        unit={unitOf(field, system)}
        within={measure === 'depth' ? 'in this depth' : 'in this mass'}
      />
    </div>
  );
}
