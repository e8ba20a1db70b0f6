export { buildFaultSheet, buildSheet } from './build';
export type {
  Cell,
  JudgedRow,
  SheetBlock,
  SheetCaution,
  SheetFigure,
  SheetInput,
} from './types';
