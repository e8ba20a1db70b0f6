import { pointer } from '@/lib/pointer';

type Written = Record<string, unknown>;
export type JsonReading =
  | { readonly ok: true; readonly value: Written }
  | { readonly ok: false; readonly message: string };

/** Levels of objects and lists inside one another, as a body of the interface may have. */
const DEEPEST = 64;

/** A document's JSON text. */
export function parseJson(text: string): JsonReading {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch (error) {
    return { ok: false, message: error instanceof Error ? `${error.message}.` : 'It cannot be read.' };
  }
  if (typeof value !== 'object' || value === null || Array.isArray(value))
    return { ok: false, message: 'A document is an object: { … }.' };
  const fault = unkeepable(value, 0);
  return fault === null ? { ok: true, value: { ...value } } : { ok: false, message: fault };
}

/** What the database, or whoever copies an object, could not take. */
function unkeepable(value: unknown, depth: number): string | null {
  if (typeof value === 'string')
    return /\0|\p{Surrogate}/u.test(value)
      ? 'It holds a character that is no text: a NUL, or half of a pair.'
      : null;
  if (typeof value !== 'object' || value === null) return null;
  if (depth > DEEPEST) return `It has more than ${DEEPEST} levels inside one another.`;
  for (const [key, inner] of Object.entries(value)) {
    if (key === '__proto__') return '“__proto__” is not a field here.';
    const fault = unkeepable(key, depth) ?? unkeepable(inner, depth + 1);
    if (fault !== null) return fault;
  }
  return null;
}

const FIRST = ['reference', 'name', 'summary'] as const;

/** The document with what it is called first: the database keeps no order of keys. */
export const namedFirst = (document: Readonly<Written>): Written => ({
  ...Object.fromEntries(FIRST.filter((key) => key in document).map((key) => [key, document[key]])),
  ...Object.fromEntries(Object.entries(document).filter(([key]) => !FIRST.some((one) => one === key))),
});

/** The text of a document as it is shown and edited. */
export const jsonText = (value: unknown): string => JSON.stringify(value, null, 2);

/** The line of `jsonText`, from 1, on which the value at each JSON Pointer begins. */
export function linesOf(value: unknown): ReadonlyMap<string, number> {
  const lines = new Map<string, number>();
  walk(value, [], 1, lines);
  return lines;
}

/** Returns the line on which the value ends. */
function walk(
  value: unknown,
  path: readonly PropertyKey[],
  line: number,
  lines: Map<string, number>,
): number {
  lines.set(pointer(path), line);
  if (typeof value !== 'object' || value === null) return line;
  const entries = Object.entries(value).filter(([, inner]) => inner !== undefined);
  if (entries.length === 0) return line;
  let last = line;
  for (const [key, inner] of entries) last = walk(inner, [...path, key], last + 1, lines);
  return last + 1;
}

/** The line of a pointer, or of the nearest part around it that is there. */
export function lineAt(lines: ReadonlyMap<string, number>, at: string): number {
  for (let place = at; place !== ''; place = place.slice(0, place.lastIndexOf('/'))) {
    const line = lines.get(place);
    if (line !== undefined) return line;
  }
  return 1;
}
