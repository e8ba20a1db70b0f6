import { cellText } from './cells';
import type { DecimalMark } from './contract';

const GROUP = String.raw`[ '\u00a0\u2009\u202f\u2019]`;
const POINT = new RegExp(String.raw`^-?\d*(?:${GROUP}\d{3})*\.(?:\d{1,2}|\d{4,})(?:\D|$)`);
const COMMA = new RegExp(String.raw`^-?\d*(?:${GROUP}\d{3})*,(?:\d{1,2}|\d{4,})(?:\D|$)`);
/** Both marks: the last one is that of the decimals. */
const COMMA_THEN_POINT = /^\d{1,3}(?:,\d{3})+\.\d+$/;
const POINT_THEN_COMMA = /^\d{1,3}(?:\.\d{3})+,\d+$/;
const EITHER = /^-?[1-9]\d{0,2}[.,]\d{3}$/;

const TELLING = 20; // cells that can be read one way only, from which a stray one on the other side says nothing
const OUTVOTED = 3; // times as many, where there are fewer

export type MarkReading = { mark: DecimalMark | null; points: string[]; commas: string[] };

/**
 * The decimal mark of a file, by what its cells can only mean; "1,234" tells nothing. Null on a tie, or where there are
 * only such cells: then a person is asked, with three samples of each.
 */
export function decimalMarkOf(cells: readonly string[]): MarkReading {
  const texts = cells.map(cellText).filter((text) => /[.,]/.test(text) && /^[-\d]/.test(text));
  const isPoint = (text: string) => POINT.test(text) || COMMA_THEN_POINT.test(text);
  const isComma = (text: string) => COMMA.test(text) || POINT_THEN_COMMA.test(text);
  const points = texts.filter(isPoint);
  const commas = texts.filter(isComma);
  const most = Math.max(points.length, commas.length);
  const least = Math.min(points.length, commas.length);
  const isClear = most > 0 && (most >= TELLING ? most > least : most > OUTVOTED * least);
  const open = texts.filter((text) => EITHER.test(text));
  const samples = (found: readonly string[]) => [...found, ...open].slice(0, 3);
  const isPlain = texts.length === 0 || (most === 0 && open.every((text) => !text.includes(',')));
  const mark = isClear ? (points.length > commas.length ? '.' : ',') : isPlain ? '.' : null;
  return { mark, points: samples(points), commas: samples(commas) };
}

const THOUSANDS: readonly [string, RegExp][] = [
  ['space', /^\d{1,3}(?: \d{3})+(?:\D|$)/],
  ['no-break space', /^\d{1,3}(?:[\u00a0\u202f]\d{3})+(?:\D|$)/],
  ['thin space', /^\d{1,3}(?:\u2009\d{3})+(?:\D|$)/],
  ['apostrophe', /^\d{1,3}(?:['\u2019]\d{3})+(?:\D|$)/],
];

/** The marks that part thousands, in words. */
export function thousandsMarksOf(cells: readonly string[], mark: DecimalMark | null): string[] {
  const other = mark === '.' ? /^\d{1,3}(?:,\d{3})+(?:\.|$)/ : /^\d{1,3}(?:\.\d{3})+(?:,|$)/;
  const kinds: [string, RegExp][] = [...THOUSANDS, [mark === '.' ? 'comma' : 'point', other]];
  return kinds
    .filter(([, pattern]) => cells.some((cell) => pattern.test(cell.trim())))
    .map(([words]) => words);
}
