/** How a field may go on: symbols and functions in an expression, units behind a figure. */
import type { DimensionName } from '@/engine/quantity';
import type { Expected, Kinds } from '@/engine/template/author';
import type { Written } from '@/features/review/draft';
import { unitsOffered } from '@/features/template/units';
import { listAt, textAt } from './edit';
import { fits } from './expression';

export interface Completion {
  /** What stands in place of the text from `from` to `to`. */
  readonly text: string;
  readonly from: number;
  readonly to: number;
  /** What it is, in words. */
  readonly note: string;
}

const FUNCTIONS: Readonly<Record<string, string>> = {
  min: 'the least of several',
  max: 'the largest of several',
  abs: 'without its sign',
  sqrt: 'square root',
  sin: 'of an angle',
  cos: 'of an angle',
  tan: 'of an angle',
  sum: 'over the rows of a list',
  count: 'rows of a list',
};

const BUILT_IN: Readonly<Record<string, string>> = {
  EI: 'bending stiffness',
  h: 'depth of the section',
  shear: 'shear deformation, "included" or "left-out"',
  dmax: 'largest movement',
};

/** What each declared symbol is called. */
export function symbolNames(document: Written): ReadonlyMap<string, string> {
  const entries = [...listAt(document, '/parameters'), ...listAt(document, '/derived')];
  return new Map(
    entries
      .flatMap((entry) => [entry, ...listAt(entry, '/columns')])
      .map((entry) => [textAt(entry, '/symbol'), textAt(entry, '/name')]),
  );
}

const nameOf = (symbol: string, names: ReadonlyMap<string, string>): string =>
  names.get(symbol) || BUILT_IN[symbol] || (/^R[A-Z]$/.test(symbol) ? `reaction at ${symbol.slice(1)}` : '');

interface Context {
  readonly wanted: Expected;
  readonly kinds: Kinds;
  readonly names: ReadonlyMap<string, string>;
}

const MOST = 8;

/** The completions of an expression with the caret at `caret`, the best first. */
export function completions(text: string, caret: number, { wanted, kinds, names }: Context): Completion[] {
  const quoted = /"([^"]*)$/.exec(text.slice(0, caret));
  if (quoted) return valueCompletions(text, caret, quoted[1] ?? '', kinds);
  const word = /[A-Za-z][A-Za-z0-9]*$/.exec(text.slice(0, caret))?.[0] ?? '';
  const before = text.slice(0, caret - word.length);
  // Behind a figure or a closing bracket a sign is missing, not a symbol.
  if (/[0-9.)"A-Za-z]\s*$/.test(before) || (word === '' && /[0-9)]\s*$/.test(before))) return [];
  const isAlone = before.trim() === '' && text.slice(caret).trim() === '';
  const span = { from: caret - word.length, to: caret };
  const symbols = [...kinds.keys()].map((symbol) => ({
    text: symbol,
    note: nameOf(symbol, names),
    rank: rank(symbol, nameOf(symbol, names), word) + (isAlone && fits(symbol, wanted, kinds) ? 0 : 0.5),
  }));
  const functions = Object.entries(FUNCTIONS).map(([name, note]) => ({
    text: `${name}(`,
    note,
    rank: word === '' ? NONE : rank(name, '', word) + 0.6,
  }));
  return [...symbols, ...functions]
    .filter((one) => one.rank < NONE && one.text !== word)
    .sort((a, b) => a.rank - b.rank)
    .slice(0, MOST)
    .map(({ text: insert, note }) => ({ text: insert, note, ...span }));
}

const NONE = 9;

/** The lower, the nearer to what was typed: as written, in either case, in its name. */
function rank(symbol: string, name: string, word: string): number {
  if (word === '') return 1;
  if (symbol.startsWith(word)) return 0;
  const small = word.toLowerCase();
  if (symbol.toLowerCase().startsWith(small)) return 1;
  return small.length > 1 && name.toLowerCase().includes(small) ? 2 : NONE;
}

/** In quotes stands a named value of the choice that the expression compares. */
function valueCompletions(text: string, caret: number, typed: string, kinds: Kinds): Completion[] {
  const symbol = /([A-Za-z][A-Za-z0-9]*)\s*[=!]=\s*"[^"]*$/.exec(text.slice(0, caret))?.[1] ?? '';
  const kind = kinds.get(symbol);
  if (kind?.is !== 'text') return [];
  const to = text[caret] === '"' ? caret + 1 : caret;
  return kind.values
    .filter((value) => value.startsWith(typed))
    .map((value) => ({ text: `${value}"`, note: `of ${symbol}`, from: caret - typed.length, to }));
}

/** Units that may follow the figure of a quantity. */
export function unitCompletions(text: string, caret: number, dimension: DimensionName): Completion[] {
  const [, space = '', typed = ''] = /^[-+\u2212]?[\d.,\s]*\d(\s*)(\S*)$/.exec(text.slice(0, caret)) ?? [];
  if (!/\d/.test(text) || caret !== text.length) return [];
  return unitsOffered(dimension, '')
    .filter(
      (unit) =>
        unit !== '' &&
        unit !== 'ft-in' &&
        unit.toLowerCase().startsWith(typed.toLowerCase()) &&
        unit !== typed,
    )
    .map((unit) => ({
      text: `${space === '' ? ' ' : ''}${unit}`,
      note: '',
      from: caret - typed.length,
      to: caret,
    }));
}
