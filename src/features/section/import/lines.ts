import Papa from 'papaparse';
import { type ImportFault, onLine } from './fault';
import { cellText } from './old-cells';

export type FileLine = { number: number; cells: string[] };

/** What parts the headings most often: later lines have decimal commas, headings at most an axis after one. */
function delimiterOf(csv: string): string {
  const headings =
    csv
      .split(/\r?\n/)
      .find((line) => line.trim() !== '')
      ?.replaceAll(/"[^"]*"/g, '') ?? '';
  const counts = [',', ';', '\t', '|'].map((mark) => ({ mark, count: headings.split(mark).length }));
  return counts.reduce((best, one) => (one.count > best.count ? one : best)).mark;
}

/** The lines of the file with their numbers; a quoted cell may hold line breaks. Blank lines are left out. */
export function linesOf(csv: string): { lines: FileLine[]; faults: ImportFault[] } {
  const parsed = Papa.parse<string[]>(csv.replace(/^\ufeff/, ''), { delimiter: delimiterOf(csv) });
  const lines: FileLine[] = [];
  let number = 1;
  for (const cells of parsed.data) {
    if (cells.some((cell) => cellText(cell) !== '')) lines.push({ number, cells });
    number += 1 + cells.reduce((breaks, cell) => breaks + (cell.match(/\n/g)?.length ?? 0), 0);
  }
  const faults = parsed.errors
    .filter(({ type }) => type === 'Quotes')
    .map(({ row, message }): ImportFault => onLine((row ?? 0) + 1, 'quotes', 'error', `${message}.`));
  return { lines, faults };
}

export const filled = (cells: readonly string[]) => cells.map(cellText).filter((cell) => cell !== '');

/** Lines that are no section: repeated headings, footnotes, totals. Null where the line is a row. */
export function asideOf({ number, cells }: FileLine, headings: readonly string[]): ImportFault | null {
  const texts = filled(cells);
  const first = texts[0] ?? '';
  if (texts.join() === filled(headings).join()) {
    return onLine(
      number,
      'repeated_header',
      'note',
      'The headings stand here once more. The line is skipped.',
      first,
    );
  }
  if (/^(average|mean|total|sum|subtotal|summe|mittel|mittelwert|moyenne)\b/i.test(first)) {
    return onLine(number, 'summary_row', 'error', 'This line sums up other rows. Remove it.', first);
  }
  if (texts.length === 1 && cells.length > 2) {
    return onLine(
      number,
      'footnote',
      'note',
      'The line has one cell only. It is taken as a remark and skipped.',
      first,
    );
  }
  return null;
}
