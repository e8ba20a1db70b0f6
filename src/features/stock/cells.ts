import { readQuantity } from '@/engine/quantity';
import { cellText, hasControl, isMissing } from '@/features/section/import/cells';
import type { DecimalMark } from '@/features/section/import/contract';
import { decimalMarkOf } from '@/features/section/import/marks';
import { type Holding, LENGTH, MOST_LEAD_DAYS, MOST_LENGTHS, MOST_NOTE, PRICE_BANDS } from './stock';

export type StockField = 'designation' | 'table' | 'lengths' | 'lead_time' | 'price_band' | 'note';
/** The cells of a line, as they stand in the file. */
export type StockTexts = Readonly<Record<StockField, string>>;

/** How the cells of a file are read. */
export interface ReadAs {
  /** Null: the file does not tell whether its commas are decimal marks or stand between lengths. */
  readonly mark: DecimalMark | null;
  /** Of lengths that have none of their own. */
  readonly lengthUnit: string;
  /** Days in a lead time of one. */
  readonly leadDays: 1 | 7;
}

/** How a person's own figures are read: metres and days; a comma may be meant either way. */
export const BY_HAND: ReadAs = { mark: null, lengthUnit: 'm', leadDays: 1 };

export interface CellFault {
  readonly field: StockField;
  /** As read. */
  readonly value: string;
  readonly code: string;
  readonly message: string;
}

type Cell<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly fault: CellFault };

const good = <T>(value: T): Cell<T> => ({ ok: true, value });
const SHOWN = 60;
const bad = (field: StockField, value: string, code: string, message: string): Cell<never> => ({
  ok: false,
  fault: { field, value: value.slice(0, SHOWN), code, message },
});

const FEET_AND_INCHES = /["″'′]|\b(?:in|ft)\b/i;
const BETWEEN = /[;|\n]|,\s+|\s+(?:and|&|\+)\s+/;
/** Where nothing is in feet and inches, whose fractions and parts look the same. */
const BETWEEN_PLAIN = /[;|\n/]|,\s+|\s+(?:and|&|\+)\s+|(?<=\d)\s+(?=\d)/;

const partsOf = (text: string): string[] =>
  text
    .split(FEET_AND_INCHES.test(text) ? BETWEEN : BETWEEN_PLAIN)
    .map((part) => part.trim())
    .filter((part) => part !== '');

/**
 * What a comma between two digits is in the lengths of a file. Where commas part the cells and nothing else has a
 * decimal point, "6,12" may be one length or two: null, and the cell is refused.
 */
export function lengthMarkOf(cells: readonly string[], delimiter: string): DecimalMark | null {
  const parts = cells.flatMap((cell) => partsOf(cellText(cell)));
  if (!parts.some((part) => /\d,\d/.test(part))) return '.';
  const hasPoint = parts.some((part) => /\d\.\d/.test(part));
  if (delimiter === ',') return hasPoint ? '.' : null;
  return decimalMarkOf(parts).mark ?? (hasPoint ? null : ',');
}

const AMBIGUOUS =
  'A comma between two digits may be a decimal mark or stand between two lengths. Put a semicolon between lengths, and a point in each.';
const RANGE = `Stock is from ${LENGTH.least} m to ${LENGTH.most} m long`;
const MM = 1e6; // lengths are kept to a thousandth of a millimetre: a foot is no round number of metres

/** Lengths in m, the shortest first: "6; 7.5; 12", "6/12 m", "6000 mm", "40 ft". */
export function readLengths(cell: string, { mark, lengthUnit }: ReadAs): Cell<number[]> {
  const text = cellText(cell);
  if (isMissing(text)) return good([]);
  if (mark === null && /\d,\d/.test(text)) return bad('lengths', text, 'ambiguous_number', AMBIGUOUS);
  const parts = partsOf(text).flatMap((part) =>
    mark === ',' ? [part.replace(/(?<=\d),(?=\d)/, '.')] : part.split(/(?<=\d),(?=\d)/),
  );
  const lengths: number[] = [];
  for (const part of parts) {
    const read = readQuantity(part, 'length', { unit: lengthUnit });
    if (!read.ok) return bad('lengths', text, 'not_a_number', read.message);
    const metres = Math.round(read.value * MM) / MM;
    if (metres < LENGTH.least || metres > LENGTH.most) {
      const words = `${RANGE}; “${part.slice(0, SHOWN)}” is read as ${metres} m. Correct it, or say the unit: in the heading, as “lengths (mm)”, or in the cell.`;
      return bad('lengths', text, 'out_of_range', words);
    }
    lengths.push(metres);
  }
  const sorted = [...new Set(lengths)].sort((a, b) => a - b);
  return sorted.length > MOST_LENGTHS
    ? bad('lengths', text, 'out_of_range', `Give at most ${MOST_LENGTHS} lengths.`)
    : good(sorted);
}

const DAYS = /^(\d{1,4})\s*(?:d|days?|tage?|jours?|working days)?$/i;
const WEEKS = /^(\d{1,3})\s*(?:w|wks?|weeks?|wochen?|semaines?)$/i;
const AT_ONCE = /^(?:ex[- ]?stock|in stock|stock|ab lager|en stock)$/i;

/** Days until it is there: "5", "5 days", "2 weeks", "ex stock". */
export function readLeadTime(cell: string, { leadDays }: ReadAs): Cell<number | null> {
  const text = cellText(cell);
  if (isMissing(text)) return good(null);
  if (AT_ONCE.test(text)) return good(0);
  const weeks = WEEKS.exec(text)?.[1];
  const bare = /^\d+$/.test(text);
  const days = DAYS.exec(text)?.[1];
  const value = weeks ? 7 * Number(weeks) : Number(days ?? Number.NaN) * (bare ? leadDays : 1);
  if (Number.isNaN(value))
    return bad(
      'lead_time',
      text,
      'not_a_number',
      'This is no lead time. Give whole days, as 5, or “2 weeks”.',
    );
  return value > MOST_LEAD_DAYS
    ? bad('lead_time', text, 'out_of_range', `A lead time is at most ${MOST_LEAD_DAYS} days.`)
    : good(value);
}

export function readBand(cell: string): Cell<Holding['price_band']> {
  const text = cellText(cell);
  if (isMissing(text)) return good(null);
  const band = PRICE_BANDS.find((one) => one === text.replace(/^band\s+/i, '').toUpperCase());
  return band
    ? good(band)
    : bad('price_band', text, 'not_allowed', `A price band is one of ${PRICE_BANDS.join(', ')}, or empty.`);
}

function readNote(cell: string): Cell<string> {
  const text = cellText(cell).replaceAll(/\s+/g, ' ');
  return text.length > MOST_NOTE
    ? bad('note', text, 'out_of_range', `A note has at most ${MOST_NOTE} characters.`)
    : good(text);
}

/** What a line says of its section, or everything that is wrong with its cells. */
export function readHolding(texts: StockTexts, as: ReadAs): Holding | readonly CellFault[] {
  const odd = Object.entries(texts).find(([, text]) => hasControl(text.replaceAll(/[\n\t]/g, ' ')));
  if (odd) {
    const [field, text] = odd as [StockField, string];
    // biome-ignore lint/suspicious/noControlCharactersInRegex: they are what is taken out
    const shown = text.replaceAll(/[\u0000-\u001f\u007f]/g, '·').slice(0, SHOWN);
    const message = 'The cell holds control characters. Type it again.';
    return [{ field, value: shown, code: 'control_character', message }];
  }
  const lengths = readLengths(texts.lengths, as);
  const lead = readLeadTime(texts.lead_time, as);
  const band = readBand(texts.price_band);
  const note = readNote(texts.note);
  if (lengths.ok && lead.ok && band.ok && note.ok)
    return {
      lengths_m: lengths.value,
      lead_time_days: lead.value,
      price_band: band.value,
      note: note.value,
    };
  return [lengths, lead, band, note].flatMap((cell) => (cell.ok ? [] : [cell.fault]));
}
