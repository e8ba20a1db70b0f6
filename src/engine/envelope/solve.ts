import { type PreparedBeam, prepareBeam, type Solution } from '../beam/index';
import { stillBeam } from '../combination/index';
import type { Beam, Fault, Reading } from '../model/index';
import { arrangementLoads, governingArrangements, type LoadArrangement } from './arrangement';
import { ContactBeam, type Resting } from './contact';
import { SourceReactions } from './reactions';
import type { EnvelopeTask } from './read';
import { restingEnvelope } from './resting';
import type { Source } from './sources';
import { SuperposedBeam } from './superposed';
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
  const { beam, redundants, sources, combinations, liftOff } = task;
  const prepared = prepareBeam(beam, redundants);
  const solved = solveSources(prepared, sources);
  const elementary = solved.map(({ solution }) => solution);
  if (liftOff.length === 0) {
    const envelope = new SuperposedBeam(sources, elementary).envelope(combinations, positions);
    const governing = governingArrangements(task, envelope);
    const arrangements = () =>
      governing.map((of) => ({ ...of, ...solveArrangement(prepared, task, of), lifted: [] }));
    return { ok: true, value: { envelope, solved, governing, arrangements } };
  }
  const contact = new ContactBeam(beam, liftOff, redundants);
  const found = restingEnvelope(task, contact, positions, new SourceReactions(sources, elementary).groups);
  if (!found.ok) return { ok: false, faults: [liftOffFault(task, found)] };
  const { envelope } = found;
  const governing = governingArrangements(task, envelope);
  const arrangements = governing.map((of) => ({ ...of, ...rested(contact, task, of) }));
  return {
    ok: true,
    value: { envelope, solved: [...solved, ...arrangements], governing, arrangements: () => arrangements },
  };
}

/** Each source by itself, unfactored; the supports move only where they are the source. */
export const solveSources = (prepared: PreparedBeam, sources: readonly Source[]): SolvedCase[] =>
  sources.map(({ group, loads }) => {
    const movements = group === null;
    const { beam } = prepared;
    return {
      beam: { ...(movements ? beam : stillBeam(beam)), loads },
      solution: prepared.solve(loads, { movements }),
    };
  });

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
  { combinations }: EnvelopeTask,
  { arrangement: { combination, pattern }, message }: { arrangement: LoadArrangement; message: string },
): Fault {
  const index = combinations.findIndex(({ name }) => name === combination);
  const spans = pattern.length === 0 ? '' : `, with the pattern [${pattern.join(', ')}]`;
  return {
    path: ['combinations', index],
    code: 'unstable',
    message: `Under combination ${combination}${spans}, the beam does not stay on its supports. ${message} Hold it down there, or leave lift_off out.`,
  };
}
