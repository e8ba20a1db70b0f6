import Fuse from 'fuse.js';
import type { Arrangement, LoadKind } from '@/engine/template';
import type { RevisionState } from '@/features/review/review';
import type { TemplateRow } from './template';

/** What is asked of the catalogue. An empty list asks nothing. */
export interface CatalogueQuery {
  readonly q: string;
  readonly arrangements: readonly Arrangement[];
  readonly loadKinds: readonly LoadKind[];
  readonly states: readonly RevisionState[];
  readonly tags: readonly string[];
}
export const EVERYTHING: CatalogueQuery = { q: '', arrangements: [], loadKinds: [], states: [], tags: [] };

export type Facet = Exclude<keyof CatalogueQuery, 'q'>;

/** A row with what a search looks through; the first of the texts is the name. */
export interface Searchable {
  readonly row: TemplateRow;
  readonly texts: readonly string[];
}

export interface Match<T> {
  readonly entry: T;
  /** Words of the name that the search meant, as [from, to) into it. */
  readonly marks: readonly (readonly [number, number])[];
}

/** What people type for what a name says. */
export const SHORT_WORDS: Readonly<Record<string, string>> = {
  udl: 'uniform',
  pt: 'point',
  ss: 'simple',
  pc: 'propped',
  cant: 'cantilever',
  conc: 'point',
};

/** Letters that a word may have wrong, as a share of them: one in "unifrm", two in "cantelevr". */
const TYPOS = 0.34;
/** Words shorter than this are read as the start of a word. */
const SHORTEST_FUZZY = 3;
const WORD = /[\p{L}\p{N}.]+/gu;

const wordsOf = (text: string): string[] => text.toLowerCase().match(WORD) ?? [];

/** Each entry's words with the place of the text they stand in: the earlier, the more they count. */
type Index = readonly ReadonlyMap<string, number>[];

const indexOf = (entries: readonly Searchable[]): Index =>
  entries.map(({ texts }) => {
    const places = new Map<string, number>();
    texts.forEach((text, place) => {
      for (const word of wordsOf(text)) if (!places.has(word)) places.set(word, place);
    });
    return places;
  });

/** Finds entries in which every word of a search stands, or one that differs by a typing slip. */
export function createFinder<T extends Searchable>(entries: readonly T[]) {
  const index = indexOf(entries);
  const vocabulary = [...new Set(index.flatMap((words) => [...words.keys()]))];
  const fuse = new Fuse(vocabulary, { threshold: TYPOS, ignoreLocation: true, includeScore: true });

  const meantBy = (typed: string): ReadonlyMap<string, number> => {
    const asked = SHORT_WORDS[typed] ?? typed;
    if (asked.length < SHORTEST_FUZZY)
      return new Map(vocabulary.filter((word) => word.startsWith(asked)).map((word) => [word, 0]));
    const found = fuse.search(asked).map(({ item, score = 0 }) => [item, score] as const);
    // A word spelt as typed leaves no room for a slip.
    const exact = found.filter(([word]) => word.startsWith(asked));
    return new Map(exact.length > 0 ? exact : found);
  };

  return (q: string): Match<T>[] => {
    const meanings = wordsOf(q).map(meantBy);
    const scored = entries.flatMap((entry, at) => {
      const score = scoreOf(index[at] ?? new Map(), meanings);
      return score === null ? [] : [{ entry, score, marks: marksIn(entry.row.name, meanings) }];
    });
    const best =
      meanings.length > 0 ? (a: { score: number }, b: { score: number }) => a.score - b.score : () => 0;
    return scored
      .sort((a, b) => best(a, b) || byUse(a.entry.row, b.entry.row))
      .map(({ entry, marks }) => ({ entry, marks }));
  };
}

/** Smaller is better; null where a word of the search stands nowhere. */
function scoreOf(
  words: ReadonlyMap<string, number>,
  meanings: readonly ReadonlyMap<string, number>[],
): number | null {
  let sum = 0;
  for (const meaning of meanings) {
    let best = Number.POSITIVE_INFINITY;
    for (const [word, slip] of meaning) {
      const place = words.get(word);
      if (place !== undefined) best = Math.min(best, slip + place / 100);
    }
    if (best === Number.POSITIVE_INFINITY) return null;
    sum += best;
  }
  return sum;
}

const marksIn = (name: string, meanings: readonly ReadonlyMap<string, number>[]): [number, number][] =>
  [...name.matchAll(WORD)].flatMap(({ 0: word, index }): [number, number][] =>
    meanings.some((meaning) => meaning.has(word.toLowerCase())) ? [[index, index + word.length]] : [],
  );

const byReference = new Intl.Collator('en', { numeric: true });
const byUse = (a: TemplateRow, b: TemplateRow): number =>
  b.uses.members - a.uses.members || byReference.compare(a.reference, b.reference);

const meets = {
  arrangements: (row, { arrangements: asked }) => asked.length === 0 || asked.includes(row.arrangement),
  loadKinds: (row, { loadKinds: asked }) => asked.every((kind) => row.loadKinds.includes(kind)),
  states: (row, { states: asked }) => asked.length === 0 || asked.includes(row.state),
  tags: (row, { tags: asked }) => asked.every((tag) => row.tags.includes(tag)),
} satisfies Record<Facet, (row: TemplateRow, query: CatalogueQuery) => boolean>;

const FACETS = Object.keys(meets) as Facet[];

/** Of what a search found, what the filters leave. `but` is left out, to count what it would leave. */
export const narrow = <T extends Searchable>(
  found: readonly Match<T>[],
  query: CatalogueQuery,
  but?: Facet,
): Match<T>[] =>
  found.filter(({ entry }) => FACETS.every((facet) => facet === but || meets[facet](entry.row, query)));

const VALUES: Record<Facet, (row: TemplateRow) => readonly string[]> = {
  arrangements: ({ arrangement }) => [arrangement],
  loadKinds: ({ loadKinds }) => loadKinds,
  states: ({ state }) => [state],
  tags: ({ tags }) => tags,
};

/** How many of what was found each value of a filter would leave, the other filters as they are. */
export function countBy<T extends Searchable>(
  found: readonly Match<T>[],
  query: CatalogueQuery,
  facet: Facet,
): Map<string, number> {
  // Of arrangements and states any may hold; loads and tags must all, and so they narrow themselves too.
  const left = narrow(found, query, facet === 'arrangements' || facet === 'states' ? facet : undefined);
  const counts = new Map<string, number>();
  for (const { entry } of left)
    for (const value of VALUES[facet](entry.row)) counts.set(value, (counts.get(value) ?? 0) + 1);
  return counts;
}
