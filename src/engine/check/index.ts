export { actingCombinations, factoredLoads } from './combine';
export {
  type Combination,
  type Criteria,
  criteriaDocument,
  type DeflectionLimit,
  LOAD_GROUP_NAMES,
  LOAD_GROUPS,
} from './criteria';
export { checkMember } from './member';
export { regionsOf } from './regions';
export type {
  Arrangement,
  CheckKind,
  CheckRow,
  ElasticSection,
  Finding,
  MemberChecks,
  ServiceArrangement,
} from './types';
