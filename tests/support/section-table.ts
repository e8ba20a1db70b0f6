import { readFileSync } from 'node:fs';
import Papa from 'papaparse';
import { fromUnit, toUnit } from '@/engine/quantity';
import { type SectionDimensions, type SectionShape, sectionProperties } from '@/engine/section';
import { PRINTED_HEADINGS, plausibleSections } from './plausible-sections';

/** A table of cells with its headings, to be spoilt. The first row stands in line 2. */
export type Table = { headings: string[]; rows: string[][] };

export const columnAt = ({ headings }: Table, name: string): number => {
  const at = headings.findIndex((heading) => heading.split(' (')[0] === name);
  if (at < 0) throw new Error(`no column ${name}`);
  return at;
};
export const cellAt = (table: Table, row: number, name: string): string =>
  table.rows[row]?.[columnAt(table, name)] ?? '';

export function setCell(table: Table, row: number, name: string, value: string): void {
  const cells = table.rows[row];
  if (!cells) throw new Error(`no row ${row}`);
  cells[columnAt(table, name)] = value;
}

export const plainly = (value: number, figures = 4): string => {
  const number = Number(value.toPrecision(figures));
  const text = String(number);
  return text.includes('e') ? number.toFixed(12).replace(/0+$/, '') : text;
};

export function scaleCell(table: Table, row: number, name: string, by: number): void {
  setCell(table, row, name, plainly(Number(cellAt(table, row, name)) * by));
}

export const lineOf = (row: number): number => row + 2;

/** Rows of shapes, with radii of gyration and the clear depth of the web, which the generator does not print. */
export function plausibleTable(count: number, seed: number, shapes: readonly SectionShape[]): Table {
  const rows = [...plausibleSections(count, seed, shapes)].map((row) => {
    const number = (heading: (typeof PRINTED_HEADINGS)[number]) => Number(row[heading]);
    const radius = (i: number) => plainly(Math.sqrt(i / number('A (cm2)')));
    const isFlanged = row.shape === 'i' || row.shape === 'channel';
    const clear = number('h (mm)') - 2 * number('t_f (mm)') - 2 * number('r (mm)');
    const extra = [
      radius(number('I_major (cm4)')),
      radius(number('I_minor (cm4)')),
      isFlanged ? plainly(clear) : '',
    ];
    return [...PRINTED_HEADINGS.map((heading) => row[heading]), ...extra];
  });
  return { headings: [...PRINTED_HEADINGS, 'r_major (cm)', 'r_minor (cm)', 'd_clear (mm)'], rows };
}

/** A shipped table as it stands. */
export function shippedTable(slug: string): Table {
  const text = readFileSync(new URL(`../../data/sections/${slug}.csv`, import.meta.url), 'utf8');
  const [headings = [], ...rows] = Papa.parse<string[]>(text, { skipEmptyLines: true }).data;
  return { headings, rows };
}

const UNITS: Readonly<Record<string, readonly [string, string]>> = {
  A: ['area', 'cm2'],
  I_major: ['iMajor', 'cm4'],
  I_minor: ['iMinor', 'cm4'],
  W_el_major: ['wElMajor', 'cm3'],
  W_el_minor: ['wElMinor', 'cm3'],
  W_pl_major: ['wPlMajor', 'cm3'],
  W_pl_minor: ['wPlMinor', 'cm3'],
  I_t: ['j', 'cm4'],
  I_w: ['iw', 'cm6'],
};

/** Prints what these dimensions give into a row: another section under the same name. */
export function setSection(table: Table, row: number, d: SectionDimensions, density = 7850): void {
  const properties = sectionProperties(d) as unknown as Record<string, number>;
  for (const [symbol, value] of Object.entries(d)) {
    const name = symbol === 'd' ? 'h' : symbol.replace(/^t([wf])$/, 't_$1');
    if (typeof value === 'number' && table.headings.some((heading) => heading.split(' (')[0] === name)) {
      setCell(table, row, name, plainly(toUnit(value, 'mm')));
    }
  }
  for (const [name, [property, unit]] of Object.entries(UNITS)) {
    setCell(table, row, name, plainly(toUnit(properties[property] ?? 0, unit), 5));
  }
  setCell(table, row, 'mass', plainly(density * (properties['area'] ?? 0)));
}

export const metres = (table: Table, row: number, name: string): number =>
  fromUnit(Number(cellAt(table, row, name)), 'mm');

export type Format = { delimiter: string; mark: '.' | ',' };

/** The table as a file. Numbers have the mark of the file; texts that look like none stay. */
export function csvOf(
  { headings, rows }: Table,
  { delimiter, mark }: Format = { delimiter: ',', mark: '.' },
): string {
  const marked = (cell: string) =>
    mark === ',' && /^-?\d*\.\d+$/.test(cell) ? cell.replace('.', ',') : cell;
  return `${Papa.unparse([headings, ...rows.map((row) => row.map(marked))], { delimiter, newline: '\r\n' })}\r\n`;
}
