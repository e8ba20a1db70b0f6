import { type Diagrams, type Extremes, prepareBeam, type Reaction } from '../beam/index';
import type { Beam, Load } from '../model/index';
import { extremes } from '../polynomial/index';
import { ContinuousBeam } from './continuous-beam';

/** `by`: what solved it, plain doubles or the 32 digits of engine/beam. */
type FastSolution = { by: 'doubles' | 'wide'; reactions: Reaction[]; diagrams: Diagrams; extremes: Extremes };

type FastBeam = {
  beam: Beam;
  /** As of `prepareBeam`. `check: false` takes the doubles' word for it, in a sweep that checks a sample. */
  solve(loads?: readonly Load[], options?: { movements?: boolean; check?: boolean }): FastSolution;
};

/**
 * The one rule of which solver solves: doubles where the beam is a continuous one and the result proves itself, 32
 * digits everywhere else. Any beam; many load cases of one beam share what does not depend on them.
 */
export function prepareFast(beam: Beam): FastBeam {
  const continuous = new ContinuousBeam();
  const fits = continuous.take(beam);
  let wide: ReturnType<typeof prepareBeam> | null = null;
  return {
    beam,
    solve(loads = beam.loads, { movements = true, check = true } = {}) {
      if (fits) {
        continuous.solve(loads, { movements });
        if (!check || continuous.isProven()) {
          const diagrams = continuous.diagrams();
          return {
            by: 'doubles',
            reactions: continuous.reactions(),
            diagrams,
            extremes: extremesOf(diagrams),
          };
        }
      }
      wide ??= prepareBeam(beam);
      const { reactions, diagrams, extremes: exact } = wide.solve(loads, { movements });
      return { by: 'wide', reactions, diagrams, extremes: exact };
    },
  };
}

const extremesOf = ({ shear, moment, slope, deflection }: Diagrams): Extremes => ({
  shear: extremes(shear),
  moment: extremes(moment),
  slope: extremes(slope),
  deflection: extremes(deflection),
});
