import { expect, test } from 'vitest';
import { letteredSupports, readBeam, supportLetter } from './index';

test('supportLetter(place) goes on after Z with two letters', () => {
  expect([0, 1, 25, 26, 27, 51, 52, 701, 702].map(supportLetter)).toEqual(
    ['A', 'B', 'Z', 'AA', 'AB', 'AZ', 'BA', 'ZZ', 'AAA'], // columns of a spreadsheet are lettered the same way
  );
});

test('letteredSupports(beam) letters from the left, whatever the order of the list, and counts a free end', () => {
  const reading = readBeam({
    length: 8,
    ei: 1e7,
    supports: [
      { at: 8, kind: 'free' },
      { at: 6, kind: 'roller' },
      { at: 0, kind: 'pin' },
    ],
  });
  expect(reading.ok && letteredSupports(reading.value).map(({ letter, index }) => [letter, index])).toEqual([
    ['A', 2],
    ['B', 1],
    ['C', 0],
  ]);
});
