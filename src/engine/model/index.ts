export { type LetteredSupport, letteredSupports, supportLetter } from './letters';
export { describeMotion, releaseMechanism } from './motion';
export { readBeam } from './read';
export { COINCIDENT } from './reader';
export {
  admissibleSets,
  checkRedundants,
  defaultRedundants,
  eligibleRedundants,
  placeRedundant,
} from './redundants';
export { type Span, spansOf } from './spans';
export { findMotion, frameOf, type MovingPart, riseOf } from './stability';
export * from './types';
export { metres, nameRedundant, nameSupport } from './words';
