import { describe, expect, test } from 'vitest';
import { shippedCriteria } from '../../../tests/support/criteria';
import { prepareBeam } from '../beam/index';
import {
  actingCombinations,
  arrangementNamer,
  type Combination,
  groupsOf,
  regionsOf,
} from '../combination/index';
import { envelopeTask, SuperposedBeam, solveSources } from '../envelope/index';
import { type Load, readBeam } from '../model/index';
import { type Criteria, checkMember } from './index';

const steel = shippedCriteria('steel-elastic-en');

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

interface Given {
  readonly loads: Load[];
  readonly supports: number[];
  readonly length: number;
  readonly criteria?: Criteria;
  readonly patterns?: boolean;
}

function checked({ loads, supports, length, criteria = steel, patterns = true }: Given) {
  const reading = readBeam({
    length,
    ei: EI,
    supports: supports.map((at) => ({ at, kind: 'roller' })),
    loads,
    horizontal: 'ignore',
  });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  const beam = reading.value;
  const groups = groupsOf(loads);
  const patterned = patterns
    ? (criteria.patterns ?? []).flatMap(({ group, where_adverse }) => (where_adverse ? [group] : []))
    : [];
  const { beam: cut, sources } = envelopeTask(beam, { combinations: [], patterns: patterned });
  const solved = solveSources(prepareBeam(cut), sources);
  const superposed = new SuperposedBeam(
    sources,
    solved.map(({ solution }) => solution),
  );
  const acting = (combinations: readonly Combination[]) =>
    actingCombinations(combinations, groups, criteria.letters);
  const strength = acting(criteria.strength.combinations);
  const limits = criteria.deflection.flatMap((limit) =>
    acting([limit.combination]).map((combination) => ({ ...limit, combination })),
  );
  return checkMember({
    beam,
    superposed,
    section: IPE_300,
    criteria,
    strength: superposed.combined(strength),
    limits,
    nameOf: arrangementNamer(beam, patterned, [...strength, ...limits.map(({ combination }) => combination)]),
    system: 'metric',
  });
}

const check = (loads: Load[], length = 6, overhang = 0, criteria = steel) =>
  checked({ loads, supports: [0, length], length: length + overhang, criteria });

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

  test('is held to the absolute cap where that is lower than its share of the span', () => {
    const capped = (cap: number) => {
      const deflection = steel.deflection.map((limit) => ({ ...limit, cap }));
      const found = check([uniform(8000, 'Q')], 6, 0, { ...steel, deflection }).rows;
      return found.find(({ title }) => title.startsWith('Deflection, imposed load'));
    };
    expect(capped(0.005)).toMatchObject({ title: 'Deflection, imposed load, cap', capacity: 0.005 });
    expect(capped(0.005)?.symbols).toBe('\\delta \\le \\delta_{max}');
    expect(capped(0.02)).toMatchObject({ title: 'Deflection, imposed load, L/360', capacity: 6 / 360 });
  });

  test('lifted, says so and is held to the same limit', () => {
    const [row] = check([uniform(-8000, 'Q')]).rows.filter(({ title }) => title.includes('imposed load'));
    expect(row?.place).toBe('span A–B, Q, upward');
    expect(row?.demand).toBeCloseTo((5 * 8000 * 6 ** 4) / (384 * EI), 9);
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
    const us = check([uniform(6000, 'Q', 4, 6)], 4, 2, shippedCriteria('steel-elastic-us'));
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

describe('two spans of 5.4 m, G 4.42 and Q 18 kN/m, by patterns', () => {
  const loads = [uniform(4420, 'G', 0, 10.8), uniform(18000, 'Q', 0, 10.8)];
  const given = { loads, supports: [0, 5.4, 10.8], length: 10.8 };
  const { rows, findings } = checked(given);
  const everywhere = checked({ ...given, patterns: false });
  const row = (id: string, of = rows) => rows && of.find((one) => one.id === id);

  // −wL²/8 with both spans loaded: AISC Manual Table 3-23 case 29 twice, from memory.
  test('bend most over the middle support, with both loaded', () => {
    expect(row('bending')?.demand).toBeCloseTo(((1.35 * 4420 + 1.5 * 18000) * 5.4 ** 2) / 8 / 557.1e-6, 0);
    expect(row('bending')?.place).toBe('at B, 1.35 G + 1.5 Q, all spans loaded');
    expect(row('bending')).toMatchObject({ combination: '1.35 G + 1.5 Q', pattern: [0, 1] });
  });

  // 0.00915 wL⁴/EI with one span loaded against 1/184.6 with both: the same table, from memory.
  test('deflect most with one loaded, nearly twice what both together do', () => {
    const imposed = rows.find(({ title }) => title.startsWith('Deflection, imposed load'));
    expect(((imposed?.demand ?? 0) * EI) / (18000 * 5.4 ** 4)).toBeCloseTo(0.00915, 4);
    expect(imposed?.place).toBe('span A–B, Q, span A–B loaded');
    const all = everywhere.rows.find(({ title }) => title.startsWith('Deflection, imposed load'));
    expect((18000 * 5.4 ** 4) / EI / (all?.demand ?? 0)).toBeCloseTo(184.6, 1);
  });

  // Far support: 3/8 of G less 1/16 of 1.5 Q in the other span: −1.1 kN/… by the same table.
  test('pull at the support that the load is far from, which full load hides', () => {
    const pull = (3 / 8) * 4420 * 5.4 - (1 / 16) * 1.5 * 18000 * 5.4;
    expect(findings.map(({ title }) => title)).toEqual(['Uplift at A', 'Uplift at C']);
    expect(findings[1]).toMatchObject({ combination: 'G + 1.5 Q', pattern: [0] });
    expect(findings[1]?.detail).toContain('under G + 1.5 Q, span A–B loaded');
    expect(findings[1]?.detail).toContain((-pull / 1000).toFixed(1));
    expect(everywhere.findings).toEqual([]);
  });
});

describe('a cantilever, whichever end is built in', () => {
  test.each([
    [0, 2],
    [2, 0],
  ])('fixed at %d moves down from there to its tip at %d', (root, tip) => {
    const reading = readBeam({
      length: 2,
      ei: EI,
      supports: [{ at: root, kind: 'fixed' }],
      loads: [uniform(1000, 'Q', 0, 2)],
    });
    if (!reading.ok) throw new Error(reading.faults[0]?.message);
    const beam = reading.value;
    const { sources } = envelopeTask(beam, { combinations: [] });
    const superposed = new SuperposedBeam(
      sources,
      solveSources(prepareBeam(beam), sources).map(({ solution }) => solution),
    );
    const limit = steel.deflection[0]!;
    const { rows } = checkMember({
      beam,
      superposed,
      section: IPE_300,
      criteria: steel,
      strength: [],
      limits: [{ ...limit, combination: { name: 'Q', factors: { Q: 1 } } }],
      nameOf: ({ combination }) => combination,
      system: 'metric',
    });
    const deflection = rows.find(({ kind }) => kind === 'deflection');
    expect(deflection).toMatchObject({ at: tip, place: 'overhang beyond A, Q' });
    expect(deflection?.demand).toBeCloseTo((1000 * 2 ** 4) / (8 * EI), 12); // wL⁴/8EI
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
