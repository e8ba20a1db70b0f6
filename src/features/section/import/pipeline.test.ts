import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { alarms, importBytes, importText } from '../../../../tests/support/section-import';
import { columnAt, csvOf, plausibleTable, scaleCell, setCell } from '../../../../tests/support/section-table';
import { sectionRowSchema } from '../section';
import type { Edit, Finding, Mapping } from './contract';
import {
  addFindings,
  answer,
  applyFix,
  emptyReport,
  mayAccept,
  openCount,
  openQuestions,
  RowCheck,
  recognise,
  remember,
  reportOf,
  Survey,
} from './index';

const FAULTY = new Uint8Array(
  readFileSync(new URL('../../../../tests/fixtures/ottervane-issue-7-faults.csv', import.meta.url)),
);
const bytesOf = (text: string) => new TextEncoder().encode(text);
const recognised = (bytes: Uint8Array) => {
  const recognition = recognise(bytes, { name: 'a.csv', size: bytes.length });
  if (!recognition.ok) throw new Error(recognition.refusal.message);
  return recognition;
};

describe('reading in pieces', () => {
  test.each([1, 7, 100, 4096])('pieces of %d bytes give what the whole file gives', (piece) => {
    const whole = importBytes(FAULTY, { axes: 'en' });
    const inPieces = importBytes(FAULTY, { axes: 'en', piece });
    expect(inPieces.findings).toEqual(whole.findings);
    expect(inPieces.rows).toEqual(whole.rows);
  });

  test('a reading that was cut short goes on at the row it had come to', () => {
    const bytes = bytesOf(csvOf(plausibleTable(300, 4, ['i', 'rhs', 'chs'])));
    const { mapping } = recognised(bytes);
    const survey = new Survey(mapping, []);
    survey.push(bytes);
    const surveyed = survey.finish();
    if (!surveyed.ok) throw new Error(surveyed.refusal.message);
    const facts = JSON.parse(JSON.stringify(surveyed.facts));
    const whole = new RowCheck(mapping, [], facts);
    const rows = [...whole.push(bytes).rows, ...whole.finish().rows];

    const first = new RowCheck(mapping, [], facts).push(bytes.subarray(0, 9000));
    const second = new RowCheck(mapping, [], facts, { fromRow: first.rowsDone });
    const rest = [...second.push(bytes).rows, ...second.finish().rows];
    expect(first.rowsDone).toBeGreaterThan(20);
    expect([...first.rows, ...rest]).toEqual(rows);
  });

  test('rows that are settled are read as they were when they were judged', () => {
    const bytes = bytesOf(csvOf(plausibleTable(300, 4, ['i', 'rhs', 'chs'])));
    const { mapping } = recognised(bytes);
    const survey = new Survey(mapping, []);
    survey.push(bytes);
    const surveyed = survey.finish();
    if (!surveyed.ok) throw new Error(surveyed.refusal.message);
    const judged = new RowCheck(mapping, [], surveyed.facts);
    const settled = new RowCheck(mapping, [], surveyed.facts, { isSettled: true });
    const rows = [...judged.push(bytes).rows, ...judged.finish().rows];
    expect([...settled.push(bytes).rows, ...settled.finish().rows]).toEqual(rows);
    expect(rows).toHaveLength(300);
  });

  test('every row that is given is one of the schema', () => {
    const { rows } = importText(
      csvOf(plausibleTable(200, 9, ['i', 'channel', 'rhs', 'shs', 'chs', 'round'])),
    );
    expect(rows).toHaveLength(200);
    expect(rows.filter((row) => !sectionRowSchema.safeParse(row).success)).toEqual([]);
  });
});

describe('fixes', () => {
  /** Applies the first fix of every finding, again and again, until none is left that has one. */
  function resolve(bytes: Uint8Array, mapping: Mapping) {
    let state: { mapping: Mapping; edits: readonly Edit[] } = { mapping, edits: [] };
    for (let round = 0; round < 4; round++) {
      const imported = importBytes(bytes, { change: state.mapping, edits: state.edits });
      const open = alarms(imported).flatMap(({ fixes }) => fixes.slice(0, 1));
      if (open.length === 0) return { imported, state };
      for (const fix of open) state = applyFix(state, fix);
    }
    throw new Error('the fixes do not come to an end');
  }

  test('one press for each of the thirteen faults, and the file is clean', () => {
    const mapping = answer(recognised(FAULTY).mapping, { kind: 'axes', value: 'en' });
    const { imported, state } = resolve(FAULTY, mapping);
    expect(alarms(imported)).toEqual([]);
    // left out: the row without t_f, the formula for a name, the second OV 180, the averages
    expect(imported.rows.map(({ printed }) => printed)).toEqual([
      'OV 150×75×13',
      'OV 180×90×18',
      'OV 210×110×24',
      'OV 260×130×32',
      'OV 285x140×37',
      'OV 310×150×43',
      'OV 360×165×53',
      'OVC 205×205×51',
      'OVC 255×255×71',
    ]);
    const row = (printed: string) => imported.rows.find((one) => one.printed === printed);
    expect(row('OV 210×110×24')?.i_major_cm4).toBeCloseTo(2342, 9);
    expect(row('OV 260×130×32')).toMatchObject({ w_el_cm3: 368, w_pl_cm3: 414 });
    expect(row('OV 310×150×43')?.mass_kg_m).toBeCloseTo(28.8 * 1.488164, 4); // NIST SP 811
    expect(row('OV 360×165×53')).toMatchObject({ i_major_cm4: 14899, i_minor_cm4: 930 });
    expect(row('OVC 205×205×51')).toMatchObject({ depth_mm: 208, iw_cm6: 166000 });
    expect(state.mapping.columns.at(-1)).toMatchObject({ unit: 'dm6' });
  });

  test('a column in two units is read in both with one press', () => {
    const table = plausibleTable(40, 2, ['i']);
    for (let row = 0; row < 40; row += 4) scaleCell(table, row, 'I_major', 1e4);
    const bytes = bytesOf(csvOf(table));
    const { imported } = resolve(bytes, recognised(bytes).mapping);
    expect(imported.rows).toHaveLength(40);
  });

  test('all cells of a kind are taken as suggested, all rows of a kind are left out', () => {
    const table = plausibleTable(30, 2, ['chs']);
    for (let row = 3; row < 9; row++) setCell(table, row, 'h', `'${table.rows[row]?.[2]}`);
    const bytes = bytesOf(csvOf(table));
    const { mapping } = recognised(bytes);
    const found = alarms(importBytes(bytes)).map(({ group }) => group);
    expect(found).toHaveLength(6);
    const group = found[0] ?? '';
    const taken = importBytes(bytes, { edits: [{ kind: 'take_every', group }] });
    expect(alarms(taken)).toEqual([]);
    expect(taken.rows).toHaveLength(30);
    const left = importBytes(bytes, { change: mapping, edits: [{ kind: 'drop_every', group }] });
    expect(left.rows).toHaveLength(24);
  });

  test('a cell typed anew replaces what was typed before', () => {
    const { mapping } = recognised(FAULTY);
    const typed = (value: string) => ({ edit: { kind: 'set_cell', line: 3, column: 6, value } }) as const;
    const state = applyFix(applyFix({ mapping, edits: [] }, typed('1')), typed('2'));
    expect(state.edits).toEqual([{ kind: 'set_cell', line: 3, column: 6, value: '2' }]);
  });
});

describe('the mapping', () => {
  const head =
    'Section,D (mm),B (mm),t (mm),T (mm),r (mm),d (mm),Mass (kg/m),A (cm2),Ix (cm4),Zx (cm3),Sx (cm3),H (dm6)';

  test('old British letters: D and d, t and T, Z elastic, S plastic, H the warping constant', () => {
    const { mapping, questions } = recognised(
      bytesOf(`${head}\nUB 533x210x92,533.1,209.3,10.1,15.6,12.7,476.5,92.1,117,55230,2072,2360,1.60\n`),
    );
    expect(questions.map(({ kind }) => kind)).toEqual(['axes']);
    const fields = answer(mapping, { kind: 'axes', value: 'british' }).columns.map(({ field }) => field);
    expect(fields).toEqual([
      'designation',
      'h',
      'b',
      'tw',
      'tf',
      'r',
      'dClear',
      'mass',
      'area',
      'iMajor',
      'wElMajor',
      'wPlMajor',
      'iw',
    ]);
  });

  test('German headings: s and t are web and flange, the language is told', () => {
    const { mapping, language } = recognised(
      bytesOf('Profil;Höhe (mm);Breite (mm);s (mm);t (mm);Fläche (cm2)\nOV 1;100;55;4,1;5,7;10,3\n'),
    );
    expect(language).toBe('de');
    expect(mapping.columns.map(({ field }) => field)).toEqual(['designation', 'h', 'b', 'tw', 'tf', 'area']);
  });

  test('a unit is asked where the heading has none, and may carry a multiplier', () => {
    const { mapping, questions } = recognised(
      bytesOf('name,h (mm),b (mm),shape,A,Iw\nA 1,100,50,rectangle,50,0\n'),
    );
    expect(questions.map((question) => question.kind === 'unit' && question.column)).toEqual([4, 5]);
    const once = answer(mapping, { kind: 'unit', column: 4, value: 'cm2' });
    const both = answer(once, { kind: 'unit', column: 5, value: '10³ cm⁶' });
    expect(openQuestions(both)).toEqual([]);
    expect(both.columns[5]).toMatchObject({ unit: 'cm6', factor: 1000 });
  });

  test('a supplier’s mapping answers for a new file of the same headings, and for no other', () => {
    const first = answer(
      recognised(bytesOf('name,h (mm),b (mm),shape,A\nA 1,100,50,rectangle,50\n')).mapping,
      { kind: 'unit', column: 4, value: 'cm2' },
    );
    const next = recognised(bytesOf('\nname;h (mm);b (mm);shape;A\nA 2;100,5;50;rectangle;50,25\n')).mapping;
    const remembered = remember(first, next);
    expect(remembered).toMatchObject({ delimiter: ';', decimalMark: ',', headingLine: 2 });
    expect(remembered?.columns[4]).toMatchObject({ field: 'area', unit: 'cm2' });
    const other = recognised(
      bytesOf('name,h (mm),b (mm),shape,I_t (cm4)\nA 1,100,50,rectangle,50\n'),
    ).mapping;
    expect(remember(first, other)).toBeNull();
  });

  test('a field is held by one column', () => {
    const { mapping } = recognised(
      bytesOf('name,h (mm),depth (mm),b (mm),shape\nA 1,100,100,50,rectangle\n'),
    );
    const moved = answer(mapping, { kind: 'field', column: 2, value: 'h' });
    expect(moved.columns.map(({ field }) => field)).toEqual(['designation', null, 'h', 'b', 'shape']);
  });

  test('units stand in a second line, and a title above the headings', () => {
    const imported = importText('Ottervane timber,,,\nname,h,b,shape\n,mm,mm,\n47x200,200,47,rectangle\n');
    expect(imported.mapping).toMatchObject({ headingLine: 2, unitLine: 3 });
    expect(imported.rows).toHaveLength(1);
  });

  test('tapered flanges, tees and angles are judged by their own outlines', () => {
    // DIN 1025-1: INP 200 with A 33.4 cm², I_y 2140, W_y 214 (from memory)
    const inp =
      'name,h (mm),b (mm),t_w (mm),t_f (mm),r (mm),A (cm2),I_major (cm4),W_el_major (cm3)\nINP 200,200,90,7.5,11.3,7.5,33.4,2140,214\n';
    expect(alarms(importText(inp, { change: { flanges: 'tapered' } }))).toEqual([]);
    // EN 10056-1: L 100 × 100 × 10, r 12, A 19.2 cm², I 177 cm⁴, W 24.6 cm³ (from memory)
    const angle = (i: number) =>
      `name,shape,h (mm),b (mm),t (mm),r (mm),A (cm2),I_major (cm4),W_el_major (cm3)\nL 100x100x10,angle,100,100,10,12,19.2,${i},24.6\n`;
    expect(alarms(importText(angle(177)))).toEqual([]);
    expect(alarms(importText(angle(197))).map(({ cause }) => cause)).toEqual(['second_moment']);
  });
});

describe('the report', () => {
  const finding = (line: number, severity: Finding['severity'], group = 'g'): Finding => ({
    key: `${group}|${line}`,
    group,
    rule: 1,
    severity,
    cause: 'mass',
    line,
    designation: '',
    column: null,
    heading: '',
    read: '',
    expected: null,
    formula: null,
    message: '',
    fixes: [],
  });

  test('a thousand findings of one cause are one group of a hundred, counted', () => {
    const many = Array.from({ length: 1000 }, (_, k) => finding(k, 'warning'));
    const report = addFindings(addFindings(emptyReport(), many.slice(0, 600)), many.slice(600));
    expect(report.groups.map(({ count, findings }) => [count, findings.length])).toEqual([[1000, 100]]);
    expect(openCount(report, [])).toEqual({ errors: 0, warnings: 1000 });
    expect(openCount(report, [{ key: 'g', reason: 'as the maker prints it' }])).toEqual({
      errors: 0,
      warnings: 0,
    });
    expect(openCount(report, [{ key: 'g|3', reason: 'checked' }])).toEqual({ errors: 0, warnings: 999 });
    expect(openCount(report, [{ key: 'g', reason: ' ' }])).toEqual({ errors: 0, warnings: 1000 });
  });

  test('an error cannot be accepted', () => {
    const report = addFindings(emptyReport(), [finding(1, 'error')]);
    expect(mayAccept(finding(1, 'error'))).toBe(false);
    expect(openCount(report, [{ key: 'g', reason: 'no' }])).toEqual({ errors: 1, warnings: 0 });
  });

  test('one slipped column of two thousand rows is one finding', () => {
    const table = plausibleTable(2000, 6, ['rhs']);
    for (const row of table.rows) {
      const at = columnAt(table, 'I_major');
      row[at] = String(Number(row[at]) * 1e4);
    }
    const imported = importText(csvOf(table));
    expect(alarms(imported).map(({ cause }) => cause)).toEqual(['column_slip']);
    expect(imported.report).toMatchObject({ errors: 1, warnings: 0 });
  });

  test('what the survey does not list is counted', () => {
    const table = plausibleTable(300, 6, ['chs']);
    const copies = { ...table, rows: [...table.rows, ...table.rows] };
    const { facts } = importText(csvOf(copies));
    if (!facts) throw new Error('no facts');
    expect(facts.findings.length).toBeLessThan(300);
    const group = reportOf(facts).groups.find(({ cause }) => cause === 'duplicate');
    expect(group).toMatchObject({ count: 300 });
  });
});
