import { stationPositions } from '@/engine/beam/index';
import {
  arrangementCount,
  type EnvelopeSolution,
  type EnvelopeTask,
  readEnvelope,
  solveEnvelope,
} from '@/engine/envelope/index';
import type { Fault as ModelFault, Reading } from '@/engine/model/index';
import { isProven, proveSolution } from '@/engine/proof/index';
import { pointsOf } from '@/engine/stiffness/index';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { read } from '@/lib/read';
import type { EnvelopeAnswer } from './envelope-answer';
import { type EnvelopeRequest, envelopeRequest } from './envelope-request';
import { toSolveAnswer, unproven, unsolvable } from './solve';

export { envelopeAnswer } from './envelope-answer';
export { envelopeRequest } from './envelope-request';

/**
 * Beyond these a request would keep others waiting: cases times the points of the beam, of load cases to be added up and
 * of arrangements to be solved anew, and stations of whole arrangements.
 */
const MOST_WORK = { added: 25_000, anew: 12_000 } as const;
const MOST_STATIONS = 50_000;

export type EnvelopeOutcome = { ok: true; answer: EnvelopeAnswer } | { ok: false; errors: Fault[] };

/** The envelope of the beam in the body, its parts proven, or everything that keeps it from being so. */
export function answerEnvelope(body: unknown): EnvelopeOutcome {
  const request = read(envelopeRequest, body);
  return request.ok ? envelopeDocument(request.value) : { ok: false, errors: request.faults };
}

/** The same of a body that its schema has read. */
export function envelopeDocument(request: EnvelopeRequest): EnvelopeOutcome {
  const answer = answerOf(request);
  if (answer.ok) return { ok: true, answer: answer.value };
  const errors = answer.faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message }));
  return { ok: false, errors };
}

function answerOf(request: EnvelopeRequest): Reading<EnvelopeAnswer> {
  const task = readEnvelope(request);
  if (!task.ok) return task;
  const tooMuch = workFault(task.value);
  if (tooMuch) return { ok: false, faults: [tooMuch] };
  const positions = stationPositions(task.value.beam, request.stations);
  try {
    const solved = solveEnvelope(task.value, positions);
    if (!solved.ok) return solved;
    if (!isSound(solved.value)) return unproven('Its proof is off by more than it may be.');
    const { envelope } = solved.value;
    if (!request.arrangements) return { ok: true, value: envelope };
    const arrangements = arrangementAnswers(task.value, solved.value, positions);
    return arrangements.ok
      ? { ok: true, value: { ...envelope, arrangements: arrangements.value } }
      : arrangements;
  } catch (error) {
    return unsolvable(error, task.value.beam, task.value.redundants);
  }
}

const isSound = ({ solved }: EnvelopeSolution): boolean =>
  solved.every(({ beam, solution }) => isProven(proveSolution(beam, solution), beam));

function workFault(task: EnvelopeTask): ModelFault | undefined {
  const points = pointsOf(task.beam).length;
  const isAnew = task.liftOff.length > 0;
  const cases = task.sources.length + (isAnew ? arrangementCount(task) : 0);
  const most = Math.floor(MOST_WORK[isAnew ? 'anew' : 'added'] / points);
  if (cases <= most) return undefined;
  const why = isAnew
    ? `With supports that cannot pull, these combinations and patterns are ${cases} cases to solve one by one`
    : `These groups and pattern spans are ${cases} cases to solve`;
  const message = `${why}; at most ${most} are possible for a beam of ${points} points. Pattern fewer groups, or leave out combinations, spans or loads.`;
  return { path: ['combinations'], code: 'out_of_range', message };
}

function arrangementAnswers(
  task: EnvelopeTask,
  solved: EnvelopeSolution,
  positions: readonly number[],
): Reading<NonNullable<EnvelopeAnswer['arrangements']>> {
  const count = solved.governing.length;
  const points = pointsOf(task.beam).length;
  if (count * points > MOST_WORK.anew || count * positions.length > MOST_STATIONS) {
    const message = `${count} arrangements govern something, too many to answer whole. Ask for fewer stations, or leave arrangements out.`;
    return { ok: false, faults: [{ path: ['arrangements'], code: 'out_of_range', message }] };
  }
  const answers = solved.arrangements().map(({ combination, pattern, lifted, beam, solution }) => {
    const proof = proveSolution(beam, solution);
    const whole = toSolveAnswer({ beam, solution, proof }, [...positions]);
    const off = task.liftOff.length > 0 ? { lifted } : {};
    return {
      proven: isProven(proof, beam),
      answer: { combination, pattern: [...pattern], ...off, ...whole },
    };
  });
  return answers.every(({ proven }) => proven)
    ? { ok: true, value: answers.map(({ answer }) => answer) }
    : unproven('The proof of an arrangement is off by more than it may be.');
}
