export { type ForceMethodParts, forceMethod, releasedBeam } from './force-method';
export { prepareBeam, solveBeam } from './solve';
export { stationPositions, stationsAt } from './stations';
export type * from './types';
