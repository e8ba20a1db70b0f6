export { buildFaultSheet, buildSheet } from './build';
export type {
  Cell,
  JudgedRow,
  SheetBlock,
  SheetCaution,
  SheetColumn,
  SheetFigure,
  SheetInput,
  SheetResult,
  SheetRow,
} from './types';
