import { settle } from '../polynomial/index';
import { type Adverse, NOTHING, type Sense } from './cases';
import type { Governing, Range } from './types';

/** The most and the least of what stands beside one another at one place, with the loads that give it, over combinations first … last − 1. */
export function governingOf(
  adverse: Adverse,
  sides: readonly Float64Array[],
  largest: number,
  first = 0,
  last = adverse.cases.combinations.length,
): Range<Governing> {
  const max = { value: Number.NEGATIVE_INFINITY, side: 0, combination: first };
  const min = { value: Number.POSITIVE_INFINITY, side: 0, combination: first };
  for (let c = first; c < last; c++) {
    for (let side = 0; side < sides.length; side++) {
      adverse.add(sides[side]!, 0, c);
      if (adverse.most > max.value) {
        max.value = adverse.most;
        max.side = side;
        max.combination = c;
      }
      if (adverse.least < min.value) {
        min.value = adverse.least;
        min.side = side;
        min.combination = c;
      }
    }
  }
  const described = ({ value, side, combination }: typeof max, sense: Sense): Governing => ({
    value: settle(value, largest),
    combination: adverse.cases.combinations[combination]!.name,
    pattern: adverse.pattern(sides[side]!, 0, combination, sense, NOTHING * largest),
  });
  return { max: described(max, 1), min: described(min, -1) };
}
