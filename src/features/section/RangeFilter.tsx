import { useMemo } from 'react';
import { HistogramRange } from '@/components/drawing/HistogramRange';
import { type Bins, shifted } from '@/components/drawing/histogram/histogram';
import { RichHtml } from '@/components/drawing/marks/RichHtml';
import type { UnitSystemName } from '@/engine/quantity';
import { type Bound, type PageState, withBound } from './address';
import { FIELD_WORDS, fromShown, richUnitOf, toShown, unitOf } from './display';
import { NumberBound } from './NumberBound';
import { RANGED_FIELD as FIELD, type MeasureSpread, type Ranged } from './spread';

interface RangeFilterProps {
  readonly measure: Ranged;
  readonly state: PageState;
  readonly system: UnitSystemName;
  readonly spread: MeasureSpread;
  readonly onBound: (bounds: readonly (readonly [Bound, number | null])[]) => void;
}

const NUDGE = { depth: { metric: 1, us: 0.25 }, mass: { metric: 1, us: 1 } } as const;
const FIGURES = 9; // a bound in the unit shown, without the last bits of its conversion

const shown = (measure: Ranged, value: number, system: UnitSystemName): number =>
  Number(toShown(FIELD[measure], value, system).toPrecision(FIGURES));

/** The bins in the unit shown. */
const binsOf = ({ bin, all }: MeasureSpread, measure: Ranged, system: UnitSystemName): Bins => ({
  from: 0,
  to: shown(measure, bin * all.length, system),
  bin: shown(measure, bin, system),
});

/** The range that the cursors stand at, in the unit shown; an end without a bound is the histogram's. */
function rangeOf(state: PageState, measure: Ranged, bins: Bins, system: UnitSystemName) {
  const at = (end: 'min' | 'max', open: number) => {
    const bound = state.bounds[`${measure}_${end}`];
    return bound === undefined ? open : shown(measure, bound, system);
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

const NUDGES = 10; // steps

/** The range of depth moved by some steps, its width kept; an open end stays open. */
export function nudged(
  state: PageState,
  spread: MeasureSpread,
  turn: 1 | -1,
  system: UnitSystemName,
): PageState {
  const bins = binsOf(spread, 'depth', system);
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
export function RangeFilter({ measure, state, system, spread, onBound }: RangeFilterProps) {
  const field = FIELD[measure];
  const bins = useMemo(() => binsOf(spread, measure, system), [spread, measure, system]);
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
      <div className="flex flex-wrap items-center gap-8">
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
        all={spread.all}
        meeting={spread.meeting}
        count={spread.within}
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
