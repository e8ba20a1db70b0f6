import type { Actions } from './actions';
import type { Geometry } from './geometry';
import type { Statics } from './statics';

/**
 * V, M, θ and v of every piece as polynomials of s from its left end, lowest power first, of 3, 4, 5 and 6 coefficients:
 * V' = −w, M' = V, ψ' = M/EI + κ, θ = ψ − V/GA, v' = θ. And their values just inside its right end.
 */
export class Curves {
  shear = new Float64Array(0);
  moment = new Float64Array(0);
  slope = new Float64Array(0);
  deflection = new Float64Array(0);
  endShear = new Float64Array(0);
  endMoment = new Float64Array(0);
  endSlope = new Float64Array(0);
  endDeflection = new Float64Array(0);

  /** The state just left of the point that a run of pieces starts at, then of the one that it ends at. */
  private V = 0;
  private M = 0;
  private rotation = 0;
  private rise = 0;

  take(geometry: Geometry, actions: Actions, statics: Statics): void {
    this.fit(geometry.points);
    const { supports, point, points } = geometry;
    const last = supports - 1;
    this.overhang(geometry, actions, statics);
    for (let j = 0; j < last; j++) {
      this.begin(statics.shear[j]!, statics.right[j]!, statics.rotation[j]!, statics.rise[j]!);
      this.run(geometry, actions, point[j]!, point[j + 1]!);
    }
    this.begin(statics.outerShear, statics.right[last]!, statics.outerRotation, statics.rise[last]!);
    this.run(geometry, actions, point[last]!, points - 1);
  }

  /** The overhang at the left: its shape from the free end, then brought to the support. */
  private overhang(geometry: Geometry, actions: Actions, statics: Statics): void {
    const { point, x } = geometry;
    const end = point[0]!;
    if (end === 0) return;
    const { force, couple } = actions;
    this.begin(-force[0]!, -couple[0]!, 0, 0);
    this.run(geometry, actions, 0, end);
    const rotation = (geometry.supports > 1 ? statics.rotation[0]! : statics.outerRotation) - this.rotation;
    const rise = statics.rise[0]! - this.rise - rotation * x[end]!;
    for (let k = 0; k < end; k++) {
      const lift = rise + rotation * x[k]!;
      this.slope[5 * k]! += rotation;
      this.endSlope[k]! += rotation;
      this.deflection[6 * k]! += lift;
      this.deflection[6 * k + 1]! += rotation;
      this.endDeflection[k]! += rise + rotation * x[k + 1]!;
    }
  }

  private begin(V: number, M: number, rotation: number, rise: number): void {
    this.V = V;
    this.M = M;
    this.rotation = rotation;
    this.rise = rise;
  }

  private run({ h, bending, shearing }: Geometry, actions: Actions, first: number, last: number): void {
    const { start, rate, curvature, force, couple } = actions;
    const { shear, moment, slope, deflection } = this;
    let { V, M, rotation, rise } = this;
    for (let k = first; k < last; k++) {
      if (k > first) {
        V -= force[k]!;
        M -= couple[k]!;
      }
      const [s, w0, w1, b, g] = [h[k]!, start[k]!, rate[k]!, bending[k]!, shearing[k]!];
      const [v1, v2] = [-w0, -w1 / 2];
      const [m2, m3] = [v1 / 2, v2 / 3];
      const t0 = rotation - g * V;
      const t1 = b * M + curvature[k]! - g * v1;
      const t2 = (b * V) / 2 - g * v2;
      const t3 = (b * m2) / 3;
      const t4 = (b * m3) / 4;
      shear[3 * k] = V;
      shear[3 * k + 1] = v1;
      shear[3 * k + 2] = v2;
      moment[4 * k] = M;
      moment[4 * k + 1] = V;
      moment[4 * k + 2] = m2;
      moment[4 * k + 3] = m3;
      slope[5 * k] = t0;
      slope[5 * k + 1] = t1;
      slope[5 * k + 2] = t2;
      slope[5 * k + 3] = t3;
      slope[5 * k + 4] = t4;
      deflection[6 * k] = rise;
      deflection[6 * k + 1] = t0;
      deflection[6 * k + 2] = t1 / 2;
      deflection[6 * k + 3] = t2 / 3;
      deflection[6 * k + 4] = t3 / 4;
      deflection[6 * k + 5] = t4 / 5;
      rise += s * (t0 + s * (t1 / 2 + s * (t2 / 3 + s * (t3 / 4 + (s * t4) / 5))));
      M += s * (V + s * (m2 + s * m3));
      V += s * (v1 + s * v2);
      const theta = t0 + s * (t1 + s * (t2 + s * (t3 + s * t4)));
      rotation = theta + g * V;
      this.endShear[k] = V;
      this.endMoment[k] = M;
      this.endSlope[k] = theta;
      this.endDeflection[k] = rise;
    }
    this.V = V;
    this.M = M;
    this.rotation = rotation;
    this.rise = rise;
  }

  private fit(points: number): void {
    if (points <= this.endShear.length) return;
    const room = 2 * points;
    this.shear = new Float64Array(3 * room);
    this.moment = new Float64Array(4 * room);
    this.slope = new Float64Array(5 * room);
    this.deflection = new Float64Array(6 * room);
    this.endShear = new Float64Array(room);
    this.endMoment = new Float64Array(room);
    this.endSlope = new Float64Array(room);
    this.endDeflection = new Float64Array(room);
  }
}
