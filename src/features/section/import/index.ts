export { applyFix } from './fix';
export { identityFindings } from './identity';
export { answer, openQuestions, remember } from './mapping';
export { readSectionTable } from './read';
export { recognise } from './recognise';
export { addFindings, emptyReport, mayAccept, openCount, reportOf } from './report';
export { RowCheck } from './row-check';
export { RULES } from './rules';
export { Survey } from './survey';
