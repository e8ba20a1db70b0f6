import { type DimensionName, readQuantity, unitFactor } from '@/engine/quantity';
import type { Severity } from '@/engine/section';
import type { Cause, DecimalMark, RuleNumber } from './contract';

const MISSING = new Set(['', '-', '–', '—', '−', 'n/a', 'na', '#n/a', '#nv', 'nan', 'null', '.', '…', '...']);

/** A cell without byte order marks, outer blanks and the hidden apostrophe that spreadsheets leave. */
export function cellText(cell: string): string {
  const text = (cell.includes('\ufeff') ? cell.replaceAll('\ufeff', '') : cell).trim();
  return text.startsWith("'") ? text.slice(1) : text;
}

export const isMissing = (text: string): boolean => MISSING.has(text.toLowerCase());

/** What is odd about a cell; `value` is what it is read as all the same, SI, or null. */
export type CellFault = {
  rule: RuleNumber;
  severity: Severity;
  cause: Cause;
  message: string;
  value: number | null;
  /** The cell as it should read. */
  suggestion?: string;
  expected?: string;
};

export type CellColumn = { quantity: DimensionName; unit: string; scale: number };

const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];
const MONTH = /^(\d{1,2})[-. /]?(jan|feb|mar|mär|apr|may|mai|jun|jul|aug|sep|oct|okt|nov|dec|dez)/i;
const MONTH_FIRST = /^(jan|feb|mar|apr|may|jun|jul|aug|sep|oct|nov|dec)[a-z]*[-. /](\d{1,2})$/i;
const ISO_DATE = /^(?:\d{4}-\d{2}-\d{2}|\d{1,2}[./]\d{1,2}[./]\d{4})/;
const ZERO_LETTER = /(?<=[\d.,])[oO]|[oO](?=[\d.,])/g;
const ONE_LETTER = /(?<=[\d.,])[lI](?=[\d.,]|$)|(?<=^)[lI](?=[\d.,])/g;
const SPREADSHEET_ERROR = /^#(?:DIV\/0|REF|VALUE|NAME|NUM|NULL|WERT|BEZUG|ZAHL)[!?]/i;
const FORMULA = /^[=@\t]|^[+-]\s*[a-z(]/i;
// biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is looked for
const CONTROL = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f]/;

export const isFormula = (text: string): boolean => FORMULA.test(text);
export const hasControl = (text: string): boolean => CONTROL.test(text);

function error(rule: RuleNumber, cause: Cause, message: string, suggestion?: string): CellFault {
  const fault: CellFault = { rule, severity: 'error', cause, message, value: null };
  return suggestion === undefined ? fault : { ...fault, suggestion, expected: suggestion };
}

function dateFault(text: string): CellFault | null {
  const day = MONTH.exec(text);
  const first = MONTH_FIRST.exec(text);
  if (!day && !first && !ISO_DATE.test(text)) return null;
  const words = 'A spreadsheet has turned this into a date.';
  const month = MONTHS.indexOf((day?.[2] ?? first?.[1] ?? '').slice(0, 3).toLowerCase()) + 1;
  const fraction = month === 0 ? undefined : `${day?.[1] ?? first?.[2]}/${month}`;
  const hint = fraction ? `It may have been ${fraction}.` : 'Look it up in the source.';
  return error(34, 'date', `${words} ${hint}`, fraction);
}

/** A cell that can be no number, named for what has been done to it. */
function damage(text: string): CellFault | null {
  if (text.includes('\ufffd')) {
    return error(
      30,
      'replacement_character',
      'A character could not be read: the file has another encoding here.',
    );
  }
  if (hasControl(text))
    return error(38, 'control_character', 'The cell holds control characters. Type it again.');
  if (FORMULA.test(text))
    return error(38, 'formula', 'The cell is a formula; it is never worked out. Paste its value.');
  if (SPREADSHEET_ERROR.test(text)) {
    return error(
      34,
      'not_a_number',
      'A spreadsheet could not work this cell out. Look the value up in the source.',
    );
  }
  return dateFault(text);
}

const SPACES = /[\u00a0\u2009\u202f]/g;

/** Number part and unit of a cell; the unit is empty where it has none. */
function partsOf(text: string): { digits: string; unit: string } {
  const split = /^([-\d.,'\u2019\s/½¼¾⅛⅜⅝⅞⅓⅔OolI]*(?:[eE][+-]?\d+)?)\s*([a-zA-Z°"″].*)?$/.exec(text);
  return split
    ? { digits: (split[1] ?? '').trim(), unit: (split[2] ?? '').trim() }
    : { digits: text, unit: '' };
}

const FRACTION = /[/½¼¾⅛⅜⅝⅞⅓⅔]/;

/** Plain digits with a point, or what stands against the file's decimal mark or its thousands. */
function plainNumber(digits: string, mark: DecimalMark): { plain: string; fault?: 'mark' | 'groups' } | null {
  const other = mark === '.' ? ',' : '.';
  const text = digits.replaceAll(SPACES, ' ').replaceAll('\u2019', "'");
  const whole = text.split(mark)[0] ?? '';
  const parts = text.split(mark);
  if (parts.length > 2 && !text.includes(other)) {
    return { plain: text.replaceAll(/[^-\d]/g, ''), fault: 'groups' };
  }
  if (parts.length > 2) return null;
  const separators = new Set(whole.replaceAll(/[-\d]/g, ''));
  const joined = (part: string) => part.replaceAll(/[^-\d]/g, '');
  const plain = parts.length === 2 ? `${joined(whole)}.${parts[1]}` : joined(whole);
  if (!/^-?\d*\.?\d*$/.test(plain) || !/\d/.test(plain)) return null;
  if (separators.size === 0) return { plain };
  const isGrouped = separators.size === 1 && /^-?\d{1,3}(?:[ ',.]\d{3})+$/.test(whole);
  if (isGrouped) return { plain };
  if (separators.has(other) && separators.size === 1 && whole.split(other).length === 2) {
    return { plain: text.replace(other, '.').replaceAll(' ', ''), fault: 'mark' };
  }
  return { plain, fault: 'groups' };
}

const LARGEST = 1e15; // in the unit of any column: no section has such a value

function readDigits(digits: string, scale: number, mark: DecimalMark): number | CellFault {
  const read = plainNumber(digits, mark);
  const number = Number(read?.plain ?? Number.NaN);
  if (read === null || !Number.isFinite(number) || Math.abs(number) > LARGEST) {
    return error(34, 'not_a_number', `"${digits.slice(0, 40)}" is not a number of a section. Correct it.`);
  }
  const value = number * scale;
  if (read.fault === 'mark') {
    const words = mark === ',' ? 'a comma' : 'a point';
    const suggestion = read.plain.replace('.', mark);
    const message = `The file writes decimals with ${words}; this cell does not. It looks like ${suggestion}.`;
    return error(28, 'decimal_mark', message, suggestion);
  }
  if (read.fault === 'groups') {
    const suggestion = read.plain.replace('.', mark);
    const message = `Thousands are parted in threes; here they are not. It is read as ${suggestion}.`;
    return {
      rule: 29,
      severity: 'warning',
      cause: 'thousands',
      message,
      value,
      suggestion,
      expected: suggestion,
    };
  }
  return value;
}

function readFraction(text: string, column: CellColumn, scale: number): number | CellFault {
  const inches = text.replace(/^(\d+)-(?=\d+\/\d+$)/, '$1 '); // in a table 1-1/2 is no foot
  const reading = readQuantity(inches, column.quantity, { unit: column.unit });
  if (!reading.ok) return error(35, 'fraction', reading.message);
  const multiplier = scale / unitScale(column.unit, column.quantity);
  const value = reading.value * multiplier;
  if (/in|ft|["″']/.test(text) || /in|ft/.test(column.unit)) return value;
  const message = 'A fraction stands in a column that is not in inches. Look whether it is one.';
  return { rule: 35, severity: 'warning', cause: 'fraction', message, value };
}

const scales = new Map<string, number>();
/** SI value of one of the unit; NaN where it is none of the quantity. A pound per foot is a mass here. */
export function unitScale(unit: string, quantity: DimensionName): number {
  const key = `${quantity} ${unit}`;
  const before = scales.get(key);
  if (before !== undefined) return before;
  const read = unitFactor(unit, quantity);
  const scale = read.ok ? read.factor : Number.NaN;
  if (scales.size < 1000) scales.set(key, scale);
  return scale;
}

function readOddNumber(raw: string, text: string, column: CellColumn, mark: DecimalMark): number | CellFault {
  const damaged = damage(text);
  if (damaged) return damaged;
  const { digits, unit } = partsOf(text);
  const scale = unit === '' ? column.scale : unitScale(unit, column.quantity);
  if (FRACTION.test(digits) || (/["″']/.test(unit) && column.quantity === 'length')) {
    return readFraction(text, column, column.scale);
  }
  if (Number.isNaN(scale)) {
    if (/^\d/.test(text) && unit !== '') {
      return error(26, 'unit_unknown', `"${unit.slice(0, 20)}" is no unit of this column. Correct the cell.`);
    }
    return error(34, 'not_a_number', `"${text.slice(0, 40)}" is not a number. Correct it.`);
  }
  const read = readPlain(raw, digits, scale, mark);
  if (typeof read === 'number' || read.suggestion === undefined || unit === '') return read;
  const suggestion = `${read.suggestion} ${unit}`;
  return { ...read, suggestion, expected: suggestion };
}

/** The number part of a cell. */
function readPlain(raw: string, digits: string, scale: number, mark: DecimalMark): number | CellFault {
  const repaired = digits.replaceAll(ZERO_LETTER, '0').replaceAll(ONE_LETTER, '1');
  if (repaired !== digits) {
    const read = readDigits(repaired, scale, mark);
    if (typeof read !== 'number') return read;
    const message = `A letter stands where a digit should. It is read as ${repaired}.`;
    const base = { rule: 37, severity: 'warning', cause: 'letter_for_digit', message } as const;
    return { ...base, value: read, suggestion: repaired, expected: repaired };
  }
  const power = /^([\d.,]+)([eE])([+-]?\d+)$/.exec(digits);
  if (power) {
    const [, mantissa = '', e, exponent] = power;
    const read = readScientific(mantissa, Number(exponent), scale, mark);
    if (typeof read === 'number' || read.suggestion === undefined) return read;
    const suggestion = `${read.suggestion}${e}${exponent}`;
    return { ...read, suggestion, expected: suggestion };
  }
  const value = readDigits(digits, scale, mark);
  if (typeof value !== 'number' || !raw.trim().startsWith("'")) return value;
  const message = 'A hidden apostrophe makes this number a text. It is read as the number.';
  return { rule: 34, severity: 'warning', cause: 'hidden_apostrophe', message, value, suggestion: digits };
}

const CUT_FIGURES = 3; // "1.2E+03": what a narrow spreadsheet column leaves

function readScientific(
  mantissa: string,
  exponent: number,
  scale: number,
  mark: DecimalMark,
): number | CellFault {
  const value = readDigits(mantissa, scale * 10 ** exponent, mark);
  if (typeof value === 'number' && value / scale > LARGEST) return readDigits(`${LARGEST}0`, scale, mark);
  if (typeof value !== 'number') return value;
  if (exponent < CUT_FIGURES || mantissa.replaceAll(/\D/g, '').length > CUT_FIGURES) return value;
  const message =
    'A spreadsheet has written this with a power of ten and may have cut its figures. Compare the source.';
  return { rule: 34, severity: 'warning', cause: 'scientific', message, value };
}

const PLAIN = { '.': /^\d{1,12}(?:\.\d{1,12})?$/, ',': /^\d{1,12}(?:,\d{1,12})?$/ } as const;

/** One numeric cell in SI, by its own unit if it has one, else by the column's; or what is odd about it. */
export function readCell(raw: string, column: CellColumn, mark: DecimalMark): number | CellFault {
  if (PLAIN[mark].test(raw)) {
    return Number(mark === ',' ? raw.replace(',', '.') : raw) * column.scale;
  }
  return readOddNumber(raw, cellText(raw), column, mark);
}

/** The unit that a cell carries itself; empty where it has none. */
export const ownUnit = (text: string): string => {
  const last = text.charCodeAt(text.length - 1);
  return last >= 48 && last <= 57 && !/[a-z"]/i.test(text) ? '' : partsOf(cellText(text)).unit;
};

/** Half a unit of the last printed digit, in the unit of the cell: 0.05 for "26.0", 0.5 for "26". */
export function halfDigit(text: string, mark: DecimalMark): number {
  const at = text.indexOf(mark);
  if (at < 0) return 0.5;
  let decimals = 0;
  for (let k = at + 1; k < text.length; k++) {
    const code = text.charCodeAt(k);
    if (code < 48 || code > 57) break;
    decimals++;
  }
  const half = 0.5 * 10 ** -decimals;
  const power = /[eE]([+-]?\d+)/.exec(text);
  return power ? half * 10 ** Number(power[1]) : half;
}

/** Letters of other alphabets that look like those of a designation. */
const LOOK_ALIKES = /[\u0370-\u03ff\u0400-\u04ff]|[\uff00-\uffef]/;
export const hasLookAlike = (text: string): boolean => LOOK_ALIKES.test(text);
