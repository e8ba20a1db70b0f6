export { derive } from './derive';
export type { DerivationStep, DisplayUnit } from './types';
