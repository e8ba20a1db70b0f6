export { derive } from './derive';
export * from './lettered';
export { type DerivationStep, joinedNumbers, SI_UNITS } from './types';
