import { readdirSync, readFileSync } from 'node:fs';
import Papa from 'papaparse';
import { describe, expect, test } from 'vitest';
import { fromUnit, toUnit } from '@/engine/quantity';
import { designationKey } from '@/engine/section';
import { readSectionTable } from '@/features/section/import';
import { type SectionRow, sectionRowSchema, sectionTableMetaSchema } from '@/features/section/section';

const FOLDER = new URL('../../data/sections/', import.meta.url);
const read = (name: string) => readFileSync(new URL(name, FOLDER), 'utf8');
const slugs = readdirSync(FOLDER)
  .filter((name) => name.endsWith('.csv'))
  .map((name) => name.replace('.csv', ''));

const tables = slugs.map((slug) => {
  const meta = sectionTableMetaSchema.parse(JSON.parse(read(`${slug}.json`)));
  return { slug, meta, reading: readSectionTable(read(`${slug}.csv`), meta) };
});
const rows = tables.flatMap(({ reading }) => reading.rows);
const byKey = new Map<string, SectionRow>(rows.map((row) => [row.key, row]));

describe('the shipped tables', () => {
  test('hold at least 800 sections, and no reference twice', () => {
    expect(rows.length).toBeGreaterThanOrEqual(800);
    expect(new Set(tables.map(({ meta }) => meta.reference)).size).toBe(tables.length);
  });

  test.each(tables)(
    '$slug is read without a fault, and its sidecar is its own',
    ({ slug, meta, reading }) => {
      expect(reading.faults.filter(({ severity }) => severity !== 'note')).toEqual([]);
      expect(meta.slug).toBe(slug);
      for (const row of reading.rows) {
        expect(() => sectionRowSchema.parse(row)).not.toThrow();
        expect(row.computed).toContain('area_cm2');
      }
    },
  );
});

/** Printed values, typed from memory before the engine ran: data/published/sections.source.md. */
type Printed = { designation: string; source: string; axes: 'cm' | 'in' } & Record<string, string>;
const printed = Papa.parse<Printed>(readFileSync(new URL('../published/sections.csv', FOLDER), 'utf8'), {
  header: true,
  skipEmptyLines: true,
}).data;

const FIELDS = [
  ['A', 'area_cm2', 2],
  ['I_major', 'i_major_cm4', 4],
  ['W_el_major', 'w_el_cm3', 3],
  ['W_pl_major', 'w_pl_cm3', 3],
  ['I_minor', 'i_minor_cm4', 4],
  ['J', 'j_cm4', 4],
  ['I_w', 'iw_cm6', 6],
] as const;

/** Cut or rolled with root radii that are found from a whole number of lb/ft. */
const isWideFlange = ({ shape }: SectionRow, axes: Printed['axes']) =>
  axes === 'in' && (shape === 'i' || shape === 'tee');

/** 0.6 %, of American wide flange and what is cut from it 1 %; J 4 and 5 %; I_w 4 %, of parallel channels 8 %. */
function tolerance(column: string, row: SectionRow, axes: Printed['axes']): number {
  if (column === 'J') return isWideFlange(row, axes) ? 0.05 : 0.04;
  if (column === 'I_w') return row.shape === 'channel' ? 0.08 : 0.04;
  return isWideFlange(row, axes) ? 0.01 : 0.006;
}

/** Half a unit of the last printed digit; of a whole number, the zeros after its third figure may be filling. */
function halfDigit(text: string): number {
  const decimals = text.split('.')[1]?.length;
  if (decimals !== undefined) return 0.5 * 10 ** -decimals;
  const zeros = /0*$/.exec(text)?.[0].length ?? 0;
  return 0.5 * 10 ** Math.min(zeros, Math.max(text.length - 3, 0));
}

/** Tables whose very sizes are from memory: each of their rows is held against a printed one. */
const FROM_MEMORY = [
  'european-tapered-i',
  'european-tapered-channels',
  'american-tapered-i',
  'american-tapered-channels',
  'equal-angles',
  'unequal-angles',
  'american-angles',
];

describe('computed properties agree with printed tables', () => {
  test('at least 240 sections are compared, and of the tables typed from memory every one', () => {
    expect(printed.length).toBeGreaterThanOrEqual(240);
    const compared = new Set(printed.map(({ designation }) => designationKey(designation)));
    const typed = tables
      .filter(({ slug }) => FROM_MEMORY.includes(slug))
      .flatMap(({ reading }) => reading.rows);
    expect(typed.filter(({ key }) => !compared.has(key)).map(({ designation }) => designation)).toEqual([]);
  });

  test.each(printed)('$designation: $source', (line) => {
    const row = byKey.get(designationKey(line.designation));
    expect(row, 'is in a shipped table').toBeDefined();
    if (!row) return;
    for (const [column, field, power] of FIELDS) {
      const text = line[column];
      if (!text) continue;
      const value =
        line.axes === 'in' ? toUnit(fromUnit(row[field], `cm${power}`), `in${power}`) : row[field];
      const allowed = tolerance(column, row, line.axes) * Number(text) + halfDigit(text);
      expect(Math.abs(value - Number(text)), `${column}: ${value} against ${text}`).toBeLessThanOrEqual(
        allowed,
      );
    }
  });
});
