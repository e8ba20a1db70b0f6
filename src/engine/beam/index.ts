export { type BeamState, type PreparedBeam, prepareBeam, solveBeam } from './solve';
export { stationPositions, stationsAt } from './stations';
export type * from './types';
