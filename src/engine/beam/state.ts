import { CANCELLED, largest, Sum, settled, Wide } from '../linear/index';
import { riseOf } from '../model/index';
import type { Actions } from './actions';
import type { Mesh } from './mesh';
import { type Reaction, turnOf } from './released';

/** V and M just right of the left end of every piece. */
export type Forces = { shear: Wide[]; moment: Wide[] };

/** ψ and v at every point, of the curve without kinks that starts with ψ = 0 and v = 0 at the left end. */
export type Curve = { rotation: Wide[]; deflection: Wide[] };

/** What holds the beam at its points: upward forces and anticlockwise couples on it. */
export type Holding = { up: Wide[]; turn: Wide[] };

const HALF = Wide.of(0.5);
const SIXTH = Wide.ONE.over(6);
const INVERSE_FACTORIALS = [Wide.ONE, Wide.ONE, HALF, SIXTH, Wide.ONE.over(24), Wide.ONE.over(120)] as const;
const NO_LOAD = [Wide.ZERO, Wide.ZERO, Wide.ZERO, Wide.ZERO] as const;

/** The load w₀ + w₁s of piece k integrated over it once, twice, three and four times: hⁿ (w₀/n! + w₁h/(n+1)!). */
function loadIntegrals(
  { lengths }: Mesh,
  { start, rate }: Actions,
  k: number,
): readonly [Wide, Wide, Wide, Wide] {
  const [h, w0, w1] = [lengths[k]!, start[k]!, rate[k]!];
  if (w0.hi === 0 && w1.hi === 0) return NO_LOAD;
  const rise = w1.times(h);
  let power = Wide.ONE;
  const integral = (n: 1 | 2 | 3 | 4) => {
    power = power.times(h);
    return w0
      .times(INVERSE_FACTORIALS[n])
      .plus(rise.times(INVERSE_FACTORIALS[n + 1]!))
      .times(power);
  };
  return [integral(1), integral(2), integral(3), integral(4)];
}

/** Shear and moment by equilibrium from the left end: V' = −w, M' = V. */
export function forcesOf(mesh: Mesh, actions: Actions, { up, turn }: Holding): Forces {
  const forces: Forces = { shear: [], moment: [] };
  let [shear, moment] = [Wide.ZERO, Wide.ZERO];
  mesh.lengths.forEach((h, k) => {
    shear = shear.plus(up[k]!).minus(actions.force[k]!);
    moment = moment.minus(turn[k]!).minus(actions.couple[k]!);
    forces.shear.push(shear);
    forces.moment.push(moment);
    const [once, twice] = loadIntegrals(mesh, actions, k);
    moment = moment.plus(shear.times(h)).minus(twice);
    shear = shear.minus(once);
  });
  return forces;
}

/** ψ' = M/EI + κ and v' = ψ − V/GA, integrated exactly from the left end; what a moment wholly holds does not bend. */
export function curveOf(mesh: Mesh, actions: Actions, { shear, moment }: Forces): Curve {
  const curve: Curve = { rotation: [Wide.ZERO], deflection: [Wide.ZERO] };
  let [rotation, deflection] = [Wide.ZERO, Wide.ZERO];
  mesh.lengths.forEach((h, k) => {
    const [, twice, thrice, fourfold] = loadIntegrals(mesh, actions, k);
    const [V, M, kappa] = [shear[k]!, moment[k]!, actions.curvature[k]!];
    const [bending, shearing] = [mesh.bending[k]!, mesh.shearing[k]!];
    const bend = V.times(h).times(HALF).plus(M).times(h).minus(thrice);
    const sag = V.times(h).times(SIXTH).plus(M.times(HALF)).times(h).times(h).minus(fourfold);
    const shift = V.times(h).minus(twice).times(shearing);
    const turn = kappa.times(h);
    deflection = totalOf(
      deflection,
      rotation.times(h),
      turn.times(h).times(HALF),
      sag.times(bending),
      shift.negated(),
    );
    rotation = totalOf(rotation, bend.times(bending), turn);
    curve.rotation.push(rotation);
    curve.deflection.push(deflection);
  });
  return curve;
}

function totalOf(...terms: readonly Wide[]): Wide {
  const sum = new Sum();
  for (const term of terms) sum.add(term);
  return sum.total();
}

/**
 * The curve on its supports: every reaction's point is moved to where its restraint holds it (`movements`), by the
 * rigid movements that belong to the reactions. ψ and v just right of the left end of every piece.
 */
export function placedCurve(
  mesh: Mesh,
  curve: Curve,
  reactions: readonly Reaction[],
  movements: readonly Wide[],
): Curve {
  const rotation = curve.rotation.slice(0, -1);
  const deflection = curve.deflection.slice(0, -1);
  reactions.forEach(({ at, component, motion }, c) => {
    const i = mesh.index.get(at)!;
    const there = component === 'vertical' ? curve.deflection[i]! : curve.rotation[i]!;
    const missing = movements[c]!.minus(there);
    for (const part of motion) {
      const turn = turnOf(part).times(missing);
      for (let k = mesh.index.get(part.from)!; k < mesh.index.get(part.to)!; k++) {
        rotation[k] = rotation[k]!.plus(turn);
        deflection[k] = deflection[k]!.plus(riseOf(part, mesh.points[k]!).times(missing));
      }
    }
  });
  const turned = largest([...curve.rotation, ...rotation]);
  const moved = largest([...curve.deflection, ...deflection]);
  return {
    rotation: settled(rotation, CANCELLED * turned),
    deflection: settled(deflection, CANCELLED * moved),
  };
}
