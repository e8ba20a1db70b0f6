export { type ForceMethodParts, forceMethod, releasedBeam } from './force-method';
export { loadsOfGroup, type PreparedBeam, prepareBeam, solveBeam } from './solve';
export { stationPositions, stationsAt } from './stations';
export type { BeamState } from './superpose';
export type * from './types';
