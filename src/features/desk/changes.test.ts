import { expect, test } from 'vitest';
import { changesBetween } from './changes';

test('only what differs is listed, with its place in the second document', () => {
  const before = {
    name: 'A',
    parameters: [
      { symbol: 'L', most: '9 m' },
      { symbol: 'w', most: '1' },
    ],
    tags: ['x'],
  };
  const after = {
    name: 'A',
    parameters: [
      { symbol: 'w', most: '2' },
      { symbol: 'L', most: '9 m' },
    ],
    note: 'n',
    tags: ['x', 'y'],
  };
  expect(changesBetween(before, after)).toEqual([
    { pointer: '/parameters/0/most', before: '"1"', after: '"2"' },
    { pointer: '/note', before: null, after: '"n"' },
    { pointer: '/tags/1', before: null, after: '"y"' },
  ]);
});

test('what is gone keeps its old place; what is the same is not listed', () => {
  expect(changesBetween({ a: 1, b: { c: [1, 2] } }, { b: { c: [1] } })).toEqual([
    { pointer: '/b/c/1', before: '2', after: null },
    { pointer: '/a', before: '1', after: null },
  ]);
  expect(changesBetween({ a: [{ id: 'p' }] }, { a: [{ id: 'p' }] })).toEqual([]);
});
