export { firstFrequency } from './frequency';
export { joinMasses, massOfLoads, readMasses, totalMass } from './masses';
export { vibratingBeam } from './piece';
export type { Prepare } from './sag';
export type * from './types';
