import type { SectionShape } from '@/engine/section';
import { designationParts } from '@/engine/section';
import { cellText, isMissing } from './cells';
import type {
  Delimiter,
  Encoding,
  Field,
  HeadingLanguage,
  MappedColumn,
  Mapping,
  RecognisedColumn,
  RecognisedFile,
  Recognition,
  Refusal,
} from './contract';
import { MOST_BYTES } from './contract';
import { timberDensity } from './density';
import { encodingOf, refusalOf } from './encoding';
import { isUnit, knownHeadings, meaningOf, type ReadHeading, readUnitText, settle } from './headings';
import { decimalMarkOf, thousandsMarksOf } from './marks';
import { questionsOf } from './questions';
import { type FileLine, LineReader } from './stream';

const MOST_COLUMNS = 250;
const HEADING_LINES = 30; // a title and remarks may stand above the headings
const PREVIEW_ROWS = 8;
const STEEL = 7850; // kg/m³

const refused = (code: Refusal['code'], message: string): Recognition => ({
  ok: false,
  refusal: { code, message },
});

const DELIMITERS: readonly Delimiter[] = [',', ';', '\t', '|'];

/** What parts the headings most often: later lines have decimal commas, headings at most an axis after one. */
function delimiterOf(text: string): { delimiter: Delimiter; isNamed: boolean } {
  const lines = text
    .split(/\r\n?|\n/)
    .filter((line) => line.trim() !== '')
    .slice(0, HEADING_LINES);
  const named = /^"?sep=(.)"?$/i.exec(lines[0]?.trim() ?? '')?.[1] as Delimiter | undefined;
  if (named && DELIMITERS.includes(named)) return { delimiter: named, isNamed: true };
  const count = (mark: Delimiter) => {
    const cells = lines.map((line) => line.replaceAll(/"[^"]*"/g, '').split(mark));
    const best = cells.reduce((most, one) => Math.max(most, knownHeadings(one.slice(0, MOST_COLUMNS))), 0);
    return { mark, score: best * 1000 + (cells[0]?.length ?? 0) };
  };
  const counts = DELIMITERS.map(count);
  return {
    delimiter: counts.reduce((best, one) => (one.score > best.score ? one : best)).mark,
    isNamed: false,
  };
}

const isBlank = ({ cells }: FileLine) => cells.every((cell) => cellText(cell) === '');

/** The lines of the head, and why what follows the last whole one cannot be a row. */
function readLines(head: Uint8Array, encoding: Encoding, delimiter: Delimiter, isWhole: boolean) {
  const reader = new LineReader({ encoding, delimiter });
  const first = reader.push(head);
  const last = isWhole && !('code' in first) ? reader.finish() : [];
  if ('code' in first) return { lines: [], unfinished: first };
  if ('code' in last) return { lines: [], unfinished: last };
  return { lines: [...first, ...last], unfinished: isWhole ? null : reader.unfinished() };
}

/** The line with the most known headings; the first filled one where none has any. */
function headingAt(lines: readonly FileLine[], isNamed: boolean): number {
  const first = lines.findIndex((line, at) => !isBlank(line) && !(isNamed && at === 0));
  let best = first;
  let most = 0;
  for (const [at, { cells }] of lines.slice(0, HEADING_LINES).entries()) {
    const count = knownHeadings(cells.slice(0, MOST_COLUMNS));
    if (count > most) [best, most] = [at, count];
  }
  return best;
}

const isUnitLine = (cells: readonly string[]) => {
  const texts = cells.map(cellText).filter((cell) => cell !== '');
  return texts.length > 1 && texts.every((text) => isUnit(readUnitText(text).unit ?? '') || isMissing(text));
};

type Read = MappedColumn & ReadHeading;

function readColumns(headings: readonly string[], units: readonly string[] | null): Read[] {
  const read = headings.map((cell, index): Read => {
    const heading = cellText(cell);
    const meaning = meaningOf(heading);
    const under = cellText(units?.[index] ?? '');
    const unit = meaning.unit === null && under !== '' && !isMissing(under) ? readUnitText(under) : meaning;
    return { index, heading, ...meaning, unit: unit.unit, factor: unit.factor };
  });
  return settle(read.filter(({ heading }) => heading !== ''));
}

const CHANNELS = new Set(['upe', 'upn', 'u', 'c', 'mc', 'pfc', 'uap', 'rsc', 'upa']);

/** The shape that the columns and the names speak for. */
function shapeOf(columns: readonly Read[], rows: readonly FileLine[]): SectionShape | null {
  const has = (field: Field) => columns.some((column) => column.field === field);
  if (has('shape')) return null;
  const name = columns.find(({ field }) => field === 'designation');
  const families = rows.map(({ cells }) => designationParts(cells[name?.index ?? 0] ?? '').family);
  const isOldFlange = columns.some(({ byAxes }) => byAxes?.british === 'tf');
  if ((has('tw') && has('tf')) || (has('t') && isOldFlange))
    return families.every((family) => CHANNELS.has(family)) ? 'channel' : 'i';
  if (has('t')) return has('b') ? 'rhs' : 'chs';
  if (has('tw') || has('tf')) return null;
  if (has('b') && has('h')) return 'rectangle';
  return has('h') ? 'round' : null;
}

function languageOf(columns: readonly Read[]): HeadingLanguage | null {
  const counts = new Map<HeadingLanguage, number>();
  for (const { language } of columns) if (language) counts.set(language, (counts.get(language) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1])[0]?.[0] ?? null;
}

/** A repeated heading, and what settle has changed, in words. */
function toRecognised(column: Read, rows: readonly FileLine[], all: readonly Read[]): RecognisedColumn {
  const { index, heading, field, byAxes } = column;
  const samples = rows.slice(0, 3).map(({ cells }) => cellText(cells[index] ?? ''));
  const meant = meaningOf(heading).field;
  const isSecond = field === null && meant !== null && all.some((one) => one.field === meant);
  if (isSecond) {
    const reason = `"${heading}" is the second column for the same value. It is left out.`;
    return { index, heading, samples, confidence: 'unsure', reason };
  }
  const confidence = field !== meant && !byAxes ? 'likely' : column.confidence;
  return { index, heading, samples, confidence, reason: column.reason };
}

const ROWS_READ = 400;

/**
 * What the first bytes of a file say: encoding, delimiter, decimal mark, line of headings, what each column is, and what
 * has to be asked. `file.encoding` is the answer to an open encoding. Axes, missing units and an open decimal mark are
 * never guessed. Refuses what is no CSV at all.
 */
export function recognise(head: Uint8Array, file: RecognisedFile): Recognition {
  if (file.size === 0 || head.length === 0)
    return refused('empty', 'The file is empty. Choose the one with the table.');
  if (file.size > MOST_BYTES) return refused('too_large', 'The file is larger than 50 MB. Split it.');
  const refusal = refusalOf(head);
  if (refusal) return { ok: false, refusal };
  const isWhole = head.length >= file.size;
  const read = encodingOf(head, isWhole);
  if (read.kind === 'refused') return { ok: false, refusal: read.refusal };
  const choices = read.kind === 'open' ? read.choices : [];
  const encoding = file.encoding ?? (read.kind === 'known' ? read.encoding : (choices[0] ?? 'utf-8'));

  const { delimiter, isNamed } = delimiterOf(new TextDecoder(encoding).decode(head));
  const { lines, unfinished } = readLines(head, encoding, delimiter, isWhole);
  if (lines.length === 0 && unfinished)
    return tooWide(head, encoding, delimiter) ?? { ok: false, refusal: unfinished };
  const at = headingAt(lines, isNamed);
  const unfit = unfitness(lines[at]);
  if (unfit) return unfit;
  const known = file.encoding ?? (read.kind === 'known' ? read.encoding : null);
  const bom = read.kind === 'known' && read.bom;
  return recogniseTable({ head, lines, at, unfinished, encoding: known, choices, delimiter, bom });
}

type Head = {
  head: Uint8Array;
  lines: readonly FileLine[];
  /** Index of the headings among them. */
  at: number;
  unfinished: Refusal | null;
  encoding: Encoding | null;
  choices: readonly Encoding[];
  delimiter: Delimiter;
  bom: boolean;
};

function recogniseTable({
  head,
  lines,
  at,
  unfinished,
  encoding,
  choices,
  delimiter,
  bom,
}: Head): Recognition {
  const heading = lines[at] ?? { number: 1, cells: [] };
  const units = isUnitLine(lines[at + 1]?.cells ?? []) ? (lines[at + 1] ?? null) : null;
  const columns = readColumns(heading.cells, units?.cells ?? null);
  const rows = lines
    .slice(at + (units ? 2 : 1))
    .filter((line) => !isBlank(line))
    .slice(0, ROWS_READ);
  if (rows.length === 0) {
    if (unfinished) return { ok: false, refusal: unfinished };
    return refused('no_rows', 'The file has headings and no rows. Give at least one section.');
  }
  const cells = rows.flatMap((row) => columns.filter(isNumeric).map(({ index }) => row.cells[index] ?? ''));
  const marks = decimalMarkOf(cells);
  const mapping: Mapping = {
    version: 1,
    encoding,
    delimiter,
    decimalMark: marks.mark,
    axes: null,
    columns: columns.map(({ index, heading: text, field, unit, factor, byAxes }) =>
      byAxes
        ? { index, heading: text, field, unit, factor, byAxes }
        : { index, heading: text, field, unit, factor },
    ),
    headingLine: heading.number,
    unitLine: units?.number ?? null,
    shape: shapeOf(columns, rows),
    flanges: 'parallel',
    density: STEEL,
    tubeStandard: 'EN 10210',
  };
  mapping.density = timberDensity(mapping, rows) ?? mapping.density;
  return {
    ok: true,
    mapping,
    columns: columns.map((column) => toRecognised(column, rows, columns)),
    questions: questionsOf(mapping, { head, choices, marks, rows }),
    language: languageOf(columns),
    bom,
    thousandsMarks: thousandsMarksOf(cells, marks.mark),
    preview: rows.slice(0, PREVIEW_ROWS).map(({ cells: row }) => row.map(cellText)),
  };
}

const isNumeric = ({ field, byAxes }: Read) =>
  byAxes !== undefined || (field !== null && !['designation', 'shape', 'computed'].includes(field));

/** A first line that is longer than the head for its many columns. */
function tooWide(head: Uint8Array, encoding: Encoding, delimiter: Delimiter): Recognition | null {
  const columns = new TextDecoder(encoding).decode(head).split(delimiter).length;
  if (columns <= MOST_COLUMNS) return null;
  const message = `The file has more than ${columns} columns; ${MOST_COLUMNS} is the most. Leave out what is no property.`;
  return refused('too_many_columns', message);
}

/** Why a line cannot head a table. */
function unfitness(heading: FileLine | undefined): Recognition | null {
  if (!heading)
    return refused('empty', 'The file has nothing but blank lines where its headings should stand.');
  const { cells } = heading;
  if (cells.length > MOST_COLUMNS) {
    const message = `The file has ${cells.length} columns; ${MOST_COLUMNS} is the most. Leave out what is no property.`;
    return refused('too_many_columns', message);
  }
  if (cells.length < 2) {
    return refused(
      'one_column',
      'The file has one column only. Part the columns with commas, semicolons or tabs.',
    );
  }
  if (knownHeadings(cells) > 0) return null;
  const shown = cells.map(cellText).slice(0, 5).join(', ').slice(0, 100);
  const message = `No line of the file heads the columns of a section table. The first one reads: ${shown}.`;
  return refused('no_headings', message);
}
