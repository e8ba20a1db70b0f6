export { derive } from './derive';
export * from './lettered';
export { type DerivationStep, type DisplayUnit, joinedNumbers, SI_UNITS } from './types';
