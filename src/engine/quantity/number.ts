/** A number read, or why it could not be. `values` are the two readings of an ambiguous one. */
export type NumberReading =
  | { ok: true; value: number }
  | { ok: false; code: 'not_a_number' }
  | { ok: false; code: 'ambiguous_number'; values: readonly [string, string] };

const NOT_A_NUMBER: NumberReading = { ok: false, code: 'not_a_number' };

const VULGAR: Readonly<Record<string, string>> = {
  '½': '1/2',
  '⅓': '1/3',
  '⅔': '2/3',
  '¼': '1/4',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

/**
 * One spelling for the characters people use: fraction characters written out, full-width and superscript digits,
 * thin and no-break spaces, minus signs and dashes, primes and quotes.
 */
export function plainText(text: string): string {
  return text
    .replaceAll(/[½⅓⅔¼¾⅛⅜⅝⅞]/g, (character) => ` ${VULGAR[character] ?? character}`)
    .replaceAll(/[\u2018\u2019\u2032\u02b9\u00b4`]/g, "'")
    .replaceAll(/[\u201c\u201d\u2033]/g, '"')
    .normalize('NFKC')
    .replaceAll("''", '"')
    .replaceAll(/[\u2212\u2010-\u2015]/g, '-')
    .replaceAll('\u2044', '/')
    .replaceAll(/\s+/g, ' ')
    .trim();
}

/** A fraction, or digits with their separators and an exponent: what readNumber is given. */
export const NUMBER_PATTERN = String.raw`(?:\d+[ -])?\d+\/\d+|[\d.,]+(?:[ ']\d{3}(?!\d))*[.,\d]*(?:(?:[eE]|[×*x] ?10\^?)[+-]?\d+)?`;

/** Removes the thousands separators, or says that the text can be read in two ways. */
function readDigits(text: string): NumberReading {
  const isGrouped = /^\d{1,3}(?:[ ']\d{3})+(?=[.,]|$)/.test(text);
  const digits = text.replaceAll(/[ ']/g, '');
  if (!isGrouped && digits !== text) return NOT_A_NUMBER;
  if (!isGrouped && /^[1-9]\d{0,2},\d{3}$/.test(digits)) {
    const values = [digits.replace(',', ''), digits.replace(',', '.')] as const;
    return { ok: false, code: 'ambiguous_number', values };
  }
  const byComma = /^[1-9]\d{0,2}(?:(?:,\d{3}){2,}|,\d{3}(?=\.))(?:\.\d*)?$/.test(digits);
  const byPoint = /^[1-9]\d{0,2}(?:(?:\.\d{3}){2,}|\.\d{3}(?=,))(?:,\d*)?$/.test(digits);
  const ungrouped = byComma ? digits.replaceAll(',', '') : byPoint ? digits.replaceAll('.', '') : digits;
  const plain = ungrouped.replace(',', '.');
  return /^(?:\d+\.?\d*|\.\d+)$/.test(plain) ? { ok: true, value: Number(plain) } : NOT_A_NUMBER;
}

/**
 * An unsigned number in plain text: 12.5, 3,8, 1 234.5, 1'234, 7/16, 1 1/2, 1-1/2, 2e7, 2×10^7. One comma before
 * three digits ("1,234") is ambiguous; a comma that cannot part thousands ("0,125", "1234,567") is a decimal comma.
 */
export function readNumber(text: string): NumberReading {
  const fraction = /^(?:(\d+)[ -])?(\d+)\/(\d+)$/.exec(text);
  if (fraction) {
    const value = Number(fraction[1] ?? 0) + Number(fraction[2]) / Number(fraction[3]);
    return Number.isFinite(value) ? { ok: true, value } : NOT_A_NUMBER;
  }
  const power = /^(.+?)(?:[eE]|[×*x] ?10\^?)([+-]?\d+)$/.exec(text);
  const digits = readDigits(power?.[1] ?? text);
  if (!digits.ok || !power) return digits;
  const value = Number(`${digits.value}e${power[2]}`);
  return Number.isFinite(value) ? { ok: true, value } : NOT_A_NUMBER;
}
