import { z } from 'zod';
import type { UnitSystemName } from '@/engine/quantity';
import { roundStep } from '@/lib/round-step';
import { fromShown, toShown } from './display';
import { meetsQuery, type SectionQuery } from './query';
import type { SectionItem } from './section';

const MEASURES = ['depth', 'mass'] as const;
export type Ranged = (typeof MEASURES)[number];
export const RANGED_FIELD = { depth: 'depth_mm', mass: 'mass_kg_m' } as const;

const counts = z.array(z.int().nonnegative()).max(64);

/** How a measure is spread over bins that start at 0. A value on a boundary is in the bin that it starts. */
const measureSpreadSchema = z.strictObject({
  /** Width of a bin, in mm or kg/m. */
  bin: z.number().positive(),
  /** The sections that answer all but the ranges, and those of them that meet every range. */
  all: counts,
  meeting: counts,
  /** Those that meet the range of this measure, whatever the others. */
  within: z.int().nonnegative(),
});
export type MeasureSpread = z.output<typeof measureSpreadSchema>;

export const spreadSchema = z.strictObject({ depth: measureSpreadSchema, mass: measureSpreadSchema });
export type Spread = z.output<typeof spreadSchema>;

const BARS = 32;
/** Of a bin: a value this little below a boundary is on it, since a bin of inches has no exact width in mm. */
const ON_BOUNDARY = 1e-9;

/** Bins as round as the unit that is shown allows, up to the greatest value; in mm or kg/m. */
export function binsTo(
  greatest: number,
  measure: Ranged,
  system: UnitSystemName,
): { bin: number; bins: number } {
  const field = RANGED_FIELD[measure];
  const shown = roundStep(Math.max(1, toShown(field, greatest, system)) / BARS);
  const bin = fromShown(field, shown, system);
  return { bin, bins: Math.max(1, Math.ceil(greatest / bin - ON_BOUNDARY)) };
}

/** The bin that a value is in; one at the very end is in the last. */
export const binOf = (value: number, bin: number, bins: number): number =>
  Math.min(bins - 1, Math.floor(value / bin + ON_BOUNDARY));

/** How many values are in each bin. */
export function countsOf(values: readonly number[], bin: number, bins: number): number[] {
  const counts = new Array<number>(bins).fill(0);
  for (const value of values) {
    const i = binOf(value, bin, bins);
    counts[i] = (counts[i] ?? 0) + 1;
  }
  return counts;
}

/** The query with no range but those of one measure; without a measure, with none at all. */
export const withRangesOf = (query: SectionQuery, measure?: Ranged): SectionQuery => ({
  ...query,
  ranges: query.ranges.filter(({ field }) => measure !== undefined && field === RANGED_FIELD[measure]),
});

/** The spread of rows that answer all but the ranges. The axis is that of every section where none is left. */
export function spreadOf(
  base: readonly SectionItem[],
  every: readonly SectionItem[],
  query: SectionQuery,
  system: UnitSystemName,
): Spread {
  const meeting = base.filter((item) => meetsQuery(item, query));
  const of = (measure: Ranged): MeasureSpread => {
    const field = RANGED_FIELD[measure];
    const greatest = (base.length > 0 ? base : every).reduce((most, item) => Math.max(most, item[field]), 0);
    const { bin, bins } = binsTo(greatest, measure, system);
    const counted = (items: readonly SectionItem[]) =>
      countsOf(
        items.map((item) => item[field]),
        bin,
        bins,
      );
    const own = withRangesOf(query, measure);
    return {
      bin,
      all: counted(base),
      meeting: counted(meeting),
      within: base.filter((item) => meetsQuery(item, own)).length,
    };
  };
  return { depth: of('depth'), mass: of('mass') };
}
