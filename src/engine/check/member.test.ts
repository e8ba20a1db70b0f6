import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { prepareBeam } from '../beam/index';
import { actingCombinations, factoredLoads, regionsOf } from '../combination/index';
import { type Load, readBeam } from '../model/index';
import { checkMember, criteriaDocument } from './index';

const criteriaOf = (slug: string) =>
  criteriaDocument.parse(JSON.parse(readFileSync(`data/criteria/${slug}.json`, 'utf8')));
const steel = criteriaOf('steel-elastic-en');

/** IPE 300 in S275: I_y 8356 cm⁴, W_el,y 557.1 cm³, t_w 7.1 mm, EN 10365 tables, from memory; Q by hand below. */
const IPE_300 = {
  designation: 'IPE 300',
  elasticModulus: 557.1e-6,
  // Half of W_pl,y 628.4 cm³ is Q about the major axis.
  shearAreaAtAxis: (8356e-8 * 0.0071) / (628.4e-6 / 2),
  bendingStrength: 275e6,
  shearStrength: 275e6 / Math.sqrt(3),
};
const EI = 210e9 * 8356e-8;

function check(loads: Load[], length = 6, overhang = 0, criteria = steel) {
  const reading = readBeam({
    length: length + overhang,
    ei: EI,
    supports: [
      { at: 0, kind: 'pin' },
      { at: length, kind: 'roller' },
    ],
    loads,
  });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  const beam = reading.value;
  const prepared = prepareBeam(beam);
  const groups = [...new Set(loads.map(({ group = '' }) => group))];
  const solve = (combinations: Parameters<typeof actingCombinations>[0]) =>
    actingCombinations(combinations, groups, criteria.letters).map((combination) => ({
      combination,
      solution: prepared.solve(factoredLoads(loads, combination)),
    }));
  return checkMember({
    beam,
    section: IPE_300,
    criteria,
    system: 'metric',
    strength: solve(criteria.strength.combinations),
    service: criteria.deflection.flatMap((limit) =>
      solve([limit.combination]).map(({ combination, solution }) => ({
        limit: { ...limit, combination },
        solution,
      })),
    ),
  });
}

const uniform = (w: number, group: string, from = 0, to = 6): Load => ({
  kind: 'line',
  from,
  to,
  w0: w,
  w1: w,
  group,
});

describe('a simple span of 6 m, G 5 and Q 8 kN/m', () => {
  const { rows, findings, notChecked } = check([uniform(5000, 'G'), uniform(8000, 'Q')]);
  const row = (id: string) => rows.find((one) => one.id === id);

  test('bends with (1.35·5 + 1.5·8)·6²/8 = 84.375 kNm, σ = M/W_el', () => {
    expect(row('bending')?.demand).toBeCloseTo(84375 / 557.1e-6, 0);
    expect(row('bending')).toMatchObject({ combination: '1.35 G + 1.5 Q', at: 3, capacity: 275e6 });
    expect(row('bending')?.place).toMatch(/^at 3\.000.m, 1\.35 G \+ 1\.5 Q$/);
  });

  test('shears with 56.25 kN over I·t/Q', () => {
    const tau = (56250 * (628.4e-6 / 2)) / (8356e-8 * 0.0071);
    expect(row('shear')?.demand).toBeCloseTo(tau, -1);
    expect(row('shear')?.place).toMatch(/^at A/);
  });

  test('deflects 5·Q·L⁴/384EI = 7.69 mm under the imposed load, held to L/360', () => {
    const imposed = rows.find(({ title }) => title === 'Deflection, imposed load, L/360');
    expect(imposed?.demand).toBeCloseTo((5 * 8000 * 6 ** 4) / (384 * EI), 9);
    expect(imposed?.capacity).toBeCloseTo(6 / 360, 12);
    expect(imposed?.combination).toBe('Q');
  });

  test('puts the governing check first and finds no uplift', () => {
    expect(rows.map(({ ratio }) => ratio)).toEqual(rows.map(({ ratio }) => ratio).sort((a, b) => b - a));
    expect(findings).toEqual([]);
    expect(notChecked).toContain('Vibration');
  });
});

describe('a span of 4 m with an overhang of 2 m', () => {
  test('lifts its far support under load on the overhang alone: w·a²/2L', () => {
    const { findings } = check([uniform(6000, 'Q', 4, 6)], 4, 2);
    expect(findings).toHaveLength(1);
    expect(findings[0]?.title).toBe('Uplift at A');
    // 1.5 · 6 · 2²/(2·4) = 4.5 kN
    expect(findings[0]?.detail).toMatch(/^−4\.5.kN under 1\.5 Q/);
  });

  test('holds the tip to the overhang’s own limit, twice its length in the US criteria', () => {
    const us = check([uniform(6000, 'Q', 4, 6)], 4, 2, criteriaOf('steel-elastic-us'));
    const tip = us.rows.find(
      ({ place, title }) => title.includes('live load, 2a/360') && place.startsWith('overhang'),
    );
    expect(tip?.capacity).toBeCloseTo((2 * 2) / 360, 12);
    // Tip of an overhang under its own load, wa³(4L + 3a)/24EI: AISC Manual Table 3-23 case 25, from memory.
    expect(tip?.demand).toBeCloseTo((6000 * 2 ** 3 * (4 * 4 + 3 * 2)) / (24 * EI), 9);
  });

  test('is a span A–B and an overhang beyond B', () => {
    const reading = readBeam({
      length: 6,
      ei: 1,
      supports: [
        { at: 0, kind: 'pin' },
        { at: 4, kind: 'roller' },
      ],
    });
    if (!reading.ok) throw new Error(reading.faults[0]?.message);
    expect(regionsOf(reading.value).map(({ name }) => name)).toEqual(['span A–B', 'overhang beyond B']);
  });
});

test('combinations that differ only in groups that do not act are one', () => {
  const names = actingCombinations(steel.strength.combinations, ['G', 'Q'], undefined).map(
    ({ name }) => name,
  );
  expect(new Set(names).size).toBe(names.length);
  expect(names).toContain('1.35 G + 1.5 Q');
  expect(names).toContain('G + 1.5 Q');
});

test.each(['steel-elastic-en', 'steel-elastic-us', 'timber-elastic-en', 'timber-elastic-us'])(
  'criteria %s read by their schema',
  (slug) => {
    expect(criteriaOf(slug).slug).toBe(slug);
  },
);
