import { expect, test } from 'vitest';
import { readDecimal } from './decimal';

test.each<[string, number]>([
  ['0.7', 0.7],
  ['0,7', 0.7],
  [' .5 ', 0.5],
  ['2.', 2],
  ['1/1.67', 1 / 1.67],
  ['1 / 3', 1 / 3],
])('“%s” is a number', (text, value) => {
  expect(readDecimal(text)).toBe(value);
});

test.each(['', '.', '-1', '1e3', '1/0', '1/2/3', '/2', '1 000', 'a', '1.2.3'])('“%s” is none', (text) => {
  expect(readDecimal(text)).toBeNull();
});
