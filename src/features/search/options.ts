/** What the dialog lists, as data: hits by kind, searches made before, and places to go to. */
import { paths } from '@/paths';
import type { Hit, Marked, SearchView } from './search';
import { KIND_TITLES, SHOWN_OF_KIND } from './terms';

export interface Option {
  readonly href: string;
  readonly mark: Marked;
  readonly title: Marked;
  readonly detail: Marked;
  readonly excerpt: Marked | null;
  readonly state: string;
  /** Keys that do the same. */
  readonly keys: string;
  /** A search made before: choosing it searches again. */
  readonly again: string | null;
}

export interface Group {
  readonly title: string;
  readonly options: readonly Option[];
}

/** A place that the person may go to, and the keys that lead there. */
export interface Command {
  readonly label: string;
  readonly href: string;
  readonly keys: string;
}

const unmarked = (text: string): Marked => ({ text, marks: [] });
const NOTHING = unmarked('');

const toOption = (hit: Hit): Option => ({ ...hit, keys: '', again: null });

const plain = (title: string, href: string, more: Partial<Option> = {}): Option => ({
  href,
  mark: NOTHING,
  title: unmarked(title),
  detail: NOTHING,
  excerpt: null,
  state: '',
  keys: '',
  again: null,
  ...more,
});

/** What was found in its groups, each with a way to all of its kind. */
export const hitGroups = (q: string, { items, kinds }: SearchView): Group[] =>
  kinds.map(({ kind, total }) => {
    const title = KIND_TITLES[kind];
    const all = plain(`All ${total} ${title.toLowerCase()}`, paths.search(q, kind));
    const options = items.filter((hit) => hit.kind === kind).map(toOption);
    return { title, options: total > SHOWN_OF_KIND ? [...options, all] : options };
  });

const words = (text: string): string[] => text.toLowerCase().match(/[\p{L}\p{N}]+/gu) ?? [];

/** The places whose label has a word for each that was typed; all of them where nothing was. */
export function commandGroups(q: string, commands: readonly Command[], title: string): Group[] {
  const asked = words(q);
  const options = commands
    .filter(({ label }) => asked.every((one) => words(label).some((word) => word.startsWith(one))))
    .map(({ label, href, keys }) => plain(label, href, { keys }));
  return options.length > 0 ? [{ title, options }] : [];
}

const MOST_RECENT = 6;

/** With a search that led somewhere put before those made earlier. */
export const withRecent = (recent: readonly string[], q: string): string[] =>
  [q, ...recent.filter((one) => one.toLowerCase() !== q.toLowerCase())].slice(0, MOST_RECENT);

/** What was kept of earlier searches, whatever else may stand in its place. */
export function readRecent(kept: string | null): string[] {
  try {
    const read: unknown = JSON.parse(kept ?? '[]');
    return Array.isArray(read) ? read.filter((one) => typeof one === 'string').slice(0, MOST_RECENT) : [];
  } catch {
    return [];
  }
}

export const recentGroups = (recent: readonly string[]): Group[] =>
  recent.length > 0
    ? [{ title: 'Searched before', options: recent.map((q) => plain(q, paths.search(q), { again: q })) }]
    : [];

/** How many there are, in words, for whoever does not see the list. */
export function countWords({ total, instead }: Pick<SearchView, 'total' | 'instead'>): string {
  if (total === 0) return '';
  const found = total === 1 ? '1 found' : `${total} found`;
  const [first] = instead;
  if (!first) return `${found}.`;
  const read = instead.map(({ typed, meant }) => `“${typed}” read as “${meant.join('” or “')}”`).join(', ');
  return `${found}. Nothing has it as typed: ${read}.`;
}
