export {
  type Criteria,
  criteriaDocument,
  type DeflectionLimit,
  type Pattern,
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
