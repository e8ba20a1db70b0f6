import { describe, expect, test } from 'vitest';
import { type Beam, type BeamDocument, type Redundant, readBeam } from '../model/index';
import { evaluate } from '../polynomial/index';
import { forceMethod } from './force-method';
import { loadsOfGroup, prepareBeam, solveBeam } from './solve';
import { stationPositions, stationsAt } from './stations';

function beam(document: Omit<BeamDocument, 'horizontal'>): Beam {
  const reading = readBeam({ ...document, horizontal: 'ignore' });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

const [L, EI, w] = [8, 2e7, 5000];
const uniform = { kind: 'line', from: 0, to: L, w0: w, w1: w } as const;
const fixedAt = (at: number) => ({ at, kind: 'fixed' }) as const;
const rollerAt = (at: number) => ({ at, kind: 'roller' }) as const;

const near = (value: number) => expect.closeTo(value, 6);

describe('propped cantilever under uniform load', () => {
  const propped = beam({ length: L, ei: EI, supports: [fixedAt(0), rollerAt(L)], loads: [uniform] });
  const solution = solveBeam(propped, [{ support: 1, component: 'vertical' }]);

  test('the gap at the prop is wL⁴/8EI down, a unit force there closes L³/3EI of it', () => {
    const { gaps, flexibility, values, imposed } = solution.forceMethod;
    expect(gaps[0]).toBeCloseTo((-w * L ** 4) / (8 * EI), 15);
    expect(flexibility[0]![0]).toBeCloseTo(L ** 3 / (3 * EI), 18);
    expect(values[0]).toBeCloseTo((3 * w * L) / 8, 8);
    expect(imposed).toEqual([0]);
  });

  test('carries 5wL/8, 3wL/8 and wL²/8', () => {
    expect(solution.reactions).toEqual([
      { at: 0, vertical: near((5 * w * L) / 8), moment: near((w * L ** 2) / 8) },
      { at: L, vertical: near((3 * w * L) / 8), moment: 0 },
    ]);
  });

  test('has its contraflexure at L/4 and its largest sagging moment, 9wL²/128, at 5L/8', () => {
    expect(solution.contraflexure).toEqual([near(L / 4)]);
    expect(solution.extremes.moment.max).toEqual({
      value: near((9 * w * L ** 2) / 128),
      at: [near((5 * L) / 8)],
    });
  });

  test('answers alike with the fixed-end moment as the redundant, anticlockwise on the beam', () => {
    const other = solveBeam(propped, [{ support: 0, component: 'rotation' }]);
    expect(other.forceMethod.values).toEqual([near((w * L ** 2) / 8)]);
    // The released simple span turns clockwise at its left end, by wL³/24EI.
    expect(other.forceMethod.gaps[0]).toBeCloseTo((-w * L ** 3) / (24 * EI), 15);
    expect(other.reactions).toEqual(solution.reactions);
  });

  test('answers alike with the moment inside the span, sagging positive', () => {
    const other = solveBeam(propped, [{ at: 3, component: 'moment' }]);
    expect(other.forceMethod.values[0]).toBeCloseTo(evaluate(solution.diagrams.moment, 3)[0], 6);
    expect(other.reactions[1]!.vertical).toBeCloseTo((3 * w * L) / 8, 8);
    expect(other.diagrams.moment.breaks).toEqual(solution.diagrams.moment.breaks);
  });
});

// Force-method benchmark of the design: L 6.0 m, a 1.8 m, w 5.517 kN/m, P 6.0 kN at the tip, EI 9963 kN·m².
test('the benchmark joist: gap 240.49 mm, flexibility 7.2267 mm/kN, prop 33.28 kN', () => {
  const joist = beam({
    length: 7.8,
    ei: 9963e3,
    supports: [fixedAt(0), rollerAt(6)],
    loads: [
      { kind: 'line', from: 0, to: 7.8, w0: 5517, w1: 5517 },
      { kind: 'point', at: 7.8, p: 6000 },
    ],
  });
  const { reactions, extremes, diagrams, forceMethod } = solveBeam(joist, [
    { support: 1, component: 'vertical' },
  ]);
  expect(forceMethod.gaps[0]! * 1e3).toBeCloseTo(-240.49, 2);
  expect(forceMethod.flexibility[0]![0]! * 1e6).toBeCloseTo(7.2267, 4);
  expect(reactions[1]!.vertical / 1e3).toBeCloseTo(33.28, 2);
  expect(reactions[0]!.vertical / 1e3).toBeCloseTo(15.75, 2);
  expect(evaluate(diagrams.moment, 0)[0] / 1e3).toBeCloseTo(-14.96, 2);
  expect(evaluate(diagrams.moment, 6)[0] / 1e3).toBeCloseTo(-19.74, 2);
  expect(extremes.moment.max.value / 1e3).toBeCloseTo(7.54, 2);
  expect(extremes.moment.max.at[0]).toBeCloseTo(2.86, 1);
  expect(evaluate(diagrams.deflection, 7.8)[0] * -1e3).toBeCloseTo(2.76, 2);
});

test('a released spring has 1/k on its diagonal, and its ground movement on the right side', () => {
  const k = 3e6;
  const sprung = beam({
    length: L,
    ei: EI,
    supports: [fixedAt(0), { at: L, kind: 'free', kv: k, rise: -0.004 }],
    loads: [uniform],
  });
  const { flexibility, imposed, values } = solveBeam(sprung, [
    { support: 1, component: 'vertical' },
  ]).forceMethod;
  expect(flexibility[0]![0]).toBeCloseTo(L ** 3 / (3 * EI) + 1 / k, 18);
  expect(imposed).toEqual([-0.004]);
  const drop = (w * L ** 4) / (8 * EI) - 0.004;
  expect(values[0]).toBeCloseTo(drop / (L ** 3 / (3 * EI) + 1 / k), 6);
});

test('a settlement Δ of the prop makes a fixed-end moment of 3EIΔ/L² (Roark table 8.1, from memory)', () => {
  const settling = beam({
    length: L,
    ei: EI,
    supports: [fixedAt(0), { at: L, kind: 'roller', rise: -0.01 }],
  });
  const { reactions, diagrams } = solveBeam(settling);
  expect(reactions[0]!.moment).toBeCloseTo((3 * EI * 0.01) / L ** 2, 6);
  expect(evaluate(diagrams.deflection, L)[0]).toBeCloseTo(-0.01, 15);
});

test('a free curvature bends a simple span to κL²/8 without moments, and a fixed one not at all', () => {
  const kappa = { kind: 'curvature', from: 0, to: L, kappa: 1e-3 } as const;
  const simple = solveBeam(beam({ length: L, ei: EI, supports: [rollerAt(0), rollerAt(L)], loads: [kappa] }));
  expect(simple.extremes.moment.max.value).toBe(0);
  expect(simple.extremes.deflection.min.value).toBeCloseTo((-1e-3 * L ** 2) / 8, 15);
  const fixed = solveBeam(beam({ length: L, ei: EI, supports: [fixedAt(0), fixedAt(L)], loads: [kappa] }));
  expect(fixed.extremes.moment.min).toEqual({ value: near(-EI * 1e-3), at: [0, L] });
  expect(fixed.extremes.deflection).toEqual({ max: { value: 0, at: [0, L] }, min: { value: 0, at: [0, L] } });
});

test('with GA supports hold the rotation of the section: a cantilever’s slope starts at −V/GA', () => {
  const [P, GA] = [1000, 4e6];
  const cantilever = beam({
    length: L,
    ei: EI,
    ga: GA,
    supports: [fixedAt(0)],
    loads: [{ kind: 'point', at: L, p: P }],
  });
  const { diagrams } = solveBeam(cantilever);
  expect(evaluate(diagrams.slope, 0)[0]).toBeCloseTo(-P / GA, 15);
  expect(evaluate(diagrams.deflection, L)[0]).toBeCloseTo((-P * L ** 3) / (3 * EI) - (P * L) / GA, 12);
});

test('the slope jumps in a hinge, the moment by a couple, the shear by a force', () => {
  const gerber = beam({
    length: 10,
    ei: EI,
    supports: [fixedAt(0), rollerAt(10)],
    hinges: [4],
    loads: [
      { kind: 'couple', at: 2, m: 700 },
      { kind: 'point', at: 7, p: 900 },
    ],
  });
  const [couple, hinge, force] = stationsAt(solveBeam(gerber), [2, 4, 7]);
  expect(couple!.moment[0] - couple!.moment[1]).toBeCloseTo(700, 9);
  expect(hinge!.moment).toEqual([0, 0]);
  expect(Math.abs(hinge!.slope[1] - hinge!.slope[0])).toBeGreaterThan(1e-5);
  expect(force!.shear[0] - force!.shear[1]).toBeCloseTo(900, 9);
});

test('a couple exactly over a support whose moment is the redundant acts at the right of the release', () => {
  const spans = beam({
    length: 10,
    ei: EI,
    supports: [rollerAt(0), rollerAt(5), rollerAt(10)],
    loads: [{ kind: 'couple', at: 5, m: 800 }],
  });
  const solution = solveBeam(spans, [{ at: 5, component: 'moment' }]);
  const [station] = stationsAt(solution, [5]);
  expect(station!.moment).toEqual([near(400), near(-400)]);
  expect(solution.forceMethod.values).toEqual([near(400)]);
});

test('what equilibrium makes zero is exactly zero: a load on a support bends nothing', () => {
  const spans = beam({
    length: 9.3,
    ei: EI,
    supports: [fixedAt(0), rollerAt(3.1), rollerAt(6.2), fixedAt(9.3)],
    loads: [{ kind: 'point', at: 6.2, p: 12345.678 }],
  });
  const { reactions, extremes, contraflexure } = solveBeam(spans, [
    { support: 1, component: 'vertical' },
    { support: 2, component: 'vertical' },
    { support: 0, component: 'rotation' },
    { support: 3, component: 'rotation' },
  ]);
  expect(reactions.map(({ vertical }) => vertical)).toEqual([0, 0, 12345.678, 0]);
  expect(extremes.moment.max.value).toBe(0);
  expect(contraflexure).toEqual([]);
});

test('of a beam without loads every value is 0', () => {
  const { reactions, extremes } = solveBeam(beam({ length: L, ei: EI, supports: [fixedAt(0), fixedAt(L)] }));
  expect(reactions.every(({ vertical, moment }) => vertical === 0 && moment === 0)).toBe(true);
  expect(extremes.deflection).toEqual({ max: { value: 0, at: [0, L] }, min: { value: 0, at: [0, L] } });
});

describe('a prepared beam', () => {
  const propped = beam({
    length: L,
    ei: EI,
    supports: [fixedAt(0), { at: L, kind: 'roller', rise: -0.002 }],
    loads: [
      { ...uniform, group: 'G' },
      { kind: 'point', at: 3, p: 4000, group: 'Q' },
      { kind: 'point', at: 5, p: 1000 },
    ],
  });

  test('solves the loads of one group', () => {
    const { solve } = prepareBeam(propped);
    expect(loadsOfGroup(propped, 'Q')).toEqual([propped.loads[1]]);
    expect(loadsOfGroup(propped, 'none')).toEqual([]);
    const permanent = solve(loadsOfGroup(propped, 'G'), { movements: false });
    expect(permanent.reactions[1]!.vertical).toBeCloseTo((3 * w * L) / 8, 8);
  });

  test('solves factored loads, and leaves its supports where they are if told to', () => {
    const { solve } = prepareBeam(propped);
    const factored = [{ ...uniform, w0: 2 * w, w1: 2 * w }];
    const moved = solve(factored);
    const still = solve(factored, { movements: false });
    expect(still.reactions[1]!.vertical).toBeCloseTo((6 * w * L) / 8, 8);
    expect(moved.reactions[1]!.vertical - still.reactions[1]!.vertical).toBeCloseTo(
      (-3 * EI * 0.002) / L ** 3,
      6,
    );
    expect(still.forceMethod.imposed).toEqual([0]);
  });
});

describe('forceMethod', () => {
  const propped = beam({
    length: 10,
    ei: EI,
    supports: [fixedAt(0), rollerAt(7)],
    loads: [{ kind: 'point', at: 10, p: 900 }],
  });
  const prop: Redundant = { support: 1, component: 'vertical' };

  test('gives the released beam: the trade’s names for what its supports still hold', () => {
    expect(forceMethod(propped, [prop]).released).toMatchObject({
      degree: 0,
      supports: [{ kind: 'fixed' }, { kind: 'free', vertical: { kind: 'free' } }],
    });
    expect(forceMethod(propped, [{ support: 0, component: 'rotation' }]).released.supports[0]).toMatchObject({
      kind: 'pin',
      horizontal: true,
    });
    expect(forceMethod(propped, [{ support: 0, component: 'vertical' }]).released.supports[0]!.kind).toBe(
      'guided',
    );
    expect(forceMethod(propped, [{ at: 3, component: 'moment' }]).released.hinges).toEqual([3]);
  });

  test('gives the unit state of a prop: beyond it the beam is straight and carries nothing', () => {
    const [unit] = forceMethod(propped, [prop]).units;
    expect(unit!.reactions).toEqual([
      { at: 0, vertical: -1, moment: -7 },
      { at: 7, vertical: 1, moment: 0 },
    ]);
    expect(evaluate(unit!.diagrams.moment, 8)).toEqual([0, 0]);
    expect(evaluate(unit!.diagrams.slope, 8)[0]).toBeCloseTo(49 / (2 * EI), 18);
    expect(evaluate(unit!.diagrams.deflection, 7)[0]).toBeCloseTo(343 / (3 * EI), 18);
  });

  test('adds up: loads + Σ value · unit is the beam', () => {
    const { loads, units, values } = forceMethod(propped, [prop]);
    const { diagrams } = solveBeam(propped);
    for (const x of [0, 2, 7, 9]) {
      const sum =
        evaluate(loads.diagrams.moment, x)[0] + values[0]! * evaluate(units[0]!.diagrams.moment, x)[0];
      expect(sum).toBeCloseTo(evaluate(diagrams.moment, x)[0], 8);
    }
  });
});

describe('stations', () => {
  const solution = solveBeam(
    beam({
      length: 3,
      ei: EI,
      supports: [rollerAt(0), rollerAt(3)],
      loads: [{ kind: 'point', at: 2.1, p: 10 }],
    }),
  );

  test('stand at the ends of equal steps, the last exactly at the end', () => {
    expect(stationPositions({ length: 0.7 }, 8)).toEqual(
      [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7].map((_, k) => (k === 7 ? 0.7 : (0.7 * k) / 7)),
    );
    expect(stationPositions({ length: 9 })).toHaveLength(11);
    expect(stationPositions({ length: 9 }, [4, 1])).toEqual([4, 1]);
  });

  test('within 1e-12 of the length of a point have the two sides of that point', () => {
    for (const x of [2.1, 2.1 - 2.9e-12, 2.1 + 2.9e-12]) {
      expect(stationsAt(solution, [x])[0]).toMatchObject({ x, shear: [near(3), near(-7)] });
    }
    expect(stationsAt(solution, [2.1 + 3.1e-12])[0]!.shear).toEqual([near(-7), near(-7)]);
    expect(stationsAt(solution, [2.1 + 1e-9])[0]!.shear).toEqual([near(-7), near(-7)]);
  });

  test('at the ends of the beam have the value inside it twice, and 0 where rounding is left', () => {
    const [left, right] = stationsAt(solution, [0, 3]);
    expect(left!.shear).toEqual([near(3), near(3)]);
    expect(right).toMatchObject({ shear: [near(-7), near(-7)], moment: [0, 0], deflection: 0 });
  });
});

describe('what rounding leaves of nothing', () => {
  const nowhere = { value: 0, at: [0, 3.3, 10] };
  const nothing = { max: nowhere, min: nowhere };

  test('supports that turn as one body bend nothing, though their decimals are not exact', () => {
    const { extremes, contraflexure, reactions } = solveBeam(
      beam({
        length: 10,
        ei: EI,
        supports: [
          { ...fixedAt(0), rotation: -0.001 },
          { ...rollerAt(3.3), rise: -0.0033 },
          { ...fixedAt(10), rise: -0.01, rotation: -0.001 },
        ],
      }),
    );
    expect(extremes).toMatchObject({ shear: nothing, moment: nothing });
    expect(contraflexure).toEqual([]);
    expect(reactions.every(({ vertical, moment }) => vertical === 0 && moment === 0)).toBe(true);
  });

  test('a small settlement beside a large common one still bends the beam', () => {
    const { extremes } = solveBeam(
      beam({
        length: 10,
        ei: EI,
        supports: [
          { ...rollerAt(0), rise: -0.1 },
          { ...rollerAt(5), rise: -0.1 - 1e-9 },
          { ...rollerAt(10), rise: -0.1 },
        ],
      }),
    );
    // 3EIΔ/ℓ² at the middle support
    expect(extremes.moment.max.value).toBeCloseTo((3 * EI * 1e-9) / 25, 9);
  });

  test('a temperature gradient that is wholly held leaves the beam straight', () => {
    const { extremes } = solveBeam(
      beam({
        length: 10,
        ei: EI,
        supports: [fixedAt(0), fixedAt(10)],
        loads: [{ kind: 'curvature', from: 0, to: 10, kappa: 0.0003 }],
      }),
    );
    const straight = { value: 0, at: [0, 10] };
    expect(extremes).toMatchObject({
      moment: { max: { value: near(-EI * 0.0003), at: [0, 10] } },
      slope: { max: straight, min: straight },
      deflection: { max: straight, min: straight },
    });
  });

  test('a gradient in an overhang, where it is free to bend the beam, makes no forces', () => {
    const { extremes, contraflexure } = solveBeam(
      beam({
        length: 15.55,
        ei: 1.5e6,
        supports: [
          { ...rollerAt(10.9), kr: 810000 },
          fixedAt(13.4),
          { ...rollerAt(7.6), kr: 500000 },
          { at: 11.25, kind: 'guided' },
          rollerAt(15.55),
        ],
        loads: [{ kind: 'curvature', from: 4.8, to: 6.4, kappa: 0.00012 }],
      }),
    );
    const { shear, moment } = extremes;
    expect([shear.max.value, shear.min.value, moment.max.value, moment.min.value]).toEqual([0, 0, 0, 0]);
    expect(contraflexure).toEqual([]);
  });

  test('redundants that leave the beam indeterminate, or none of it, are no redundants', () => {
    const built = beam({ length: 6, ei: 1e6, supports: [fixedAt(0), fixedAt(6)], loads: [] });
    expect(() => solveBeam(built, [{ support: 0, component: 'vertical' }])).toThrow(RangeError);
    expect(() => solveBeam(built, [])).toThrow('not statically determinate');
  });
});
