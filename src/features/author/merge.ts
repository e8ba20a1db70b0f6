/** Two people's changes of one draft brought together. */
import { type Edit, type Pointer, parentOf } from './edit';

/** A place that both changed, each to something else. `at` names it in the merged document; undefined: it was removed. */
export interface Conflict {
  readonly at: Pointer;
  readonly mine: unknown;
  readonly theirs: unknown;
}

interface Merged {
  readonly merged: unknown;
  readonly conflicts: readonly Conflict[];
}

type Fields = Readonly<Record<string, unknown>>;

const isList = (value: unknown): value is readonly unknown[] => Array.isArray(value);
const isFields = (value: unknown): value is Fields =>
  typeof value === 'object' && value !== null && !isList(value);

/** Whether two values say the same, whatever the order of their fields. */
export function sameValue(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (isList(a) && isList(b))
    return a.length === b.length && a.every((one, index) => sameValue(one, b[index]));
  if (!isFields(a) || !isFields(b)) return false;
  const keys = Object.keys(a);
  return (
    keys.length === Object.keys(b).length &&
    keys.every((key) => Object.hasOwn(b, key) && sameValue(a[key], b[key]))
  );
}

/**
 * What both made of `base`: whatever only one changed is as they changed it. Lists are matched by the id, symbol or
 * name of their entries where each has one of its own, else by place. A place that both changed in different ways keeps
 * mine and is a conflict, with the two values to choose from.
 */
export function merge(base: unknown, mine: unknown, theirs: unknown, at: Pointer = ''): Merged {
  if (sameValue(mine, theirs) || sameValue(base, theirs)) return { merged: mine, conflicts: [] };
  if (sameValue(base, mine)) return { merged: theirs, conflicts: [] };
  if (isFields(mine) && isFields(theirs)) return mergeFields(isFields(base) ? base : {}, mine, theirs, at);
  if (isList(mine) && isList(theirs)) {
    const lists = mergeLists(isList(base) ? base : [], mine, theirs, at);
    if (lists) return lists;
  }
  return { merged: mine, conflicts: [{ at, mine, theirs }] };
}

const escaped = (key: string): string => key.replaceAll('~', '~0').replaceAll('/', '~1');

function mergeFields(base: Fields, mine: Fields, theirs: Fields, at: Pointer): Merged {
  const conflicts: Conflict[] = [];
  const entries: [string, unknown][] = [];
  const own = (fields: Fields, key: string) => (Object.hasOwn(fields, key) ? fields[key] : undefined);
  for (const key of new Set([...Object.keys(mine), ...Object.keys(theirs)])) {
    const part = merge(own(base, key), own(mine, key), own(theirs, key), `${at}/${escaped(key)}`);
    conflicts.push(...part.conflicts);
    if (part.merged !== undefined) entries.push([key, part.merged]);
  }
  return { merged: Object.fromEntries(entries), conflicts };
}

const NAMES = ['id', 'symbol', 'name'] as const;

/** What the entries are called by, where every one has a name of its own; null for a list without names. */
function namesOf(list: readonly unknown[], by: string): string[] | null {
  const names = list.map((entry) => (isFields(entry) ? entry[by] : undefined));
  const texts = names.filter((name): name is string => typeof name === 'string' && name !== '');
  return texts.length === list.length && new Set(texts).size === texts.length ? texts : null;
}

function mergeLists(
  base: readonly unknown[],
  mine: readonly unknown[],
  theirs: readonly unknown[],
  at: Pointer,
): Merged | null {
  for (const by of NAMES) {
    const [ofBase, ofMine, ofTheirs] = [base, mine, theirs].map((list) => namesOf(list, by));
    if (ofBase && ofMine && ofTheirs && ofMine.length + ofTheirs.length > 0)
      return mergeNamed(index(ofBase, base), index(ofMine, mine), index(ofTheirs, theirs), at);
  }
  if (base.length !== mine.length || base.length !== theirs.length) return mergeHunks(base, mine, theirs);
  const parts = mine.map((one, k) => merge(base[k], one, theirs[k], `${at}/${k}`));
  return {
    merged: parts.map(({ merged }) => merged),
    conflicts: parts.flatMap(({ conflicts }) => conflicts),
  };
}

/** What of a list became what: entries `from` to `to` are now `entries`, and those around them are as they were. */
function hunkOf(base: readonly unknown[], list: readonly unknown[]) {
  const least = Math.min(base.length, list.length);
  let from = 0;
  while (from < least && sameValue(base[from], list[from])) from++;
  let behind = 0;
  while (behind < least - from && sameValue(base.at(-1 - behind), list.at(-1 - behind))) behind++;
  return { from, to: base.length - behind, entries: list.slice(from, list.length - behind) };
}

/** Entries without names, where the two changed different stretches; null where these meet. */
function mergeHunks(
  base: readonly unknown[],
  mine: readonly unknown[],
  theirs: readonly unknown[],
): Merged | null {
  const hunks = [hunkOf(base, mine), hunkOf(base, theirs)].sort((a, b) => a.from - b.from || a.to - b.to);
  const [first, second] = hunks;
  if (!first || !second || first.to > second.from || (first.from === second.from && first.to === second.to))
    return null;
  const merged = [
    ...base.slice(0, first.from),
    ...first.entries,
    ...base.slice(first.to, second.from),
    ...second.entries,
    ...base.slice(second.to),
  ];
  return { merged, conflicts: [] };
}

const index = (names: readonly string[], list: readonly unknown[]): ReadonlyMap<string, unknown> =>
  new Map(names.map((name, k) => [name, list[k]]));

type Named = ReadonlyMap<string, unknown>;

function mergeNamed(base: Named, mine: Named, theirs: Named, at: Pointer): Merged | null {
  const order = orderOf(base, mine, theirs);
  if (!order) return null;
  const merged: unknown[] = [];
  const conflicts: Conflict[] = [];
  for (const name of order) {
    const place = `${at}/${merged.length}`;
    const part = merge(base.get(name), mine.get(name), theirs.get(name), place);
    conflicts.push(...part.conflicts);
    // An entry that I removed and they changed stays in view until one of the two is chosen.
    const kept = part.merged === undefined && part.conflicts.length > 0 ? theirs.get(name) : part.merged;
    if (kept !== undefined) merged.push(kept);
  }
  return { merged, conflicts };
}

/** The order of whoever moved entries, with the other's new entries behind their neighbours; null where the two differ. */
function orderOf(base: Named, mine: Named, theirs: Named): string[] | null {
  const common = [...base.keys()].filter((name) => mine.has(name) && theirs.has(name));
  const moved = [mine, theirs].map((list) => [...list.keys()].filter((name) => common.includes(name)));
  const isMineMoved = !sameValue(moved[0], common);
  const isTheirsMoved = !sameValue(moved[1], common);
  if (isMineMoved && !isTheirsMoved) return joined(base, mine, theirs);
  if (isTheirsMoved && !isMineMoved) return joined(base, theirs, mine);
  const order = joined(base, mine, theirs);
  return sameValue(order, joined(base, theirs, mine)) ? order : null;
}

/** The names of `first` in their order, with those that only `second` has behind their neighbours there. */
function joined(base: Named, first: Named, second: Named): string[] {
  const order = [...first.keys()];
  for (const [name, before] of neighbours(second)) {
    if (order.includes(name)) continue;
    let place = before === null ? 0 : order.indexOf(before) + 1;
    // New entries of both at one place stand in the order of their names, so that it does not matter whose they are.
    for (let next = order[place]; next !== undefined; next = order[++place])
      if (base.has(next) || second.has(next) || next > name) break;
    order.splice(place, 0, name);
  }
  return order;
}

const neighbours = (list: Named): [string, string | null][] => {
  const names = [...list.keys()];
  return names.map((name, k) => [name, names[k - 1] ?? null]);
};

/** One conflict decided: the edits of the merged document, and the conflicts that are left, at their places after it. */
export function decide(
  conflicts: readonly Conflict[],
  conflict: Conflict,
  whose: 'mine' | 'theirs',
): { edits: Edit[]; rest: Conflict[] } {
  const rest = conflicts.filter((one) => one !== conflict);
  const { at } = conflict;
  const value = conflict[whose];
  if (value !== undefined) return { edits: [{ do: 'set', at, value }], rest };
  const list = parentOf(at);
  const removed = Number(at.slice(list.length + 1));
  return {
    edits: [{ do: 'remove', at }],
    rest: Number.isInteger(removed)
      ? rest.map((one) => ({ ...one, at: movedUp(one.at, list, removed) }))
      : rest,
  };
}

/** A pointer after an entry of a list was removed: those behind it move up. */
function movedUp(at: Pointer, list: Pointer, removed: number): Pointer {
  const entry = at.startsWith(`${list}/`) ? /^\d+(?=\/|$)/.exec(at.slice(list.length + 1))?.[0] : undefined;
  if (entry === undefined || Number(entry) <= removed) return at;
  return `${list}/${Number(entry) - 1}${at.slice(list.length + 1 + entry.length)}`;
}
