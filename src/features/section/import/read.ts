import type { SectionRow, SectionTableMeta } from '../section';
import { type Column, readColumns } from './columns';
import { type ImportFault, isError, onLine } from './fault';
import { asideOf, type FileLine, filled, linesOf } from './lines';
import { cellText, type DecimalMark, decimalMarkOf, isMissing } from './old-cells';
import { isNumberField, isUnit } from './old-headings';
import { readFittedRow } from './shift';

/** `rows` are those without an error. `faults` of a table that is read are warnings and notes. */
export type SectionTableReading = { ok: boolean; rows: SectionRow[]; faults: ImportFault[] };

const MAX_IMPORT_ROWS = 10_000;

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
      ...onLine(
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

/** What the rows of one column may share: a slip of units, or a size that has no column at all. */
function sharedCause({ column, code, message }: ImportFault): string {
  if (code === 'missing' && column === '') return message;
  return / (The value (?:looks like|is 10).*)$/.exec(message)?.[1] ?? '';
}

/** One slip in most rows of a column becomes one fault of the column's heading. */
function gatherColumns(faults: readonly ImportFault[], rowCount: number, header: number): ImportFault[] {
  const groups = new Map<string, ImportFault[]>();
  for (const fault of faults) {
    const key = `${fault.column}\n${sharedCause(fault)}`;
    groups.set(key, [...(groups.get(key) ?? []), fault]);
  }
  return [...groups.values()].flatMap((group) => {
    const [one] = group;
    const cause = one ? sharedCause(one) : '';
    if (!one || cause === '' || group.length < Math.max(MOST * rowCount, one.column === '' ? 1 : FEW))
      return group;
    const code = one.column === '' ? 'column_missing' : 'column_unit';
    const message = `${group.length} of ${rowCount} rows agree: ${cause}`;
    return [{ ...one, line: header, code, got: one.column, message } satisfies ImportFault];
  });
}

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
    faults: [onLine(header, 'decimal_mark', 'error', message, samples.join(' '))],
  };
}

/** What is wrong with the file before any of its rows is looked at. */
function fileFaults(csv: string, rowCount: number): ImportFault[] {
  const faults: ImportFault[] = [];
  if (rowCount <= 0) {
    faults.push(onLine(1, 'empty', 'error', 'The file has no rows. Give headings and at least one row.'));
  }
  if (rowCount > MAX_IMPORT_ROWS) {
    const message = `The file has ${rowCount} rows; ${MAX_IMPORT_ROWS} is the most. Split it.`;
    faults.push(onLine(1, 'too_many_rows', 'error', message));
  }
  if (csv.includes('\ufffd')) {
    faults.push(onLine(1, 'encoding', 'error', 'Some characters could not be read. Save the file as UTF-8.'));
  }
  if (csv.includes('\ufeff', 1)) {
    faults.push(onLine(1, 'encoding', 'note', 'A byte order mark stands inside the file. It is left out.'));
  }
  return faults;
}

const isUnitLine = (cells: readonly string[]) =>
  filled(cells).length > 1 && filled(cells).every((cell) => isUnit(cell) || isMissing(cell));

/**
 * Reads a section table from CSV text: delimiter and decimal mark are those of the file, units stand in the headings (or
 * in a line under them, or in the cells). Gives every fault of every row; never a part of a faulty row.
 */
export function readSectionTable(csv: string, meta: SectionTableMeta): SectionTableReading {
  const { lines, faults } = linesOf(csv);
  const [header, ...rest] = lines;
  faults.push(...fileFaults(csv, rest.length));
  if (!header || faults.some(isError)) return { ok: false, rows: [], faults };

  const units = isUnitLine(rest[0]?.cells ?? []) ? (rest[0]?.cells ?? null) : null;
  const body = units ? rest.slice(1) : rest;
  const { columns, faults: columnFaults } = readColumns(header.cells, units, header.number, meta);
  const { mark, faults: markFaults } = readMark(body, columns, header.number);
  faults.push(...columnFaults, ...markFaults);
  if (faults.some(isError)) return { ok: false, rows: [], faults };

  const rows: { line: number; row: SectionRow }[] = [];
  const rowFaults: ImportFault[] = [];
  for (const line of body) {
    const aside = asideOf(line, header.cells);
    const reading = aside
      ? { row: null, faults: [aside] }
      : readFittedRow(line, header.cells.length, { columns, mark, meta });
    if (reading.row) rows.push({ line: line.number, row: reading.row });
    rowFaults.push(...reading.faults);
  }
  const unique = dropDuplicates(rows, columns.find(({ field }) => field === 'designation')?.heading ?? '');
  const all = [...faults, ...gatherColumns(rowFaults, body.length, header.number), ...unique.faults];
  all.sort((a, b) => a.line - b.line);
  return { ok: !all.some(isError), rows: unique.rows, faults: all };
}
