import type { Severity } from '@/engine/section';
import type { Cause, Finding, Fix, RuleNumber } from './contract';

export type FindingParts = {
  rule: RuleNumber;
  severity: Severity;
  cause: Cause;
  message: string;
  line?: number;
  designation?: string;
  column?: number;
  heading?: string;
  read?: string;
  expected?: string | null;
  formula?: string | null;
  fixes?: Fix[];
};

const LONGEST = 120; // characters of a cell that are shown

/** A finding with its keys; what is left out does not apply. */
export function findingOf(parts: FindingParts): Finding {
  const { rule, severity, cause, message, line = null, column = null } = parts;
  const group = `${rule}|${cause}|${column ?? ''}`;
  return {
    key: `${group}|${line ?? ''}`,
    group,
    rule,
    severity,
    cause,
    line,
    designation: parts.designation ?? '',
    column,
    heading: parts.heading ?? '',
    read: (parts.read ?? '').slice(0, LONGEST),
    expected: parts.expected ?? null,
    formula: parts.formula ?? null,
    message,
    fixes: parts.fixes ?? [],
  };
}

export const isError = (finding: Pick<Finding, 'severity'>): boolean => finding.severity === 'error';

export const dropRow = (line: number): Fix => ({
  label: 'Leave out the row',
  reach: 'row',
  edit: { kind: 'drop_row', line },
});

export const setCell = (line: number, column: number, value: string): Fix => ({
  label: `Read as ${value}`,
  reach: 'cell',
  edit: { kind: 'set_cell', line, column, value },
});
