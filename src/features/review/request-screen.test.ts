import { expect, test } from 'vitest';
import { queryOf, screenOf, valueWords } from './request-screen';

test.each([
  ['/templates/simple-span?L=7+m', { kind: 'template', slug: 'simple-span', number: undefined }],
  ['/templates/simple-span/revisions/2#A', { kind: 'template', slug: 'simple-span', number: 2 }],
  ['/jobs/Q-1/members/B%2F1', { kind: 'member', job: 'Q-1', mark: 'B/1' }],
  ['/jobs/Q-1/members/B1/sheet', { kind: 'member', job: 'Q-1', mark: 'B1' }],
  ['/jobs/Q-1/members/new', { kind: 'other' }],
  ['/templates/simple-span/revisions/2/passport', { kind: 'other' }],
  ['/jobs/%E0%A4%A/members/B1', { kind: 'other' }],
  ['/sections?q=hea', { kind: 'other' }],
  ['', { kind: 'other' }],
] as const)('the screen of %s', (address, screen) => {
  expect(screenOf(address)).toEqual(screen);
});

test('the query of an address, but for what is too long to be a value', () => {
  expect(queryOf('/sections?q=hea&depth_min=300#B')).toEqual({ q: 'hea', depth_min: '300' });
  expect(queryOf(`/x?a=${'9'.repeat(4001)}&b=1`)).toEqual({ b: '1' });
  expect(queryOf('/x')).toEqual({});
});

test.each([
  ['6 m', '6 m'],
  [{ G: '5.2 kN/m', S: '3.6 kN/m' }, 'G 5.2 kN/m, S 3.6 kN/m'],
  [
    [
      { x: '1 m', P: { G: '2 kN' } },
      { x: '2 m', P: { G: '3 kN' } },
    ],
    'x 1 m, P G 2 kN; x 2 m, P G 3 kN',
  ],
  [null, 'null'],
])('a value %j in words', (value, words) => {
  expect(valueWords(value)).toBe(words);
});
