export {
  actingCombinations,
  type Combination,
  factoredLoads,
  factorOf,
  type GroupLetters,
} from './combine';
export { cutLoads } from './cut';
export { groupsOf, LOAD_GROUP_NAMES, LOAD_GROUPS } from './groups';
export { stillBeam, supportsMove } from './movements';
export { type Region, regionsOf } from './regions';
export { type ArrangementNamer, arrangementNamer } from './words';
