import type { Proof } from '../beam/index';
import { ContinuousBeam } from '../continuous/index';
import { isProven, proveSolution } from '../proof/index';
import { type SolveMoved, solveWide } from './solver';

/** What may be done in 32 digits where doubles do not do. */
type Wide = { readonly prove: boolean; readonly solve: boolean };

/**
 * In plain doubles where the beam is a continuous one and the result is proven, by doubles or else, as where points lie
 * close together, by stiffness in 32 digits; solved in 32 digits elsewhere. For lines by the dozen, and beams of hundreds
 * of supports: where such would take too long in 32 digits, what doubles do not prove is answered with the proof that
 * it failed. Whatever the redundants, the line is the same. All that one solver solves shares its memory.
 */
export function fastSolver(wide: Wide = { prove: true, solve: true }): SolveMoved {
  const continuous = new ContinuousBeam();
  return (beam, redundants) => {
    if (!continuous.take(beam)) return solveWide(beam, redundants);
    continuous.solve();
    const { equilibrium, compatibility, agreement } = continuous.prove();
    const plain: Proof = { equilibrium, compatibility, agreement, method: 'direct stiffness' };
    const diagrams = continuous.diagrams();
    const isEnough = isProven(plain, beam) || !wide.prove;
    const proof = isEnough ? plain : proveSolution(beam, { diagrams, reactions: continuous.reactions() });
    return wide.solve && !isProven(proof, beam)
      ? solveWide(beam, redundants)
      : { deflection: diagrams.deflection, proof };
  };
}
