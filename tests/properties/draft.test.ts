import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Written } from '@/features/review/draft';
import { readerOf } from '@/features/review/written.server';
import { writtenTemplates } from '../support/templates';

const RUNS = 200;
const SLUGS = [...writtenTemplates.keys()];

type Path = readonly (string | number)[];

function pathsOf(value: unknown, path: Path = []): Path[] {
  if (typeof value !== 'object' || value === null) return [path];
  const keys = Array.isArray(value) ? value.map((_, index) => index) : Object.keys(value);
  return [
    ...(path.length > 0 ? [path] : []),
    ...keys.flatMap((key) => pathsOf(Reflect.get(value, key), [...path, key])),
  ];
}

/** What an author may have left there half typed, or a program have sent. */
const JUNK = [
  undefined,
  null,
  '',
  ' ',
  0,
  -1,
  1e308,
  true,
  [],
  {},
  'L',
  'L +',
  'L + w',
  '1/0',
  '0*L',
  'zz',
  '-L',
  'L^99',
  'w*w',
  'A',
  'Z',
  '0 m',
  '-3 m',
  '1e300 m',
  'constructor("return 1")()',
  '<b>',
  'x'.repeat(9000),
  [null],
  [{}],
  { text: 'L', tree: 'L' },
];

function without(document: unknown, path: Path, junk: unknown): void {
  const [last, ...before] = [...path].reverse();
  const parent = before.reverse().reduce<unknown>((value, key) => Reflect.get(Object(value), key), document);
  if (last === undefined || typeof parent !== 'object' || parent === null) return;
  if (junk !== undefined) Reflect.set(parent, last, structuredClone(junk));
  else if (Array.isArray(parent)) parent.splice(Number(last), 1);
  else Reflect.deleteProperty(parent, last);
}

const half = fc
  .record({
    slug: fc.constantFrom(...SLUGS),
    edits: fc.array(fc.tuple(fc.nat(), fc.nat(JUNK.length - 1)), { minLength: 1, maxLength: 6 }),
  })
  .map(({ slug, edits }) => {
    const document = structuredClone(writtenTemplates.get(slug)) as Written;
    for (const [place, junk] of edits) {
      const paths = pathsOf(document);
      const path = paths[place % paths.length];
      if (path) without(document, path, JUNK[junk]);
    }
    return document;
  });

describe('a draft that is half typed', () => {
  test(`is read without a failure of ours, its faults at their places and in words (${RUNS} of them)`, {
    timeout: 120_000,
  }, () => {
    const read = readerOf('template');
    let faulty = 0;
    fc.assert(
      fc.property(half, (document) => {
        const reading = read?.(document);
        if (!reading || reading.ok) return;
        faulty += 1;
        expect(reading.faults.length).toBeGreaterThan(0);
        for (const { pointer, code, message } of reading.faults) {
          expect(pointer).toMatch(/^(\/.*)?$/);
          expect(code).toMatch(/^[a-z_]+$/);
          expect(message).toMatch(/[.?!]$/);
          expect(message.replaceAll(/“[^”]*”/g, '')).not.toMatch(/undefined|NaN|\[object|Invalid input/);
        }
      }),
      { numRuns: RUNS },
    );
    expect(faulty).toBeGreaterThan(RUNS / 2);
  });
});
