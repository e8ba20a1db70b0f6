import { expect, test } from 'vitest';
import {
  ageWords,
  goneWords,
  heldWords,
  lengthsWords,
  notHeldWords,
  stockChoices,
  stockQuery,
} from './words';

const TODAY = '2026-12-01';
const SUPPLIERS = [
  { slug: 'near', name: 'Near', asOf: '2026-11-30' },
  { slug: 'far', name: 'Far', asOf: '2026-08-01' },
];

test('the age of a list is said in days', () => {
  expect(['2026-12-01', '2026-11-30', '2026-09-01'].map((asOf) => ageWords(asOf, TODAY))).toEqual([
    'today',
    '1 day old',
    '91 days old',
  ]);
});

test('lengths are said in the units that are read', () => {
  expect(lengthsWords([6, 12.192], 'metric')).toBe('6, 12.192\u00a0m');
  expect(lengthsWords([12.192], 'us')).toBe(`40'-0"`); // 40 × 0.3048 m
  expect(lengthsWords([], 'metric')).toBe('–');
});

test('what nobody said is left out of the line', () => {
  const held = { lengths_m: [9], lead_time_days: 0, price_band: 'C' } as const;
  expect(heldWords({ ...held, lengths_m: [9] }, 'metric')).toBe('off the shelf · band C · 9\u00a0m');
  expect(heldWords({ lengths_m: [], lead_time_days: null, price_band: null }, 'metric')).toBe('');
});

test('a choice of stock says which lists are old, and is a query', () => {
  expect(stockChoices(SUPPLIERS, TODAY).map(({ value, label }) => [label, stockQuery(value)])).toEqual([
    ['Stocked or not', {}],
    ['In stock', { stock: '1' }],
    ['In stock: Near', { supplier: 'near' }],
    ['In stock: Far (122 days old)', { supplier: 'far' }],
  ]);
});

test('one list and one line are not said in the plural', () => {
  expect([1, 2].map(notHeldWords)).toEqual([
    'The one stock list does not have it.',
    'None of the 2 stock lists has it.',
  ]);
  expect([0, 1, 2].map(goneWords)).toEqual([
    'It has no lines.',
    'Its one line goes with it.',
    'Its 2 lines go with it.',
  ]);
});
