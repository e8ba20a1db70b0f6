import type { Beam, Redundant } from '../model/index';
import { evaluate } from '../polynomial/index';
import { solveBeam } from './solve';
import type { Solution } from './types';

/** A deflection, m, positive up, without and with the shear deformation of the beam; `shear` is what that adds. */
export type ShearShare = { at: number; total: number; bending: number; shear: number };

/**
 * The part of shear deformation in the deflection at x, from two solutions: in an indeterminate beam it changes the
 * redundants too. Null where no segment has a shear stiffness. Fails as `solveBeam` does.
 */
export function shearShare(
  beam: Beam,
  { diagrams }: Pick<Solution, 'diagrams'>,
  at: number,
  redundants?: readonly Redundant[],
): ShearShare | null {
  if (beam.segments.every(({ ga }) => ga === null)) return null;
  const stiff = { ...beam, segments: beam.segments.map((segment) => ({ ...segment, ga: null })) };
  const total = evaluate(diagrams.deflection, at)[0];
  const bending = evaluate(solveBeam(stiff, redundants).diagrams.deflection, at)[0];
  return { at, total, bending, shear: total - bending };
}
