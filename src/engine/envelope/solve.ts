import { type PreparedBeam, prepareBeam, type Solution } from '../beam/index';
import { stillBeam } from '../combination/index';
import type { Beam, Fault, Reading } from '../model/index';
import { arrangementLoads, governingArrangements, type LoadArrangement } from './arrangement';
import { ContactBeam, type Resting } from './contact';
import type { EnvelopeTask } from './read';
import { restingEnvelope } from './resting';
import { groupReactions, superposedEnvelope, valuesOf } from './superposed';
import type { Envelope } from './types';

/** A beam with the loads that it was solved for, and the solution: what a proof asks for. */
export type SolvedCase = { readonly beam: Beam; readonly solution: Solution };

export type EnvelopeSolution = {
  readonly envelope: Envelope;
  /** What the envelope stands on. */
  readonly solved: readonly SolvedCase[];
  /** Every arrangement that governs anything, and all of them solved, each as one beam. */
  readonly governing: readonly LoadArrangement[];
  arrangements(): (LoadArrangement & SolvedCase & { readonly lifted: number[] })[];
};

/**
 * The envelope over all combinations and patterns at the positions, in its extremes and in the reactions: superposed,
 * or, where supports cannot pull, solved anew for every arrangement. Faults: an arrangement that lifts the beam away.
 * Fails with SingularMatrix as `prepareBeam` does.
 */
export function solveEnvelope(task: EnvelopeTask, positions: readonly number[]): Reading<EnvelopeSolution> {
  const { beam, redundants, sources, cases, liftOff } = task;
  const prepared = prepareBeam(beam, redundants);
  const solved = sources.map(({ group, loads }) => solveSource(prepared, loads, group === null));
  const elementary = solved.map(({ solution }) => solution);
  if (liftOff.length === 0) {
    const envelope = superposedEnvelope(sources, elementary, cases, positions);
    const governing = governingArrangements(task, envelope);
    const arrangements = () =>
      governing.map((of) => ({ ...of, ...solveArrangement(prepared, task, of), lifted: [] }));
    return { ok: true, value: { envelope, solved, governing, arrangements } };
  }
  const contact = new ContactBeam(beam, liftOff, redundants);
  const groups = beam.supports.map((_, support) =>
    groupReactions(
      sources,
      valuesOf(elementary, support, 'vertical'),
      valuesOf(elementary, support, 'moment'),
    ),
  );
  const found = restingEnvelope(task, contact, positions, groups);
  if (!found.ok) return { ok: false, faults: [liftOffFault(task, found)] };
  const { envelope } = found;
  const governing = governingArrangements(task, envelope);
  const arrangements = governing.map((of) => ({ ...of, ...rested(contact, task, of) }));
  return {
    ok: true,
    value: { envelope, solved: [...solved, ...arrangements], governing, arrangements: () => arrangements },
  };
}

/** One source unfactored; the supports move only where they are the source. */
function solveSource(prepared: PreparedBeam, loads: Beam['loads'], movements: boolean): SolvedCase {
  const { beam } = prepared;
  return {
    beam: { ...(movements ? beam : stillBeam(beam)), loads },
    solution: prepared.solve(loads, { movements }),
  };
}

function solveArrangement(prepared: PreparedBeam, task: EnvelopeTask, of: LoadArrangement): SolvedCase {
  const loads = arrangementLoads(task, of);
  return { beam: { ...prepared.beam, loads }, solution: prepared.solve(loads) };
}

function rested(contact: ContactBeam, task: EnvelopeTask, of: LoadArrangement): Resting {
  const outcome = contact.solve(arrangementLoads(task, of));
  if (!outcome.ok) throw new RangeError(`the arrangement ${JSON.stringify(of)} rested before`);
  return outcome.value;
}

function liftOffFault(
  { cases }: EnvelopeTask,
  { arrangement: { combination, pattern }, message }: { arrangement: LoadArrangement; message: string },
): Fault {
  const index = cases.combinations.findIndex(({ name }) => name === combination);
  const spans = pattern.length === 0 ? '' : `, with the pattern [${pattern.join(', ')}]`;
  return {
    path: ['combinations', index],
    code: 'unstable',
    message: `Under combination ${combination}${spans}, the beam does not stay on its supports. ${message} Hold it down there, or leave lift_off out.`,
  };
}
