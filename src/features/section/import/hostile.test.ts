import { gzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { type Imported, importBytes } from '../../../../tests/support/section-import';
import { MOST_BYTES } from './contract';
import { recognise } from './index';

const utf8 = (text: string) => new TextEncoder().encode(text);
const utf16 = (text: string, bom: boolean) =>
  new Uint8Array(Buffer.concat([Buffer.from(bom ? [0xff, 0xfe] : []), Buffer.from(text, 'utf16le')]));
const joined = (...parts: Uint8Array[]) => new Uint8Array(Buffer.concat(parts));

const HEAD = 'name,h (mm),b (mm),shape';
const ROWS = ['47x200,200,47,rectangle', '47x225,225,47,rectangle', '47x250,250,47,rectangle'];
const file = (...lines: string[]) => utf8(`${lines.join('\n')}\n`);
const clean = file(HEAD, ...ROWS);

/** Everything that a person is told: refusal, questions, findings. */
const told = ({ refusal, questions, findings }: Imported): string =>
  [
    ...(refusal ? [`${refusal.code}: ${refusal.message}`] : []),
    ...questions.map(({ kind, message }) => `${kind}: ${message}`),
    ...findings.map(({ cause, message }) => `${cause}: ${message}`),
  ].join('\n');

const LIMIT = 2000; // ms of processor time

const zip = joined(Uint8Array.from([0x50, 0x4b, 3, 4, 20, 0, 0, 0]), utf8('readme.txt and more'));
const workbook = joined(
  Uint8Array.from([0x50, 0x4b, 3, 4, 20, 0, 6, 0]),
  utf8('[Content_Types].xml … xl/workbook.xml'),
);
const noise = Uint8Array.from({ length: 4096 }, (_, k) => (k * 7919 + (k % 13) * 31) % 256);

const CASES: readonly [string, Uint8Array, RegExp, number][] = [
  ['0 bytes', new Uint8Array(0), /^empty: The file is empty/, 0],
  ['blank lines only', utf8('\n'.repeat(1_000_000)), /^(empty|cell_too_long|no_rows)/, 0],
  [
    'a million blank lines between rows',
    joined(file(HEAD, ROWS[0] ?? ''), utf8('\n'.repeat(1_000_000)), file(ROWS[1] ?? '')),
    /^$/,
    2,
  ],
  ['a zip archive', zip, /^archive: This is a zip archive/, 0],
  ['a workbook named .csv', workbook, /^spreadsheet: .*save the sheet as CSV/, 0],
  ['an old workbook', Uint8Array.from([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1, 0x1a, 0xe1]), /^spreadsheet/, 0],
  ['a gzip archive', new Uint8Array(gzipSync(clean)), /^archive: This is a gzip archive/, 0],
  ['a PDF', utf8('%PDF-1.7\n%âãÏÓ'), /^document: This is a PDF/, 0],
  ['a picture', Uint8Array.from([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10]), /^image/, 0],
  ['a web page', utf8('<!DOCTYPE html>\n<html><body><table></table></body></html>'), /^markup/, 0],
  ['JSON', utf8('[{"name": "IPE 100", "h": 100}]'), /^markup: This is JSON/, 0],
  ['binary noise', noise, /^binary/, 0],
  ['NULs in the text', utf8(`${HEAD}\n47x200\0,200,47,rectangle\n`), /^control_character: .*control/, 0],
  ['control characters', file(HEAD, '47x200,20\u00070,47,rectangle'), /^control_character/, 0],
  ['one column', file('name', 'IPE 100', 'IPE 120'), /^one_column/, 0],
  [
    'ten thousand columns',
    file(['name', ...Array(9999).fill('h (mm)')].join(','), 'x'),
    /^too_many_columns: .*more than \d+ columns; 250 is the most/,
    0,
  ],
  ['one cell of 5 MB', joined(utf8(`${HEAD}\n`), utf8('x'.repeat(5_000_000))), /^cell_too_long/, 0],
  [
    'one quoted cell of 5 MB',
    joined(utf8(`${HEAD}\n"`), utf8('x'.repeat(5_000_000)), utf8('",1,2,rectangle\n')),
    /^unclosed_quote/,
    0,
  ],
  [
    'an unclosed quote',
    file(HEAD, '"47x200,200,47,rectangle', ROWS[1] ?? ''),
    /^unclosed_quote: .*line 2/,
    0,
  ],
  [
    'an unclosed quote in a long file',
    joined(file(HEAD, '"47x200,200,47,rectangle'), utf8(`${ROWS[1]}\n`.repeat(100_000))),
    /^unclosed_quote: .*line 2/,
    0,
  ],
  ['only a heading', file(HEAD), /^no_rows/, 0],
  ['no heading', file('47x200,200,47', '47x225,225,47'), /^no_headings/, 0],
  [
    'words that are no headings',
    file('lorem,ipsum,dolor', 'sit,amet,elit'),
    /^no_headings: .*lorem, ipsum, dolor/,
    0,
  ],
  [
    'rows of other lengths',
    file(HEAD, '47x200,200', ROWS[1] ?? '', '1,2,3,4,5,6,7'),
    /ragged_row: The row has 2 cells where the headings have 4/,
    1,
  ],
  [
    'headings twice',
    file('name,h (mm),h (mm),b (mm),shape', '47x200,200,200,47,rectangle'),
    /column_repeated: .*stands twice/,
    1,
  ],
  [
    'formulas',
    file(HEAD, "=cmd|'/C calc'!A0,200,47,rectangle", '47x225,=1+1,47,rectangle'),
    /formula: .*never worked out/,
    0,
  ],
  ['a number of 400 digits', file(HEAD, `47x200,${'9'.repeat(400)},47,rectangle`), /not_a_number/, 0],
  ['a number beyond any size', file(HEAD, '47x200,1e308,47,rectangle'), /not_a_number/, 0],
  [
    'Latin 1 without a mark',
    joined(utf8(`${HEAD},H`), Uint8Array.from([0xf6]), utf8(`he\n${ROWS[0]},x\n`)),
    /^encoding: .*not marked/,
    0,
  ],
  [
    'two encodings',
    joined(utf8(`${HEAD},Höhe\n`), utf8('47x200,200,47,rectangle,'), Uint8Array.from([0xe4]), utf8('\n')),
    /^encoding/,
    0,
  ],
  [
    'a bad byte far down',
    joined(
      utf8(`${HEAD}\n`),
      utf8(`${ROWS[0]}\n`.repeat(4000)),
      Uint8Array.from([0xe4]),
      utf8('x225,225,47,rectangle\n'),
    ),
    /replacement_character/,
    1,
  ],
  ['UTF-16 without a mark', utf16(`${HEAD}\n${ROWS.join('\n')}\n`, false), /^encoding/, 0],
  [
    'names that every object has',
    file(
      'name,constructor,h (mm),b (mm),shape',
      'constructor 1,x,200,47,constructor',
      '__proto__ 2,y,225,47,rectangle',
    ),
    /shape_unknown: "constructor" is no shape/,
    1,
  ],
  [
    'decimal marks that may be either',
    file('name;h (mm);b (mm);shape', 'A 1;1,200;1,047;rectangle'),
    /^decimal_mark: .*1,200/,
    0,
  ],
];

describe('a file that is none, or that is spoilt, is told apart within two seconds', () => {
  test('there are twenty kinds and more', () => expect(CASES.length).toBeGreaterThanOrEqual(30));

  test.each(CASES)('%s', (_name, bytes, words, rows) => {
    const start = process.cpuUsage();
    const imported = importBytes(bytes);
    const { user, system } = process.cpuUsage(start);
    expect((user + system) / 1000).toBeLessThan(LIMIT);
    expect(told(imported)).toMatch(words);
    expect(imported.rows).toHaveLength(rows);
  });

  test('more than 50 MB', () => {
    const recognition = recognise(clean, { name: 'a.csv', size: MOST_BYTES + 1 });
    expect(recognition).toMatchObject({ ok: false, refusal: { code: 'too_large' } });
  });

  test('UTF-16 with its mark is read', () => {
    expect(importBytes(utf16(`${HEAD}\n${ROWS.join('\n')}\n`, true)).rows).toHaveLength(3);
  });

  test('sep= names the delimiter', () => {
    const imported = importBytes(
      file('sep=;', HEAD.replaceAll(',', ';'), ...ROWS.map((row) => row.replaceAll(',', ';'))),
    );
    expect(imported.rows).toHaveLength(3);
    expect(imported.findings).toEqual([]);
  });
});
