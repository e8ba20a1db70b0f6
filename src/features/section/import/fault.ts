import type { Severity } from '@/engine/section';

export type ImportCode =
  | 'empty'
  | 'too_many_rows'
  | 'encoding'
  | 'quotes'
  | 'column_missing'
  | 'column_repeated'
  | 'column_unknown'
  | 'column_unit'
  | 'axis_unresolved'
  | 'unit_missing'
  | 'decimal_mark'
  | 'ragged_row'
  | 'row_shift'
  | 'summary_row'
  | 'repeated_header'
  | 'footnote'
  | 'missing'
  | 'not_a_number'
  | 'not_allowed'
  | 'spreadsheet_damage'
  | 'dangerous_text'
  | 'look_alike'
  | 'geometry'
  | 'implausible'
  | 'duplicate'
  | 'duplicate_differs';

/** What is wrong with a cell, a row or a column. `line` counts the lines of the file from 1; `column` is its heading. */
export type ImportFault = {
  line: number;
  column: string;
  code: ImportCode;
  severity: Severity;
  got: string;
  expected?: string;
  message: string;
};

/** A fault of a line as a whole. */
export const onLine = (
  line: number,
  code: ImportCode,
  severity: Severity,
  message: string,
  got = '',
): ImportFault => ({ line, column: '', code, severity, got, message });

/** Faults of one heading. */
export const onColumn =
  (line: number, heading: string) =>
  (code: ImportCode, severity: Severity, message: string): ImportFault => ({
    ...onLine(line, code, severity, message, heading),
    column: heading,
  });

export const isError = (fault: ImportFault): boolean => fault.severity === 'error';
