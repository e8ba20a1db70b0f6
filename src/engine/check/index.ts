export type { Pattern } from '../combination/index';
export {
  type Criteria,
  type CriteriaDocument,
  type CriteriaOfSet,
  criteriaDocument,
  criteriaOfSet,
  type DeflectionLimit,
  LIMIT_NAMES,
  resolveCriteria,
  unfitting,
} from './criteria';
export { deflectionId } from './deflection';
export { checkMember } from './member';
export type {
  CheckKind,
  CheckRow,
  ElasticSection,
  Finding,
  MemberChecks,
} from './types';
