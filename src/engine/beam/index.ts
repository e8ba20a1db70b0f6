export { AXIAL_LIMIT, axialScope } from './axial';
export { type Datum, deflectionFrom, isOverhang } from './datum';
export { type ForceMethodParts, forceMethod, releasedBeam } from './force-method';
export { shearShare } from './shear-share';
export { type PreparedBeam, prepareBeam, solveBeam } from './solve';
export { stationPositions, stationsAt } from './stations';
export { tipParts } from './tip';
export type * from './types';
export { zeroShear } from './zero-shear';
