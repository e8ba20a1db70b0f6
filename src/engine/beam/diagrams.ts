import { Sum, type Wide } from '../linear/index';
import { piecewise } from '../polynomial/index';
import type { Actions } from './actions';
import type { Mesh } from './mesh';
import type { Curve, Forces } from './state';
import type { Diagrams } from './types';

/**
 * The diagrams from the state at the left end of every piece, by V' = −w, M' = V, ψ' = M/EI + κ, θ = ψ − V/GA, v' = θ:
 * exact polynomials of x, each about its piece's left end, rounded once.
 */
export function diagramsOf(mesh: Mesh, actions: Actions, forces: Forces, placed: Curve): Diagrams {
  const pieces = mesh.lengths.map((_, k) => pieceOf(mesh, actions, forces, placed, k));
  return {
    shear: piecewise(
      mesh.points,
      pieces.map(({ shear }) => shear),
    ),
    moment: piecewise(
      mesh.points,
      pieces.map(({ moment }) => moment),
    ),
    slope: piecewise(
      mesh.points,
      pieces.map(({ slope }) => slope),
    ),
    deflection: piecewise(
      mesh.points,
      pieces.map(({ deflection }) => deflection),
    ),
  };
}

function pieceOf(mesh: Mesh, actions: Actions, forces: Forces, placed: Curve, k: number) {
  const shear = [forces.shear[k]!, actions.start[k]!.negated(), actions.rate[k]!.times(-0.5)];
  const moment = [forces.moment[k]!, ...integral(shear)];
  const bending = moment.map((c) => c.times(mesh.bending[k]!));
  const [first, ...rest] = bending as [Wide, ...Wide[]];
  const bend = new Sum();
  bend.add(first);
  bend.add(actions.curvature[k]!);
  const rotation = [placed.rotation[k]!, ...integral([bend.total(), ...rest])];
  const slope = rotation.map((c, j) => (shear[j] ? c.minus(shear[j].times(mesh.shearing[k]!)) : c));
  const deflection = [placed.deflection[k]!, ...integral(slope)];
  return {
    shear: rounded(shear),
    moment: rounded(moment),
    slope: rounded(slope),
    deflection: rounded(deflection),
  };
}

const integral = (coefficients: readonly Wide[]): Wide[] =>
  coefficients.map((c, j) => (j === 0 ? c : c.over(j + 1)));

const rounded = (coefficients: readonly Wide[]): number[] => coefficients.map((c) => c.rounded() + 0);
