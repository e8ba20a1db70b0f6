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
  /** How many groups there are, the movements of the supports one of them, and the group of each source. */
  readonly groups: number;
  readonly groupOf: Int32Array;
  /** Factor of group g in combination c at c·groups + g. */
  readonly groupFactors: Float64Array;
};

/** `sources`: those that always act first, then span by span. */
export function casesOf(sources: readonly Source[], combinations: readonly Combination[]): Cases {
  const count = sources.length;
  const groups = [...new Set(sources.map(({ group }) => group))];
  const groupOf = Int32Array.from(sources.map(({ group }) => groups.indexOf(group)));
  const groupFactors = new Float64Array(combinations.length * groups.length);
  const factors = new Float64Array(combinations.length * count);
  for (let c = 0; c < combinations.length; c++) {
    for (let g = 0; g < groups.length; g++) {
      const group = groups[g]!;
      groupFactors[c * groups.length + g] = group === null ? 1 : factorOf(combinations[c]!, group);
    }
    for (let i = 0; i < count; i++) factors[c * count + i] = groupFactors[c * groups.length + groupOf[i]!]!;
  }
  return { combinations, count, ...partsOf(sources), factors, groups: groups.length, groupOf, groupFactors };
}

function partsOf(sources: readonly Source[]): Pick<Cases, 'starts' | 'spans'> {
  const spans: number[] = [];
  const starts = [0];
  sources.forEach(({ span }, i) => {
    if (span === null || span === spans.at(-1)) return;
    spans.push(span);
    starts.push(i);
  });
  return { spans, starts: Int32Array.of(...starts, sources.length) };
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

  /** At a place where `values[at + i]` is the quantity under source i alone. */
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
