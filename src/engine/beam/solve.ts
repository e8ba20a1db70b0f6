import { type Beam, eligibleRedundants, type Load, type Redundant } from '../model/index';
import { extremes, signChanges, withoutBreaks } from '../polynomial/index';
import { solveCompatibility } from './compatibility';
import { flexibilityMatrix, flexibilityOf } from './flexibility';
import { superpose } from './superpose';
import type { Diagrams, Extremes, Solution } from './types';

/** A beam with everything that does not depend on its loads already done. */
export type PreparedBeam = {
  beam: Beam;
  /**
   * The beam under the loads, all of its own unless given. They may be any of the beam's loads, factored or not.
   * `movements: false` leaves the supports where they are, for superposition.
   */
  solve(loads?: readonly Load[], options?: { movements?: boolean }): Solution;
};

/** Solves many load cases of one beam with one flexibility matrix. Fails as `solveBeam` does. */
export function prepareBeam(beam: Beam, redundants?: readonly Redundant[]): PreparedBeam {
  const flexibility = flexibilityOf(beam, redundants);
  const matrix = flexibilityMatrix(flexibility.rows);
  const eligible = eligibleRedundants(beam);
  return {
    beam,
    solve(loads = beam.loads, { movements = true } = {}) {
      const solving = solveCompatibility(flexibility, loads, movements);
      const { reactions, diagrams: cut } = superpose(flexibility, solving);
      const diagrams = mended(cut, flexibility.mesh.cuts);
      return {
        degree: beam.degree,
        reactions,
        diagrams,
        extremes: extremesOf(diagrams),
        contraflexure: signChanges(diagrams.moment),
        forceMethod: {
          redundants: [...flexibility.redundants],
          eligible: [...eligible],
          flexibility: matrix.map((row) => [...row]),
          gaps: solving.gaps.map((value) => value.rounded()),
          imposed: solving.imposed.map((value) => value.rounded()),
          values: solving.values.map((value) => value.rounded()),
        },
      };
    },
  };
}

/**
 * The beam by the force method: released beam, unit states, F·X + Δ₀ = Δ_imposed, superposition, exact diagrams.
 *
 * Any admissible redundants give the same answer, since all of it is carried with twice the usual digits and rounded
 * once. Units and signs: the engine's. Fails with SingularMatrix where the redundants repeat one another to within
 * those digits; `checkRedundants` refuses before that what leaves a mechanism.
 */
export function solveBeam(beam: Beam, redundants?: readonly Redundant[]): Solution {
  return prepareBeam(beam, redundants).solve();
}

/** The release of a moment within a span is closed again: no break is left there. */
const mended = ({ shear, moment, slope, deflection }: Diagrams, cuts: readonly number[]): Diagrams => ({
  shear: withoutBreaks(shear, cuts),
  moment: withoutBreaks(moment, cuts),
  slope: withoutBreaks(slope, cuts),
  deflection: withoutBreaks(deflection, cuts),
});

function extremesOf({ shear, moment, slope, deflection }: Diagrams): Extremes {
  return {
    shear: extremes(shear),
    moment: extremes(moment),
    slope: extremes(slope),
    deflection: extremes(deflection),
  };
}

/** The loads of one group; those without a group are no group's. */
export const loadsOfGroup = ({ loads }: Pick<Beam, 'loads'>, group: string): Load[] =>
  loads.filter((load) => load.group === group);
