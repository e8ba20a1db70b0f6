import { ContinuousBeam } from '@/engine/continuous/index';
import { fastSolver, type SolveMoved, solveWide } from '@/engine/influence/index';
import type { Beam, Reading } from '@/engine/model/index';
import { pointsOf } from '@/engine/stiffness/index';

/** What a request may cost, and up to where 32 digits are worth their time; each about 0.4 ms. */
const MOST = 2500;
const LITTLE = 100;
/** Degree whose equations take as long as all the rest of a line, squared. */
const DENSE = 6000;

/**
 * What solves so many influence lines of a beam: 32 digits where that takes little, doubles for more; or why it takes
 * too long, as with hundreds of supports and hinges.
 */
export function lineSolver(beam: Beam, lines = 1): Reading<SolveMoved> {
  const unloaded = { ...beam, loads: [] };
  const points = pointsOf(unloaded).length;
  const cost = lines * points * (1 + beam.degree ** 2 / DENSE);
  if (cost <= LITTLE) return { ok: true, value: solveWide };
  const solve = cost <= MOST;
  if (solve || new ContinuousBeam().take(unloaded)) {
    return { ok: true, value: fastSolver({ prove: lines * points <= MOST, solve }) };
  }
  const message =
    'A beam with hinges or guided supports and so many supports takes too long here. Leave out supports far from what you ask for.';
  return { ok: false, faults: [{ path: ['supports'], code: 'out_of_range', message }] };
}
