import { CANCELLED, largest, type Sum, settled, Wide } from '../linear/index';
import type { Redundant } from '../model/index';
import type { Mesh } from './mesh';
import { type Reaction, riseAt, turnAt } from './released';
import type { Curve } from './state';

/** A stretch between neighbouring supports, hinges and cuts, where the moment of a unit redundant is a straight line. */
export type Member = {
  /** Numbers of its end points. */
  from: number;
  to: number;
  length: Wide;
  /** ∫ 1/EI, ∫ s/EI, and ∫ s²/EI + ∫ 1/GA, with s from its left end. */
  constant: Wide;
  linear: Wide;
  quadratic: Wide;
};

const [HALF, THIRD] = [Wide.of(0.5), Wide.ONE.over(3)];

/** The members between the given points (numbers, ascending). */
export function membersOf(mesh: Mesh, joints: readonly number[]): Member[] {
  return joints.slice(1).map((to, m) => {
    const from = joints[m]!;
    let [constant, linear, quadratic] = [Wide.ZERO, Wide.ZERO, Wide.ZERO];
    for (let k = from; k < to; k++) {
      const [h, bending, shearing] = [mesh.lengths[k]!, mesh.bending[k]!, mesh.shearing[k]!];
      const s = Wide.difference(mesh.points[k]!, mesh.points[from]!);
      const area = h.times(bending);
      constant = constant.plus(area);
      linear = linear.plus(area.times(s.plus(h.times(HALF))));
      quadratic = quadratic
        .plus(area.times(s.times(s.plus(h)).plus(h.times(h).times(THIRD))))
        .plus(h.times(shearing));
    }
    const length = Wide.difference(mesh.points[to]!, mesh.points[from]!);
    return { from, to, length, constant, linear, quadratic };
  });
}

/**
 * The released beam under a unit value of one redundant: its reactions, and on each member from `first` to `last` the
 * moment at the left end and the shear; elsewhere it carries nothing.
 */
export type UnitState = { reactions: Wide[]; moment: Wide[]; shear: Wide[]; first: number; last: number };

export function unitState(
  mesh: Mesh,
  members: readonly Member[],
  reactions: readonly Reaction[],
  redundant: Redundant,
  at: number,
): UnitState {
  const values = reactions.map(({ motion }) => {
    if (redundant.component === 'vertical') return riseAt(motion, at).negated();
    if (redundant.component === 'rotation') return turnAt(motion, at, 'left').negated();
    // A sagging pair turns what is left of the cut anticlockwise, and what is right of it clockwise.
    return turnAt(motion, at, 'right').minus(turnAt(motion, at, 'left'));
  });
  const [up, turn] = [new Map<number, Wide>(), new Map<number, Wide>()];
  reactions.forEach(({ at: place, component }, c) => {
    (component === 'vertical' ? up : turn).set(mesh.index.get(place)!, values[c]!);
  });
  if (redundant.component !== 'moment') {
    (redundant.component === 'vertical' ? up : turn).set(mesh.index.get(at)!, Wide.ONE);
  }
  return { reactions: values, ...lines(members, up, turn) };
}

type AtPoint = ReadonlyMap<number, Wide>;

/** Shear and moment of a beam that is loaded at its joints only, from the left end. */
function lines(members: readonly Member[], up: AtPoint, turn: AtPoint) {
  let [shear, moment] = [Wide.ZERO, Wide.ZERO];
  const shears: Wide[] = [];
  const moments: Wide[] = [];
  for (const { from, length } of members) {
    shear = shear.plus(up.get(from) ?? Wide.ZERO);
    moment = moment.minus(turn.get(from) ?? Wide.ZERO);
    shears.push(shear);
    moments.push(moment);
    moment = moment.plus(shear.times(length));
  }
  // What is left of a sum that cancels is exactly nothing: so a unit state ends where it ends.
  const cleared = {
    shear: settled(shears, CANCELLED * largest(shears)),
    moment: settled(moments, CANCELLED * largest(moments)),
  };
  const carries = members.map((_, m) => cleared.shear[m] !== Wide.ZERO || cleared.moment[m] !== Wide.ZERO);
  return { ...cleared, first: Math.max(0, carries.indexOf(true)), last: carries.lastIndexOf(true) };
}

/**
 * f_ij = ∫ m_i m_j/EI dx + ∫ v_i v_j/GA dx + Σ r_i r_j/k
 *
 * Exact: m = M + V s on every member, and the integrals of 1, s and s² over EI are known.
 */
export function flexibilityBetween(
  members: readonly Member[],
  springs: readonly { index: number; compliance: Wide }[],
  a: UnitState,
  b: UnitState,
): Wide {
  let total = Wide.ZERO;
  for (let m = Math.max(a.first, b.first); m <= Math.min(a.last, b.last); m++) {
    const { constant, linear, quadratic } = members[m]!;
    const [M, V] = [b.moment[m]!, b.shear[m]!];
    total = total
      .plus(a.moment[m]!.times(M.times(constant).plus(V.times(linear))))
      .plus(a.shear[m]!.times(M.times(linear).plus(V.times(quadratic))));
  }
  for (const { index, compliance } of springs) {
    total = total.plus(a.reactions[index]!.times(b.reactions[index]!).times(compliance));
  }
  return total;
}

/**
 * ∫ m_i (M₀/EI + κ) dx + ∫ v_i V₀/GA dx of a unit state and the curve of the loads on the released beam.
 *
 * Exact, by parts: on a member m_i = M + V s, ψ₀' = M₀/EI + κ and v₀' = ψ₀ − V₀/GA, so its share is
 * M Δψ₀ + V (ℓ ψ₀(ℓ) − Δv₀).
 */
export function addWorkOn(sum: Sum, members: readonly Member[], unit: UnitState, curve: Curve): void {
  for (let m = unit.first; m <= unit.last; m++) {
    const { from, to, length } = members[m]!;
    const [turn, drop] = [curve.rotation[to]!, curve.deflection[to]!];
    sum.add(unit.moment[m]!.times(turn.minus(curve.rotation[from]!)));
    sum.add(unit.shear[m]!.times(turn.times(length).minus(drop.minus(curve.deflection[from]!))));
  }
}
