import { expect, test } from 'vitest';
import { z } from 'zod';
import { parseList, readCursor, writeCursor } from './list';

const Place = z.tuple([z.number(), z.string()]);

test('a cursor comes back as the place that was written', () => {
  const cursor = writeCursor([43.1, 'UB 305×165×46']);
  expect(cursor).toMatch(/^[\w-]+$/);
  expect(readCursor(cursor, Place)).toEqual([43.1, 'UB 305×165×46']);
});

test.each(['', 'nonsense', writeCursor(['b', 1]), writeCursor({})])(
  'cursor %j is refused with its place',
  (cursor) => {
    expect(() => readCursor(cursor, Place)).toThrow(
      expect.objectContaining({ status: 422, faults: [expect.objectContaining({ pointer: '/cursor' })] }),
    );
  },
);

test('parseList leaves the other fields of the query to the list', () => {
  expect(parseList(new URL('http://localhost/?q=hall&limit=10'))).toEqual({ limit: 10 });
});
