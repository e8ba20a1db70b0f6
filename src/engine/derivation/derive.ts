import { checkStep } from './check';
import { flexibilitySteps, gapSteps } from './coefficients';
import { compatibilitySteps, FEW } from './compatibility';
import { deflectionSteps } from './deflection';
import { type Movements, movementsOf } from './movements';
import { nameBeam } from './named-beam';
import { countStep, givenStep, releasedStep } from './opening';
import { peakSteps } from './peak';
import { coupleMomentSteps, reactionSteps, supportMomentSteps } from './reactions';
import { threeMomentSteps } from './three-moments';
import type { DerivationStep, DeriveInput } from './types';
import { type Worked, work } from './values';

/**
 * The worked solution of a beam as data, in the order in which the force method is taught: count and choose, the
 * released beam under the loads, under unit redundants, compatibility, equilibrium, moments, deflection, and a check. Of
 * a determinate beam: equilibrium, moments, deflection.
 *
 * Letters are those of the template instance, else numbered ones that the first step explains; supports are A, B, C …
 * from the left. Deflections are positive down and reactions up. Closed forms come from the chart register where it
 * covers the released beam, and are shown only where they equal the exact integrals. Fails as solveBeam does.
 */
export function derive(input: DeriveInput): DerivationStep[] {
  const beam = nameBeam(input);
  const worked = work(beam, input.redundants);

  const redundants = worked.unknowns.length === 0 ? [] : redundantSteps(worked);
  const rest = [
    ...reactionSteps(worked),
    ...supportMomentSteps(worked),
    ...coupleMomentSteps(worked),
    ...peakSteps(worked),
    ...deflectionSteps(worked),
    ...checkStep(worked),
  ];
  return [...givenStep(worked), countStep(worked), ...redundants, ...rest];
}

function redundantSteps(worked: Worked): DerivationStep[] {
  const movements = movementsOf(worked);
  const { pieces } = movements;
  const steps = threeMomentSteps(worked, pieces) ?? compatible(worked, movements);
  return [releasedStep(worked, pieces), ...steps];
}

function compatible(worked: Worked, movements: Movements): DerivationStep[] {
  const isFew = worked.unknowns.length <= FEW;
  const coefficients = isFew ? [...gapSteps(worked, movements), ...flexibilitySteps(worked, movements)] : [];
  return [...coefficients, ...compatibilitySteps(worked, movements)];
}
