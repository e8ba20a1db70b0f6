/** Cells of a set's tables: what each shows of the document, and the edit that its text comes to. */
import Papa from 'papaparse';
import type { SetFactor } from '@/engine/combination';
import { type DimensionName, readQuantity, toUnit } from '@/engine/quantity';
import { applyEdit, type Edit, keysOf, listAt, type Pointer, valueAt } from '@/features/author/edit';
import { factorText, readFactor } from '@/features/combination/factor';
import type { Written } from '@/features/review/draft';
import { readDecimal } from '@/lib/decimal';

/** What a column holds, at `key` of its row: a pointer without its first slash, "factors/Q". */
export type Column = {
  readonly key: string;
  readonly label: string;
  /** Left empty, it is no part of the document. */
  readonly isOptional?: boolean;
  /** What stands where it is empty. */
  readonly placeholder?: string | undefined;
} & (
  | { readonly kind: 'text' }
  | { readonly kind: 'choice'; readonly choices: readonly { value: string; label: string }[] }
  | { readonly kind: 'number' }
  | { readonly kind: 'factor' }
  /** A quantity string; a number alone takes `unit`. */
  | { readonly kind: 'quantity'; readonly dimension: DimensionName; readonly unit: string }
  /** A number of the document in SI, shown in `unit`. */
  | { readonly kind: 'si'; readonly dimension: DimensionName; readonly unit: string }
);

/** Whether a column is of numbers, which stand at the right. */
export const isFigure = ({ kind }: Column): boolean => kind !== 'text' && kind !== 'choice';

/** Of a quotient, and of a length that was typed in another unit: more digits than anybody types, fewer than a double has. */
const DIGITS = 12;
const rounded = (value: number): number => Number(value.toPrecision(DIGITS));

const isFactor = (value: unknown): value is SetFactor =>
  typeof value === 'number' ||
  (typeof value === 'object' && value !== null && 'by' in value && 'factor' in value);

/** The text of a value in its column. */
export function cellText(value: unknown, column: Column): string {
  if (value === undefined || value === null) return '';
  switch (column.kind) {
    case 'factor':
      return isFactor(value) ? factorText(value) : String(value);
    case 'quantity':
      return withoutUnit(String(value), column.unit);
    case 'si':
      return typeof value === 'number' ? String(rounded(toUnit(value, column.unit))) : String(value);
    case 'number':
      return typeof value === 'number' ? String(rounded(value)) : String(value);
    case 'text':
    case 'choice':
      return typeof value === 'object' ? JSON.stringify(value) : String(value);
  }
}

/** "355 N/mm2" in a column of N/mm2 is 355; what is in another unit keeps it. */
function withoutUnit(text: string, unit: string): string {
  const number = text.endsWith(` ${unit}`) ? text.slice(0, -unit.length - 1) : '';
  return isBare(number) ? number : text;
}

const isBare = (text: string): boolean => /^[+-]?[\d.,]+(e[+-]?\d*)?$/i.test(text.trim());

/** The value that a text stands for; undefined where the cell is left out; what cannot be read stays text, with its fault. */
export function cellValue(text: string, column: Column): unknown {
  const isEmpty = text.trim() === '' || (column.kind === 'factor' && /^\s*[–-]\s*$/.test(text));
  switch (column.kind) {
    case 'choice':
      return column.choices.find(({ label }) => label === text)?.value ?? text;
    case 'text':
      return isEmpty && column.isOptional ? undefined : text;
    case 'number':
      return isEmpty ? undefined : (readDecimal(text) ?? text);
    case 'factor':
      return isEmpty ? undefined : (readFactor(text) ?? text);
    case 'quantity':
      if (isEmpty) return column.isOptional ? undefined : '';
      return isBare(text) ? `${text.trim()} ${column.unit}` : text;
    case 'si': {
      if (isEmpty) return undefined;
      const reading = readQuantity(isBare(text) ? `${text} ${column.unit}` : text, column.dimension);
      return reading.ok ? reading.value : text;
    }
  }
}

/** The edit of the row at `row` that a cell's text comes to. */
export function cellEdit(row: Pointer, text: string, column: Column): Edit {
  const at = `${row}/${column.key}`;
  const value = cellValue(text, column);
  return value === undefined ? { do: 'remove', at } : { do: 'set', at, value };
}

/** What a spreadsheet or a CSV file gives: rows of cells, by tabs, or by semicolons or commas where there are none. */
export function pastedRows(text: string): readonly (readonly string[])[] {
  const table = text.replaceAll('\r\n', '\n').replace(/\n+$/, '');
  const { data } = Papa.parse<string[]>(table, { delimiter: delimiterOf(table), newline: '\n' });
  return data.map((cells) => cells.map((cell) => cell.trim().replaceAll(/\s*\n\s*/g, ' ')));
}

/** A tab, which is in none of its lines, where a text is one column of decimals with commas or of words. */
function delimiterOf(table: string): string {
  const bare = table.replaceAll(/"[^"]*"/g, '""');
  if (bare.includes('\t')) return '\t';
  if (bare.includes(';')) return ';';
  const isOneColumn = /, /.test(bare) || bare.split('\n').every((line) => DECIMAL.test(line.trim()));
  return isOneColumn ? '\t' : ',';
}

/** "0,7", "355,5 N/mm2": nothing, or one number with a comma at most. */
const DECIMAL = /^(?:[+-]?\d+(?:,\d+)?(?:\s[^,]*)?)?$/;

/** Whether a pasted text is a table, and not one cell's. */
export const isTable = (text: string): boolean => /[\t\n]/.test(text.replace(/\n+$/, ''));

/**
 * Edits that fill a table from a cell on, to the right and down. `rows` are the rows from that cell's on, `columns` the
 * columns from that cell's on; what goes beyond them is left out, and `left` counts the rows that were.
 */
export function pasteEdits(
  pasted: readonly (readonly string[])[],
  rows: readonly Pointer[],
  columns: readonly Column[],
): { readonly edits: readonly Edit[]; readonly left: number } {
  const edits = pasted.slice(0, rows.length).flatMap((cells, index) =>
    cells.slice(0, columns.length).flatMap((text, place) => {
      const [row, column] = [rows[index], columns[place]];
      return row === undefined || column === undefined ? [] : [cellEdit(row, text, column)];
    }),
  );
  return { edits, left: Math.max(0, pasted.length - rows.length) };
}

/** How a list gets more rows: each made of the document with the ones before it. */
export interface Growth {
  readonly list: Pointer;
  /** How many entries the list may have. */
  readonly most: number;
  readonly blank: (document: Written) => object;
}

/** New rows at the end of a list, as many as it may have: the edits that put them there, and where they are then. */
export function grown(
  document: Written,
  { list, most, blank }: Growth,
  wanted: number,
): { readonly edits: readonly Edit[]; readonly rows: readonly Pointer[] } {
  const count = Math.min(wanted, most - listAt(document, list).length);
  let after = document;
  const edits: Edit[] = [];
  const rows: Pointer[] = [];
  for (let index = 0; index < count; index++) {
    rows.push(`${list}/${listAt(after, list).length}`);
    const edit: Edit = { do: 'insert', at: `${list}/-`, value: blank(after) };
    edits.push(edit);
    after = applyEdit(after, edit).document;
  }
  return { edits, rows };
}

/** The unit that most values of a column are written in; the first of them where several are as many. */
export function unitOf(values: readonly unknown[], usual: string): string {
  const units = values.flatMap((value) => {
    const unit =
      typeof value === 'string' ? /^[+-]?[\d.,]+(?:e[+-]?\d+)? (\S.*)$/i.exec(value)?.[1] : undefined;
    return unit === undefined ? [] : [unit];
  });
  const counts = new Map<string, number>();
  for (const unit of units) counts.set(unit, (counts.get(unit) ?? 0) + 1);
  return [...counts].reduce((most, one) => (one[1] > most[1] ? one : most), [usual, 0] as [
    string,
    number,
  ])[0];
}

/** The last part of a pointer as a place in its list. */
export const indexOf = (at: Pointer): number => Number(keysOf(at).at(-1));

export const cellAt = (document: unknown, row: Pointer, column: Column): unknown =>
  valueAt(document, `${row}/${column.key}`);
