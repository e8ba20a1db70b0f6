import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { materialsOf } from '@/engine/section';
import { read } from '@/lib/read';
import { materialSetDocument } from './material';

const shipped = readdirSync('data/materials').map((file): [string, Record<string, unknown>] => [
  file.replace('.json', ''),
  JSON.parse(readFileSync(`data/materials/${file}`, 'utf8')),
]);

const EXAMPLE = {
  id: 'x',
  name: 'X',
  kind: 'steel',
  standard: 'S',
  edition: '1',
  clause: '1',
  from_memory: true,
  note: 'n',
  e: '210 GPa',
  g: '81 GPa',
  density: '7850 kg/m3',
  expansion: '12e-6 1/K',
  strength: [{ fy: '355 MPa', fu: '470 MPa' }],
};

const setOf = (...materials: object[]) => ({
  schema_version: 1,
  slug: 'x-1',
  reference: 'X',
  name: 'X',
  summary: 'X.',
  materials,
});

const faultsOf = (document: unknown): string[] => {
  const reading = read(materialSetDocument, document);
  return reading.ok ? [] : reading.faults.map(({ pointer, code }) => `${pointer} ${code}`);
};

describe('the shipped sets', () => {
  test.each(shipped)('%s is read as it is written', (slug, set) => {
    expect(read(materialSetDocument, set)).toEqual({ ok: true, value: set });
    expect(set['slug']).toBe(slug);
  });

  test('name every material once over all of them', () => {
    const ids = shipped.flatMap(([, { materials }]) => (materials as { id: string }[]).map(({ id }) => id));
    expect(new Set(ids).size).toBe(ids.length);
  });
});

test('a set gives its materials in SI', () => {
  const reading = read(materialSetDocument, setOf(EXAMPLE));
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  expect(materialsOf(reading.value)[0]).toMatchObject({
    e: 2.1e11,
    strength: [{ upTo: Number.POSITIVE_INFINITY, fy: 355e6, fu: 470e6 }],
  });
});

test.each([
  ['a bare number', { e: '210000' }, '/materials/0/e unit_missing'],
  ['a stress for a density', { density: '350 N/mm2' }, '/materials/0/density unit_wrong_dimension'],
  ['nothing at all', { g: '0 GPa' }, '/materials/0/g out_of_range'],
  ['no id', { id: undefined }, '/materials/0/id missing'],
  ['an empty name', { name: '' }, '/materials/0/name out_of_range'],
  ['another kind', { kind: 'glass' }, '/materials/0/kind wrong_type'],
  ['no bands', { strength: [] }, '/materials/0/strength out_of_range'],
  [
    'bands out of order',
    {
      strength: [
        { up_to: '40 mm', fy: '345 MPa', fu: '470 MPa' },
        { up_to: '16 mm', fy: '355 MPa', fu: '470 MPa' },
      ],
    },
    '/materials/0/strength/1/up_to not_allowed',
  ],
  [
    'a band after one without limit',
    {
      strength: [
        { fy: '345 MPa', fu: '470 MPa' },
        { up_to: '16 mm', fy: '355 MPa', fu: '470 MPa' },
      ],
    },
    '/materials/0/strength/1/up_to not_allowed',
  ],
])('%s is refused at its place', (_, change, fault) => {
  expect(faultsOf(setOf({ ...EXAMPLE, ...change }))).toContain(fault);
});

test('two materials of one id are refused', () => {
  expect(faultsOf(setOf(EXAMPLE, EXAMPLE))).toEqual(['/materials/1/id duplicate']);
});
