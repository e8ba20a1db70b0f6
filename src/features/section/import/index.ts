export { applyFix } from './fix';
export { type Changes, identityFindings } from './identity';
export { answer, openQuestions, remember } from './mapping';
export { readSectionTable, type SectionTableReading } from './read';
export { recognise } from './recognise';
export { addFindings, emptyReport, mayAccept, openCount, reportOf } from './report';
export { RowCheck } from './row-check';
export { RULES } from './rules';
export { Survey } from './survey';
