import type { Geometry } from './geometry';
import type { Piece } from './records';
import { findMonotoneZero, quadraticZeros, quartic } from './zeros';

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

  private readonly ranges = [this.shear, this.moment, this.slope, this.deflection] as const;
  /** θ and θ' on the piece at hand, lowest power first. */
  private readonly theta = new Float64Array(5);
  private readonly bend = new Float64Array(5);
  /** Places where θ' turns, and where θ does. */
  private readonly few = new Float64Array(2);
  private readonly turns = new Float64Array(3);
  private readonly stretch = new Float64Array(5);

  find(geometry: Geometry): void {
    const { ranges } = this;
    for (let quantity = 0; quantity < 4; quantity++) {
      // Where a quantity does not jump from piece to piece, left ends and the last right end are all of it.
      const jumps =
        quantity === 0 || (quantity === 1 && geometry.turned) || (quantity === 2 && geometry.shears);
      compareEnds(geometry, ranges[quantity]!, quantity, jumps ? 4 : 8);
    }
    this.searchPieces(geometry);
  }

  /**
   * Inside the pieces. Where the load does not vary, all is in closed form but the zeros of θ, a cubic; between two places
   * where θ turns v is curved to one side, and so beyond neither of the tangents at their ends, nor beyond where they meet.
   * One function: in two a beam of few pieces takes a tenth longer.
   */
  // eslint-disable-next-line max-lines-per-function
  private searchPieces({ piece, points, states }: Geometry): void {
    const { moment, slope, deflection, turns, theta, stretch } = this;
    const pieces = points - 1;
    for (let k = 0; k < pieces; k++) {
      const record = piece[k]!;
      const i = 8 * k;
      if (record.rate !== 0) {
        this.searchForces(record, states, i);
        this.searchMovements(record, states, i);
        continue;
      }
      const { from, length, bending: b, shearing, start, curvature } = record;
      const V = states[i]!;
      const M = states[i + 1]!;
      const kappa = curvature + shearing * start;
      const t0 = states[i + 2]!;
      const t1 = b * M + kappa;
      const t2 = (b * V) / 2;
      const t3 = b * start * -SIXTH;
      const last = b * states[i + 5]! + kappa;
      let crest = t1;
      if (V * states[i + 4]! < 0) {
        const s = V / start;
        const M0 = M + (V * s) / 2;
        moment.add(M0, from + s);
        crest = b * M0 + kappa;
      }
      let count = 0;
      if (t1 * crest < 0 || crest * last < 0) {
        // quadraticZeros in line, where it costs a third less.
        const root = Math.sqrt(t2 * t2 - 3 * t1 * t3);
        const q = t2 < 0 ? root - t2 : -t2 - root;
        const one = t1 / q;
        const other = q / (3 * t3);
        const first = Math.min(one, other);
        const second = Math.max(one, other);
        if (first > 0 && first < length) turns[count++] = first;
        if (second > 0 && second < length) turns[count++] = second;
      }
      let s = 0;
      let value = t0;
      let v = states[i + 3]!;
      for (let n = 0; n <= count; n++) {
        let to = length;
        let next = states[i + 6]!;
        let w = states[i + 7]!;
        if (n < count) {
          to = turns[n]!;
          next = t0 + to * (t1 + to * (t2 + to * t3));
          w = states[i + 3]! + to * (t0 + to * (t1 / 2 + to * (t2 * THIRD + (to * t3) / 4)));
          if (next > slope.max || next < slope.min) slope.add(next, from + to);
        }
        if (value * next < 0) {
          const reach = to - s;
          const meet = v + (value * (w - v - next * reach)) / (value - next);
          const beyond =
            value > 0
              ? v + value * reach > deflection.max &&
                w - next * reach > deflection.max &&
                meet > deflection.max
              : v + value * reach < deflection.min &&
                w - next * reach < deflection.min &&
                meet < deflection.min;
          if (beyond) {
            theta[0] = t0;
            theta[1] = t1;
            theta[2] = t2;
            theta[3] = t3;
            theta[4] = 0;
            stretch[0] = s;
            stretch[1] = to;
            stretch[2] = value;
            stretch[3] = next;
            this.addLevel(record, states, i);
          }
        }
        s = to;
        value = next;
        v = w;
      }
    }
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

  /** θ and v where the load varies: θ' is a cubic, θ a quartic. */
  private searchMovements(piece: Piece, states: Float64Array, i: number): void {
    const { bending: b, shearing, start, rate, curvature, length } = piece;
    const { theta, bend, few } = this;
    theta[0] = states[i + 2]!;
    theta[1] = b * states[i + 1]! + curvature + shearing * start;
    theta[2] = (b * states[i]! + shearing * rate) / 2;
    theta[3] = b * start * -SIXTH;
    theta[4] = (b * rate * -SIXTH) / 4;
    for (let n = 0; n < 4; n++) bend[n] = (n + 1) * theta[n + 1]!;
    const count = quadraticZeros(bend[1]!, 2 * bend[2]!, 3 * bend[3]!, length, few);
    this.addTurns(piece, states, i, this.findTurns(piece, count));
  }

  /** The zeros of θ', a cubic, between the `count` places `few` where it turns; their number. */
  private findTurns({ length }: Piece, count: number): number {
    const { few, turns, bend, stretch } = this;
    let found = 0;
    stretch[0] = 0;
    stretch[2] = bend[0]!;
    for (let n = 0; n <= count; n++) {
      stretch[1] = n < count ? few[n]! : length;
      stretch[3] = quartic(bend, stretch[1]!);
      if (stretch[2]! * stretch[3]! < 0) {
        findMonotoneZero(bend, stretch);
        turns[found++] = stretch[4]!;
      }
      stretch[0] = stretch[1]!;
      stretch[2] = stretch[3]!;
    }
    return found;
  }

  /** The slopes at the `count` places where θ turns, and the deflections where θ = 0 between those. */
  private addTurns(piece: Piece, states: Float64Array, i: number, count: number): void {
    const { theta, turns, stretch } = this;
    stretch[0] = 0;
    stretch[2] = theta[0]!;
    for (let n = 0; n <= count; n++) {
      const s = n < count ? turns[n]! : piece.length;
      const value = n < count ? quartic(theta, s) : states[i + 6]!;
      if (n < count) this.slope.add(value, piece.from + s);
      stretch[1] = s;
      stretch[3] = value;
      if (stretch[2]! * value < 0) this.addLevel(piece, states, i);
      stretch[0] = s;
      stretch[2] = value;
    }
  }

  /** The deflection where θ = 0 in the stretch. */
  private addLevel({ from }: Piece, states: Float64Array, i: number): void {
    const { theta, stretch, deflection } = this;
    findMonotoneZero(theta, stretch);
    const s = stretch[4]!;
    const rest = theta[2]! * THIRD + s * (theta[3]! / 4 + s * theta[4]! * FIFTH);
    deflection.add(states[i + 3]! + s * (theta[0]! + s * (theta[1]! / 2 + s * rest)), from + s);
  }
}

/**
 * A quantity (0: V, 1: M, 2: θ, 3: v) at the ends of the pieces: every `step` numbers of the states, 4 for both ends of
 * each, 8 where it goes on from piece to piece without a jump.
 */
function compareEnds(
  { piece, points, states }: Geometry,
  range: Range,
  quantity: number,
  step: number,
): void {
  const last = 8 * (points - 1) - 4 + quantity;
  let max = states[last]!;
  let min = max;
  let highest = last;
  let lowest = last;
  for (let i = quantity; i < last; i += step) {
    const value = states[i]!;
    if (value > max) {
      max = value;
      highest = i;
    } else if (value < min) {
      min = value;
      lowest = i;
    }
  }
  range.max = max;
  range.min = min;
  range.maxAt = piece[(highest + 4) >> 3]!.from;
  range.minAt = piece[(lowest + 4) >> 3]!.from;
}
