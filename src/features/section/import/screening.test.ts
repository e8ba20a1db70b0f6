import { describe, expect, test } from 'vitest';
import { Screening } from './index';

const HEAD = 'name,h (mm),b (mm),shape\n';
const ROW = '47x200,200,47,rectangle\n';
/** More than recognition reads. */
const LONG = HEAD + ROW.repeat(6000);

const bytesOf = (...parts: readonly (string | Uint8Array)[]) =>
  new Uint8Array(Buffer.concat(parts.map((part) => (typeof part === 'string' ? Buffer.from(part) : part))));

/** What is said of a file that arrives in pieces of so many bytes, and how much of it was looked at. */
function screen(bytes: Uint8Array, piece: number) {
  const screening = new Screening('a.csv');
  for (let at = 0; at < bytes.length; at += piece) {
    const refusal = screening.push(bytes.subarray(at, at + piece));
    if (refusal) return { refusal, read: at + piece };
  }
  const reading = screening.finish();
  return { refusal: reading.ok ? null : reading.refusal, read: bytes.length };
}

const REFUSED: readonly [string, Uint8Array, string, RegExp][] = [
  [
    'a quote that never ends',
    bytesOf(LONG, '"47x200,1\n', ROW.repeat(60_000)),
    'unclosed_quote',
    /line 6002 never/,
  ],
  ['a quote at the very end', bytesOf(LONG, '"47x200,1'), 'unclosed_quote', /line 6002 never/],
  ['a line of 2 MB', bytesOf(LONG, 'x'.repeat(2_000_000)), 'cell_too_long', /Line 6002/],
  ['a stretch of zeros', bytesOf(LONG, new Uint8Array(5000), ROW.repeat(9000)), 'binary', /no text/],
  [
    'another file behind it',
    bytesOf(
      LONG,
      Uint8Array.from({ length: 40_000 }, (_, k) => k % 11),
    ),
    'binary',
    /no text/,
  ],
  ['too many rows', bytesOf(HEAD, 'a,1,1,i\n'.repeat(300_001)), 'too_many_rows', /300000/],
  ['no row as long as the headings', bytesOf(HEAD, 'a,1\n'.repeat(30_000)), 'no_rows', /line 2 has 2/],
  ['no row that is a section', bytesOf(HEAD, 'see the catalogue,,,\n'.repeat(4000)), 'no_rows', /no row/],
  ['nothing', bytesOf(''), 'empty', /empty/],
];

const utf16 = (text: string) => bytesOf(new Uint8Array([0xff, 0xfe]), Buffer.from(text, 'utf16le'));
const TAKEN: readonly [string, Uint8Array][] = [
  ['a short file', bytesOf(HEAD, ROW)],
  ['a long file', bytesOf(LONG)],
  ['a file of exactly what is read to recognise it', bytesOf(HEAD, ROW.repeat(3000)).subarray(0, 65_536)],
  [
    'a bad byte and a few control characters far down',
    bytesOf(LONG, '47\u0000x2,\u00072,47,i\n', Buffer.from([0xe4]), ROW),
  ],
  ['a quoted cell of several lines far down', bytesOf(LONG, '"47x\n200",200,47,rectangle\n')],
  ['rows of other lengths among the good ones', bytesOf(LONG, 'a\n', 'a,b\n', 'a,1,1,i,,,\n')],
  ['UTF-16', utf16(LONG)],
  ['UTF-16 without its mark', utf16(LONG).subarray(2)],
  ['UTF-8 with its mark', bytesOf('\ufeff', LONG)],
  ['blank lines', bytesOf(LONG, '\n'.repeat(200_000), ROW)],
];

describe('a file, screened as it arrives', () => {
  describe.each([1000, 65_536, 10_000_000])('in pieces of %d', (piece) => {
    test.each(REFUSED)('is refused for %s', (_, bytes, code, words) => {
      const { refusal } = screen(bytes, piece);
      expect(refusal).toMatchObject({ code, message: expect.stringMatching(words) });
    });
    test.each(TAKEN)('is taken: %s', (_, bytes) => {
      expect(screen(bytes, piece).refusal).toBeNull();
    });
  });

  test('is read no further than its fault', () => {
    const faulty = bytesOf(LONG, new Uint8Array(5000), ROW.repeat(90_000));
    expect(screen(faulty, 65_536).read).toBeLessThan(LONG.length + 3 * 65_536);
  });
});
