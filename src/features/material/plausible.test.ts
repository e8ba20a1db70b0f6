import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { implausible } from './plausible';

const shipped = (file: string) => JSON.parse(readFileSync(`data/materials/${file}`, 'utf8'));

test.each(readdirSync('data/materials'))('nothing of %s is blamed', (file) => {
  expect(implausible(shipped(file))).toEqual([]);
});

const [steel] = shipped('en-10025-2004.json').materials;
const [timber] = shipped('en-338-2016.json').materials;
const [lumber] = shipped('nds-2018.json').materials;
const band = (change: object) => ({ ...steel, strength: [{ ...steel.strength[0], ...change }] });

test.each<[string, object, string]>([
  ['E of steel in the unit of another column', { ...steel, e: '210000 kN/m2' }, '/materials/0/e'],
  ['E of steel with a digit too many', { ...steel, e: '2100000 N/mm2' }, '/materials/0/e'],
  ['G above E/2, ν below 0', { ...steel, g: '106 GPa' }, '/materials/0/g'],
  ['the density of timber for steel', { ...steel, density: '460 kg/m3' }, '/materials/0/density'],
  ['f_u below f_y', band({ fy: '355 MPa', fu: '354 MPa' }), '/materials/0/strength/0/fu'],
  ['f_y in ksi for MPa', band({ fy: '35.5 MPa', fu: '470 MPa' }), '/materials/0/strength/0/fy'],
  ['E of timber as of steel', { ...timber, e: '210000 N/mm2', g: '13000 N/mm2' }, '/materials/0/e'],
  ['a fractile above its mean', { ...timber, e05: '15000 N/mm2' }, '/materials/0/e05'],
  [
    'a characteristic density above the mean',
    { ...timber, density_k: '500 kg/m3' },
    '/materials/0/density_k',
  ],
  ['E_min above E', { ...lumber, e_min: '9000000 psi' }, '/materials/0/e_min'],
  ['psi for ksi', { ...lumber, fb: '2400 ksi' }, '/materials/0/fb'],
])('%s is said at its place', (_, material, at) => {
  expect(implausible({ materials: [material] }).map(({ pointer }) => pointer)).toEqual([at]);
});

test('f_u equal to f_y, and what cannot be read, are left alone', () => {
  expect(implausible({ materials: [band({ fy: '355 MPa', fu: '355 MPa' })] })).toEqual([]);
  expect(implausible({ materials: [{ ...steel, e: 'much', g: '', strength: 'none' }, null, 'x'] })).toEqual(
    [],
  );
  expect(implausible({})).toEqual([]);
});
