export { ContinuousBeam, continuousBeam, type FastExtremes } from './continuous-beam';
export type { Range } from './extremes';
export { type FastBeam, type FastSolution, prepareFast, type SolvedBy } from './fast';
export type { Side, StationValues } from './stations';
