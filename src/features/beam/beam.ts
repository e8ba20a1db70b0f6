import { type Proof, type Solution, solveBeam, stationPositions, stationsAt } from '@/engine/beam/index';
import { SingularMatrix } from '@/engine/linear/index';
import {
  type Beam,
  checkRedundants,
  type Fault as ModelFault,
  nameRedundant,
  type Reading,
  type Redundant,
  readBeam,
} from '@/engine/model/index';
import { isProven, proofLimit, proveSolution } from '@/engine/proof/index';
import { SingularStiffness } from '@/engine/stiffness/index';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { read } from '@/lib/read';
import type { SolveAnswer } from './answer';
import { type SolveRequest, solveRequest } from './request';

export { type SolveAnswer, solveAnswer } from './answer';
export { LIMITS, type SolveRequest, solveRequest } from './request';

export type SolveOutcome = { ok: true; answer: SolveAnswer } | { ok: false; errors: Fault[] };

/** The beam in the body, solved and proven, or everything that keeps it from being so. Errors are never empty. */
export function answerSolve(body: unknown): SolveOutcome {
  const request = read(solveRequest, body);
  return request.ok ? solveDocument(request.value) : { ok: false, errors: request.faults };
}

/** The same of a body that its schema has read. */
export function solveDocument(request: SolveRequest): SolveOutcome {
  const beam = readBeam(request);
  if (!beam.ok) return refused(beam.faults);
  const { redundants, stations } = request;
  const faults = redundants ? checkRedundants(beam.value, redundants) : [];
  if (faults.length > 0) return refused(faults);
  const proven = solveProven(beam.value, redundants);
  if (!proven.ok) return refused(proven.faults);
  const { solution, proof } = proven.value;
  return {
    ok: true,
    answer: {
      degree: solution.degree,
      reactions: solution.reactions,
      stations: stationsAt(solution, stationPositions(beam.value, stations)),
      extremes: solution.extremes,
      contraflexure: solution.contraflexure,
      force_method: forceMethodOf(solution),
      proof,
    },
  };
}

function refused(faults: readonly ModelFault[]): SolveOutcome {
  const errors = faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message }));
  return { ok: false, errors };
}

/** A result that its proof does not bear out is a fault and not a result. */
function solveProven(
  beam: Beam,
  redundants: readonly Redundant[] | undefined,
): Reading<{ solution: Solution; proof: Proof }> {
  try {
    const solution = solveBeam(beam, redundants);
    const proof = proveSolution(beam, solution);
    if (isProven(proof, beam)) return { ok: true, value: { solution, proof } };
    const largest = Math.max(proof.equilibrium, proof.compatibility, proof.agreement);
    return unproven(`Its proof is off by ${largest.toPrecision(2)}, more than ${proofLimit(beam)}.`);
  } catch (error) {
    if (error instanceof SingularMatrix && redundants) {
      const name = nameRedundant(beam, redundants[error.row]!);
      const message = `Among these redundants, ${name} repeats the others to within rounding. Choose another set.`;
      const path = ['redundants', error.row];
      return { ok: false, faults: [{ path, code: 'inadmissible_redundants', message }] };
    }
    if (error instanceof SingularMatrix || error instanceof SingularStiffness) {
      return unproven('It is beyond the digits that are carried.');
    }
    throw error;
  }
}

/** Points or stiffnesses too far apart in size are all that is known to bring this about. */
function unproven(why: string): { ok: false; faults: ModelFault[] } {
  const message = `There is no result that can be trusted. ${why} Look for points that almost coincide, and for stiffnesses that are far apart.`;
  return { ok: false, faults: [{ path: [], code: 'unproven', message }] };
}

function forceMethodOf({ forceMethod }: Solution): SolveAnswer['force_method'] {
  const { redundants, eligible, flexibility, gaps, values } = forceMethod;
  return { redundants, eligible, flexibility, gaps, values };
}
