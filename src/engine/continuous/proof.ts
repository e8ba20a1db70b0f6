import type { Beam, Load } from '../model/index';
import { PlainStiffness } from '../stiffness/index';
import type { ExtremeFinder, Range } from './extremes';
import type { Geometry } from './geometry';

/** Part of its natural size that counts as the size of what a beam happens to have none of; engine/proof tells why. */
const FLOOR = 1e-5;

/**
 * The proof of the fast solver's result in plain doubles, by what shares neither its equations nor its loads, each
 * residual relative to the largest value of its kind:
 *
 *   equilibrium    ΣF, and ΣM about both ends, of the reactions and the loads as they were given
 *   compatibility  v and ψ on both sides of every support, less what its restraint prescribes; ψ across the others
 *   agreement      V, M, ψ and v inside the ends of every span and step, and the reactions, against direct stiffness
 */
export class FastProof {
  equilibrium = NaN;
  compatibility = NaN;
  agreement = NaN;

  private readonly check = new PlainStiffness();
  private readonly scales = new Scales();
  private checked = false;

  take(beam: Beam): void {
    this.checked = this.check.take(beam);
    this.scales.take(beam);
  }

  /** The same loads and movements as the result's. */
  prove(geometry: Geometry, extremes: ExtremeFinder, loads: readonly Load[], moved: boolean): void {
    this.scales.measure(geometry, extremes, loads, moved);
    this.equilibrium = this.balance(geometry, loads);
    this.compatibility = this.fit(geometry, moved ? 1 : 0);
    this.agreement = Infinity;
    if (!this.checked) return;
    this.check.solve(loads, moved);
    this.agreement = Math.max(this.compareStates(geometry), this.compareReactions(geometry));
  }

  /** Whether every residual is within the limit; one that is not a number proves nothing. */
  isWithin(limit: number): boolean {
    return this.equilibrium <= limit && this.compatibility <= limit && this.agreement <= limit;
  }

  private balance({ supports, support, length }: Geometry, loads: readonly Load[]): number {
    let force = 0;
    let left = 0; // moment about the left end, and the largest term in it; then about the right end
    let leftTerm = 0;
    let right = 0;
    let rightTerm = 0;
    const count = supports + loads.length;
    for (let i = 0; i < count; i++) {
      let up = 0;
      let turning = 0; // about the left end
      if (i < supports) {
        const record = support[i]!;
        up = record.up;
        turning = record.couple + up * record.at;
      } else {
        const load = loads[i - supports]!;
        if (load.kind === 'line') {
          const c = load.to - load.from;
          up = -((load.w0 + load.w1) * c) / 2;
          turning = up * load.from - ((load.w0 + 2 * load.w1) * c * c) / 6;
        } else if (load.kind === 'point') {
          up = -load.p;
          turning = up * load.at;
        } else if (load.kind === 'couple') turning = load.m;
      }
      force += up;
      left += turning;
      right += turning - up * length;
      leftTerm = Math.max(leftTerm, Math.abs(turning));
      rightTerm = Math.max(rightTerm, Math.abs(turning - up * length));
    }
    const { force: most, moment } = this.scales;
    const turning = Math.max(
      relative(left, Math.max(leftTerm, moment)),
      relative(right, Math.max(rightTerm, moment)),
    );
    return Math.max(relative(force, most), turning);
  }

  private fit({ supports, support, points, piece, states }: Geometry, moved: number): number {
    const { rotation, deflection } = this.scales;
    let worst = 0;
    for (let j = 0; j < supports; j++) {
      const record = support[j]!;
      const k = record.point;
      const risen = moved * record.rise - record.give * record.up;
      const turned = moved * record.turn - record.turnGive * record.couple;
      let psi = NaN;
      if (k > 0) {
        const before = 8 * k - 4;
        psi = states[before + 2]! + piece[k - 1]!.shearing * states[before]!;
        worst = Math.max(worst, relative(states[before + 3]! - risen, deflection));
        if (record.held) worst = Math.max(worst, relative(psi - turned, rotation));
      }
      if (k + 1 < points) {
        const next = states[8 * k + 2]! + piece[k]!.shearing * states[8 * k]!;
        worst = Math.max(worst, relative(states[8 * k + 3]! - risen, deflection));
        if (record.held) worst = Math.max(worst, relative(next - turned, rotation));
        else if (k > 0) worst = Math.max(worst, relative(next - psi, rotation));
      }
    }
    return worst;
  }

  private compareStates({ points, piece, states }: Geometry): number {
    const { check, scales } = this;
    const { force, moment, rotation, deflection } = scales;
    let worst = 0;
    let e = 0;
    for (let k = 0; k + 1 < points; k++) {
      const { from, shearing } = piece[k]!;
      const starts = check.element[e]!.from === from;
      const ends =
        e + 1 < check.elements ? check.element[e + 1]!.from === piece[k + 1]!.from : k + 2 === points;
      for (let side = starts ? 0 : 1; side < (ends ? 2 : 1); side++) {
        const i = 8 * k + 4 * side;
        const other = side === 0 ? check.element[e]!.left : check.element[e]!.right;
        const psi = states[i + 2]! + shearing * states[i]!;
        worst = Math.max(worst, relative(states[i]! - other[0]!, force));
        worst = Math.max(worst, relative(states[i + 1]! - other[1]!, moment));
        worst = Math.max(worst, relative(psi - other[2]!, rotation));
        worst = Math.max(worst, relative(states[i + 3]! - other[3]!, deflection));
      }
      if (ends) e++;
    }
    return worst;
  }

  private compareReactions({ supports, support }: Geometry): number {
    const { check, scales } = this;
    let worst = 0;
    for (let j = 0; j < supports; j++) {
      const { number, up, couple } = support[j]!;
      worst = Math.max(worst, relative(up - check.vertical[number]!, scales.force));
      worst = Math.max(worst, relative(couple - check.moment[number]!, scales.moment));
    }
    return worst;
  }
}

/** The largest value of each kind, or what its natural size leaves of it; N, N·m, rad, m. As of engine/proof. */
class Scales {
  force = NaN;
  moment = NaN;
  rotation = NaN;
  deflection = NaN;

  private stiffest = NaN;
  private softest = NaN;
  private length = NaN;

  take({ segments, length }: Beam): void {
    let [stiffest, softest] = [0, Infinity];
    for (let i = 0; i < segments.length; i++) {
      stiffest = Math.max(stiffest, segments[i]!.ei);
      softest = Math.min(softest, segments[i]!.ei);
    }
    this.stiffest = stiffest;
    this.softest = softest;
    this.length = length;
  }

  measure(geometry: Geometry, extremes: ExtremeFinder, loads: readonly Load[], moved: boolean): void {
    const { supports, support } = geometry;
    const { stiffest, softest, length } = this;
    let force = largest(extremes.shear);
    let moment = largest(extremes.moment);
    let rise = 0;
    let turn = 0;
    let span = length;
    for (let j = 0; j < supports; j++) {
      const record = support[j]!;
      force = Math.max(force, Math.abs(record.up));
      moment = Math.max(moment, Math.abs(record.couple));
      if (j > 0) span = Math.min(span, record.at - support[j - 1]!.at);
      if (!moved) continue;
      rise = Math.max(rise, Math.abs(record.rise));
      turn = Math.max(turn, Math.abs(record.turn));
    }
    let curvature = 0;
    for (let i = 0; i < loads.length; i++) {
      const load = loads[i]!;
      if (load.kind === 'line') {
        const w = Math.max(Math.abs(load.w0), Math.abs(load.w1));
        force = Math.max(force, (w * (load.to - load.from)) / 2);
      } else if (load.kind === 'point') force = Math.max(force, Math.abs(load.p));
      else if (load.kind === 'couple') moment = Math.max(moment, Math.abs(load.m));
      else if (load.to > load.from) curvature = Math.max(curvature, Math.abs(load.kappa));
    }
    const rotation = Math.max(largest(extremes.slope), turn);
    const deflection = Math.max(largest(extremes.deflection), rise);

    const restrained = stiffest * (curvature + turn / span + rise / span ** 2);
    const naturalForce = Math.max(force, moment / length, restrained / span);
    const naturalMoment = Math.max(moment, restrained, naturalForce * length);
    const naturalRotation = Math.max(rotation, (naturalMoment / softest + curvature) * length, rise / length);
    this.force = Math.max(force, FLOOR * naturalForce);
    this.moment = Math.max(moment, FLOOR * naturalMoment);
    this.rotation = Math.max(rotation, FLOOR * naturalRotation);
    this.deflection = Math.max(deflection, FLOOR * naturalRotation * length);
  }
}

const largest = ({ max, min }: Range): number => Math.max(Math.abs(max), Math.abs(min));

/** |difference| / scale, where nothing beside nothing is 0. */
const relative = (difference: number, scale: number): number =>
  difference === 0 ? 0 : Math.abs(difference) / scale;
