import { expect, test } from 'vitest';
import { inBoth } from './units';

// NIST SP 811: 1 ksi is 6.894757 MPa; 1 lb/ft³ is 16.01846 kg/m³, 490 of them 7849.05; 1 °F is 5/9 K.
test.each([
  ['355 N/mm2', 'stress', '355 N/mm²', '51.5\u00a0ksi'],
  ['900 psi', 'stress', '900 psi', '6.21\u00a0N/mm²'],
  ['210000 N/mm2', 'modulus', '210000 N/mm²', '30\u202f458\u00a0ksi'],
  ['490 lb/ft3', 'density', '490 lb/ft³', /^7\u202f849\u00a0kg\/m³$/],
  ['12e-6 1/K', 'expansion', '12e-6 1/K', /6\.67/],
  ['16 mm', 'length', '16 mm', '0.630\u00a0in'],
] as const)('%s stands beside the same in the other system', (text, dimension, printed, other) => {
  const both = inBoth(text, dimension);
  expect(both.printed).toBe(printed);
  if (typeof other === 'string') expect(both.other).toBe(other);
  else expect(both.other).toMatch(other);
});
