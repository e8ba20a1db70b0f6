export {
  actingCombinations,
  type Combination,
  factoredLoads,
  factorOf,
  type GroupLetters,
} from './combine';
export { cutLoads } from './cut';
export { groupsOf, LOAD_GROUP_NAMES, LOAD_GROUPS, type LoadGroup } from './groups';
export { stillBeam, supportsMove } from './movements';
export { type Region, regionsOf } from './regions';
export {
  type Categories,
  type CombinationSet,
  categoryOf,
  LIMIT_STATES,
  type Pattern,
  REDUCTIONS,
  type Reduction,
  type SetCombination,
  type SetFactor,
  serviceOf,
  strengthOf,
  unknownCategories,
} from './set';
export { type ArrangementNamer, arrangementNamer } from './words';
