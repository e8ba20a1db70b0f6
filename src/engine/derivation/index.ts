export { derive } from './derive';
export { type DerivationStep, type DisplayUnit, SI_UNITS } from './types';
