import { expect, test } from 'vitest';
import { partName } from './part-name';

const DOCUMENT = {
  strength: [{ id: 'g', name: '6.10, permanent alone', factors: { G: 1.35 } }],
  materials: [{ id: 's355', name: 'S355', strength: [{ up_to: '16 mm', fy: '355 N/mm2' }] }],
  categories: { Q: [{ id: 'a', name: 'A: homes', psi0: 0.7 }] },
  use: ['Floors'],
};

test.each([
  ['/strength/0/factors/G', 'Strength › 6.10, permanent alone › factor › G'],
  ['/materials/0/strength/0/fy', 'Materials › S355 › Strength › 16 mm › f_y'],
  ['/categories/Q/0/psi0', 'ψ › Q › A: homes › ψ₀'],
  ['/use/0', 'use › 1'],
  ['/a~1b', 'a/b'],
  ['/gone/3/name', 'gone › 3 › name'],
  ['', 'The whole document'],
])('%s is called %s', (pointer, name) => {
  expect(partName(pointer, DOCUMENT)).toBe(name);
});
