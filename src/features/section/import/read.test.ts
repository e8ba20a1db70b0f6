import { expect, test } from 'vitest';
import { type SectionTableMeta, sectionTableMetaSchema } from '../section';
import { readSectionTable } from './index';

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
    conventions: 'US',
    licence: 'invented',
    notes: [],
  }),
  ...change,
});

const US =
  'Section,d (in.),bf (in.),tw (in.),tf (in.),r (in.),W (lb/ft),A (in.^2),Ix (in.^4),Sx (in.^3),Zx (in.^3),Iy (in.^4),J (in.^4),Cw (in.^6)';
const OVU = 'OVU 12x27,12.1,6.2,.25,.42,.35,27.7,8.13,211,34.8,38.9,16.7,.392,570';
const file = (...lines: string[]) => `${lines.join('\r\n')}\r\n`;

test('US letters are read by the US convention, inches become mm and cm', () => {
  const reading = readSectionTable(file(US, OVU), meta({ axes: 'us' }));
  expect(reading.faults).toEqual([]);
  expect(reading.rows[0]).toMatchObject({ depth_mm: 307.34, width_mm: 157.48 });
  expect(reading.rows[0]?.w_el_cm3).toBeCloseTo(34.8 * 2.54 ** 3, 6);
  expect(reading.rows[0]?.w_pl_cm3).toBeCloseTo(38.9 * 2.54 ** 3, 6);
  expect(reading.rows[0]?.mass_kg_m).toBeCloseTo(27.7 * 1.488164, 4); // NIST SP 811
});

test('what a sidecar leaves open is an error at the headings', () => {
  const reading = readSectionTable(file(US, OVU), meta());
  expect(reading.ok).toBe(false);
  expect(reading.faults.map(({ rule, line }) => [rule, line])).toEqual([[25, 1]]);
});

test('what the file does not give is computed and named so', () => {
  const timber = file('name,h,b,shape', ',mm,mm,', '47x200,200,47,rectangle');
  const { rows } = readSectionTable(timber, meta({ density_kg_m3: 420 }));
  expect(rows[0]?.computed).toContain('i_major_cm4');
  expect(rows[0]?.i_major_cm4).toBeCloseTo((4.7 * 20 ** 3) / 12, 6);
});

test('faults come in the order of their lines, and a faulty row is none', () => {
  const bad = ['47x225,0,47,rectangle', 'Average,212,47,', '47x250,two,47,rectangle'];
  const reading = readSectionTable(
    file('name,h (mm),b (mm),shape', '47x200,200,47,rectangle', ...bad),
    meta(),
  );
  expect(reading.faults.map(({ line, cause }) => [line, cause])).toEqual([
    [3, 'zero'],
    [4, 'summary_row'],
    [5, 'not_a_number'],
  ]);
  expect(reading.rows.map(({ printed }) => printed)).toEqual(['47x200']);
});

test.each(['', '\n\n', 'name,h (mm)'])('%j has no rows', (csv) => {
  expect(readSectionTable(csv, meta())).toMatchObject({ ok: false, rows: [] });
});
