/** A symbol by another name, wherever the document speaks of it. */
import { isReserved, isSymbol } from '@/engine/template/author';
import type { Written } from '@/features/review/draft';
import { applyEdit, type Edit, listAt, type Pointer, textAt, valueAt } from './edit';
import { expressionPlaces, messagePlaces, namePlaces, statedPlaces } from './places';

const WORD = /"[^"]*"|[A-Za-z][A-Za-z0-9_]*/g;

/** An expression with one symbol for another; what stands in quotes is no symbol. */
export const replaced = (expression: string, from: string, to: string): string =>
  expression.replaceAll(WORD, (word) => (word === from ? to : word));

/** Every symbol that the document declares, columns of lists too. */
export function declaredSymbols(document: Written): string[] {
  const symbol = (entry: unknown) => textAt(entry, '/symbol');
  return [...listAt(document, '/parameters'), ...listAt(document, '/derived')]
    .flatMap((entry) => [symbol(entry), ...listAt(entry, '/columns').map(symbol)])
    .filter((one) => one !== '');
}

/** Whether a parameter, column or derived value may be called so. */
const isGood = (symbol: string): boolean => isSymbol(symbol) && !isReserved(symbol);

/** Whether this is the symbol of one part alone: what is spoken of by it can follow when it is changed. */
export const isOwnSymbol = (document: Written, symbol: string): boolean =>
  isGood(symbol) && declaredSymbols(document).filter((one) => one === symbol).length === 1;

/**
 * Gives the parameter, column or derived value at `of` a symbol, and renames it wherever it is spoken of. `was` is its
 * last good symbol. A text that is no symbol, is another's or has a meaning of its own only stands in its field: nothing
 * is mixed up.
 */
export function renameEdits(document: Written, of: Pointer, was: string, to: string): Edit[] {
  const own: Edit = { do: 'set', at: `${of}/symbol`, value: to };
  const others = declaredSymbols(applyEdit(document, { do: 'remove', at: `${of}/symbol` }).document);
  const isMixed = others.includes(was) || others.includes(to);
  if (was === to || !isGood(was) || !isGood(to) || isMixed) return [own];
  const tex = textAt(document, `${of}/tex`);
  return [
    own,
    ...(tex === was || tex === '' || tex === texOf(was)
      ? [{ do: 'set', at: `${of}/tex`, value: texOf(to) } satisfies Edit]
      : []),
    ...changed(document, expressionPlaces(document), (text) => replaced(text, was, to)),
    ...changed(document, messagePlaces(document), (text) => text.replaceAll(`{${was}}`, `{${to}}`)),
    ...changed(document, namePlaces(document), (text) => (text === was ? to : text)),
    ...statedPlaces(document).flatMap((at) => statedEdits(document, at, was, to)),
    ...rowEdits(document, of, was, to),
  ];
}

/** A symbol as a formula writes it: L1 as L_1, ab as ab. */
export function texOf(symbol: string): string {
  const [, letters = '', digits = ''] = /^([A-Za-z]+)(\d*)$/.exec(symbol) ?? [];
  const name = letters.length > 1 ? `\\text{${letters}}` : letters;
  if (name === '') return symbol;
  return digits === '' ? name : `${name}_${digits.length > 1 ? `{${digits}}` : digits}`;
}

function changed(document: Written, places: readonly Pointer[], change: (text: string) => string): Edit[] {
  return places.flatMap((at): Edit[] => {
    const before = valueAt(document, at);
    if (typeof before !== 'string') return [];
    const after = change(before);
    return after === before ? [] : [{ do: 'set', at, value: after }];
  });
}

const isFields = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const renamedKey = (fields: Readonly<Record<string, unknown>>, was: string, to: string) =>
  Object.fromEntries(Object.entries(fields).map(([key, value]) => [key === was ? to : key, value]));

/** Values by symbol, and by column in the rows of a list. */
function statedEdits(document: Written, at: Pointer, was: string, to: string): Edit[] {
  const stated = valueAt(document, at);
  if (!isFields(stated)) return [];
  const rows = Object.entries(stated).map(([key, value]): [string, unknown] => [
    key,
    Array.isArray(value) ? value.map((row) => (isFields(row) ? renamedKey(row, was, to) : row)) : value,
  ]);
  const value = renamedKey(Object.fromEntries(rows), was, to);
  return JSON.stringify(value) === JSON.stringify(stated) ? [] : [{ do: 'set', at, value }];
}

/** The rows that a list begins with, when one of its columns is renamed. */
function rowEdits(document: Written, of: Pointer, was: string, to: string): Edit[] {
  const list = /^\/parameters\/\d+(?=\/columns\/)/.exec(of)?.[0];
  if (list === undefined) return [];
  const rows = listAt(document, `${list}/default`);
  return [
    {
      do: 'set',
      at: `${list}/default`,
      value: rows.map((row) => (isFields(row) ? renamedKey(row, was, to) : row)),
    },
  ];
}
