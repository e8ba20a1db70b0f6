import { type Proof, solveBeam } from '../beam/index';
import type { Beam, Redundant } from '../model/index';
import type { Piecewise } from '../polynomial/index';
import { proveSolution } from '../proof/index';

/** The deflection of a beam whose supports are moved as prescribed, with its proof. */
export type SolveMoved = (
  beam: Beam,
  redundants?: readonly Redundant[],
) => { deflection: Piecewise; proof: Proof };

/** In 32 digits. Fails as `solveBeam` and `proveSolution` do. */
export const solveWide: SolveMoved = (beam, redundants) => {
  const solution = solveBeam(beam, redundants);
  return { deflection: solution.diagrams.deflection, proof: proveSolution(beam, solution) };
};
