import type { Fault as ModelFault } from '@/engine/model/index';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { read } from '@/lib/read';
import type { SolveAnswer } from './answer';
import { type SolveRequest, solveRequest } from './request';
import { solveProven, toSolveAnswer } from './solve';

export { solveAnswer } from './answer';
export { LIMITS, type SolveRequest, solveRequest } from './request';

export type SolveOutcome = { ok: true; answer: SolveAnswer } | { ok: false; errors: Fault[] };

/** The beam in the body, solved and proven, or everything that keeps it from being so. Errors are never empty. */
export function answerSolve(body: unknown): SolveOutcome {
  const request = read(solveRequest, body);
  return request.ok ? solveDocument(request.value) : { ok: false, errors: request.faults };
}

/** The same of a body that its schema has read. */
export function solveDocument(request: SolveRequest): SolveOutcome {
  const solved = solveProven(request);
  return solved.ok
    ? { ok: true, answer: toSolveAnswer(solved.value, request.stations) }
    : refused(solved.faults);
}

function refused(faults: readonly ModelFault[]): SolveOutcome {
  const errors = faults.map(({ path, code, message }) => ({ pointer: pointer(path), code, message }));
  return { ok: false, errors };
}
