export { readSectionTable, type SectionTableReading } from './read';
