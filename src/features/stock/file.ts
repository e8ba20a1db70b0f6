import Papa from 'papaparse';
import { unitFactor } from '@/engine/quantity';
import { cellText } from '@/features/section/import/cells';
import type { Delimiter, Encoding, Refusal } from '@/features/section/import/contract';
import { encodingOf, refusalOf } from '@/features/section/import/encoding';
import { type FileLine, LineReader } from '@/features/section/import/stream';
import { lengthMarkOf, type ReadAs, type StockField, type StockTexts } from './cells';
import { type Holding, MARKS, type MarkName } from './stock';

export const MOST_BYTES = 5_000_000;
export const MOST_LINES = 20_000;
const MOST_COLUMNS = 250;
const MOST_SPARE = 60; // characters
const HEADING_LINES = 10; // a title may stand above the headings

export interface StockRow {
  /** In the file, from 1. */
  readonly line: number;
  readonly texts: StockTexts;
  /** What stands beyond the last heading: a comma inside a number, for one, moves every cell after it. */
  readonly spare: string;
}

export interface StockFile {
  readonly rows: readonly StockRow[];
  readonly as: ReadAs;
  readonly delimiter: Delimiter;
  readonly encoding: Encoding;
  /** What each column was taken for; null where it is left out. */
  readonly columns: readonly { readonly heading: string; readonly field: StockField | null }[];
}

type StockReading =
  | { readonly ok: true; readonly file: StockFile }
  | { readonly ok: false; readonly refusal: Refusal };

/** Headings in small letters, without what stands in brackets. */
const HEADINGS: Readonly<Record<StockField, readonly string[]>> = {
  designation: [
    ...['designation', 'section', 'profile', 'section size', 'size'],
    ...['bezeichnung', 'profil', 'désignation', 'profilé'],
  ],
  table: ['table', 'section table', 'range', 'series', 'tabelle'],
  lengths: [
    ...['lengths', 'length', 'stock lengths', 'stock length', 'bar lengths', 'bar length'],
    ...['längen', 'lagerlängen', 'länge', 'longueurs', 'longueur'],
  ],
  lead_time: ['lead time', 'lead', 'delivery', 'delivery time', 'lieferzeit', 'délai'],
  price_band: ['price band', 'band', 'price', 'preisgruppe', 'gamme de prix'],
  note: ['note', 'notes', 'remark', 'remarks', 'bemerkung', 'remarque'],
};
const FIELDS = Object.keys(HEADINGS) as StockField[];

interface Heading {
  readonly heading: string;
  readonly field: StockField | null;
  readonly unit: string;
}

/** A unit that stands behind a heading without brackets: "length mm", "lead time in days". */
const LAST_WORD = /^(.*?)(?: in)? (mm|cm|m|ft|feet|days|weeks|tage|wochen|jours|semaines)$/;

function readHeading(cell: string): Heading {
  const heading = cellText(cell).slice(0, 100);
  const [, name = '', bracketed = ''] = /^([^([]*)[([]?([^)\]]*)[)\]]?$/.exec(heading.toLowerCase()) ?? [];
  const plain = name.replaceAll(/[\s_,]+/g, ' ').trim();
  const [, before = plain, unit = bracketed.trim()] = (bracketed === '' && LAST_WORD.exec(plain)) || [];
  return { heading, field: FIELDS.find((one) => HEADINGS[one].includes(before)) ?? null, unit };
}

/** The second column of the same meaning is left out. */
const readHeadings = (cells: readonly string[]): Heading[] =>
  cells
    .map(readHeading)
    .map((one, at, all) =>
      all.findIndex(({ field }) => field === one.field) < at ? { ...one, field: null } : one,
    );

const knownIn = (cells: readonly string[]): number =>
  readHeadings(cells).filter(({ field }) => field !== null).length;

const DELIMITERS: readonly Delimiter[] = [';', '\t', '|', ','];

/** What parts a line into the most headings that are known. */
function delimiterOf(text: string): Delimiter {
  const lines = text.split(/\r\n?|\n/, HEADING_LINES);
  const known = (mark: Delimiter) => Math.max(0, ...lines.map((line) => knownIn(cellsOf(line, mark))));
  return DELIMITERS.reduce((best, one) => (known(one) > known(best) ? one : best));
}

/** No heading of ours lies beyond. */
const MOST_HEAD = 20_000; // characters
const cellsOf = (line: string, delimiter: Delimiter): string[] =>
  (Papa.parse(line.slice(0, MOST_HEAD), { delimiter }).data[0] as string[] | undefined)?.slice(
    0,
    MOST_COLUMNS,
  ) ?? [];

const refused = (code: Refusal['code'], message: string): StockReading => ({
  ok: false,
  refusal: { code, message },
});

const WRONG_HEADINGS =
  'No line heads the columns of a stock list. One column at least is called “designation”; the others are “table”, “stock lengths (m)”, “lead time (days)”, “price band” and “note”.';

/**
 * The lines of a supplier's list, with the text of their cells. Encoding and delimiter are recognised, and the decimal
 * mark of the lengths where it is not given. Refuses what is no table, and what is too long.
 */
export function readStockFile(bytes: Uint8Array, mark?: MarkName): StockReading {
  if (bytes.length === 0) return refused('empty', 'The file is empty. Choose the one with the list.');
  if (bytes.length > MOST_BYTES)
    return refused('too_large', 'The list is larger than 5 MB. Split it, or leave columns out.');
  const refusal = refusalOf(bytes);
  if (refusal) return { ok: false, refusal };
  const read = encodingOf(bytes, true);
  if (read.kind === 'refused') return { ok: false, refusal: read.refusal };
  const encoding = read.kind === 'known' ? read.encoding : (read.choices[0] ?? 'utf-8');
  const delimiter = delimiterOf(new TextDecoder(encoding).decode(bytes.subarray(0, MOST_HEAD)));
  const lines = linesOf(bytes, encoding, delimiter);
  if ('code' in lines) return { ok: false, refusal: lines };
  const reading = readLines(lines, delimiter, encoding);
  return reading.ok && mark ? withMark(reading.file, MARKS[mark]) : reading;
}

const withMark = (file: StockFile, mark: ReadAs['mark']): StockReading => ({
  ok: true,
  file: { ...file, as: { ...file.as, mark } },
});

function linesOf(bytes: Uint8Array, encoding: Encoding, delimiter: Delimiter): FileLine[] | Refusal {
  const reader = new LineReader({ encoding, delimiter });
  const first = reader.push(bytes);
  if ('code' in first) return first;
  const last = reader.finish();
  return 'code' in last ? last : [...first, ...last];
}

function readLines(lines: readonly FileLine[], delimiter: Delimiter, encoding: Encoding): StockReading {
  const known = lines.slice(0, HEADING_LINES).map(({ cells }) => knownIn(cells.slice(0, MOST_COLUMNS)));
  const at = known.indexOf(Math.max(...known));
  const cells = lines[at]?.cells ?? [];
  if (cells.length > MOST_COLUMNS)
    return refused('too_many_columns', `The list has ${cells.length} columns; ${MOST_COLUMNS} is the most.`);
  const headings = readHeadings(cells);
  if (!headings.some(({ field }) => field === 'designation')) return refused('no_headings', WRONG_HEADINGS);
  const body = lines.slice(at + 1).filter((line) => line.cells.some((cell) => cellText(cell) !== ''));
  if (body.length === 0)
    return refused('no_rows', 'The list has headings and no lines. Give at least one section.');
  if (body.length > MOST_LINES)
    return refused('too_many_rows', `The list has ${body.length} lines; ${MOST_LINES} is the most.`);
  const column = (field: StockField) => headings.findIndex((one) => one.field === field);
  const places = FIELDS.map((field) => [field, column(field)] as const);
  const isEven = body.every((line) => line.cells.length > cells.length);
  const rows = body.map(({ number, cells: row }) => ({
    line: number,
    texts: Object.fromEntries(
      places.map(([field, place]) => [field, cellText(row[place] ?? '')]),
    ) as StockTexts,
    spare: spareOf(row.slice(cells.length), isEven),
  }));
  const as = readAs(headings, rows, delimiter);
  return 'code' in as
    ? { ok: false, refusal: as }
    : { ok: true, file: { rows, as, delimiter, encoding, columns: headings } };
}

/** Empty cells at the end of every line are a manner of writing; at the end of some they stand for a moved one. */
function spareOf(beyond: readonly string[], isEven: boolean): string {
  const said = beyond.map(cellText).filter((cell) => cell !== '');
  if (said.length > 0) return said.join(' ').slice(0, MOST_SPARE);
  return beyond.length > 0 && !isEven ? '–' : '';
}

const DAYS = /^(?:working )?(?:d|day|tag|jour)/;
const WEEKS = /^(?:w|week|woche|semaine)/;

/** How the cells are read, or why a heading leaves it open. */
function readAs(
  headings: readonly Heading[],
  rows: readonly StockRow[],
  delimiter: Delimiter,
): ReadAs | Refusal {
  const unitOf = (field: StockField) => headings.find((one) => one.field === field)?.unit ?? '';
  const [length, lead] = [unitOf('lengths') || 'm', unitOf('lead_time') || 'days'];
  if (!unitFactor(length, 'length').ok)
    return {
      code: 'no_headings',
      message: `The lengths are headed “${length}”, which is no unit of length. Head them “stock lengths (m)”, or (mm), or (ft).`,
    };
  if (!DAYS.test(lead) && !WEEKS.test(lead))
    return {
      code: 'no_headings',
      message: `The lead times are headed “${lead}”. Head them “lead time (days)” or “lead time (weeks)”.`,
    };
  const lengths = rows.map(({ texts }) => texts.lengths);
  return {
    mark: lengthMarkOf(lengths, delimiter),
    lengthUnit: length,
    leadDays: WEEKS.test(lead) ? 7 : 1,
  };
}

const HEAD = ['designation', 'table', 'stock lengths (m)', 'lead time (days)', 'price band', 'note'];

interface Written extends Holding {
  readonly designation: string;
  readonly table: string;
}

const toCells = ({ designation, table, lengths_m, lead_time_days, price_band, note }: Written) => [
  designation,
  table,
  lengths_m.join('; '),
  lead_time_days,
  price_band,
  note,
];

/** Lines as a CSV that is read again as it was. What a spreadsheet would take for a formula is made harmless. */
export const stockCsv = (lines: readonly Written[]): string =>
  Papa.unparse([HEAD, ...lines.map(toCells)], { escapeFormulae: true });

const oneLine = (text: string): string => text.replaceAll(/\s+/g, ' ');

/** Rows as they stand, one to a line, by which what is found wrong is known again. To be read with the file's mark. */
export function rowsCsv(rows: readonly StockRow[], { lengthUnit, leadDays }: ReadAs): string {
  const headings: Record<StockField, string> = {
    designation: 'designation',
    table: 'table',
    lengths: `stock lengths (${lengthUnit})`,
    lead_time: leadDays === 7 ? 'lead time (weeks)' : 'lead time (days)',
    price_band: 'price band',
    note: 'note',
  };
  const cells = rows.map(({ texts, spare }) => [
    ...FIELDS.map((field) => oneLine(field === 'lengths' ? parted(texts[field]) : texts[field])),
    ...(spare === '' ? [] : [oneLine(spare)]),
  ]);
  return Papa.unparse([FIELDS.map((field) => headings[field]), ...cells]);
}

/** A break stands between two lengths; a blank may stand inside one, as in 20' 6". */
const parted = (lengths: string): string => lengths.replaceAll(/\s*\n\s*/g, '; ');
