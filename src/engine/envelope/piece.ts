import { horner, type UnitRoots, WIDTH } from '../polynomial/index';
import { type Cases, type Sense, shareOf } from './cases';
import type { Curves } from './curves';

/**
 * The envelope of a combination within one piece. Between the zeros of the spans' shares the same spans are adverse
 * throughout, so that it is one polynomial of t there.
 */
export class PieceEnvelope {
  /** What is adverse throughout the piece, and what is so between two neighbouring zeros. */
  private readonly steady = new Float64Array(WIDTH);
  private readonly sum = new Float64Array(WIDTH);
  /** The shares that change their sign within the piece, and how many there are. */
  private readonly changing: Float64Array[] = [];
  private changes = 0;
  private readonly cuts: Float64Array;
  private curves!: Curves;
  private nothing = 0;

  constructor(
    private readonly cases: Cases,
    private readonly roots: UnitRoots,
  ) {
    this.cuts = new Float64Array(2 + cases.spans.length * (WIDTH - 1));
  }

  /** A share that stays within `nothing` of nothing is rounding's. */
  take(curves: Curves, nothing: number): void {
    this.curves = curves;
    this.nothing = nothing;
  }

  /**
   * Visits the stretches of piece k from left to right with the polynomial of sense · envelope, up to the degree of the
   * curves. Its coefficients are the visitor's until it returns.
   */
  walk(
    k: number,
    combination: number,
    sense: Sense,
    visit: (from: number, to: number, a: Float64Array) => void,
  ): void {
    this.collect(k, combination, sense);
    const cuts = this.cutAtZeros();
    for (let i = 1; i < cuts; i++) {
      const from = this.cuts[i - 1]!;
      const to = this.cuts[i]!;
      this.sum.set(this.steady);
      this.addAdverse((from + to) / 2);
      visit(from, to, this.sum);
    }
  }

  /** Sorts the shares of the spans into those that are adverse throughout, never, and by turns. */
  private collect(k: number, combination: number, sense: Sense): void {
    this.steady.fill(0);
    this.changes = 0;
    this.addShare(0, k, combination, sense, this.steady);
    for (let part = 1; part <= this.cases.spans.length; part++) {
      const sign = this.signOf(part, k, combination, sense);
      if (sign > 0) this.addShare(part, k, combination, sense, this.steady);
      else if (sign === 0) this.addShare(part, k, combination, sense, this.nextChanging());
    }
  }

  private nextChanging(): Float64Array {
    const share = this.changing[this.changes] ?? new Float64Array(WIDTH);
    this.changing[this.changes++] = share;
    return share.fill(0);
  }

  /** Adds the changing shares that are adverse at t. */
  private addAdverse(t: number): void {
    const { degree } = this.curves;
    for (let p = 0; p < this.changes; p++) {
      const share = this.changing[p]!;
      if (horner(share, degree, t) > 0) for (let j = 0; j <= degree; j++) this.sum[j]! += share[j]!;
    }
  }

  /** 1 where a share is adverse all along the piece, −1 where it never is, 0 where that may change. */
  private signOf(part: number, k: number, combination: number, sense: Sense): number {
    const { degree, count, control } = this.curves;
    let least = Number.POSITIVE_INFINITY;
    let most = Number.NEGATIVE_INFINITY;
    for (let j = 0; j <= 2 * degree; j++) {
      const at = (k * (2 * degree + 1) + j) * count;
      const share = sense * shareOf(this.cases, part, combination, control, at);
      if (share < least) least = share;
      if (share > most) most = share;
    }
    return most <= this.nothing ? -1 : least >= -this.nothing ? 1 : 0;
  }

  private addShare(part: number, k: number, combination: number, sense: Sense, into: Float64Array): void {
    const { degree, count, power } = this.curves;
    for (let j = 0; j <= degree; j++) {
      into[j]! += sense * shareOf(this.cases, part, combination, power, (k * (degree + 1) + j) * count);
    }
  }

  /** 0, the zeros of the changing shares, and 1, ascending; how many there are. */
  private cutAtZeros(): number {
    let count = 0;
    this.cuts[count++] = 0;
    for (let p = 0; p < this.changes; p++) {
      const found = this.roots.find(this.changing[p]!, this.curves.degree);
      for (let i = 0; i < found; i++) this.cuts[count++] = this.roots.roots[i]!;
    }
    this.cuts[count++] = 1;
    if (this.changes > 1) this.cuts.subarray(0, count).sort();
    return count;
  }
}

/** The largest value of an envelope within one piece, exactly: at the ends of its stretches or where its slope is zero. */
export class PieceMaximum {
  value = 0;
  t = 0;
  private readonly envelope: PieceEnvelope;
  private readonly slope = new Float64Array(WIDTH);
  private degree = 0;

  constructor(
    cases: Cases,
    private readonly roots: UnitRoots,
  ) {
    this.envelope = new PieceEnvelope(cases, roots);
  }

  take(curves: Curves, nothing: number): void {
    this.envelope.take(curves, nothing);
    this.degree = curves.degree;
  }

  /** The largest of sense · envelope of a combination within piece k, into `value` and `t`. */
  find(k: number, combination: number, sense: Sense): void {
    this.value = Number.NEGATIVE_INFINITY;
    this.envelope.walk(k, combination, sense, this.search);
  }

  private readonly search = (from: number, to: number, a: Float64Array): void => {
    this.tryAt(a, from);
    this.tryAt(a, to);
    for (let j = 1; j <= this.degree; j++) this.slope[j - 1] = a[j]! * j;
    const turns = this.degree > 0 ? this.roots.find(this.slope, this.degree - 1) : 0;
    for (let i = 0; i < turns; i++) {
      const t = this.roots.roots[i]!;
      if (t > from && t < to) this.tryAt(a, t);
    }
  };

  private tryAt(a: Float64Array, t: number): void {
    const value = horner(a, this.degree, t);
    if (value > this.value) {
      this.value = value;
      this.t = t;
    }
  }
}
