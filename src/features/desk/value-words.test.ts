import { expect, test } from 'vitest';
import { valueWords } from './value-words';

test.each<[unknown, string]>([
  [{ factor: 1.5, by: 'psi0' }, '1.5 ψ₀'],
  [{ factor: 1, by: 'xi' }, 'ξ'],
  [0.7, '0.7'],
  ['355 N/mm2', '355 N/mm2'],
  [true, 'yes'],
  [['S', 'W'], 'S, W'],
  [[], 'none'],
  ['', '–'],
  [undefined, '–'],
  [
    { id: '610-q', factors: { G: 1.35, Q: 1, S: { factor: 1.5, by: 'psi0' } }, from_memory: false },
    'id: 610-q; 1.35 G + Q + 1.5 ψ₀ S; from memory: no',
  ],
  [[{ fy: '355 MPa', fu: '470 MPa' }, { fy: '345 MPa' }], 'fy: 355 MPa; fu: 470 MPa | fy: 345 MPa'],
])('%j is said in words', (value, words) => {
  expect(valueWords(value)).toBe(words);
});
