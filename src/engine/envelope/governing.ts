import { settle } from '../polynomial/index';
import { type Adverse, NOTHING, type Sense } from './cases';
import { GroupSums } from './group-sums';
import type { Governing, Range } from './types';

/** A value, by which row, and in which combination. */
type Found = { value: number; row: number; combination: number };

/** The most and the least at a place, with the loads that give it, over combinations first … last − 1. */
export class GoverningSearch {
  private readonly max: Found = { value: 0, row: 0, combination: 0 };
  private readonly sums: GroupSums;
  private readonly min: Found = { value: 0, row: 0, combination: 0 };

  constructor(
    private readonly adverse: Adverse,
    private readonly first = 0,
    private readonly last = adverse.cases.combinations.length,
  ) {
    this.sums = new GroupSums(adverse.cases);
  }

  /**
   * Row r: what source i alone gives stands at values[r·count + i]; of a jump there are two rows, for either side.
   * `largest`: the magnitude beside which a value is nothing.
   */
  find(values: Float64Array, rows: number, largest: number): Range<Governing> {
    const { max, min, sums, first, last } = this;
    max.value = Number.NEGATIVE_INFINITY;
    min.value = Number.POSITIVE_INFINITY;
    sums.read(values, rows);
    for (let row = 0; row < rows; row++) {
      for (let c = first; c < last; c++) {
        if (sums.bound(row, c, 1) > max.value || -sums.bound(row, c, -1) < min.value) {
          this.compare(values, row, c);
        }
      }
    }
    return {
      max: this.described(values, max, 1, largest),
      min: this.described(values, min, -1, largest),
    };
  }

  private compare(values: Float64Array, row: number, combination: number): void {
    const { adverse, max, min } = this;
    adverse.add(values, row * adverse.cases.count, combination);
    const { most, least } = adverse;
    if (most > max.value) put(max, most, row, combination);
    if (least < min.value) put(min, least, row, combination);
  }

  private described(
    values: Float64Array,
    { value, row, combination }: Found,
    sense: Sense,
    largest: number,
  ): Governing {
    const { adverse } = this;
    return {
      value: settle(value, largest),
      combination: adverse.cases.combinations[combination]!.name,
      pattern: adverse.pattern(values, row * adverse.cases.count, combination, sense, NOTHING * largest),
    };
  }
}

function put(found: Found, value: number, row: number, combination: number): void {
  found.value = value;
  found.row = row;
  found.combination = combination;
}
