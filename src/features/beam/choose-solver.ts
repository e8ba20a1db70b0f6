import { ContinuousBeam } from '@/engine/continuous/index';
import { fastSolver, type SolveMoved, solveWide } from '@/engine/influence/index';
import { type Beam, MOST_REACHING, type Reading } from '@/engine/model/index';
import { pointsOf } from '@/engine/stiffness/index';

/** What a request may cost, and up to where 32 digits are worth their time; each about 0.4 ms. */
const MOST = 2500;
const LITTLE = 100;
/** Redundants that reach over the beam, whose equations take as long as all the rest of a solution, squared. */
const DENSE = 6000;

/**
 * What solves so many influence lines of a beam: 32 digits where that takes little, doubles for more; or why it takes
 * too long, as with the many lines of hundreds of supports and hinges.
 */
export function lineSolver(beam: Beam, lines = 1): Reading<SolveMoved> {
  const { points, cost } = workOf(beam, lines);
  if (cost <= LITTLE) return { ok: true, value: solveWide };
  const solve = cost <= MOST;
  if (!solve && !isContinuous(beam)) return tooLong;
  return { ok: true, value: fastSolver({ prove: lines * points <= MOST, solve }) };
}

/** The points of the beam, and what its solutions in 32 digits cost: the points, and the equations of its redundants. */
function workOf(beam: Beam, solutions: number): { points: number; cost: number } {
  const points = pointsOf(unloaded(beam)).length;
  const reaching = beam.degree > MOST_REACHING ? 0 : beam.degree;
  return { points, cost: solutions * points * (1 + reaching ** 2 / DENSE) };
}

const unloaded = (beam: Beam): Beam => ({ ...beam, loads: [] });

const isContinuous = (beam: Beam): boolean => new ContinuousBeam().take(unloaded(beam));

const message =
  'A beam with hinges or guided supports and so many supports takes too long here. Leave out supports far from what you ask for.';
const tooLong: Reading<never> = {
  ok: false,
  faults: [{ path: ['supports'], code: 'out_of_range', message }],
};
