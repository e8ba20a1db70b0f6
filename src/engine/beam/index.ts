export { type ForceMethodParts, forceMethod, releasedBeam } from './force-method';
export { type PreparedBeam, prepareBeam, solveBeam } from './solve';
export { type Span, spansOf } from './spans';
export { stationPositions, stationsAt } from './stations';
export type * from './types';
