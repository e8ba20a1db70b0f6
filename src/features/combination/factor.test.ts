import { expect, test } from 'vitest';
import { factorText, readFactor } from './factor';

test.each([
  ['1.35', 1.35],
  ['1,35', 1.35],
  [' .9 ', 0.9],
  ['1.5 p0', { factor: 1.5, by: 'psi0' }],
  ['1.5ψ₀', { factor: 1.5, by: 'psi0' }],
  ['1.5 · PSI1', { factor: 1.5, by: 'psi1' }],
  ['ψ2', { factor: 1, by: 'psi2' }],
  ['1.35 xi', { factor: 1.35, by: 'xi' }],
  ['ξ', { factor: 1, by: 'xi' }],
])('“%s” is read as a factor', (text, factor) => {
  expect(readFactor(text)).toEqual(factor);
});

test.each(['', '1.5 p', '1.5 p3', '-1', '1.5 1.5', '1..5', 'constructor', 'p0 1.5', '1e3'])(
  '“%s” is no factor',
  (text) => {
    expect(readFactor(text)).toBeNull();
  },
);

test('a factor is read as it is written', () => {
  for (const factor of [1, 1.35, { factor: 1, by: 'psi0' }, { factor: 1.35, by: 'xi' }] as const)
    expect(readFactor(factorText(factor))).toEqual(factor);
});
