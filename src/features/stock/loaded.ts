import type { StockField } from './cells';
import type { StockFile, StockRow } from './file';
import type { StockCheck } from './stock';

export type LineFault = StockCheck['faults'][number];

/** A list on its way in: its rows with what was put right, and what is still wrong with them. */
export interface Loaded {
  readonly name: string;
  readonly file: StockFile;
  readonly rows: readonly StockRow[];
  readonly leftOut: number;
  /** What was found wrong, and the rows as they were then. */
  readonly check: StockCheck;
  readonly checked: readonly StockRow[];
}

/** The row that a fault was found in: rows are sent one to a line, under one line of headings. */
export const checkedRow = ({ checked }: Loaded, { line }: LineFault): StockRow | undefined =>
  checked[line - 2];

/** Rows are other than those that were checked. */
export const isTouched = ({ rows, checked }: Loaded): boolean =>
  rows.length !== checked.length || rows.some((row, at) => row !== checked[at]);

/** With cells of one line put right. */
export const mend = (loaded: Loaded, line: number, texts: Partial<Record<StockField, string>>): Loaded => ({
  ...loaded,
  rows: loaded.rows.map((row) => (row.line === line ? { ...row, texts: { ...row.texts, ...texts } } : row)),
});

/** With what a check found in these rows; lines that were not among them are left out, and what was typed meanwhile stays. */
export function withCheck(loaded: Loaded, checked: readonly StockRow[], check: StockCheck): Loaded {
  const sent = new Set(checked.map(({ line }) => line));
  const rows = loaded.rows.filter(({ line }) => sent.has(line));
  const leftOut = loaded.leftOut + loaded.rows.length - rows.length;
  return { ...loaded, rows, leftOut, check, checked };
}
