import type { FileIdentity, Finding } from './contract';
import { findingOf } from './finding';

/** Rows that the file adds to, changes in and takes from the edition before. */
type Changes = { changed: number; removed: number; of: number };

const MANY = 0.05;
/** Of a fingerprint's 64 digits; the report has them all. */
const SHOWN = 16;

/**
 * Rule 40: what the file is against the last one of its table. The same bytes bring nothing new; where more than one row
 * in twenty has changed, a librarian is to look. `of`: rows of the edition before.
 */
export function identityFindings(
  current: FileIdentity,
  previous: FileIdentity | null,
  changes: Changes | null,
): Finding[] {
  if (!previous) return [];
  const base = { rule: 40, read: `SHA-256 ${current.sha256.slice(0, SHOWN)}…` } as const;
  if (current.sha256 === previous.sha256) {
    const message = `This is the file of ${previous.date}, byte for byte. There is nothing new in it.`;
    return [findingOf({ ...base, severity: 'note', cause: 'same_file', message })];
  }
  if (!changes || changes.of === 0) return [];
  const touched = changes.changed + changes.removed;
  if (touched <= MANY * changes.of) return [];
  const percent = ((100 * touched) / changes.of).toFixed(0);
  const message = `${touched} of ${changes.of} rows differ from the edition before, ${percent} %. Look whether it is the right file.`;
  const formula = `${changes.changed} changed + ${changes.removed} removed of ${changes.of} rows`;
  return [findingOf({ ...base, severity: 'warning', cause: 'many_changed', formula, message })];
}
