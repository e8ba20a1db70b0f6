import { designationKey } from '@/engine/section';
import { type CellFault, type ReadAs, readHolding, type StockField } from './cells';
import type { StockRow } from './file';
import type { Holding } from './stock';

/** A section of an issued edition, by its name. */
export interface NamedSection {
  readonly table: string;
  readonly designation: string;
}

/** What the issued editions have of the designations of a list. */
export interface Library {
  /** By key: in each table that has it. */
  readonly sections: ReadonlyMap<string, readonly NamedSection[]>;
  /** The slug of a table by its slug, reference and name, in small letters. */
  readonly tables: ReadonlyMap<string, string>;
}

export interface MatchedLine extends Holding, NamedSection {
  readonly key: string;
}

/** What is wrong with a line of the list. */
export interface StockFault extends Omit<CellFault, 'field'> {
  readonly line: number;
  /** `line`: the line as a whole. */
  readonly field: StockField | 'line';
  /** Sections that may be meant. */
  readonly suggestions: readonly NamedSection[];
}

export interface Matched {
  readonly lines: readonly MatchedLine[];
  readonly faults: readonly StockFault[];
}

export const keysOf = (rows: readonly StockRow[]): string[] => [
  ...new Set(rows.map(({ texts }) => designationKey(texts.designation)).filter((key) => key !== '')),
];

type Found = NamedSection | (CellFault & { readonly suggestions: readonly NamedSection[] });

const fault = (
  field: StockField,
  value: string,
  code: string,
  message: string,
  suggestions: readonly NamedSection[] = [],
) => ({ field, value: value.slice(0, 100), code, message, suggestions });

/** The one section that a line is of, however it writes it. */
function sectionOf({ texts: { designation, table } }: StockRow, { sections, tables }: Library): Found {
  if (designation === '')
    return fault('designation', '', 'missing', 'The line names no section. Give its designation.');
  const slug = table === '' ? null : tables.get(table.toLowerCase());
  if (slug === undefined)
    return fault('table', table, 'unknown_table', 'No issued section table is called so.');
  const called = sections.get(designationKey(designation)) ?? [];
  const [first, ...others] = called.filter((one) => slug === null || one.table === slug);
  if (first && others.length === 0) return first;
  if (first) {
    const tablesOf = called.map((one) => `“${one.table}”`).join(', ');
    const message = `Several tables have this section. Say which one is meant: ${tablesOf}.`;
    return fault('table', designation, 'several_tables', message, [first, ...others]);
  }
  const message =
    slug === null
      ? 'No issued edition has this section.'
      : `The issued edition of “${slug}” does not have this section.`;
  return fault('designation', designation, 'unknown_section', message, called);
}

const SPARE =
  'The line has more cells than there are headings: a comma inside a number may have parted it. Correct the list and bring it again, or leave the line out.';

/** Every line with its section, and everything that is wrong, line by line. A list names a section once. */
export function matchRows(rows: readonly StockRow[], as: ReadAs, library: Library): Matched {
  const lines: MatchedLine[] = [];
  const faults: StockFault[] = [];
  const seen = new Map<string, number>();
  for (const row of rows) {
    const { line } = row;
    if (row.spare !== '') {
      faults.push({
        line,
        field: 'line',
        value: row.spare,
        code: 'too_many_cells',
        message: SPARE,
        suggestions: [],
      });
      continue;
    }
    const held = readHolding(row.texts, as);
    const found = sectionOf(row, library);
    const known = 'message' in found ? undefined : seen.get(`${found.table}/${found.designation}`);
    if ('message' in found) faults.push({ ...found, line });
    if (!('lengths_m' in held)) faults.push(...held.map((one) => ({ ...one, line, suggestions: [] })));
    if (known !== undefined) {
      const message = `Line ${known} names this section already. Leave one of them out.`;
      faults.push({ ...fault('designation', row.texts.designation, 'duplicate', message), line });
    }
    if ('message' in found || !('lengths_m' in held) || known !== undefined) continue;
    seen.set(`${found.table}/${found.designation}`, line);
    const { table, designation } = found;
    lines.push({ ...held, table, designation, key: designationKey(designation) });
  }
  return { lines, faults };
}
