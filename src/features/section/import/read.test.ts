import { describe, expect, test } from 'vitest';
import { type SectionTableMeta, sectionRowSchema, sectionTableMetaSchema } from '../section';
import type { ImportFault } from './fault';
import { readSectionTable } from './read';

const meta = (change: Partial<SectionTableMeta> = {}): SectionTableMeta => ({
  ...sectionTableMetaSchema.parse({
    slug: 'ottervane',
    reference: 'ST-90',
    name: 'Ottervane sections',
    words: ['OV'],
    standard: 'maker',
    source: 'Ottervane Section Works, issue 7',
    edition: '7',
    catalogue_date: '2026-01-01',
    conventions: 'EN',
    licence: 'invented',
    notes: [],
  }),
  axes: 'en',
  shape: 'i',
  ...change,
});

const HEADINGS =
  'Profil;h (mm);b (mm);s (mm);t (mm);r (mm);G kg/m;A (cm2);Iy (cm4);Wel,y (cm3);Wpl,y (cm3);Iz (cm4);IT (cm4);Iw (10³ cm⁶)';
const CLEAN = [
  'OV 180×90×18;178;90;5,0;7,6;8;17,6;22,4;1208;136;154;93;3,9;6,7',
  'OV 210×110×24;208;110;5,6;9,0;9;24,4;31,1;2342;225;254;200;7,4;19,8',
  'OV 260×130×32;258;130;6,2;9,8;10;32,3;41,1;4744;368;414;360;11,4;55,4',
  'OV 310×150×43;308;150;6,9;11,2;12;42,8;54,5;8985;583;657;631;19,7;139',
  'OV 360×165×53;358;165;7,6;12,4;12;53,0;67,5;14 899;832;938;930;28,9;278',
  'OVC 205×205×51;208;205;7,6;12,0;12;50,6;64,4;5224;502;558;1724;29,3;166',
];
const file = (...lines: string[]) => `${lines.join('\r\n')}\r\n`;
const only = (faults: readonly ImportFault[]) =>
  faults.map(({ line, code, severity }) => ({ line, code, severity }));

describe('a clean file with semicolons and decimal commas', () => {
  const reading = readSectionTable(file(HEADINGS, ...CLEAN), meta());

  test('is read without a word', () => {
    expect(reading.faults).toEqual([]);
    expect(reading.ok).toBe(true);
    expect(reading.rows).toHaveLength(6);
  });

  test('keeps the supplied values, and marks what it computes', () => {
    const row = reading.rows[4];
    expect(sectionRowSchema.safeParse(row).success).toBe(true);
    expect(row).toMatchObject({
      printed: 'OV 360×165×53',
      designation: 'OV 360x165x53',
      key: 'ov360x165x53',
      shape: 'i',
      depth_mm: 358,
      width_mm: 165,
      mass_kg_m: 53,
      area_cm2: 67.5,
      i_major_cm4: 14899,
      iw_cm6: 278000,
      computed: ['w_el_minor_cm3', 'w_pl_minor_cm3'],
      dimensions: { shape: 'i', h: 0.358, b: 0.165, tw: 0.0076, tf: 0.0124, r: 0.012 },
    });
  });
});

/** Line 1 is the heading; `change` replaces the clean row of that line. */
const withRow = (line: number, text: string) =>
  readSectionTable(file(HEADINGS, ...CLEAN.map((row, index) => (index + 2 === line ? text : row))), meta());

describe('the thirteen faults of the demo file are all found', () => {
  test.each<[string, number, string, string, RegExp]>([
    [
      'Iy in mm⁴',
      3,
      'OV 210×110×24;208;110;5,6;9,0;9;24,4;31,1;23420000;225;254;200;7,4;19,8',
      'implausible',
      /mm⁴ under a heading of cm⁴/,
    ],
    [
      'moduli exchanged',
      4,
      'OV 260×130×32;258;130;6,2;9,8;10;32,3;41,1;4744;414;368;360;11,4;55,4',
      'implausible',
      /elastic and the plastic column/,
    ],
    [
      'mass in lb/ft',
      5,
      'OV 310×150×43;308;150;6,9;11,2;12;28,8;54,5;8985;583;657;631;19,7;139',
      'implausible',
      /lb\/ft under a heading of kg\/m/,
    ],
    [
      'axes exchanged',
      6,
      'OV 360×165×53;358;165;7,6;12,4;12;53,0;67,5;930;832;938;14899;28,9;278',
      'implausible',
      /two axes look exchanged/,
    ],
    [
      'a row shifted by one',
      7,
      'OVC 205×205×51;;208;205;7,6;12,0;12;50,6;64,4;5224;502;558;1724;29,3;166',
      'row_shift',
      /one column too far to the right/,
    ],
    [
      'a decimal point among commas',
      4,
      'OV 260×130×32;258;130;6,2;9,8;10;32.3;41,1;4744;368;414;360;11,4;55,4',
      'decimal_mark',
      /a comma; this cell does not/,
    ],
    [
      'no flange thickness',
      4,
      'OV 260×130×32;258;130;6,2;–;10;32,3;41,1;4744;368;414;360;11,4;55,4',
      'missing',
      /t_f, the flange/,
    ],
    [
      'a formula',
      4,
      '=HYPERLINK("http://x");258;130;6,2;9,8;10;32,3;41,1;4744;368;414;360;11,4;55,4',
      'dangerous_text',
      /formula/,
    ],
    [
      'a line of averages',
      7,
      'Average;245;141;6,5;10,3;10;36,8;46,8;6233;441;496;656;16,8;111',
      'summary_row',
      /sums up/,
    ],
  ])('%s', (_name, line, text, code, message) => {
    const reading = withRow(line, text);
    expect(reading.ok).toBe(false);
    expect(only(reading.faults)).toEqual([{ line, code, severity: 'error' }]);
    expect(reading.faults[0]?.message).toMatch(message);
    expect(reading.rows).toHaveLength(5);
  });

  test('a duplicate with another area', () => {
    const twin = 'OV 180X90x18;178;90;5,0;7,6;8;17,6;22,5;1208;136;154;93;3,9;6,7';
    const reading = readSectionTable(file(HEADINGS, ...CLEAN, twin), meta());
    expect(only(reading.faults)).toEqual([{ line: 8, code: 'duplicate_differs', severity: 'error' }]);
  });

  test('a column of dm⁶ under cm⁶ is one fault of the heading', () => {
    const small = CLEAN.map((row) =>
      row.replace(/;([\d,]+)$/, (_, iw: string) =>
        `;${Number(iw.replace(',', '.')) / 1e6}`.replace('.', ',').replace(/e-(\d)/, 'E-0$1'),
      ),
    );
    const reading = readSectionTable(file(HEADINGS, ...small), meta());
    expect(only(reading.faults)).toEqual([{ line: 1, code: 'column_unit', severity: 'error' }]);
    expect(reading.faults[0]?.message).toBe(
      '6 of 6 rows agree: The value looks like dm⁶ under a heading of cm⁶, or cm⁶ under mm⁶.',
    );
  });

  test('a byte order mark in a heading is left out and said', () => {
    const reading = readSectionTable(file(`\ufeff\ufeff${HEADINGS}`, ...CLEAN), meta());
    expect(reading.ok).toBe(true);
    expect(only(reading.faults)).toEqual([{ line: 1, code: 'encoding', severity: 'note' }]);
    expect(readSectionTable(file(`\ufeff${HEADINGS}`, ...CLEAN), meta()).faults).toEqual([]);
  });

  test('a Cyrillic х in a designation is a warning, and the key is the Latin one', () => {
    const reading = withRow(2, 'OV 180х90×18;178;90;5,0;7,6;8;17,6;22,4;1208;136;154;93;3,9;6,7');
    expect(only(reading.faults)).toEqual([{ line: 2, code: 'look_alike', severity: 'warning' }]);
    expect(reading.rows[0]?.key).toBe('ov180x90x18');
  });

  test('all at once: every bad row is named, and the clean ones are silent', () => {
    const reading = readSectionTable(
      file(
        HEADINGS,
        CLEAN[0] ?? '',
        'OV 210×110×24;208;110;5,6;9,0;9;24,4;31,1;23420000;225;254;200;7,4;19,8',
        'OV 260×130×32;258;130;6,2;9,8;10;32,3;41,1;4744;414;368;360;11,4;55,4',
        CLEAN[3] ?? '',
        'OV 360×165×53;358;165;7,6;12,4;12;53,0;67,5;930;832;938;14899;28,9;278',
        'Average;245;141;6,5;10,3;10;36,8;46,8;6233;441;496;656;16,8;111',
      ),
      meta(),
    );
    expect(reading.faults.map(({ line }) => line)).toEqual([3, 4, 6, 7]);
    expect(reading.rows.map(({ printed }) => printed)).toEqual(['OV 180×90×18', 'OV 310×150×43']);
  });
});

describe('headings', () => {
  const row = 'OVU 12x27,12.1,6.2,.25,.42,.35,27.7,8.13,211,34.8,38.9,16.7,.392,570';
  const us =
    'Section,d (in.),bf (in.),tw (in.),tf (in.),r (in.),W (lb/ft),A (in.^2),Ix (in.^4),Sx (in.^3),Zx (in.^3),Iy (in.^4),J (in.^4),Cw (in.^6)';

  test('US letters are read by the US convention, inches become mm and cm', () => {
    const reading = readSectionTable(file(us, row), meta({ axes: 'us' }));
    expect(reading.faults).toEqual([]);
    expect(reading.rows[0]).toMatchObject({ depth_mm: 307.34, width_mm: 157.48 });
    expect(reading.rows[0]?.w_el_cm3).toBeCloseTo(34.8 * 2.54 ** 3, 6);
    expect(reading.rows[0]?.w_pl_cm3).toBeCloseTo(38.9 * 2.54 ** 3, 6);
    expect(reading.rows[0]?.mass_kg_m).toBeCloseTo(27.7 * 1.488164, 4); // NIST SP 811
  });

  test('a letter that means opposite axes is never guessed', () => {
    const { axes: _axes, ...none } = meta();
    const reading = readSectionTable(file(us, row), none);
    expect(reading.ok).toBe(false);
    expect(new Set(reading.faults.map(({ code }) => code))).toContain('axis_unresolved');
  });

  test('units may stand in a line of their own, or in the cells', () => {
    const under = readSectionTable(
      file('name,h,b,shape', ',mm,mm,', '47x200,200,47,rectangle'),
      meta({ density_kg_m3: 420 }),
    );
    expect(under.faults).toEqual([]);
    const inside = readSectionTable(
      file('name,h (mm),b (mm),shape', '2x10,9-1/4 in,1 1/2 in,rectangle'),
      meta(),
    );
    expect(inside.rows[0]).toMatchObject({ depth_mm: 234.95, width_mm: 38.1 });
  });

  test.each([
    ['name,h,b,shape', 'unit_missing'],
    ['name,h (kN),b (mm),shape', 'column_unit'],
    ['h (mm),b (mm),shape,x', 'column_missing'],
    ['name,h (mm),depth (mm),shape', 'column_repeated'],
  ])('%s is refused: %s', (headings, code) => {
    const reading = readSectionTable(file(headings, '47x200,200,47,rectangle'), meta());
    expect(reading.ok).toBe(false);
    expect(reading.faults.map((fault) => fault.code)).toContain(code);
  });

  test('a size that has no column is one fault of the headings', () => {
    const rows = ['IPE A,i,200,100,5.6,12', 'IPE B,i,220,110,5.9,12'];
    const reading = readSectionTable(file('name,shape,h (mm),b (mm),tw (mm),r (mm)', ...rows), meta());
    expect(only(reading.faults)).toEqual([{ line: 1, code: 'column_missing', severity: 'error' }]);
    expect(reading.faults[0]?.message).toContain('t_f, the flange');
  });

  test('an unknown column is left out with a note', () => {
    const reading = readSectionTable(
      file('name,h (mm),b (mm),shape,Lager', '47x200,200,47,rectangle,ja'),
      meta(),
    );
    expect(reading.ok).toBe(true);
    expect(only(reading.faults)).toEqual([{ line: 1, code: 'column_unknown', severity: 'note' }]);
  });
});

describe('files', () => {
  const timber = 'name,h (mm),b (mm),shape';
  test('blank lines, repeated headings and remarks are skipped, and lines are counted as in the file', () => {
    const reading = readSectionTable(
      file(timber, '', '47x200,200,47,rectangle', timber, 'Sizes as sawn,,,', '47x225,225,0,rectangle'),
      meta(),
    );
    expect(only(reading.faults)).toEqual([
      { line: 4, code: 'repeated_header', severity: 'note' },
      { line: 5, code: 'footnote', severity: 'note' },
      { line: 6, code: 'not_allowed', severity: 'error' },
    ]);
  });

  test.each(['\t', '|', ';', ','])('the delimiter %j is found', (delimiter) => {
    const lines = [timber, '47x200,200,47,rectangle', '47x225,225,47,rectangle'].map((line) =>
      line.replaceAll(',', delimiter),
    );
    expect(readSectionTable(file(...lines), meta()).rows).toHaveLength(2);
  });

  test('a file whose commas could be either is asked back with samples', () => {
    const reading = readSectionTable(file('name;h (mm);b (mm);shape', 'A 1;1,200;1,047;rectangle'), meta());
    expect(reading.faults.map(({ code }) => code)).toEqual(['decimal_mark']);
    expect(reading.faults[0]?.message).toContain('1,200');
  });

  test('the same row twice is taken once', () => {
    const reading = readSectionTable(
      file(timber, '47x200,200,47,rectangle', '47 × 200,200,47,rectangle'),
      meta(),
    );
    expect(reading.ok).toBe(true);
    expect(reading.rows).toHaveLength(1);
    expect(only(reading.faults)).toEqual([{ line: 3, code: 'duplicate', severity: 'note' }]);
  });

  test.each([
    ['47x200,3-Apr,47,rectangle', 'spreadsheet_damage'],
    ['47x200,2O0,47,rectangle', 'look_alike'],
    ['47x200,two hundred,47,rectangle', 'not_a_number'],
    ['47x200,-200,47,rectangle', 'not_allowed'],
    ['47x200,n/a,47,rectangle', 'missing'],
    ['47x200,200,47,hexagon', 'not_allowed'],
    [',200,47,rectangle', 'missing'],
    ['47x200,200,47', 'ragged_row'],
  ])('%s is refused: %s', (row, code) => {
    const reading = readSectionTable(file(timber, row, '47x225,225,47,rectangle'), meta());
    expect(reading.ok).toBe(false);
    expect(only(reading.faults)).toEqual([{ line: 2, code, severity: 'error' }]);
  });

  test('an impossible section names its dimension', () => {
    const reading = readSectionTable(file('name,h (mm),t (mm),shape', 'CHS 50x30,50,30,chs'), meta());
    expect(reading.faults[0]).toMatchObject({ column: 't (mm)', code: 'geometry' });
  });

  test.each(['', '\n\n', 'name,h (mm)'])('%j has no rows', (csv) => {
    expect(readSectionTable(csv, meta()).faults[0]?.code).toBe('empty');
  });

  test('a quote that never closes is refused', () => {
    const reading = readSectionTable(file(timber, '"47x200,200,47,rectangle'), meta());
    expect(reading.ok).toBe(false);
    expect(reading.faults.map(({ code }) => code)).toContain('quotes');
  });
});
