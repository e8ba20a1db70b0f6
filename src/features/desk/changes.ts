import { pointer } from '@/lib/pointer';

export interface Change {
  readonly pointer: string;
  /** As JSON; null where there is nothing. */
  readonly before: string | null;
  readonly after: string | null;
}

/**
 * What differs between two documents as their authors write them, in the order of the second, then what is gone.
 * Entries of a list that have an id, a symbol or a name are compared with the one that has the same, wherever it stands.
 */
export const changesBetween = (before: unknown, after: unknown): Change[] => compare(before, after, []);

function compare(before: unknown, after: unknown, path: readonly PropertyKey[]): Change[] {
  const isInner = (isObject(before) && isObject(after)) || (Array.isArray(before) && Array.isArray(after));
  if (!isInner) {
    const [a, b] = [textOf(before), textOf(after)];
    return a === b ? [] : [{ pointer: pointer(path), before: a, after: b }];
  }
  const [old, now] = [entriesOf(before), entriesOf(after)];
  const came = [...now].flatMap(([key, { place, value }]) =>
    compare(old.get(key)?.value, value, [...path, place]),
  );
  const gone = [...old].flatMap(([key, { place, value }]) =>
    now.has(key) ? [] : compare(value, undefined, [...path, place]),
  );
  return [...came, ...gone];
}

const isObject = (value: unknown): value is object =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const textOf = (value: unknown): string | null => (value === undefined ? null : JSON.stringify(value));

/** The parts of an object or a list by what they are called. */
function entriesOf(value: object): Map<string, { place: PropertyKey; value: unknown }> {
  const names = Array.isArray(value) ? value.map(nameOf) : [];
  const areNamed = names.every((name) => name !== null) && new Set(names).size === names.length;
  return new Map(
    Object.entries(value).map(([key, inner], index) => [
      (areNamed && names[index]) || key,
      { place: Array.isArray(value) ? index : key, value: inner },
    ]),
  );
}

function nameOf(entry: unknown): string | null {
  if (!isObject(entry)) return null;
  const given: Partial<Record<'id' | 'symbol' | 'name', unknown>> = entry;
  const name = given.id ?? given.symbol ?? given.name;
  return typeof name === 'string' && name !== '' ? name : null;
}
