import { type Proof, type Solution, solveBeam, stationPositions, stationsAt } from '@/engine/beam/index';
import { SingularMatrix } from '@/engine/linear/index';
import {
  type Beam,
  type BeamDocument,
  checkRedundants,
  type Fault,
  nameRedundant,
  type Reading,
  type Redundant,
  readBeam,
} from '@/engine/model/index';
import { isProven, proofLimit, proveSolution } from '@/engine/proof/index';
import { SingularStiffness } from '@/engine/stiffness/index';
import type { SolveAnswer } from './answer';

export type SolvedBeam = { beam: Beam; solution: Solution; proof: Proof };

/**
 * The beam of a document, solved and proven, or every fault at its path in the document. A result that its proof does
 * not bear out is a fault and not a result. Runs in the browser as well: it needs no schema.
 */
export function solveProven(document: BeamDocument): Reading<SolvedBeam> {
  const beam = readBeam(document);
  if (!beam.ok) return beam;
  const { redundants } = document;
  const faults = redundants ? checkRedundants(beam.value, redundants) : [];
  return faults.length > 0 ? { ok: false, faults } : prove(beam.value, redundants);
}

/** The answer of POST /api/v1/beams/solve. */
export const toSolveAnswer = (
  { beam, solution, proof }: SolvedBeam,
  stations?: BeamDocument['stations'],
): SolveAnswer => ({
  degree: solution.degree,
  reactions: solution.reactions,
  stations: stationsAt(solution, stationPositions(beam, stations)),
  extremes: solution.extremes,
  contraflexure: solution.contraflexure,
  force_method: forceMethodOf(solution),
  proof,
});

function prove(beam: Beam, redundants: readonly Redundant[] | undefined): Reading<SolvedBeam> {
  try {
    const solution = solveBeam(beam, redundants);
    const proof = proveSolution(beam, solution);
    if (isProven(proof, beam)) return { ok: true, value: { beam, solution, proof } };
    const largest = Math.max(proof.equilibrium, proof.compatibility, proof.agreement);
    return unproven(`Its proof is off by ${largest.toPrecision(2)}, more than ${proofLimit(beam)}.`);
  } catch (error) {
    return unsolvable(error, beam, redundants);
  }
}

/** What a system of equations that cannot be solved means for the person; any other error is thrown on. */
export function unsolvable(
  error: unknown,
  beam: Beam,
  redundants: readonly Redundant[] | undefined,
): { ok: false; faults: Fault[] } {
  if (error instanceof SingularMatrix && redundants?.[error.row]) {
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

/** Points or stiffnesses too far apart in size are all that is known to bring this about. */
export function unproven(why: string): { ok: false; faults: Fault[] } {
  const message = `There is no result that can be trusted. ${why} Look for points that almost coincide, and for stiffnesses that are far apart.`;
  return { ok: false, faults: [{ path: [], code: 'unproven', message }] };
}

function forceMethodOf({ forceMethod }: Solution): SolveAnswer['force_method'] {
  const { redundants, eligible, flexibility, gaps, values } = forceMethod;
  return { redundants, eligible, flexibility, gaps, values };
}
