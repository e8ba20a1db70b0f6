import { type Combination, factorOf } from '../combination/index';
import type { Source } from './sources';

/** What is below this part of the largest value of its kind is rounding: a share that adverse loading leaves out. */
export const NOTHING = 1e-12;

/**
 * How the sources make up the combinations. They stand in parts: part 0 always acts, and every other part acts, or does
 * not, with the loads of its span.
 */
export type Cases = {
  readonly combinations: readonly Combination[];
  readonly count: number;
  /** The sources of part p are starts[p] … starts[p + 1] − 1. */
  readonly starts: Int32Array;
  /** The spans of the parts from 1 on. */
  readonly spans: readonly number[];
  /** Factor of source i in combination c at c·count + i. */
  readonly factors: Float64Array;
};

/** `sources`: those that always act first, then span by span. */
export function casesOf(sources: readonly Source[], combinations: readonly Combination[]): Cases {
  const count = sources.length;
  const spans = [...new Set(sources.flatMap(({ span }) => (span === null ? [] : [span])))];
  const starts = spans.map((span) => sources.findIndex((source) => source.span === span));
  const factors = combinations.flatMap((combination) =>
    sources.map(({ group }) => (group === null ? 1 : factorOf(combination, group))),
  );
  return {
    combinations,
    count,
    starts: Int32Array.of(0, ...starts, count),
    spans,
    factors: Float64Array.from(factors),
  };
}

/** 1 for the largest value of a quantity, −1 for the smallest. */
export type Sense = 1 | -1;

/** What one part gives in a combination. `values[at + i]` is the quantity under source i alone. */
export function shareOf(
  { count, starts, factors }: Cases,
  part: number,
  combination: number,
  values: Float64Array,
  at: number,
): number {
  const row = combination * count;
  const end = starts[part + 1]!;
  let share = 0;
  for (let i = starts[part]!; i < end; i++) share += factors[row + i]! * values[at + i]!;
  return share;
}

/**
 * Adds up what the sources give of one quantity at one place: all that always acts, and of the spans only the adverse.
 * Answers in its fields, so that adding allocates nothing.
 */
export class Adverse {
  least = 0;
  most = 0;

  constructor(readonly cases: Cases) {}

  add(values: Float64Array, at: number, combination: number): void {
    const { cases } = this;
    let least = shareOf(cases, 0, combination, values, at);
    let most = least;
    for (let part = 1; part <= cases.spans.length; part++) {
      const share = shareOf(cases, part, combination, values, at);
      if (share > 0) most += share;
      else least += share;
    }
    this.least = least;
    this.most = most;
  }

  /** The spans whose loads are adverse; none whose share is `nothing` or less. */
  pattern(values: Float64Array, at: number, combination: number, sense: Sense, nothing: number): number[] {
    const { cases } = this;
    const pattern: number[] = [];
    for (let part = 1; part <= cases.spans.length; part++) {
      if (sense * shareOf(cases, part, combination, values, at) > nothing)
        pattern.push(cases.spans[part - 1]!);
    }
    return pattern;
  }
}
