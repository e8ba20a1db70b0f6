import type { Encoding, Refusal, RefusalCode } from './contract';

const refuse = (code: RefusalCode, message: string): Refusal => ({ code, message });

const AS_CSV = 'Open it in its own program and save the sheet as CSV.';

/** First bytes of files that people rename to .csv. */
const SIGNATURES: readonly { bytes: readonly number[]; refusal: Refusal }[] = [
  {
    bytes: [0xd0, 0xcf, 0x11, 0xe0],
    refusal: refuse('spreadsheet', `This is an old Office file. ${AS_CSV}`),
  },
  {
    bytes: [0x1f, 0x8b],
    refusal: refuse('archive', 'This is a gzip archive. Unpack it and give the CSV inside.'),
  },
  { bytes: [0x42, 0x5a, 0x68], refusal: refuse('archive', 'This is a bzip2 archive. Unpack it first.') },
  { bytes: [0x37, 0x7a, 0xbc, 0xaf], refusal: refuse('archive', 'This is a 7z archive. Unpack it first.') },
  { bytes: [0x52, 0x61, 0x72, 0x21], refusal: refuse('archive', 'This is a RAR archive. Unpack it first.') },
  {
    bytes: [0xfd, 0x37, 0x7a, 0x58, 0x5a],
    refusal: refuse('archive', 'This is an xz archive. Unpack it first.'),
  },
  { bytes: [0x28, 0xb5, 0x2f, 0xfd], refusal: refuse('archive', 'This is a zstd archive. Unpack it first.') },
  {
    bytes: [0x25, 0x50, 0x44, 0x46],
    refusal: refuse('document', 'This is a PDF. Ask the supplier for the table as CSV.'),
  },
  { bytes: [0x7b, 0x5c, 0x72, 0x74], refusal: refuse('document', `This is an RTF document. ${AS_CSV}`) },
  { bytes: [0x89, 0x50, 0x4e, 0x47], refusal: refuse('image', 'This is a PNG picture, not a table.') },
  { bytes: [0xff, 0xd8, 0xff], refusal: refuse('image', 'This is a JPEG picture, not a table.') },
  { bytes: [0x47, 0x49, 0x46, 0x38], refusal: refuse('image', 'This is a GIF picture, not a table.') },
  { bytes: [0x7f, 0x45, 0x4c, 0x46], refusal: refuse('binary', 'This is a program, not a table.') },
  { bytes: [0x4d, 0x5a, 0x90], refusal: refuse('binary', 'This is a program, not a table.') },
  {
    bytes: [0x50, 0x41, 0x52, 0x31],
    refusal: refuse('binary', 'This is a Parquet file. Export the table as CSV.'),
  },
];

const startsWith = (head: Uint8Array, bytes: readonly number[]) =>
  bytes.every((byte, at) => head[at] === byte);
const latin1 = new TextDecoder('windows-1252');

function zipRefusal(head: Uint8Array): Refusal {
  const names = latin1.decode(head);
  if (/xl\/|\[Content_Types\]|mimetypeapplication\/vnd/.test(names)) {
    return refuse('spreadsheet', `This is a workbook, whatever its name ends with. ${AS_CSV}`);
  }
  return refuse('archive', 'This is a zip archive. Unpack it and give the CSV inside.');
}

function textRefusal(head: Uint8Array): Refusal | null {
  const start = latin1.decode(head.subarray(0, 512)).replace(/^ï»¿/, '').trimStart();
  if (/^(<!doctype html|<html|<table|<\?xml|<svg)/i.test(start)) {
    return refuse('markup', 'This is a web page or XML, not CSV. Download the table itself, as CSV.');
  }
  if (/^(\{\s*"|\[\s*[[{"])/.test(start))
    return refuse('markup', 'This is JSON, not CSV. Export the table as CSV.');
  return /^SQLite format 3/.test(start)
    ? refuse('binary', 'This is a database file. Export the table as CSV.')
    : null;
}

/** Why these first bytes cannot be a CSV; null where they may be one. */
export function refusalOf(head: Uint8Array): Refusal | null {
  if (startsWith(head, [0x50, 0x4b, 3, 4]) || startsWith(head, [0x50, 0x4b, 5, 6])) return zipRefusal(head);
  const signed = SIGNATURES.find(({ bytes }) => startsWith(head, bytes));
  return signed?.refusal ?? textRefusal(head);
}

export type EncodingReading =
  | { kind: 'known'; encoding: Encoding; bom: boolean }
  /** To be asked, the likeliest first. */
  | { kind: 'open'; choices: Encoding[] }
  | { kind: 'refused'; refusal: Refusal };

/** Of the bytes; UTF-16 of Latin letters has half of them. */
export const BINARY_SHARE = 0.02;

/** UTF-16 without a mark: every other byte of Latin text is 0. */
function wideEncoding(head: Uint8Array): Encoding[] | null {
  let even = 0;
  let odd = 0;
  for (let at = 0; at < head.length; at++) {
    if (head[at] !== 0) continue;
    if (at % 2 === 0) even++;
    else odd++;
  }
  const half = head.length / 2;
  if (odd > 0.3 * half && even < 0.05 * half) return ['utf-16le', 'utf-16be'];
  return even > 0.3 * half && odd < 0.05 * half ? ['utf-16be', 'utf-16le'] : null;
}

/** How many control bytes there are that no text has. */
export function binaryBytes(bytes: Uint8Array): number {
  let count = 0;
  for (const byte of bytes) if (byte < 32 && byte !== 9 && byte !== 10 && byte !== 13) count++;
  return count;
}

/** UTF-8 up to the last whole character of what was cut off. */
function isUtf8(head: Uint8Array, isWhole: boolean): boolean {
  let end = head.length;
  for (let back = 1; !isWhole && back <= 3 && back <= head.length; back++) {
    if (((head[head.length - back] ?? 0) & 0xc0) === 0xc0) {
      end = head.length - back;
      break;
    }
  }
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(head.subarray(0, end));
    return true;
  } catch (error) {
    if (error instanceof TypeError) return false;
    throw error;
  }
}

const ONE_BYTE: Encoding[] = ['windows-1252', 'windows-1251', 'iso-8859-2', 'macintosh'];

/** Encoding by byte order mark or because it is UTF-8; what is neither has to be asked. */
export function encodingOf(head: Uint8Array, isWhole: boolean): EncodingReading {
  if (startsWith(head, [0xef, 0xbb, 0xbf])) return { kind: 'known', encoding: 'utf-8', bom: true };
  if (startsWith(head, [0xff, 0xfe])) return { kind: 'known', encoding: 'utf-16le', bom: true };
  if (startsWith(head, [0xfe, 0xff])) return { kind: 'known', encoding: 'utf-16be', bom: true };
  const wide = wideEncoding(head);
  if (wide) return { kind: 'open', choices: wide };
  if (binaryBytes(head) > BINARY_SHARE * head.length) {
    return { kind: 'refused', refusal: refuse('binary', 'This is no text. Give the table as CSV.') };
  }
  if (isUtf8(head, isWhole)) return { kind: 'known', encoding: 'utf-8', bom: false };
  return { kind: 'open', choices: [...ONE_BYTE, 'utf-8'] };
}

const SAMPLES = 3;

/** Up to three cells with letters beyond ASCII, as an encoding reads them. */
export function samplesOf(head: Uint8Array, encoding: Encoding): string[] {
  const text = new TextDecoder(encoding).decode(head);
  const cells = text.split(/[\r\n,;\t|"]+/).map((cell) => cell.trim());
  const telling = cells.filter(
    (cell) => cell !== '' && (encoding.startsWith('utf-16') || /[^ -~]/.test(cell)),
  );
  return [...new Set(telling)].slice(0, SAMPLES).map((cell) => cell.slice(0, 60));
}
