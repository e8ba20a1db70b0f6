import type { Geometry } from './geometry';
import type { Piece, Support } from './records';

const THIRD = 1 / 3; // a product is several times faster than a quotient
const FIFTH = 1 / 5;

/**
 * From the moments beside the supports to everything else, in one sweep from left to right: reactions, and V, M, θ and v
 * just inside both ends of every piece, by V' = −w, M' = V, ψ' = M/EI + κ, θ = ψ − V/GA, v' = θ. Every span starts from
 * what its supports tell, so that rounding does not gather along the beam.
 */
export class Sweep {
  /** The state where the sweep has come to, beyond what acts there. */
  private V = NaN;
  private M = NaN;
  private psi = NaN;
  private v = NaN;
  /** ψ over the first support. */
  private firstPsi = NaN;

  /** `moved`: 1 where the supports are moved as prescribed, 0 where they stay. */
  run(geometry: Geometry, moved: number): void {
    const { supports, points, support, span, piece } = geometry;
    const last = supports - 1;
    let from = support[0]!;
    this.V = 0;
    if (from.point > 0) this.integrateOverhang(geometry);
    for (let j = 0; j < last; j++) {
      const to = support[j + 1]!;
      const { inverse, near, cross, leftShear, leftTurn } = span[j]!;
      const { right, risen } = from;
      const { left } = to;
      const shear = leftShear + (left - right) * inverse;
      const psi = (to.risen - risen) * inverse - leftTurn - near * right - cross * left;
      if (j === 0) this.firstPsi = psi;
      from.up = shear - this.V;
      hold(from, piece[from.point]!);
      this.V = shear;
      this.M = right;
      this.psi = psi;
      this.v = risen;
      this.integrate(geometry, from.point, to.point);
      from = to;
    }
    const { shear } = span[last]!;
    from.up = shear - this.V;
    hold(from, piece[from.point]!);
    if (last === 0) {
      this.psi = moved * from.turn - from.turnGive * from.couple;
      this.firstPsi = this.psi;
    }
    this.V = shear;
    this.M = from.right;
    this.v = from.risen;
    this.integrate(geometry, from.point, points - 1);
    if (support[0]!.point > 0) this.placeOverhang(geometry);
  }

  /** From just right of point `first` to just left of point `last`. */
  private integrate({ piece, states }: Geometry, first: number, last: number): void {
    let { V, M, psi, v } = this;
    for (let k = first; k < last; k++) {
      const { length: s, bending: b, shearing: g, start, rate, curvature, force, couple } = piece[k]!;
      const change = rate * s;
      if (k > first) {
        V -= force;
        M -= couple;
      }
      const i = 8 * k;
      states[i] = V;
      states[i + 1] = M;
      states[i + 2] = psi - g * V;
      states[i + 3] = v;
      const half = s / 2;
      const third = s * THIRD;
      const gain = s * (V - half * (start + change * THIRD));
      const sag = M + third * (V - (s / 4) * (start + change * FIFTH));
      v += s * (psi + half * (curvature + b * sag)) - g * gain;
      psi += s * (curvature + b * (M + half * (V - third * (start + change / 4))));
      M += gain;
      V -= s * (start + change / 2);
      states[i + 4] = V;
      states[i + 5] = M;
      states[i + 6] = psi - g * V;
      states[i + 7] = v;
    }
    this.V = V;
    this.M = M;
    this.psi = psi;
    this.v = v;
  }

  /** The left overhang as if it started level at its free end. */
  private integrateOverhang(geometry: Geometry): void {
    this.V = -geometry.piece[0]!.force;
    this.M = -geometry.piece[0]!.couple;
    this.psi = 0;
    this.v = 0;
    this.integrate(geometry, 0, geometry.support[0]!.point);
  }

  /** Brings it to its support: there it goes on as the beam starts. */
  private placeOverhang({ piece, support, states }: Geometry): void {
    const { point: end, at, risen } = support[0]!;
    const i = 8 * end - 8;
    const turn = this.firstPsi - states[i + 6]! - piece[end - 1]!.shearing * states[i + 4]!;
    const lift = risen - states[i + 7]! - turn * at;
    for (let k = 0; k < end; k++) {
      states[8 * k + 2]! += turn;
      states[8 * k + 3]! += lift + turn * piece[k]!.from;
      states[8 * k + 6]! += turn;
      states[8 * k + 7]! += lift + turn * piece[k + 1]!.from;
    }
  }
}

/** The reactions of a support: `up` is what the shear rises by there, so far. */
function hold(support: Support, { force, couple }: Piece): void {
  support.up += force;
  support.couple = support.held ? support.left - support.right - couple : 0;
}
