export type { LoadArrangement } from './arrangement';
export { type EnvelopeDocument, type EnvelopeTask, envelopeTask, readEnvelope } from './read';
export { arrangementCount } from './resting';
export { type EnvelopeSolution, type SolvedCase, solveEnvelope } from './solve';
export { type Elementary, superposedEnvelope } from './superposed';
export type * from './types';
export { QUANTITIES } from './types';
