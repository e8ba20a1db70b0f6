export { defaultRedundants, MOST_REACHING } from './default-redundants';
export { type LetteredSupport, letteredSupports, supportLetter } from './letters';
export { describeMotion, releaseMechanism } from './motion';
export { readBeam } from './read';
export { COINCIDENT } from './reader';
export {
  admissibleSets,
  checkRedundants,
  eligibleRedundants,
  placeRedundant,
} from './redundants';
export { type Span, spansOf } from './spans';
export { type Frame, findMotion, frameOf, type MovingPart, placeOf, riseOf, without } from './stability';
export * from './types';
export { metres, nameRedundant, nameSupport } from './words';
