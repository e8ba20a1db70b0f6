import { describe, expect, test } from 'vitest';
import { designationKey } from '@/engine/section';
import { BY_HAND, readBand, readHolding, readLeadTime, readLengths } from './cells';
import { MOST_LINES, readStockFile, rowsCsv, type StockFile, stockCsv } from './file';
import { type Library, matchRows, type NamedSection } from './match';
import { daysBetween, isOld, markNameOf, slugOf } from './stock';

const bytes = (text: string) => new TextEncoder().encode(text);

function fileOf(text: string | Uint8Array): StockFile {
  const reading = readStockFile(typeof text === 'string' ? bytes(text) : text);
  if (!reading.ok) throw new Error(reading.refusal.message);
  return reading.file;
}

/** Lengths of every line, or the code of what is wrong with it. */
const lengthsOf = (text: string) => {
  const { rows, as } = fileOf(text);
  return rows.map(({ texts }) => {
    const held = readHolding(texts, as);
    return 'lengths_m' in held ? held.lengths_m : held[0]?.code;
  });
};

const IPE: NamedSection = { table: 'european-i', designation: 'IPE 300' };
const TWICE = ['sawn-timber', 'regularised-timber'].map((table) => ({ table, designation: '47x147' }));
const LIBRARY: Library = {
  sections: new Map([
    [designationKey('IPE 300'), [IPE]],
    [designationKey('47x147'), TWICE],
  ]),
  tables: new Map([
    ['european-i', 'european-i'],
    ['european i sections', 'european-i'],
    ['sawn-timber', 'sawn-timber'],
  ]),
};
const matched = (text: string) => {
  const { rows, as } = fileOf(text);
  return matchRows(rows, as, LIBRARY);
};

describe('lengths', () => {
  // A foot is 0.3048 m, by the yard of 1959.
  test.each([
    ['', []],
    ['–', []],
    ['6', [6]],
    ['12; 6; 12', [6, 12]],
    ['6 / 7.5 / 12 m', [6, 7.5, 12]],
    ['6 9 12', [6, 9, 12]],
    ['6, 12 and 15.1', [6, 12, 15.1]],
    ['6000 mm; 12 m', [6, 12]],
    ['40 ft; 60 ft', [12.192, 18.288]],
    [`20' 6"`, [6.2484]],
    ["'12", [12]],
  ])('“%s” is read in metres, the shortest first', (text, lengths) => {
    expect(readLengths(text, BY_HAND)).toEqual({ ok: true, value: lengths });
  });

  test.each([
    ['6000', 'out_of_range'],
    ['0.1', 'out_of_range'],
    ['-6', 'out_of_range'],
    ['6-12', 'not_a_number'],
    ['long', 'not_a_number'],
    ['=6+6', 'not_a_number'],
    ['6 kg', 'not_a_number'],
    ['7,5', 'ambiguous_number'],
    [Array.from({ length: 21 }, (_, at) => at + 1).join(';'), 'out_of_range'],
  ])('“%s” is refused as %s', (text, code) => {
    expect(readLengths(text, BY_HAND)).toMatchObject({ ok: false, fault: { code } });
  });

  test('of a file in mm are read by its heading', () => {
    expect(lengthsOf('designation,lengths (mm)\nIPE 300,6000; 12100')).toEqual([[6, 12.1]]);
  });

  test.each([
    ['Lengths mm', '7500', 7.5],
    ['stock_lengths_mm', '7500', 7.5],
    ['Length, in ft', '40', 12.192],
    ['Lengths (feet)', '40', 12.192],
  ])('under “%s” have its unit', (heading, cell, metres) => {
    expect(lengthsOf(`designation;${heading}\nIPE 300;${cell}`)).toEqual([[metres]]);
  });

  test('are parted by commas where a point is the decimal mark', () => {
    expect(lengthsOf('designation,lengths\nIPE 300,"6,7.5,12"')).toEqual([[6, 7.5, 12]]);
  });

  test('have decimal commas where semicolons part the cells', () => {
    expect(lengthsOf('designation;lengths\nIPE 300;7,5/12\nIPE 330;12,192')).toEqual([[7.5, 12], [12.192]]);
  });

  test('with a comma that may be either are refused, and not guessed', () => {
    expect(lengthsOf('designation,lengths\nIPE 300,"6,12"\nIPE 330,12')).toEqual(['ambiguous_number', [12]]);
    expect(lengthsOf('designation,lengths\nIPE 300,"6,12"\nIPE 330,7.5')).toEqual([[6, 12], [7.5]]);
  });
});

describe('a lead time', () => {
  test.each([
    ['', null],
    ['0', 0],
    ['5', 5],
    ['5 days', 5],
    ['2 weeks', 14],
    ['Ex stock', 0],
  ])('“%s” is %s days', (text, value) => {
    expect(readLeadTime(text, BY_HAND)).toEqual({ ok: true, value });
  });

  test.each(['soon', '-1', '1.5', '9999', '200 weeks'])('“%s” is refused', (text) => {
    expect(readLeadTime(text, BY_HAND).ok).toBe(false);
  });

  test('in weeks by its heading leaves days that say so', () => {
    const { rows, as } = fileOf('designation,lead time (weeks)\nA1,2\nA2,3 days');
    const held = rows.map(({ texts }) => readHolding(texts, as));
    expect(held).toMatchObject([{ lead_time_days: 14 }, { lead_time_days: 3 }]);
  });
});

test('a price band is A to E or empty', () => {
  expect(['a', 'Band E', ''].map(readBand)).toMatchObject([{ value: 'A' }, { value: 'E' }, { value: null }]);
  expect(readBand('F').ok).toBe(false);
});

describe('a file', () => {
  test.each([
    ['commas', 'Designation,Table,Stock lengths (m),Lead time (days),Price band\nIPE 300,european-i,12,5,B'],
    [
      'semicolons, CR LF and a mark',
      '\ufeffProfil;Tabelle;Längen;Lieferzeit;Preisgruppe\r\nIPE 300;european-i;12;5;B\r\n',
    ],
    [
      'tabs, in another order',
      'band\tlead time\tlengths\tsize\ttable\nB\t5\t12\tIPE 300\tEuropean I sections',
    ],
    ['a title above', 'Stock of week 47,,\n,,\nsection,table,lengths,lead,price\nIPE 300,european-i,12,5,B'],
  ])('with %s is read the same', (_, text) => {
    expect(matched(text)).toEqual({
      lines: [{ ...IPE, key: 'ipe300', lengths_m: [12], lead_time_days: 5, price_band: 'B', note: '' }],
      faults: [],
    });
  });

  test('of UTF-16 and of Windows 1252 is decoded', () => {
    const wide = new Uint8Array([
      0xff,
      0xfe,
      ...[...'section\nIPE 300'].flatMap((c) => [c.charCodeAt(0), 0]),
    ]);
    expect(fileOf(wide).rows).toMatchObject([{ texts: { designation: 'IPE 300' } }]);
    const western = Uint8Array.from('Profil;Längen\n47×147;6', (c) => c.charCodeAt(0));
    expect(fileOf(western).rows).toMatchObject([{ texts: { designation: '47×147', lengths: '6' } }]);
  });

  test.each([
    ['nothing', '', 'empty'],
    ['a zip archive', 'PK\u0003\u0004xl/workbook', 'spreadsheet'],
    ['a web page', '<html><table></table></html>', 'markup'],
    ['headings alone', 'designation,lengths\n\n', 'no_rows'],
    ['no headings', 'IPE 300,12,5', 'no_headings'],
    ['lengths in no unit', 'designation,lengths (bars)\nIPE 300,12', 'no_headings'],
    ['lead times in months', 'designation,lead time (months)\nIPE 300,2', 'no_headings'],
    ['an open quote', 'designation,lengths\n"IPE 300,12\nIPE 330,12', 'unclosed_quote'],
    ['10,000 columns', `designation${',x'.repeat(10_000)}\nIPE 300`, 'too_many_columns'],
    ['too many lines', `designation\n${'IPE 300\n'.repeat(MOST_LINES + 1)}`, 'too_many_rows'],
    ['too many bytes', `designation\n${'x'.repeat(5_000_000)}`, 'too_large'],
  ])('with %s is refused', (_, text, code) => {
    expect(readStockFile(bytes(text))).toMatchObject({ ok: false, refusal: { code } });
  });

  test('that is exported is read again as it was, and starts no formula', () => {
    const held = {
      lengths_m: [6, 12.192],
      lead_time_days: 0,
      price_band: 'A',
      note: '=HYPERLINK("x")',
    } as const;
    const bare = { lengths_m: [], lead_time_days: null, price_band: null, note: 'a; "b", c' };
    const csv = stockCsv([
      { ...IPE, ...held, lengths_m: [...held.lengths_m] },
      { table: 'european-i', designation: 'IPE 330', ...bare },
    ]);
    expect(csv).not.toMatch(/(^|[,"])=/m);
    const { rows, as } = fileOf(csv);
    expect(rows.map(({ texts }) => texts.designation)).toEqual(['IPE 300', 'IPE 330']);
    expect(rows.map(({ texts }) => readHolding(texts, as))).toEqual([held, bare]);
  });

  /** Lengths of every line when the file is sent on, one cell of it mended. */
  const sentOn = (text: string, mended: string, put: string) => {
    const { rows, as } = fileOf(text);
    const sent = rows.map((row) =>
      row.texts.lengths === mended ? { ...row, texts: { ...row.texts, lengths: put } } : row,
    );
    const again = readStockFile(bytes(rowsCsv(sent, as)), markNameOf(as.mark));
    if (!again.ok) throw new Error(again.refusal.message);
    return again.file.rows.map(({ texts }) => {
      const { ok, ...rest } = readLengths(texts.lengths, again.file.as);
      return 'value' in rest ? rest.value : rest.fault.code;
    });
  };

  test('whose comma may mean either is refused still when another line is mended', () => {
    const text = 'designation,lengths\nIPE 300,"7,5"\nIPE 330,"6,5"';
    expect(sentOn(text, '6,5', '6.5')).toEqual(['ambiguous_number', [6.5]]);
  });

  // A foot is 0.3048 m, by the yard of 1959.
  test('in feet is in feet when it is sent on, with a fault or without', () => {
    const text = 'designation,lengths (ft),band\nIPE 300,"30,40",Z\nIPE 330,20.5,B\nIPE 360,long,C';
    expect(sentOn(text, 'long', '10')).toEqual([[9.144, 12.192], [6.2484], [3.048]]);
    expect(sentOn('designation,lengths (ft)\nIPE 300,"30,40"\nIPE 330,x', 'x', '20.5')).toEqual([
      'ambiguous_number',
      [6.2484],
    ]);
  });

  test('with decimal commas, breaks and weeks is the same when it is sent on', () => {
    expect(sentOn('section;lengths (mm)\nIPE 300;7500,5\nIPE 330;long', 'long', '6000')).toEqual([
      [7.5005],
      [6],
    ]);
    expect(sentOn(`section,lengths\nIPE 300,"20' 6""\n40'"`, '', '')).toEqual([[6.2484, 12.192]]);
    const { rows, as } = fileOf('section,lead time (weeks)\nIPE 300,2');
    expect(fileOf(rowsCsv(rows, as)).as.leadDays).toBe(7);
  });
});

describe('a line', () => {
  const codes = (text: string) => matched(text).faults.map(({ line, field, code }) => [line, field, code]);

  test('of a section that no table has is named with its line', () => {
    expect(codes('designation\nIPE 300\nIPE 305\n')).toEqual([[3, 'designation', 'unknown_section']]);
  });

  test('of a section in several tables asks which', () => {
    expect(matched('designation\n47 × 147').faults).toMatchObject([
      { code: 'several_tables', suggestions: TWICE },
    ]);
    expect(matched('designation,table\n47 × 147,Sawn-Timber').lines).toMatchObject([TWICE[0]]);
  });

  test('of a table that does not have its section is offered the one that does', () => {
    expect(matched('designation,table\nIPE 300,sawn-timber').faults).toMatchObject([
      { code: 'unknown_section', suggestions: [IPE] },
    ]);
    expect(codes('designation,table\nIPE 300,nowhere')).toEqual([[2, 'table', 'unknown_table']]);
  });

  test('that names a section again says where it stood', () => {
    const { lines, faults } = matched('designation\nIPE 300\n\nipe-300');
    expect(lines).toHaveLength(1);
    expect(faults).toMatchObject([
      { line: 4, code: 'duplicate', message: expect.stringContaining('Line 2') },
    ]);
  });

  test('that a comma has moved along is not read as it stands, nor written anew so', () => {
    const text = 'designation,lengths,lead time\nIPE 300,7,5,3\nHE 200 A,6,5';
    expect(codes(text)[0]).toEqual([2, 'line', 'too_many_cells']);
    const { rows, as } = fileOf(text);
    expect(matched(rowsCsv(rows, as)).faults[0]).toMatchObject({ line: 2, code: 'too_many_cells' });
    expect(codes('designation,lengths,lead time\nIPE 300,7,5,\nIPE 300,6,')).toEqual([
      [2, 'line', 'too_many_cells'],
    ]);
    expect(matched('designation,lengths\nIPE 300,6,\n').lines).toMatchObject([{ lengths_m: [6] }]);
  });

  test('has all of its faults told at once', () => {
    expect(codes('designation,lengths,lead,band\n,long,soon,Z')).toEqual([
      [2, 'designation', 'missing'],
      [2, 'lengths', 'not_a_number'],
      [2, 'lead_time', 'not_a_number'],
      [2, 'price_band', 'not_allowed'],
    ]);
    expect(codes('designation,note\nIPE 300,a\u007fb')).toEqual([[2, 'note', 'control_character']]);
  });
});

test('a stock list is old on the 91st day', () => {
  expect(daysBetween('2026-02-27', '2026-03-01')).toBe(2);
  expect(isOld('2026-01-01', '2026-04-01')).toBe(false);
  expect(isOld('2026-01-01', '2026-04-02')).toBe(true);
});

test('a supplier’s address is made of its name', () => {
  expect(slugOf('Ottervane Section Works')).toBe('ottervane-section-works');
  expect(slugOf('  Größe & Söhne, Ltd. ')).toBe('gro-e-sohne-ltd');
});
