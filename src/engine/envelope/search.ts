import { settle, UnitRoots } from '../polynomial/index';
import { AttainedPlaces } from './attained';
import { type Adverse, NOTHING, type Sense } from './cases';
import { type Curves, valuesAt } from './curves';
import { GroupSums } from './group-sums';
import { PieceMaximum } from './piece';
import type { Range } from './types';

/** An extreme of an envelope: its value, and every position where the arrangement that gives it attains it. */
export type EnvelopeExtreme = { value: number; at: number[]; combination: number; pattern: number[] };

/** A place in a combination, with sense · envelope there. */
type Found = { value: number; piece: number; t: number; combination: number };

/**
 * The exact extremes of a quantity, over all combinations and patterns or combination by combination, by branch and
 * bound. Goes from quantity to quantity in the same memory.
 *
 * The envelope of the control coefficients, each added up adversely, bounds the envelope on a piece (the sum of
 * adverse shares is convex in the sources, and Bernstein's polynomials are never negative and add up to 1). Pieces are
 * searched in the order of their bounds, until none is left that could hold more than has been found.
 */
export class ExtremeSearch {
  private readonly sums: GroupSums;
  private readonly piece: PieceMaximum;
  private readonly places: AttainedPlaces;
  private readonly values: Float64Array;
  /** The bounds of the combinations in one piece. */
  private readonly byCombination: Float64Array;
  /** The bounds of the pieces, over all combinations that are asked for. */
  private byPiece = new Float64Array(0);
  private curves!: Curves;
  /** What differs by no more differs by rounding. */
  private nothing = 0;
  private found: Found = { value: 0, piece: 0, t: 0, combination: 0 };

  constructor(private readonly adverse: Adverse) {
    const { cases } = adverse;
    const roots = new UnitRoots();
    this.sums = new GroupSums(cases);
    this.piece = new PieceMaximum(cases, roots);
    this.places = new AttainedPlaces(cases, roots);
    this.values = new Float64Array(cases.count);
    this.byCombination = new Float64Array(cases.combinations.length);
  }

  take(curves: Curves): void {
    const { breaks, degree, control } = curves;
    const { sums } = this;
    const pieces = breaks.length - 1;
    const rows = pieces * (2 * degree + 1);
    this.curves = curves;
    this.byPiece = new Float64Array(pieces);
    sums.read(control, rows);
    sums.over(0, this.adverse.cases.combinations.length);
    let size = 0;
    for (let row = 0; row < rows; row++) {
      size = Math.max(size, sums.boundOfAll(row, 1), sums.boundOfAll(row, -1));
    }
    this.nothing = NOTHING * size;
    this.piece.take(curves, this.nothing);
    this.places.take(curves, size);
  }

  /** Over combinations first … last − 1; all of them unless said. */
  extremes(first = 0, last = this.adverse.cases.combinations.length): Range<EnvelopeExtreme> {
    this.sums.over(first, last);
    const max = this.extreme(first, last, 1);
    const min = this.extreme(first, last, -1);
    const largest = Math.max(Math.abs(max.value), Math.abs(min.value));
    max.value = settle(max.value, largest);
    min.value = settle(min.value, largest);
    return { max, min };
  }

  private extreme(first: number, last: number, sense: Sense): EnvelopeExtreme {
    this.found = { value: Number.NEGATIVE_INFINITY, piece: 0, t: 0, combination: first };
    this.compareValues(first, last, sense);
    this.boundPieces(sense);
    for (let k = this.nextOf(this.byPiece); k >= 0; k = this.nextOf(this.byPiece)) {
      this.searchPiece(k, first, last, sense);
    }
    return this.described(sense);
  }

  /** The values at the pieces' ends and middles. */
  private compareValues(first: number, last: number, sense: Sense): void {
    const { curves, sums, adverse, nothing } = this;
    const { breaks, degree, count, control } = curves;
    const step = Math.max(1, degree); // a constant has but one coefficient, its value
    for (let k = 0; k + 1 < breaks.length; k++) {
      for (let j = 0; j <= 2 * degree; j += step) {
        const row = k * (2 * degree + 1) + j;
        if (!(sums.boundOfAll(row, sense) > this.found.value - nothing)) continue;
        for (let c = first; c < last; c++) {
          if (!(sums.bound(row, c, sense) > this.found.value - nothing)) continue;
          adverse.add(control, row * count, c);
          this.consider(sense > 0 ? adverse.most : -adverse.least, k, j / step / 2, c);
        }
      }
    }
  }

  /** By the other control coefficients, over all combinations. */
  private boundPieces(sense: Sense): void {
    const { curves, sums, byPiece } = this;
    const { degree } = curves;
    for (let k = 0; k < byPiece.length; k++) {
      let most = Number.NEGATIVE_INFINITY;
      for (let j = 1; j < 2 * degree; j++) {
        if (j !== degree) most = Math.max(most, sums.boundOfAll(k * (2 * degree + 1) + j, sense));
      }
      byPiece[k] = most;
    }
  }

  /** Searches piece k in every combination that could hold more there than has been found, the most promising first. */
  private searchPiece(k: number, first: number, last: number, sense: Sense): void {
    const { curves, sums, byCombination, piece } = this;
    const { degree } = curves;
    byCombination.fill(Number.NEGATIVE_INFINITY);
    for (let c = first; c < last; c++) {
      for (let j = 1; j < 2 * degree; j++) {
        if (j === degree) continue;
        const bound = sums.bound(k * (2 * degree + 1) + j, c, sense);
        byCombination[c] = Math.max(byCombination[c]!, bound);
      }
    }
    for (let c = this.nextOf(byCombination); c >= 0; c = this.nextOf(byCombination)) {
      piece.find(k, c, sense);
      this.consider(piece.value, k, piece.t, c);
    }
  }

  /** Takes out the largest of the bounds and answers its place; −1 if none is above what has been found. */
  private nextOf(bounds: Float64Array): number {
    let place = -1;
    let most = this.found.value + this.nothing;
    for (let i = 0; i < bounds.length; i++) {
      if (bounds[i]! > most) {
        most = bounds[i]!;
        place = i;
      }
    }
    if (place >= 0) bounds[place] = Number.NEGATIVE_INFINITY;
    return place;
  }

  /** Of equals the first combination and the leftmost piece stay, whatever their rounding. */
  private consider(value: number, piece: number, t: number, combination: number): void {
    const { found, nothing } = this;
    const isEarlier =
      combination < found.combination || (combination === found.combination && piece < found.piece);
    if (!(value > found.value + (isEarlier ? -nothing : nothing))) return;
    found.value = value;
    found.piece = piece;
    found.t = t;
    found.combination = combination;
  }

  /** The pattern at the place found, and every position where that arrangement comes to the same value. */
  private described(sense: Sense): EnvelopeExtreme {
    const { value, piece, t, combination } = this.found;
    valuesAt(this.curves, piece, t, this.values, 0);
    const pattern = this.adverse.pattern(this.values, 0, combination, sense, this.nothing);
    const at = this.places.find({ combination, pattern }, sense, value);
    return { value: sense * value + 0, at, combination, pattern };
  }
}
