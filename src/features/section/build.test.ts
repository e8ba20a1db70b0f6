import { expect, test } from 'vitest';
import { type SectionDimensions, sectionProperties } from '@/engine/section';
import { type Build, build, builtRow, readDensity } from './build';
import { sectionRowSchema } from './section';

const BEAM: SectionDimensions = { shape: 'i', h: 0.3, b: 0.15, tw: 0.0071, tf: 0.0107, r: 0.015 };
const typed = (fields: Readonly<Record<string, string>>) => (name: string) => fields[name] ?? '';
const made = (kind: Build, fields: Readonly<Record<string, string>>, beam: SectionDimensions | null = BEAM) =>
  build(kind, typed(fields), beam && { designation: 'IPE 300', dimensions: beam }, 'metric');
const dimensionsOf = (built: ReturnType<typeof build>): SectionDimensions => {
  if (!built.ok) throw new Error(built.faults.map(({ message }) => message).join('\n'));
  return built.dimensions;
};
const fieldsOf = (built: ReturnType<typeof build>) =>
  built.ok ? [] : built.faults.map(({ pointer }) => pointer);

test('two beams with a gap have twice the I, and are wider by the gap', () => {
  const row = builtRow('2/IPE 300', dimensionsOf(made('side', { count: '2', gap: '10' })), 7850);
  expect(row.i_major_cm4).toBeCloseTo(2e8 * sectionProperties(BEAM).iMajor, 6);
  expect(row.width_mm).toBeCloseTo(310, 9);
  expect(row.mass_kg_m).toBeCloseTo(2 * 42.2, 0); // EN 10365: IPE 300 weighs 42.2 kg/m
});

test('a plate under the beam adds to its depth, in the units that are typed', () => {
  const row = builtRow(
    'IPE 300 + 200x12',
    dimensionsOf(made('plated', { bottom_width: '20 cm', bottom_thickness: '12' })),
    7850,
  );
  expect(row.depth_mm).toBeCloseTo(312, 9);
  expect(row.area_cm2).toBeCloseTo(1e4 * sectionProperties(BEAM).area + 24, 9);
});

test('what is put together keeps its parts by their names, through its row', () => {
  const built = dimensionsOf(made('plated', { top_width: '200', top_thickness: '12' }));
  const { dimensions } = sectionRowSchema.parse(builtRow('IPE 300 + 200x12', built, 7850));
  expect(dimensions).toMatchObject({
    parts: [
      { name: 'IPE 300', rings: 1 },
      { name: 'Plate on top', rings: 1 },
    ],
  });
});

test('corners are read either way round, with holes, in inches in a US practice', () => {
  const corners = '0 0\n0 4\n2 4\n2 0\n\nhole\n0.5 0.5\n1.5 0.5\n1.5 3.5\n0.5 3.5';
  const built = build('outline', typed({ corners, thickness: '0.5', j: '1 in4' }), null, 'us');
  const { area, iMajor } = sectionProperties(dimensionsOf(built));
  expect(area / 0.0254 ** 2).toBeCloseTo(8 - 3, 9);
  expect(iMajor / 0.0254 ** 4).toBeCloseTo((2 * 4 ** 3 - 1 * 3 ** 3) / 12, 9);
});

test('values are given back as they were typed, and no more is claimed', () => {
  const fields = {
    depth: '300',
    width: '150',
    thickness: '10',
    area: '53.8 cm2',
    i_major: '8360 cm4',
    i_minor: '604 cm4',
    w_el: '557 cm3',
    w_el_minor: '80.5 cm3',
    shear_area: '25.7 cm2',
    iw: '126000 cm6',
  };
  const row = builtRow('Old joist', dimensionsOf(made('values', fields, null)), 7850);
  expect(row).toMatchObject({ computed: ['mass_kg_m'] });
  expect(row.i_major_cm4).toBeCloseTo(8360, 6);
  expect(row.w_pl_cm3).toBeCloseTo(557, 6);
  expect(row.iw_cm6).toBeCloseTo(126000, 3);
});

test.each<[string, Build, Readonly<Record<string, string>>, SectionDimensions | null, string[]]>([
  ['no beam', 'side', {}, null, ['/beam']],
  ['one beam', 'side', { count: '1' }, BEAM, ['/count']],
  ['no plate', 'plated', {}, BEAM, ['/top_width']],
  ['a plate without a thickness', 'plated', { top_width: '200' }, BEAM, ['/top_thickness']],
  ['a line that is no corner', 'outline', { corners: '0 0\nnorth', thickness: '5' }, null, ['/corners']],
  [
    'an outline that crosses itself',
    'outline',
    { corners: '0 0\n10 10\n10 0\n0 20', thickness: '5' },
    null,
    ['/corners'],
  ],
  [
    'a hole without J',
    'outline',
    { corners: '0 0\n9 0\n9 9\n0 9\n\nhole\n1 1\n2 1\n2 2', thickness: '5' },
    null,
    ['/j'],
  ],
  [
    'values left out',
    'values',
    { depth: '300', width: '150', thickness: '10' },
    null,
    ['/area', '/i_major', '/i_minor', '/w_el', '/w_el_minor', '/shear_area'],
  ],
  ['a unit of something else', 'side', { gap: '3 kN' }, BEAM, ['/gap']],
])('%s is said at its field', (_, kind, fields, beam, pointers) => {
  expect(fieldsOf(made(kind, fields, beam))).toEqual(pointers);
});

test('the density is steel’s unless another is given', () => {
  expect(readDensity(typed({}), 'metric')).toEqual({ density: 7850, faults: [] });
  expect(readDensity(typed({ density: '2700 kg/m3' }), 'metric').density).toBe(2700);
  expect(readDensity(typed({ density: 'heavy' }), 'metric').faults).toHaveLength(1);
});
