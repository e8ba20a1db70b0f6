import type { z } from 'zod';
import type { Fault } from './app-error';
import { pointer } from './pointer';

export type Reading<T> = { ok: true; value: T } | { ok: false; faults: Fault[] };

type Issue = z.core.$ZodIssue;
type Path = readonly PropertyKey[];

/** Reads a value by its schema: the value as the schema puts it out, or every fault in plain words. */
export function read<S extends z.ZodType>(schema: S, value: unknown): Reading<z.output<S>> {
  const result = schema.safeParse(value, { error: (issue) => words(issue, issue.input) });
  if (result.success) return { ok: true, value: result.data };
  return { ok: false, faults: result.error.issues.flatMap((issue) => toFaults(issue, [], value)) };
}

function toFaults(issue: Issue, base: Path, value: unknown): Fault[] {
  const path = [...base, ...issue.path];
  if (issue.code === 'unrecognized_keys')
    return issue.keys.map((key) => ({
      pointer: pointer([...path, key]),
      code: 'unknown_field',
      message: `“${key}” is not a field here. Remove it, or correct its name.`,
    }));
  const nearest = issue.code === 'invalid_union' ? nearestBranch(issue.errors) : undefined;
  if (nearest) return nearest.flatMap((inner) => toFaults(inner, path, value));
  return [{ pointer: pointer(path), code: codeOf(issue, at(value, path)), message: issue.message }];
}

/** The alternative that the value was meant for: the one whose faults lie inside it, and the fewest of them. */
function nearestBranch(branches: readonly Issue[][]): Issue[] | undefined {
  const inside = branches.filter((issues) =>
    issues.every((issue) => issue.code !== 'invalid_type' || issue.path.length > 0),
  );
  return inside.sort((a, b) => a.length - b.length)[0];
}

function at(value: unknown, path: Path): unknown {
  return path.reduce<unknown>(
    (inner, key) => (typeof inner === 'object' && inner !== null ? Reflect.get(inner, key) : undefined),
    value,
  );
}

function codeOf(issue: Issue, value: unknown): string {
  switch (issue.code) {
    case 'invalid_type':
    case 'invalid_union':
      return value === undefined ? 'missing' : 'wrong_type';
    case 'invalid_value':
      return value === undefined ? 'missing' : 'not_allowed';
    case 'too_small':
    case 'too_big':
    case 'not_multiple_of':
      return 'out_of_range';
    case 'invalid_format':
      return 'wrong_format';
    case 'custom':
      return typeof issue.params?.['code'] === 'string' ? issue.params['code'] : 'not_allowed';
    default:
      return 'not_allowed';
  }
}

const KINDS: Readonly<Record<string, string>> = {
  number: 'a number',
  int: 'a whole number',
  string: 'text',
  boolean: 'true or false',
  array: 'a list',
  tuple: 'a list',
  object: 'an object',
  record: 'an object',
  date: 'a date',
  null: 'null',
};

const FORMATS: Readonly<Record<string, string>> = {
  email: 'an e-mail address',
  uuid: 'an identifier',
  guid: 'an identifier',
  date: 'a date such as 2026-03-31',
  datetime: 'a date and time such as 2026-03-31T09:00:00Z',
  url: 'a web address',
};

function kindOf(value: unknown): string {
  if (value === null) return 'null';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'number' && !Number.isFinite(value)) return 'not a finite number';
  if (typeof value === 'number' && !Number.isInteger(value)) return 'a number with decimals';
  return KINDS[typeof value] ?? 'something else';
}

const quoted = (values: readonly unknown[]): string => values.map((value) => `“${String(value)}”`).join(', ');

/** What Zod found, said to a person. A message given in the schema itself stands before this one. */
function words(issue: z.core.$ZodRawIssue, value: unknown): string {
  switch (issue.code) {
    case 'invalid_type': {
      const wanted = KINDS[issue.expected] ?? `a ${issue.expected}`;
      return value === undefined ? `Missing. Give ${wanted}.` : `This is ${kindOf(value)}. Give ${wanted}.`;
    }
    case 'invalid_value':
      return `${value === undefined ? 'Missing. ' : ''}Give ${issue.values.length > 1 ? 'one of ' : ''}${quoted(issue.values)}.`;
    case 'invalid_union':
      if (Array.isArray(issue['options'])) return `Give one of ${quoted(issue['options'])}.`;
      return value === undefined ? 'Missing. Give a value.' : `${capital(kindOf(value))} does not fit here.`;
    case 'too_small':
      return limit(issue.origin, 'least', issue.minimum, issue.inclusive ?? true);
    case 'too_big':
      return limit(issue.origin, 'most', issue.maximum, issue.inclusive ?? true);
    case 'not_multiple_of':
      return `Give a multiple of ${issue.divisor}.`;
    case 'invalid_format':
      return FORMATS[issue.format]
        ? `Give ${FORMATS[issue.format]}.`
        : 'This is not written in the form expected here.';
    default:
      return 'This value is not allowed here.';
  }
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

function limit(origin: string, side: 'least' | 'most', bound: number | bigint, inclusive: boolean): string {
  if (origin === 'string' && side === 'least' && bound === 1) return 'Empty. Give some text.';
  if (origin === 'string') return `Give at ${side} ${bound} characters.`;
  if (origin === 'array' || origin === 'set')
    return `Give at ${side} ${bound} ${bound === 1 ? 'entry' : 'entries'}.`;
  if (inclusive) return `Give at ${side} ${bound}.`;
  return side === 'least' ? `Give more than ${bound}.` : `Give less than ${bound}.`;
}
