import Papa from 'papaparse';
import { cellText, type DecimalMark, decimalMarkOf, isMissing } from './import-cells';
import { type Column, isNumberField, isUnit, readColumns } from './import-columns';
import { type ImportFault, isError } from './import-fault';
import { type RowReading, readRow } from './import-row';
import type { RowContext } from './import-values';
import type { SectionRow, SectionTableMeta } from './section';

/** `rows` are those without an error. `faults` of a table that is read are warnings and notes. */
export type SectionTableReading =
  | { ok: true; rows: SectionRow[]; faults: ImportFault[] }
  | { ok: false; rows: SectionRow[]; faults: ImportFault[] };

export const MAX_IMPORT_ROWS = 10_000;

type FileLine = { number: number; cells: string[] };

/** The lines of the file with their numbers; a quoted cell may hold line breaks. Blank lines are left out. */
function linesOf(csv: string): { lines: FileLine[]; faults: ImportFault[] } {
  const parsed = Papa.parse<string[]>(csv.replace(/^\ufeff/, ''), {
    delimitersToGuess: [',', ';', '\t', '|'],
    skipEmptyLines: false,
  });
  const lines: FileLine[] = [];
  let number = 1;
  for (const cells of parsed.data) {
    if (cells.some((cell) => cellText(cell) !== '')) lines.push({ number, cells });
    number += 1 + cells.reduce((breaks, cell) => breaks + (cell.match(/\n/g)?.length ?? 0), 0);
  }
  const faults = parsed.errors
    .filter(({ type }) => type === 'Quotes')
    .map(({ row, message }): ImportFault => whole((row ?? 0) + 1, 'quotes', 'error', `${message}.`));
  return { lines, faults };
}

const whole = (
  line: number,
  code: ImportFault['code'],
  severity: ImportFault['severity'],
  message: string,
  got = '',
): ImportFault => ({ line, column: '', code, severity, got, message });

const filled = (cells: readonly string[]) => cells.map(cellText).filter((cell) => cell !== '');

/** Lines that are no section: repeated headings, footnotes, totals. Null where the line is a row. */
function asideOf({ number, cells }: FileLine, headings: readonly string[]): ImportFault | null {
  const texts = filled(cells);
  const first = texts[0] ?? '';
  if (texts.join() === filled(headings).join()) {
    return whole(
      number,
      'repeated_header',
      'note',
      'The headings stand here once more. The line is skipped.',
      first,
    );
  }
  if (/^(average|mean|total|sum|subtotal|summe|mittel|mittelwert|moyenne)\b/i.test(first)) {
    return whole(number, 'summary_row', 'error', 'This line sums up other rows. Remove it.', first);
  }
  if (texts.length === 1 && cells.length > 2) {
    return whole(
      number,
      'footnote',
      'note',
      'The line has one cell only. It is taken as a remark and skipped.',
      first,
    );
  }
  return null;
}

/** The row, or, where moving its cells by one makes an unsound row sound, one fault that says so. */
function readFitted(line: FileLine, width: number, context: RowContext): RowReading {
  const { number, cells } = line;
  const excess = filled(cells.slice(width)).length;
  const isRagged = cells.length < width || excess > 0;
  const reading: RowReading = isRagged
    ? {
        row: null,
        faults: [
          whole(
            number,
            'ragged_row',
            'error',
            `The row has ${cells.length} cells where the headings have ${width}.`,
          ),
        ],
      }
    : readRow(cells, number, context);
  const errors = reading.faults.filter(isError);
  if (!isRagged && errors.length < 3) return reading;
  for (let at = 0; at < width; at++) {
    const left = [...cells.slice(0, at), ...cells.slice(at + 1), ''];
    const right = [...cells.slice(0, at), '', ...cells.slice(at)];
    for (const [moved, way] of [
      [left, 'right'],
      [right, 'left'],
    ] as const) {
      if (filled(moved.slice(width)).length > 0 || readRow(moved, number, context).row === null) continue;
      const from = context.columns.find((column) => column.index >= at)?.heading ?? '';
      const message = `The cells from "${from}" on stand one column too far to the ${way}. Move them back.`;
      return {
        row: null,
        faults: [
          { ...whole(number, 'row_shift', 'error', message), column: from, got: cellText(cells[at] ?? '') },
        ],
      };
    }
  }
  return reading;
}

/** Two rows of one key: the same values are one row, others contradict each other. */
function dropDuplicates(rows: readonly { line: number; row: SectionRow }[], column: string) {
  const first = new Map<string, { line: number; row: SectionRow }>();
  const faults: ImportFault[] = [];
  for (const { line, row } of rows) {
    const earlier = first.get(row.key);
    if (!earlier) {
      first.set(row.key, { line, row });
      continue;
    }
    const values = ({
      printed: _printed,
      designation: _designation,
      computed: _computed,
      ...rest
    }: SectionRow) => JSON.stringify(rest);
    const isSame = values(row) === values(earlier.row);
    faults.push({
      ...whole(
        line,
        isSame ? 'duplicate' : 'duplicate_differs',
        isSame ? 'note' : 'error',
        isSame
          ? `${row.printed} stands in line ${earlier.line} with the same values. It is taken once.`
          : `${row.printed} stands in line ${earlier.line} with other values. Keep one of the two.`,
        row.printed,
      ),
      column,
    });
  }
  return { rows: [...first.values()].map(({ row }) => row), faults };
}

const MOST = 0.8; // of the rows: then the heading is wrong, not the rows
const FEW = 3; // rows, below which nothing is said of the column

/** One slip in most rows of a column becomes one fault of the column's heading. */
function gatherColumns(faults: readonly ImportFault[], rowCount: number, header: number): ImportFault[] {
  const groups = new Map<string, ImportFault[]>();
  for (const fault of faults) {
    const key = `${fault.column}\n${causeOf(fault)}`;
    groups.set(key, [...(groups.get(key) ?? []), fault]);
  }
  return [...groups.values()].flatMap((group) => {
    const [one] = group;
    const cause = one ? causeOf(one) : '';
    if (!one || cause === '' || group.length < FEW || group.length < MOST * rowCount) return group;
    return [
      {
        ...one,
        line: header,
        code: 'column_unit' as const,
        got: one.column,
        message: `${group.length} of ${rowCount} rows agree: ${cause}`,
      },
    ];
  });
}

const causeOf = ({ message }: ImportFault) => / (The value (?:looks like|is 10).*)$/.exec(message)?.[1] ?? '';

/** Decimal mark from all numeric cells; an undecidable file is one fault with samples. */
function readMark(lines: readonly FileLine[], columns: readonly Column[], header: number) {
  const cells = lines.flatMap(({ cells: row }) =>
    columns.flatMap(({ field, index }) => (isNumberField(field) ? [cellText(row[index] ?? '')] : [])),
  );
  const mark = decimalMarkOf(cells);
  if (mark !== null) return { mark, faults: [] };
  const samples = cells.filter((cell) => /\d[.,]\d/.test(cell)).slice(0, 3);
  const message = `Decimals may be written with a point or a comma: ${samples.join(', ')}. Say which.`;
  return {
    mark: '.' as DecimalMark,
    faults: [whole(header, 'decimal_mark', 'error', message, samples.join(' '))],
  };
}

/**
 * Reads a section table from CSV text: delimiter and decimal mark are those of the file, units stand in the headings (or
 * in a line under them, or in the cells). Gives every fault of every row; never a part of a faulty row.
 */
export function readSectionTable(csv: string, meta: SectionTableMeta): SectionTableReading {
  const { lines, faults } = linesOf(csv);
  const [header, ...rest] = lines;
  if (!header || rest.length === 0) {
    return {
      ok: false,
      rows: [],
      faults: [whole(1, 'empty', 'error', 'The file has no rows. Give headings and at least one row.')],
    };
  }
  if (rest.length > MAX_IMPORT_ROWS) {
    const message = `The file has ${rest.length} rows; ${MAX_IMPORT_ROWS} is the most. Split it.`;
    return { ok: false, rows: [], faults: [whole(1, 'too_many_rows', 'error', message)] };
  }
  if (csv.includes('\ufffd')) {
    faults.push(whole(1, 'encoding', 'error', 'Some characters could not be read. Save the file as UTF-8.'));
  }
  if (header.cells.some((cell) => cell.includes('\ufeff'))) {
    faults.push(
      whole(header.number, 'encoding', 'note', 'A byte order mark stands in a heading. It is left out.'),
    );
  }
  const second = rest[0]?.cells ?? [];
  const units =
    filled(second).length > 1 && filled(second).every((cell) => isUnit(cell) || isMissing(cell))
      ? second
      : null;
  const body = units ? rest.slice(1) : rest;
  const { columns, faults: columnFaults } = readColumns(header.cells, units, header.number, meta);
  const { mark, faults: markFaults } = readMark(body, columns, header.number);
  faults.push(...columnFaults, ...markFaults);
  if (faults.some(isError)) return { ok: false, rows: [], faults };

  const context: RowContext = { columns, mark, meta };
  const rows: { line: number; row: SectionRow }[] = [];
  const rowFaults: ImportFault[] = [];
  for (const line of body) {
    const aside = asideOf(line, header.cells);
    const reading = aside ? { row: null, faults: [aside] } : readFitted(line, header.cells.length, context);
    if (reading.row) rows.push({ line: line.number, row: reading.row });
    rowFaults.push(...reading.faults);
  }
  const unique = dropDuplicates(rows, columns.find(({ field }) => field === 'designation')?.heading ?? '');
  const all = [...faults, ...gatherColumns(rowFaults, body.length, header.number), ...unique.faults];
  all.sort((a, b) => a.line - b.line);
  return { ok: !all.some(isError), rows: unique.rows, faults: all };
}
