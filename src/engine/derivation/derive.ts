import { checkStep } from './check';
import { compatibilitySteps } from './compatibility';
import { deflectionSteps } from './determinate';
import { nameBeam } from './named-beam';
import { countStep, givenStep } from './opening';
import { coupleMomentSteps, peakStep, reactionSteps, supportMomentSteps } from './reactions';
import { flexibilitySteps, gapSteps, movementsOf } from './redundants';
import type { DerivationStep, DeriveInput } from './types';
import { work } from './values';

/**
 * The worked solution of a beam as data, in the order in which the force method is taught: count and choose, the
 * released beam under the loads, under unit redundants, compatibility, equilibrium, moments, and a check. Of a
 * determinate beam: equilibrium, moments, deflection.
 *
 * Letters are those of the template instance, else numbered ones that the first step explains; supports are A, B, C …
 * from the left. Deflections are positive down and reactions up; kN, m and mm. Closed forms come from the chart register
 * where it covers the released beam, and are shown only where they equal the exact integrals. Fails as solveBeam does.
 */
export function derive(input: DeriveInput): DerivationStep[] {
  const beam = nameBeam(input);
  const worked = work(beam, input.redundants);
  const opening = [countStep(worked)];
  const body = worked.unknowns.length === 0 ? determinate() : indeterminate();
  return [...givenStep(worked), ...opening, ...body];

  function indeterminate(): DerivationStep[] {
    const movements = movementsOf(worked);
    return [
      ...gapSteps(worked, movements),
      ...flexibilitySteps(worked, movements),
      ...compatibilitySteps(worked, movements),
      ...reactionSteps(worked),
      ...supportMomentSteps(worked),
      ...coupleMomentSteps(worked),
      ...peakStep(worked),
      ...checkStep(worked),
    ];
  }

  function determinate(): DerivationStep[] {
    return [
      ...reactionSteps(worked),
      ...supportMomentSteps(worked),
      ...coupleMomentSteps(worked),
      ...peakStep(worked),
      ...deflectionSteps(worked),
    ];
  }
}
