import type { Geometry } from './geometry';
import type { Piece } from './records';
import { monotoneZero, quadraticZeros, quartic } from './zeros';

const THIRD = 1 / 3; // a product is several times faster than a quotient
const FIFTH = 1 / 5;
const SIXTH = 1 / 6;

/** The largest and the smallest value of a quantity, each with one position where it is attained, m. */
export class Range {
  max = NaN;
  maxAt = NaN;
  min = NaN;
  minAt = NaN;

  add(value: number, at: number): void {
    if (value > this.max) {
      this.max = value;
      this.maxAt = at;
    } else if (value < this.min) {
      this.min = value;
      this.minAt = at;
    }
  }
}

/**
 * The exact extremes of V, M, θ and v: over the ends of the pieces, both sides of each point, and the places in between
 * where the derivative is zero, M' = V, θ' = M/EI + κ + w/GA, v' = θ. The same as of polynomial/extremes, but for one
 * position each.
 */
export class ExtremeFinder {
  readonly shear = new Range();
  readonly moment = new Range();
  readonly slope = new Range();
  readonly deflection = new Range();

  /** θ and θ' on the piece at hand, lowest power first. */
  private readonly theta = new Float64Array(5);
  private readonly bend = new Float64Array(5);
  /** Places where θ' turns, and where θ does. */
  private readonly few = new Float64Array(2);
  private readonly turns = new Float64Array(3);
  private readonly stretch = new Float64Array(2);

  find(geometry: Geometry): void {
    compareEnds(geometry, this.shear, 0);
    compareEnds(geometry, this.moment, 1);
    compareEnds(geometry, this.slope, 2);
    compareEnds(geometry, this.deflection, 3);
    this.searchPieces(geometry);
  }

  /** Inside the pieces. θ and v are looked into only where cheap bounds leave room for a new extreme. */
  private searchPieces({ piece, points, states }: Geometry): void {
    const last = points - 1;
    for (let k = 0; k < last; k++) {
      const record = piece[k]!;
      if (record.rate !== 0) {
        this.searchForces(record, states, 8 * k);
        this.searchVarying(record, states, 8 * k);
      } else if (!this.isSettled(record, states, 8 * k)) this.searchUniform(record, states, 8 * k);
    }
  }

  /**
   * A piece whose load does not vary: takes in the crest of M, where V = 0; answers whether bounds show that θ and v have
   * no new extreme inside. Turned over where the load acts upward, so that q = θ' is a parabola open below.
   *
   * Next to an end where q < 0, q lies above the chord to its crest: up to its zero θ falls by q₀² a/(2(crest − q₀)) at
   * most. It lies below its tangent: a slope θ₀ > 0 with θ₀ · 2q'₀ ≤ q₀² is gone by 2θ₀/|q₀|, so that v rises by 2θ₀²/|q₀|
   * at most, and rises nowhere else. Where q > 0, v stays above the parabola of the largest q over its ends.
   */
  private isSettled(piece: Piece, states: Float64Array, i: number): boolean {
    const { from, length: h, bending, shearing, start, curvature } = piece;
    const { slope, deflection } = this;
    const sense = start < 0 ? -1 : 1;
    const b = sense * bending;
    const kappa = sense * (curvature + shearing * start);
    const V = states[i]!;
    const M = states[i + 1]!;
    const endV = states[i + 4]!;
    const left = b * M + kappa;
    const right = b * states[i + 5]! + kappa;
    let crestOfLeft = right;
    let crestOfRight = left;
    let fromLeft = h;
    let fromRight = h;
    if (V * endV < 0) {
      const s = V / start;
      const crest = M + (V * s) / 2;
      this.moment.add(crest, from + s);
      crestOfLeft = b * crest + kappa;
      crestOfRight = crestOfLeft;
      fromLeft = s;
      fromRight = h - s;
    }
    const v = sense * states[i + 3]!;
    const w = sense * states[i + 7]!;
    const top = sense > 0 ? deflection.max : -deflection.min;
    if (left < 0) {
      const t = sense * states[i + 2]!;
      const least = sense > 0 ? slope.min : -slope.max;
      if (crestOfLeft > 0 && left * left * fromLeft > 2 * (t - least) * (crestOfLeft - left)) return false;
      if (t > 0 && (2 * t * b * V > left * left || 2 * t * t > (v - top) * left)) return false;
    }
    if (right < 0) {
      const u = sense * states[i + 6]!;
      const most = sense > 0 ? slope.max : -slope.min;
      if (crestOfRight > 0 && right * right * fromRight > 2 * (most - u) * (crestOfRight - right))
        return false;
      if (u < 0 && (2 * u * b * endV > right * right || 2 * u * u > (w - top) * right)) return false;
    }
    const highest = crestOfLeft > crestOfRight ? crestOfLeft : crestOfRight;
    const bottom = sense > 0 ? deflection.min : -deflection.max;
    return highest <= 0 || (v < w ? v : w) - (highest * h * h) / 8 >= bottom;
  }

  /** V and M where the load varies. */
  private searchForces({ from, length, start, rate }: Piece, states: Float64Array, i: number): void {
    const { few } = this;
    const V = states[i]!;
    const M = states[i + 1]!;
    const level = -start / rate;
    if (level > 0 && level < length) this.shear.add(V - (start * level) / 2, from + level);
    const count = quadraticZeros(V, -start, -rate / 2, length, few);
    for (let n = 0; n < count; n++) {
      const s = few[n]!;
      this.moment.add(M + s * (V - s * (start / 2 + s * rate * SIXTH)), from + s);
    }
  }

  /** θ where θ' = 0, and v where θ = 0, on a piece whose load does not vary. */
  private searchUniform(piece: Piece, states: Float64Array, i: number): void {
    const { from, length: h, bending: b, shearing: g, start, curvature } = piece;
    const { slope } = this;
    const t0 = states[i + 2]!;
    const t1 = b * states[i + 1]! + curvature + g * start;
    const t2 = (b * states[i]!) / 2;
    const t3 = b * start * -SIXTH;
    let first = h;
    let second = h;
    let atFirst = states[i + 6]!;
    let atSecond = atFirst;
    const discriminant = t2 * t2 - 3 * t1 * t3;
    if (discriminant > 0) {
      const q = t2 < 0 ? Math.sqrt(discriminant) - t2 : -t2 - Math.sqrt(discriminant); // no difference of nearly equal numbers
      const one = t1 / q;
      const other = q / (3 * t3);
      if (one > 0 && one < h) {
        first = one;
        atFirst = t0 + one * (t1 + one * (t2 + one * t3));
        slope.add(atFirst, from + one);
      }
      if (other > 0 && other < h) {
        second = other;
        atSecond = t0 + other * (t1 + other * (t2 + other * t3));
        slope.add(atSecond, from + other);
      }
    }
    const { theta } = this;
    theta[0] = t0;
    theta[1] = t1;
    theta[2] = t2;
    theta[3] = t3;
    theta[4] = 0;
    this.turns[0] = first < second ? first : second;
    this.turns[1] = first < second ? second : first;
    let count = 0;
    if (this.turns[0] < h) count = this.turns[1] < h ? 2 : 1;
    this.searchDeflections(piece, states, i, count);
  }

  /** The same where the load varies: θ' is a cubic. */
  private searchVarying(piece: Piece, states: Float64Array, i: number): void {
    const { bending: b, shearing: g, start, rate, curvature, length, from } = piece;
    const { theta, bend, few, turns } = this;
    theta[0] = states[i + 2]!;
    theta[1] = b * states[i + 1]! + curvature + g * start;
    theta[2] = (b * states[i]! + g * rate) / 2;
    theta[3] = b * start * -SIXTH;
    theta[4] = b * rate * (-1 / 24);
    for (let n = 0; n < 4; n++) bend[n] = (n + 1) * theta[n + 1]!;
    const count = this.findTurns(piece, quadraticZeros(bend[1]!, 2 * bend[2]!, 3 * bend[3]!, length, few));
    for (let n = 0; n < count; n++) this.slope.add(quartic(theta, turns[n]!), from + turns[n]!);
    this.searchDeflections(piece, states, i, count);
  }

  /** The zeros of θ', a cubic, between the `count` places `few` where it turns; their number. */
  private findTurns({ length }: Piece, count: number): number {
    const { few, turns, bend, stretch } = this;
    let found = 0;
    let value = bend[0]!;
    stretch[0] = 0;
    for (let n = 0; n <= count; n++) {
      stretch[1] = n < count ? few[n]! : length;
      const next = quartic(bend, stretch[1]!);
      if (value * next < 0) turns[found++] = monotoneZero(bend, stretch);
      stretch[0] = stretch[1]!;
      value = next;
    }
    return found;
  }

  /**
   * The deflections where θ = 0, between the `count` places where it turns. Between two of those v is curved to one side
   * only, and so beyond neither of the tangents at their ends.
   */
  private searchDeflections({ from, length }: Piece, states: Float64Array, i: number, count: number): void {
    const { turns, theta, stretch, deflection } = this;
    let s = 0;
    let v = states[i + 3]!;
    let value = theta[0]!;
    for (let n = 0; n <= count; n++) {
      const to = n < count ? turns[n]! : length;
      const next = quartic(theta, to);
      const w = n < count ? this.deflectionAt(states, i, to) : states[i + 7]!;
      if (value * next < 0) {
        const one = v + value * (to - s);
        const other = w - next * (to - s);
        const beyond =
          value > 0
            ? one > deflection.max && other > deflection.max
            : one < deflection.min && other < deflection.min;
        if (beyond) {
          stretch[0] = s;
          stretch[1] = to;
          const level = monotoneZero(theta, stretch);
          deflection.add(this.deflectionAt(states, i, level), from + level);
        }
      }
      s = to;
      v = w;
      value = next;
    }
  }

  private deflectionAt(states: Float64Array, i: number, s: number): number {
    const { theta } = this;
    const rest = theta[2]! * THIRD + s * (theta[3]! / 4 + s * theta[4]! * FIFTH);
    return states[i + 3]! + s * (theta[0]! + s * (theta[1]! / 2 + s * rest));
  }
}

/** A quantity (0: V, 1: M, 2: θ, 3: v) at both ends of every piece. */
function compareEnds({ piece, points, states }: Geometry, range: Range, quantity: number): void {
  const end = 8 * (points - 1);
  let max = -Infinity;
  let min = Infinity;
  let highest = 0;
  let lowest = 0;
  for (let i = quantity; i < end; i += 4) {
    const value = states[i]!;
    if (value > max) {
      max = value;
      highest = i;
    }
    if (value < min) {
      min = value;
      lowest = i;
    }
  }
  range.max = max;
  range.min = min;
  range.maxAt = piece[(highest + 4) >> 3]!.from;
  range.minAt = piece[(lowest + 4) >> 3]!.from;
}
