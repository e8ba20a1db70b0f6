import { CANCELLED, largest, type Sum, settled, Wide } from '../linear/index';
import type { Redundant } from '../model/index';
import type { Mesh } from './mesh';
import { type Reaction, reaches, riseAt, turnAt } from './released';
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

/** The released beam under a unit value of one redundant. */
export type UnitState = {
  /** By their numbers, those of the released beam's reactions that it causes. */
  reactions: ReadonlyMap<number, Wide>;
  /** The members that carry it, and the moment at the left end and the shear of each from `first` on. */
  first: number;
  last: number;
  moment: readonly Wide[];
  shear: readonly Wide[];
};

export function unitState(
  mesh: Mesh,
  members: readonly Member[],
  reactions: readonly Reaction[],
  redundant: Redundant,
  at: number,
): UnitState {
  const values = new Map<number, Wide>();
  const [up, turn] = [new Map<number, Wide>(), new Map<number, Wide>()];
  reactions.forEach(({ at: place, component, motion }, c) => {
    const value = reaches(motion, at) ? withstanding(motion, redundant, at) : Wide.ZERO;
    if (value.hi === 0) return;
    values.set(c, value);
    (component === 'vertical' ? up : turn).set(mesh.index.get(place)!, value);
  });
  if (redundant.component !== 'moment') {
    (redundant.component === 'vertical' ? up : turn).set(mesh.index.get(at)!, Wide.ONE);
  }
  return { reactions: values, ...lines(members, up, turn) };
}

/** The reaction to a unit value of the redundant at `at`, from the movement that the reaction prevents. */
function withstanding(motion: Reaction['motion'], { component }: Redundant, at: number): Wide {
  if (component === 'vertical') return riseAt(motion, at).negated();
  if (component === 'rotation') return turnAt(motion, at, 'left').negated();
  // A sagging pair turns what is left of the cut anticlockwise, and what is right of it clockwise.
  return turnAt(motion, at, 'right').minus(turnAt(motion, at, 'left'));
}

type AtPoint = ReadonlyMap<number, Wide>;

/** Shear and moment of a beam that is loaded at its joints only and is in equilibrium, from the first of them to the last. */
function lines(members: readonly Member[], up: AtPoint, turn: AtPoint) {
  let [V, M] = [Wide.ZERO, Wide.ZERO];
  const shears: Wide[] = [];
  const moments: Wide[] = [];
  const acting = [...up.keys(), ...turn.keys()];
  const [left, right] = [Math.min(...acting), Math.max(...acting)];
  const start = members.findIndex(({ from }) => from >= left);
  for (let m = start; m < members.length && members[m]!.from < right; m++) {
    const { from, length } = members[m]!;
    V = V.plus(up.get(from) ?? Wide.ZERO);
    M = M.minus(turn.get(from) ?? Wide.ZERO);
    shears.push(V);
    moments.push(M);
    M = M.plus(V.times(length));
  }
  // What is left of a sum that cancels is exactly nothing: so a unit state ends where it ends.
  const shear = settled(shears, CANCELLED * largest(shears));
  const moment = settled(moments, CANCELLED * largest(moments));
  const last = start + shear.findLastIndex((v, m) => v.hi !== 0 || moment[m]!.hi !== 0);
  return { first: start, last, shear, moment };
}

/** What a unit state does to the members that carry it: ∫ m/EI dx, and ∫ m s/EI dx + ∫ v/GA dx with s from the left end. */
export type Bend = { turn: Wide; drop: Wide };

/** Exact: m = M + V s on every member, and the integrals of 1, s and s² over EI are known. */
export const bendsOf = (members: readonly Member[], { first, moment, shear }: UnitState): Bend[] =>
  moment.map((M, i) => {
    const { constant, linear, quadratic } = members[first + i]!;
    const V = shear[i]!;
    return {
      turn: M.times(constant).plus(V.times(linear)),
      drop: M.times(linear).plus(V.times(quadratic)),
    };
  });

/**
 * f_ij = ∫ m_i m_j/EI dx + ∫ v_i v_j/GA dx + Σ r_i r_j/k
 *
 * of two unit states, from the bends of the first. 1/k of the springs among the reactions is by the reactions' numbers.
 */
export function flexibilityBetween(
  a: UnitState,
  bends: readonly Bend[],
  b: UnitState,
  compliances: ReadonlyMap<number, Wide>,
): Wide {
  let total = Wide.ZERO;
  for (let m = Math.max(a.first, b.first); m <= Math.min(a.last, b.last); m++) {
    const { turn, drop } = bends[m - a.first]!;
    total = total.plus(b.moment[m - b.first]!.times(turn)).plus(b.shear[m - b.first]!.times(drop));
  }
  if (compliances.size === 0) return total;
  for (const [c, reaction] of a.reactions) {
    const [other, compliance] = [b.reactions.get(c), compliances.get(c)];
    if (other && compliance) total = total.plus(reaction.times(other).times(compliance));
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
    sum.add(unit.moment[m - unit.first]!.times(turn.minus(curve.rotation[from]!)));
    sum.add(unit.shear[m - unit.first]!.times(turn.times(length).minus(drop.minus(curve.deflection[from]!))));
  }
}
