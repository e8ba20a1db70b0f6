import type { Actions } from './actions';
import { type Flexibility, partnerOf, reactionOf } from './flexibility';
import type { Geometry } from './geometry';

/**
 * What equilibrium and compatibility say of a loaded beam, at its supports: the moments beside every support, the
 * reactions, and where each span starts its deflected shape.
 */
export class Statics {
  /** Of each support: the moment just left and just right of it, N·m, sagging. */
  left = new Float64Array(0);
  right = new Float64Array(0);
  /** Of each support: the reaction, N, up, and the moment reaction, N·m, anticlockwise; and the beam's rise there, m. */
  up = new Float64Array(0);
  couple = new Float64Array(0);
  rise = new Float64Array(0);
  /** Of each span: the shear just right of its left support, N, and the rotation there, rad. */
  shear = new Float64Array(0);
  rotation = new Float64Array(0);
  /** Of the last support: the shear just right of it; of a cantilever also the rotation. */
  outerShear = 0;
  outerRotation = 0;

  /** Of each span as a simple one under its loads: shears just inside its ends, and the ends' rotations. */
  private leftShear = new Float64Array(0);
  private rightShear = new Float64Array(0);
  private leftTurn = new Float64Array(0);
  private rightTurn = new Float64Array(0);
  /** What the unknowns must make up for, then the unknowns. */
  private unknowns = new Float64Array(0);
  /** Shear and moment at the inner end of an overhang. */
  private overhangShear = 0;
  private overhangMoment = 0;

  /** `moved`: 1 where the supports are moved as prescribed, 0 where they stay. */
  take(geometry: Geometry, flexibility: Flexibility, actions: Actions, moved: 0 | 1): void {
    this.fit(geometry.supports);
    for (let j = 0; j + 1 < geometry.supports; j++) this.releaseSpan(geometry, actions, j);
    this.releaseMoments(geometry, flexibility, actions);
    this.closeGaps(geometry, flexibility, actions, moved);
    this.addUnknowns(geometry, flexibility);
    this.react(geometry, actions, moved);
    this.turnSpans(geometry, flexibility, moved);
  }

  /**
   * The simple span j: ∫ m (M₀/EI + κ) dx + ∫ v V₀/GA dx with m = 1 at one end is how far that end turns inwards,
   * from its chord, which is leftTurn and rightTurn.
   */
  private releaseSpan({ point, at, x, h, bending, shearing }: Geometry, actions: Actions, j: number): void {
    const { start, rate, curvature, force, couple } = actions;
    const [first, last] = [point[j]!, point[j + 1]!];
    const length = at[j + 1]! - at[j]!;
    let [V, M] = [0, 0];
    for (let k = first; k < last; k++) {
      if (k > first) {
        V -= force[k]!;
        M -= couple[k]!;
      }
      const [s, w0, w1] = [h[k]!, start[k]!, rate[k]!];
      M += s * (V - s * (w0 / 2 + (s * w1) / 6));
      V -= s * (w0 + (s * w1) / 2);
    }
    this.leftShear[j] = -M / length;
    this.rightShear[j] = V - M / length;

    [V, M] = [-M / length, 0];
    let [near, far, slid] = [0, 0, 0];
    for (let k = first; k < last; k++) {
      if (k > first) {
        V -= force[k]!;
        M -= couple[k]!;
      }
      const [s, w0, w1] = [h[k]!, start[k]!, rate[k]!];
      const area = s * (M + s * (V / 2 - s * (w0 / 6 + (s * w1) / 24)));
      const firstMoment = s * s * (M / 2 + s * (V / 3 - s * (w0 / 8 + (s * w1) / 30)));
      const bent = bending[k]! * area + curvature[k]! * s;
      const q = (x[k]! - at[j]!) / length;
      const part = q * bent + (bending[k]! * firstMoment + (curvature[k]! * s * s) / 2) / length;
      far += part;
      near += bent - part;
      const gain = s * (V - s * (w0 / 2 + (s * w1) / 6));
      slid += gain * shearing[k]!;
      M += gain;
      V -= s * (w0 + (s * w1) / 2);
    }
    this.leftTurn[j] = near - slid / length;
    this.rightTurn[j] = far + slid / length;
  }

  /** The moments beside the supports while every unknown is zero, and the shear from the overhangs. */
  private releaseMoments(geometry: Geometry, { left: l, right: r }: Flexibility, actions: Actions): void {
    const { supports, point } = geometry;
    const { couple } = actions;
    const last = supports - 1;
    for (let j = 0; j < supports; j++) {
      this.left[j] = 0;
      this.right[j] = l[j]! >= 0 && l[j] === r[j] ? -couple[point[j]!]! : 0;
    }
    this.hangRight(geometry, actions);
    this.outerShear = this.overhangShear;
    this.right[last] = this.overhangMoment;
    if (l[last]! < 0) this.left[last] = this.overhangMoment + couple[point[last]!]!;
    this.hangLeft(geometry, actions);
    this.left[0] = this.overhangMoment;
    if (r[0]! < 0 && last > 0) this.right[0] = this.overhangMoment - couple[point[0]!]!;
  }

  private hangLeft({ point, h }: Geometry, { start, rate, force, couple }: Actions): void {
    let [V, M] = [0, 0];
    for (let k = 0; k < point[0]!; k++) {
      V -= force[k]!;
      M -= couple[k]!;
      const [s, w0, w1] = [h[k]!, start[k]!, rate[k]!];
      M += s * (V - s * (w0 / 2 + (s * w1) / 6));
      V -= s * (w0 + (s * w1) / 2);
    }
    this.overhangShear = V;
    this.overhangMoment = M;
  }

  private hangRight({ points, supports, point, h }: Geometry, { start, rate, force, couple }: Actions): void {
    let [V, M] = [0, 0];
    for (let k = points - 2; k >= point[supports - 1]!; k--) {
      V += force[k + 1]!;
      M += couple[k + 1]!;
      const [s, w0, w1] = [h[k]!, start[k]!, rate[k]!];
      V += s * (w0 + (s * w1) / 2);
      M -= s * (V - s * (w0 / 2 + (s * w1) / 6));
    }
    this.overhangShear = V;
    this.overhangMoment = M;
  }

  private closeGaps(geometry: Geometry, flexibility: Flexibility, actions: Actions, moved: 0 | 1): void {
    const { supports, point, held, turn, turnGive, give, rise, sprung, at } = geometry;
    const { left: l, right: r, near, cross, far } = flexibility;
    const b = this.unknowns;
    if (flexibility.unknowns === 0) return;
    b.fill(0, 0, flexibility.unknowns);
    for (let j = 0; j + 1 < supports; j++) {
      const [M, N] = [this.right[j]!, this.left[j + 1]!];
      const [i, k] = [r[j]!, l[j + 1]!];
      if (i >= 0) b[i]! -= this.leftTurn[j]! + near[j]! * M + cross[j]! * N;
      if (k >= 0) b[k]! -= this.rightTurn[j]! + cross[j]! * M + far[j]! * N;
    }
    for (let j = 0; j < supports; j++) {
      if (held[j]) {
        const jump = couple(actions, point[j]!) - (this.left[j]! - this.right[j]!);
        const turned = moved * turn[j]! + turnGive[j]! * jump;
        if (l[j]! >= 0) b[l[j]!]! += turned;
        if (r[j]! >= 0) b[r[j]!]! -= turned;
      }
      const risen =
        moved * rise[j]! - (give[j]! === 0 ? 0 : give[j]! * this.releasedReaction(geometry, actions, j));
      for (let p = 0; p < 4 && risen !== 0; p++) {
        const i = partnerOf(l, r, supports, j, p);
        if (i >= 0) b[i]! += risen * reactionOf(at, supports, j, p);
      }
    }
    flexibility.solve(b, sprung);
  }

  /** The upward reaction of support j while every unknown is zero. */
  private releasedReaction({ supports, at, point }: Geometry, { force }: Actions, j: number): number {
    const before =
      j === 0
        ? this.overhangShear
        : this.rightShear[j - 1]! + (this.left[j]! - this.right[j - 1]!) / (at[j]! - at[j - 1]!);
    const after =
      j + 1 === supports
        ? this.outerShear
        : this.leftShear[j]! + (this.left[j + 1]! - this.right[j]!) / (at[j + 1]! - at[j]!);
    return after - before + force[point[j]!]!;
  }

  private addUnknowns({ supports }: Geometry, { left: l, right: r }: Flexibility): void {
    for (let j = 0; j < supports; j++) {
      if (l[j]! >= 0) this.left[j]! += this.unknowns[l[j]!]!;
      if (r[j]! >= 0) this.right[j]! += this.unknowns[r[j]!]!;
    }
  }

  private react({ supports, at, point, held, give, rise }: Geometry, actions: Actions, moved: 0 | 1): void {
    let before = this.overhangShear;
    for (let j = 0; j < supports; j++) {
      let after = this.outerShear;
      let next = 0;
      if (j + 1 < supports) {
        const sway = (this.left[j + 1]! - this.right[j]!) / (at[j + 1]! - at[j]!);
        after = this.leftShear[j]! + sway;
        next = this.rightShear[j]! + sway;
        this.shear[j] = after;
      }
      this.up[j] = after - before + actions.force[point[j]!]!;
      this.couple[j] = held[j] ? this.left[j]! - this.right[j]! - couple(actions, point[j]!) : 0;
      this.rise[j] = moved * rise[j]! - give[j]! * this.up[j]!;
      before = next;
    }
  }

  private turnSpans(
    { supports, at, turn, turnGive }: Geometry,
    { near, cross, far }: Flexibility,
    moved: 0 | 1,
  ): void {
    const last = supports - 1;
    for (let j = 0; j < last; j++) {
      const chord = (this.rise[j + 1]! - this.rise[j]!) / (at[j + 1]! - at[j]!);
      const [M, N] = [this.right[j]!, this.left[j + 1]!];
      this.rotation[j] = chord - (this.leftTurn[j]! + near[j]! * M + cross[j]! * N);
      this.outerRotation = chord + (this.rightTurn[j]! + cross[j]! * M + far[j]! * N);
    }
    if (last === 0) this.outerRotation = moved * turn[0]! - turnGive[0]! * this.couple[0]!;
  }

  private fit(supports: number): void {
    if (supports <= this.left.length) return;
    const room = 2 * supports;
    this.left = new Float64Array(room);
    this.right = new Float64Array(room);
    this.up = new Float64Array(room);
    this.couple = new Float64Array(room);
    this.rise = new Float64Array(room);
    this.shear = new Float64Array(room);
    this.rotation = new Float64Array(room);
    this.leftShear = new Float64Array(room);
    this.rightShear = new Float64Array(room);
    this.leftTurn = new Float64Array(room);
    this.rightTurn = new Float64Array(room);
    this.unknowns = new Float64Array(2 * room);
  }
}

const couple = ({ couple: couples }: Actions, point: number): number => couples[point]!;
