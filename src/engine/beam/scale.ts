import { largest, Wide } from '../linear/index';
import type { Actions } from './actions';
import type { Mesh } from './mesh';

/**
 * Part of the largest force below which a force is rounding's: what 32 digits leave of a zero that was computed through
 * redundants of condition 10¹⁰. Not more, since the small force in a soft spring still tells where its point is.
 */
const NOTHING = 1e-22;

/**
 * Forces, N, and moments, N·m, that are nothing beside those that act on the beam or in it, or that its free curvatures
 * would make if they were wholly held.
 */
export type Floor = { force: number; couple: number };

export function floorOf(
  mesh: Mesh,
  actions: Actions,
  forces: readonly Wide[],
  couples: readonly Wide[],
): Floor {
  const length = mesh.points.at(-1)!;
  const force = largest(forces, actions.force);
  const held = actions.curvature.map((kappa, k) =>
    kappa.hi === 0 ? Wide.ZERO : kappa.over(mesh.bending[k]!),
  );
  const couple = largest(couples, actions.couple, held);
  return {
    force: NOTHING * Math.max(force, couple / length),
    couple: NOTHING * Math.max(couple, force * length),
  };
}
