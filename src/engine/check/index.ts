export {
  type Criteria,
  criteriaDocument,
  type DeflectionLimit,
} from './criteria';
export { checkMember } from './member';
export type {
  Arrangement,
  CheckKind,
  CheckRow,
  ElasticSection,
  Finding,
  MemberChecks,
  ServiceArrangement,
} from './types';
