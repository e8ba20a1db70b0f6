import { cellText } from './cells';
import type { Finding, Mapping } from './contract';
import { findingOf } from './finding';
import { meaningOf } from './headings';
import type { Plan } from './plan';

/** What the line of headings leaves to be said: marks in it, columns left out, headings twice. */
export function headingFindings(headings: readonly string[], plan: Plan, mapping: Mapping): Finding[] {
  const line = mapping.headingLine;
  const cells = headings.map((heading, index) => {
    const edits = plan.edits.get(line) ?? [];
    const typed = edits.findLast((edit) => edit.kind === 'set_cell' && edit.column === index);
    return typed?.kind === 'set_cell' ? typed.value : heading;
  });
  return [...cells.entries()].flatMap(([index, raw]) => [
    ...markFindings(raw, index, line),
    ...unusedFindings(cellText(raw), index, plan, mapping),
  ]);
}

function markFindings(raw: string, column: number, line: number): Finding[] {
  const heading = cellText(raw);
  const at = { column, heading, line };
  const found: Finding[] = [];
  if (raw.includes('\ufeff')) {
    const message = 'A byte order mark (U+FEFF) stands in the heading, not before the file. Take it out.';
    const label = 'Leave the mark out';
    const edit = { kind: 'set_cell', line, column, value: heading } as const;
    const base = {
      rule: 30,
      severity: 'error',
      cause: 'byte_order_mark',
      read: `U+FEFF ${heading}`,
      expected: heading,
    } as const;
    found.push(findingOf({ ...base, ...at, message, fixes: [{ label, reach: 'cell', edit }] }));
  }
  if (raw.includes('\ufffd')) {
    const message = 'A character of the heading could not be read. Say which encoding the file has.';
    found.push(
      findingOf({
        ...at,
        rule: 30,
        severity: 'error',
        cause: 'replacement_character',
        read: heading,
        message,
      }),
    );
  }
  return found;
}

function unusedFindings(heading: string, column: number, plan: Plan, mapping: Mapping): Finding[] {
  const mapped = mapping.columns.find(({ index }) => index === column);
  if (!mapped || mapped.field !== null || heading === '') return [];
  const meant = meaningOf(heading).field;
  const isTaken = meant !== null && mapping.columns.some(({ field }) => field === meant);
  const base = { column, heading, line: mapping.headingLine } as const;
  if (isTaken && plan.headings.indexOf(heading) !== column) {
    const message = `"${heading}" stands twice. The second column is left out; look whether it is the right one.`;
    return [findingOf({ ...base, rule: 25, severity: 'warning', cause: 'column_repeated', message })];
  }
  if (mapping.axes !== null && mapped.byAxes?.[mapping.axes] === null) {
    const message = `"${heading}" means nothing by the convention that was chosen. Look whether the file follows another.`;
    return [findingOf({ ...base, rule: 25, severity: 'warning', cause: 'axis_letter', message })];
  }
  const message = `"${heading}" is no property of a section here. The column is left out.`;
  return [findingOf({ ...base, rule: 25, severity: 'note', cause: 'column_unknown', message })];
}
