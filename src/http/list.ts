import { z } from 'zod';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';

/** The query fields of every list. Spread them into the list's own strict schema. */
export const listQuery = {
  limit: z.coerce.number().pipe(z.int().min(1).max(200)).default(50),
  cursor: z.string().max(1000).optional(),
};

/** The query by its schema, or 422. A field given several times is a list. */
export function readQuery<S extends z.ZodType>(url: URL, schema: S): z.output<S> {
  const fields = Object.fromEntries(
    [...new Set(url.searchParams.keys())].map((name) => {
      const values = url.searchParams.getAll(name);
      return [name, values.length > 1 ? values : values[0]];
    }),
  );
  const reading = read(schema, fields);
  if (!reading.ok) throw invalid(reading.faults);
  return reading.value;
}

/** Limit and cursor alone, for a list that reads the rest of its query itself. */
export const parseList = (url: URL) => readQuery(url, z.object(listQuery));

export interface List<T> {
  readonly items: readonly T[];
  /** Where the next page starts; null at the end. */
  readonly next: string | null;
  /** All matches, not those of the page. */
  readonly total: number;
}

export const listOf = <S extends z.ZodType>(item: S) =>
  z.strictObject({ items: z.array(item), next: z.string().nullable(), total: z.int() });

/** A list that is short by nature, on one page. */
export const wholeList = <T>(items: readonly T[]): List<T> => ({ items, next: null, total: items.length });

/** A place in a list, opaque to whoever holds it. */
export const writeCursor = (place: unknown): string =>
  Buffer.from(JSON.stringify(place)).toString('base64url');

export function readCursor<S extends z.ZodType>(cursor: string, place: S): z.output<S> {
  const reading = read(place, decode(cursor));
  if (reading.ok) return reading.value;
  throw invalid([
    {
      pointer: '/cursor',
      code: 'not_allowed',
      message: 'This cursor is not from this list. Start without one.',
    },
  ]);
}

function decode(cursor: string): unknown {
  try {
    return JSON.parse(Buffer.from(cursor, 'base64url').toString());
  } catch {
    return undefined;
  }
}
