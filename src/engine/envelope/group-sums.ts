import type { Cases, Sense } from './cases';

/**
 * Bounds of what `Adverse` adds up, in much less time: as if each group had a pattern of its own, so that its spans are
 * summed by their sign, once for all factors. Where no span carries two groups, the bounds are the values.
 */
export class GroupSums {
  /**
   * Of row r and group g at 2·(r·groups + g): the spans' values above nothing, and next to it below; of what always acts
   * all in both.
   */
  private sums = new Float64Array(0);
  /** The least and the greatest factor of each group in the combinations that `over` was told. */
  private readonly smallest: Float64Array;
  private readonly largest: Float64Array;

  constructor(private readonly cases: Cases) {
    this.smallest = new Float64Array(cases.groups);
    this.largest = new Float64Array(cases.groups);
    this.over(0, cases.combinations.length);
  }

  /** Row r: what source i alone gives stands at values[r·count + i]. */
  read(values: Float64Array, rows: number): void {
    const { count, groups, groupOf, starts } = this.cases;
    const always = starts[1]!;
    const size = 2 * rows * groups;
    if (this.sums.length < size) this.sums = new Float64Array(size);
    const { sums } = this;
    for (let n = 0; n < size; n++) sums[n] = 0;
    for (let row = 0; row < rows; row++) {
      for (let i = 0; i < count; i++) {
        const value = values[row * count + i]!;
        const above = 2 * (row * groups + groupOf[i]!);
        if (i < always || value > 0) sums[above]! += value;
        if (i < always || value < 0) sums[above + 1]! += value;
      }
    }
  }

  /** The most that sense · envelope of a combination can be by a row. */
  bound(row: number, combination: number, sense: Sense): number {
    const { sums } = this;
    const { groups, groupFactors } = this.cases;
    let most = 0;
    for (let g = 0; g < groups; g++) {
      const factor = sense * groupFactors[combination * groups + g]!;
      const above = 2 * (row * groups + g);
      most += Math.max(factor * sums[above]!, factor * sums[above + 1]!);
    }
    return most;
  }

  /** The combinations first … last − 1 are those that `boundOfAll` bounds. */
  over(first: number, last: number): void {
    const { smallest, largest } = this;
    const { groups, groupFactors } = this.cases;
    for (let g = 0; g < groups; g++) {
      smallest[g] = Number.POSITIVE_INFINITY;
      largest[g] = Number.NEGATIVE_INFINITY;
      for (let c = first; c < last; c++) {
        const factor = groupFactors[c * groups + g]!;
        smallest[g] = Math.min(smallest[g]!, factor);
        largest[g] = Math.max(largest[g]!, factor);
      }
    }
  }

  /** The most that sense · envelope of any of the combinations can be by a row: as if each group had any factor of theirs. */
  boundOfAll(row: number, sense: Sense): number {
    const { sums, smallest, largest } = this;
    const { groups } = this.cases;
    let most = 0;
    for (let g = 0; g < groups; g++) {
      const above = 2 * (row * groups + g);
      const up = sense * sums[above]!;
      const down = sense * sums[above + 1]!;
      const least = smallest[g]!;
      const greatest = largest[g]!;
      most += Math.max(least * up, least * down, greatest * up, greatest * down);
    }
    return most;
  }
}
