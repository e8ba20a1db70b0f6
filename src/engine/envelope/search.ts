import { settle } from '../polynomial/index';
import { AttainedPlaces } from './attained';
import { Adverse, type Cases, NOTHING, type Sense } from './cases';
import { type Curves, valuesAt } from './curves';
import { PieceMaximum } from './piece';
import type { Range } from './types';

/** An extreme of an envelope: its value, and every position where the arrangement that gives it attains it. */
export type EnvelopeExtreme = { value: number; at: number[]; combination: number; pattern: number[] };

/** A place in a combination, with sense · envelope there. */
type Found = { value: number; piece: number; t: number; combination: number };

/**
 * The most that sense · envelope can be inside piece k in combination c, at c·pieces + k, and in each combination the
 * largest of its values at the pieces' ends and middles.
 */
type Bounds = { inside: Float64Array; best: Found[] };

/**
 * The exact extremes of one quantity, over all combinations and patterns or combination by combination.
 *
 * The envelope of the control coefficients, each added up adversely, bounds the envelope on a piece (the sum of
 * adverse shares is convex in the sources, and Bernstein's polynomials are never negative and add up to 1). So pieces
 * are searched in the order of their bounds, until none is left that could hold more than has been found.
 */
export class ExtremeSearch {
  private readonly high: Bounds;
  private readonly low: Bounds;
  private readonly size: number;
  private readonly piece: PieceMaximum;
  private readonly places: AttainedPlaces;
  private readonly adverse: Adverse;
  private readonly values: Float64Array;

  constructor(
    private readonly curves: Curves,
    private readonly cases: Cases,
  ) {
    this.adverse = new Adverse(cases);
    this.values = new Float64Array(curves.count);
    [this.high, this.low] = this.bounds();
    this.size = Math.max(largestOf(this.high), largestOf(this.low));
    this.piece = new PieceMaximum(curves, cases, NOTHING * this.size);
    this.places = new AttainedPlaces(curves, cases, this.size);
  }

  /** Over combinations first … last − 1; all of them unless said. */
  extremes(first = 0, last = this.cases.combinations.length): Range<EnvelopeExtreme> {
    const max = this.described(this.search(this.high, first, last, 1), 1);
    const min = this.described(this.search(this.low, first, last, -1), -1);
    const largest = Math.max(Math.abs(max.value), Math.abs(min.value));
    max.value = settle(max.value, largest);
    min.value = settle(min.value, largest);
    return { max, min };
  }

  /** For the largest and for the smallest, by every combination's control coefficients. */
  private bounds(): [Bounds, Bounds] {
    const { degree, count, control, breaks } = this.curves;
    const { adverse } = this;
    const pieces = breaks.length - 1;
    const combinations = this.cases.combinations.length;
    const [high, low] = [newBounds(combinations, pieces), newBounds(combinations, pieces)];
    const middle = Math.max(1, degree); // a constant has but one coefficient, its value
    for (let c = 0; c < combinations; c++) {
      for (let k = 0; k < pieces; k++) {
        for (let j = 0; j <= 2 * degree; j++) {
          adverse.add(control, (k * (2 * degree + 1) + j) * count, c);
          if (j % middle === 0) {
            improve(high.best[c]!, adverse.most, k, j / middle / 2);
            improve(low.best[c]!, -adverse.least, k, j / middle / 2);
          } else {
            const i = c * pieces + k;
            if (adverse.most > high.inside[i]!) high.inside[i] = adverse.most;
            if (-adverse.least > low.inside[i]!) low.inside[i] = -adverse.least;
          }
        }
      }
    }
    return [high, low];
  }

  private search({ inside, best }: Bounds, first: number, last: number, sense: Sense): Found {
    const pieces = this.curves.breaks.length - 1;
    const open = inside.slice(first * pieces, last * pieces);
    const nothing = NOTHING * this.size;
    let found = best[first]!;
    for (let c = first + 1; c < last; c++) if (best[c]!.value > found.value + nothing) found = best[c]!;
    for (;;) {
      let [next, most] = [-1, found.value + nothing];
      for (let i = 0; i < open.length; i++) {
        if (open[i]! > most) {
          most = open[i]!;
          next = i;
        }
      }
      if (next < 0) return found;
      open[next] = Number.NEGATIVE_INFINITY;
      const piece = next % pieces;
      const combination = first + (next - piece) / pieces;
      this.piece.find(piece, combination, sense);
      const { value, t } = this.piece;
      // Of equals the first combination and the leftmost piece, whatever their rounding.
      const isEarlier =
        combination < found.combination || (combination === found.combination && piece < found.piece);
      if (value > found.value + (isEarlier ? -nothing : nothing)) found = { value, piece, t, combination };
    }
  }

  /** The pattern at the place found, and every position where that arrangement comes to the same value. */
  private described({ value, piece, t, combination }: Found, sense: Sense): EnvelopeExtreme {
    valuesAt(this.curves, piece, t, this.values);
    const pattern = this.adverse.pattern(this.values, 0, combination, sense, NOTHING * this.size);
    const at = this.places.find({ combination, pattern }, sense, value);
    return { value: sense * value + 0, at, combination, pattern };
  }
}

const newBounds = (combinations: number, pieces: number): Bounds => ({
  inside: new Float64Array(combinations * pieces).fill(Number.NEGATIVE_INFINITY),
  best: Array.from({ length: combinations }, (_, combination) => ({
    value: -Number.MAX_VALUE,
    piece: 0,
    t: 0,
    combination,
  })),
});

function improve(best: Found, value: number, piece: number, t: number): void {
  if (!(value > best.value + NOTHING * Math.abs(best.value))) return;
  best.value = value;
  best.piece = piece;
  best.t = t;
}

function largestOf({ inside, best }: Bounds): number {
  let largest = 0;
  for (const { value } of best) largest = Math.max(largest, Math.abs(value));
  for (const bound of inside) if (Number.isFinite(bound)) largest = Math.max(largest, Math.abs(bound));
  return largest;
}
