export { firstFrequency } from './frequency';
export { joinMasses, massOfLoads, readMasses, totalMass } from './masses';
export type * from './types';
