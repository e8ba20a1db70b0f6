export { arrangementLoads } from './arrangement';
export { type EnvelopeDocument, type EnvelopeTask, envelopeTask, readEnvelope } from './read';
export { arrangementCount } from './resting';
export { type EnvelopeSolution, type SolvedCase, solveEnvelope, solveSources } from './solve';
export type { Source } from './sources';
export { SuperposedBeam } from './superposed';
export type * from './types';
export { QUANTITIES } from './types';
