import { type DimensionName, readQuantity } from '@/engine/quantity';
import type { ImportCode } from './fault';

export type DecimalMark = '.' | ',';

const MISSING = new Set(['', '-', '–', '—', '−', 'n/a', 'na', '#n/a', 'nan', 'null', '.', '…']);

/** A cell without the spaces and the hidden apostrophe that spreadsheets leave. */
export const cellText = (cell: string): string => cell.replaceAll('\ufeff', '').trim().replace(/^'/, '');

export const isMissing = (text: string): boolean => MISSING.has(text.toLowerCase());

const GROUP = String.raw`[ '\u00a0\u2009\u202f\u2019]`;
const POINT = new RegExp(String.raw`^-?\d+(?:${GROUP}\d{3})*\.(\d{1,2}|\d{4,})$`);
const COMMA = new RegExp(String.raw`^-?\d+(?:${GROUP}\d{3})*,(\d{1,2}|\d{4,})$`);
const EITHER = /^-?[1-9]\d{0,2}[.,]\d{3}$/;

/**
 * The decimal mark of a file, by what most of its cells can only mean; a cell like "1,234" tells nothing. Null where
 * there are only such cells, or as many of one kind as of the other.
 */
export function decimalMarkOf(cells: readonly string[]): DecimalMark | null {
  const count = (pattern: RegExp) => cells.filter((cell) => pattern.test(cell)).length;
  const [points, commas] = [count(POINT), count(COMMA)];
  if (points !== commas) return points > commas ? '.' : ',';
  const isOpen = points > 0 || cells.some((cell) => EITHER.test(cell) && cell.includes(','));
  return isOpen ? null : '.';
}

export type CellReading =
  | { ok: true; value: number }
  | { ok: false; code: ImportCode; message: string; expected?: string };

const fail = (code: ImportCode, message: string, expected?: string): CellReading =>
  expected === undefined ? { ok: false, code, message } : { ok: false, code, message, expected };

const MONTH = /^\d{1,2}[-. /]?(jan|feb|mar|apr|may|mai|jun|jul|aug|sep|oct|okt|nov|dec|dez)/i;
const ISO_DATE = /^\d{4}-\d{2}-\d{2}/;
const ZERO_LETTER = /(?<=[\d.,])[oO]|[oO](?=[\d.,])/g;
const ONE_LETTER = /(?<=[\d.,])[lI](?=[\d.,]|$)/g;

/** The number with a point, its thousands removed; null where it goes against the file's decimal mark. */
function plainNumber(text: string, mark: DecimalMark): string | null {
  const other = mark === '.' ? ',' : '.';
  const grouped = new RegExp(String.raw`(?<=\d)[${other}](?=\d{3}(?:\D|$))`, 'g');
  const plain = text.replaceAll(grouped, '');
  if (new RegExp(String.raw`\d[${other}]\d|^[${other}]\d`).test(plain)) return null;
  return mark === ',' ? plain.replace(',', '.') : plain;
}

/** A cell that spreadsheets, keyboards or people damage in known ways, named before it is read as a number. */
function damage(text: string): CellReading | null {
  if (/^[=@\t\r]/.test(text) || /^[+-]\s*[a-z]/i.test(text)) {
    return fail('dangerous_text', 'The cell is a formula. Paste its value instead.');
  }
  if (MONTH.test(text) || ISO_DATE.test(text)) {
    return fail(
      'spreadsheet_damage',
      'A spreadsheet has turned this into a date. Type the fraction again as text.',
    );
  }
  if (!/^[-\d.,'\s\u2009\u202fOolI]+$/.test(text)) return null;
  const digits = text.replaceAll(ZERO_LETTER, '0').replaceAll(ONE_LETTER, '1');
  if (digits === text) return null;
  return fail(
    'look_alike',
    `A letter stands where a digit should. Read it as ${digits}, or correct it.`,
    digits,
  );
}

/** One numeric cell in SI: its own unit if it has one, else the column's. */
export function readCell(text: string, name: DimensionName, unit: string, mark: DecimalMark): CellReading {
  const damaged = damage(text);
  if (damaged) return damaged;
  const plain = plainNumber(text, mark);
  if (plain === null) {
    const words = mark === ',' ? 'a comma' : 'a point';
    return fail('decimal_mark', `The file writes decimals with ${words}; this cell does not.`);
  }
  const reading = readQuantity(plain, name, { unit });
  if (!reading.ok) return fail('not_a_number', reading.message);
  return reading;
}

/** Half a unit of the last printed digit, in the unit of the cell: 0.05 for "26.0", 0.5 for "26". */
export function halfDigit(text: string, mark: DecimalMark): number {
  const decimals = text.split(mark)[1]?.match(/^\d+/)?.[0].length ?? 0;
  return 0.5 * 10 ** -decimals;
}

/** Letters of other alphabets that look like those of a designation. */
const LOOK_ALIKES = /[\u0370-\u03ff\u0400-\u04ff]|[\uff00-\uffef]/;
export const hasLookAlike = (text: string): boolean => LOOK_ALIKES.test(text);
