import { describe, expect, test } from 'vitest';
import { type BeamDocument, readBeam } from '../model/index';
import { evaluate, magnitude } from '../polynomial/index';
import { absoluteMoment, type Direction, influenceLine, readWheels, type Wheel, worstTrain } from './index';
import { trainEffect } from './train';

function beamOf(length: number, supports: BeamDocument['supports'], hinges: number[] = []) {
  const reading = readBeam({ length, ei: 1, supports, hinges, horizontal: 'ignore' });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return reading.value;
}

const simple = (length: number) =>
  beamOf(length, [
    { at: 0, kind: 'pin' },
    { at: length, kind: 'roller' },
  ]);
const BOTH: readonly Direction[] = ['right', 'left'];

/** Half a unit of the last printed digit, or as many as a table is known to round by. */
const printed = (value: number, text: string, units = 0.5) =>
  expect(Math.abs(value - Number(text))).toBeLessThanOrEqual(
    units * 10 ** -(text.split('.')[1]?.length ?? 0),
  );

describe('absoluteMoment of a simple span', () => {
  const TWO: readonly Wheel[] = [
    { offset: 0, force: 8 },
    { offset: 14, force: 32 },
  ];

  // Bridge and Highway Structure Rehabilitation and Repair, Table 6.7: governing moment of the 20 ton truck, kip-ft by ft
  test.each([
    [28, '226.8'],
    [30, '246.61'],
    [32, '266.45'],
    [34, '286.31'],
    [36, '306.18'],
    [38, '326.06'],
    [40, '345.96'],
    [42, '365.87'],
    [45, '395.74'],
    [50, '445.57'],
    [55, '495.43'],
  ])('of %s ft under two axles is the printed %s kip-ft', (length, text) => {
    const { max, min } = absoluteMoment(simple(length), TWO, BOTH);
    printed(max.value, text);
    expect(min).toMatchObject({ value: 0, at: [], section: null });
    // The heavier axle and the resultant, 14 · 8/40 from it, are as far from midspan on either side.
    expect(Math.abs(max.section! - length / 2)).toBeCloseTo(1.4, 9);
    expect(max.wheels).toContain(max.section);
  });

  test('is PL/4 of the heavier axle alone where the span has no room for the rule', () => {
    // AISC Manual, Table 3-23, case 44: the other load off the span (from memory)
    for (const length of [20, 26])
      expect(absoluteMoment(simple(length), TWO, BOTH).max.value).toBeCloseTo((32 * length) / 4, 9);
  });

  test('of two equal loads is P(L − a/2)²/(2L) until a is 0.586 L, and PL/4 from there', () => {
    // AISC Manual, Table 3-23, case 43 (from memory)
    const [L, P] = [10, 60];
    const at = (a: number) =>
      absoluteMoment(
        simple(L),
        [
          { offset: 0, force: P },
          { offset: a, force: P },
        ],
        BOTH,
      ).max.value;
    for (const a of [0.5, 3, 5.8]) expect(at(a)).toBeCloseTo((P * (L - a / 2) ** 2) / (2 * L), 9);
    for (const a of [5.9, 8]) expect(at(a)).toBeCloseTo((P * L) / 4, 9);
  });

  test('of 24, 24 and 6 kip on 40 ft is the printed 323 kip-ft', () => {
    // Printed example "Maximum moment in a simple span due to a set of moving loads", axles 16 ft and 12 ft apart
    const wheels = [
      { offset: 0, force: 6 },
      { offset: 12, force: 24 },
      { offset: 28, force: 24 },
    ];
    const { max } = absoluteMoment(simple(40), wheels, ['right']);
    printed(max.value, '323');
    expect(max.section).toBeCloseTo(20 + 2.889, 3);
  });

  // Standard Specifications for Highway Bridges, appendix A, HS 20-44, kip-ft by ft (from memory); it rounds up by up to
  // a unit: 72 (25 − 7/3)²/50 − 112 = 627.84 at 50 ft, by hand
  test.each([
    [20, '160.0'],
    [30, '282.1'],
    [40, '449.8'],
    [50, '627.9'],
    [60, '806.5'],
    [80, '1164.9'],
    [100, '1524.0'],
  ])('of %s ft under three axles is the printed %s kip-ft', (length, text) => {
    const axles = [
      { offset: 0, force: 8 },
      { offset: 14, force: 32 },
      { offset: 28, force: 32 },
    ];
    printed(absoluteMoment(simple(length), axles, BOTH).max.value, text, 1);
  });
});

describe('absoluteMoment of other beams', () => {
  test('of a cantilever is the train at its tip', () => {
    const { max, min } = absoluteMoment(
      beamOf(5, [{ at: 0, kind: 'fixed' }]),
      [
        { offset: 0, force: 3 },
        { offset: 2, force: 4 },
      ],
      ['right'],
    );
    expect(max).toMatchObject({ value: 0, section: null });
    expect(min).toMatchObject({ value: -(3 * 5 + 4 * 3), section: 0, at: [5], wheels: [5, 3] });
  });

  test('of one force on two equal spans is 0.2074 PL in a span and −0.0962 PL over the support', () => {
    // Printed influence maxima of two equal spans: 0.2074 at 0.432 L and −0.0962 at 0.577 L (from memory)
    const two = beamOf(
      2,
      [0, 1, 2].map((at) => ({ at, kind: 'roller' })),
    );
    const { max, min } = absoluteMoment(two, [{ offset: 0, force: 1 }], ['left']);
    printed(max.value, '0.2074');
    printed(max.section!, '0.432');
    printed(min.value, '-0.0962');
    expect(min.section).toBe(1);
    printed(min.at[0]!, '0.577');
  });

  test('of a cantilever held at its right end is the same, seen from the other side', () => {
    const { min } = absoluteMoment(
      beamOf(5, [{ at: 5, kind: 'fixed' }]),
      [{ offset: 0, force: 3 }],
      ['right'],
    );
    expect(min).toMatchObject({ value: -15, section: 5, at: [0], wheels: [0] });
  });

  test('takes the moments at both sides of a support that holds rotation', () => {
    const held = beamOf(3, [
      { at: 0, kind: 'roller' },
      { at: 1, kind: 'fixed' },
      { at: 3, kind: 'roller' },
    ]);
    const { min, proof } = absoluteMoment(held, [{ offset: 0, force: 1 }], ['right']);
    expect(Math.max(proof.equilibrium, proof.compatibility, proof.agreement)).toBeLessThan(1e-12);
    expect(min.value).toBeCloseTo((-2 * Math.sqrt(3)) / 9, 9); // PL/(3√3) of a propped span of 2 (AISC, case 14, from memory)
    expect(min.section).toBe(1);
  });
});

describe('worstTrain', () => {
  const overhang = beamOf(10, [
    { at: 0, kind: 'pin' },
    { at: 6, kind: 'roller' },
  ]);

  test('of one wheel is the extreme of the line', () => {
    const { line, extremes } = influenceLine(overhang, { kind: 'moment', at: 2, side: 'right' });
    const { max, min } = worstTrain(line, [{ offset: 0, force: 5 }], ['right']);
    expect(max).toEqual({
      value: 5 * extremes.max.value,
      direction: 'right',
      at: [2],
      wheels: [2],
      ordinates: [extremes.max.value],
    });
    expect(min.value).toBeCloseTo(5 * extremes.min.value, 12);
    expect(min.wheels).toEqual([10]);
  });

  test('of two equal loads is P(2 − a/L) for the reaction', () => {
    const { line } = influenceLine(simple(10), { kind: 'reaction', support: 0, component: 'vertical' });
    const { max } = worstTrain(
      line,
      [
        { offset: 0, force: 7 },
        { offset: 4, force: 7 },
      ],
      ['right'],
    );
    expect(max.value).toBeCloseTo(7 * (2 - 0.4), 12); // AISC Manual, Table 3-23, case 43 (from memory)
    expect(max.wheels).toEqual([4, 0]);
  });

  test('takes the worse direction of a train that may run either way', () => {
    const wheels = [
      { offset: 0, force: 1 },
      { offset: 3, force: 10 },
    ];
    const { line } = influenceLine(beamOf(5, [{ at: 0, kind: 'fixed' }]), {
      kind: 'moment',
      at: 0,
      side: 'right',
    });
    expect(worstTrain(line, wheels, ['right']).min.value).toBeCloseTo(-50, 12);
    expect(worstTrain(line, wheels, BOTH).min).toMatchObject({
      value: expect.closeTo(-52, 12),
      direction: 'left',
      wheels: [2, 5],
    });
  });

  test('has no position where a train can only make it less', () => {
    const { line } = influenceLine(beamOf(5, [{ at: 0, kind: 'fixed' }]), { kind: 'deflection', at: 4 });
    expect(worstTrain(line, [{ offset: 0, force: 1 }], BOTH).max).toEqual({
      value: 0,
      direction: 'right',
      at: [],
      wheels: [null],
      ordinates: [null],
    });
  });

  test('counts a wheel at the section on either side while another stands at the tip', () => {
    const { line } = influenceLine(overhang, { kind: 'shear', at: 3, side: 'right' });
    const wheels = [
      { offset: 0, force: 1 },
      { offset: 7, force: 1 },
    ];
    // 1 − 3/6 of the wheel at the section, less 4/6 of the wheel at the tip; and −3/6 − 4/6 a hair before
    const { min } = worstTrain(line, wheels, ['right']);
    expect(min.value).toBeCloseTo(-3 / 6 - 4 / 6, 12);
    expect(min.wheels).toEqual([10, 3]);
    expect(min.ordinates).toEqual([expect.closeTo(-4 / 6, 12), expect.closeTo(-3 / 6, 12)]);
  });

  test('leaves out a wheel that has just gone off, where that is the worst', () => {
    // Off the tip, the front wheel lifts the reaction no more.
    const { line } = influenceLine(overhang, { kind: 'reaction', support: 0, component: 'vertical' });
    const wheels = [
      { offset: 0, force: 1 },
      { offset: 9, force: 1 },
    ];
    const { max } = worstTrain(line, wheels, ['right']);
    expect(max.value).toBeCloseTo(1, 12);
    expect(max.wheels).toEqual([0, null]);
    const { max: behind } = worstTrain(
      line,
      [
        { offset: 0, force: 1 },
        { offset: 9.5, force: 1.5 },
      ],
      ['right'],
    );
    expect(behind.value).toBeCloseTo(1.5 * (1 - 0.5 / 6), 12);
    expect(behind.wheels).toEqual([null, 0.5]);
  });
});

test('trainEffect is nothing before the first wheel comes on and after the last has gone', () => {
  const { line } = influenceLine(simple(10), { kind: 'moment', at: 5, side: 'right' });
  const effect = trainEffect(
    line,
    [
      { offset: 1, force: 2 },
      { offset: 4, force: 3 },
    ],
    'right',
  );
  expect(effect.breaks[0]).toBe(1);
  expect(effect.breaks.at(-1)).toBe(14);
  expect(evaluate(effect, 9)[0]).toBeCloseTo(2 * 1 + 3 * 2.5, 12);
  expect(magnitude(effect)).toBeGreaterThan(0);
});

test('readWheels refuses no wheel, one that pulls up, and one ahead of the front', () => {
  expect(readWheels([])).toMatchObject({ ok: false, faults: [{ path: [], code: 'required' }] });
  const wrong = readWheels([
    { offset: 0, force: 1 },
    { offset: -1, force: 0 },
    { offset: Number.POSITIVE_INFINITY, force: Number.NaN },
  ]);
  expect(wrong.ok ? [] : wrong.faults.map(({ path, code }) => [...path, code].join(' '))).toEqual([
    '1 offset out_of_range',
    '1 force not_positive',
    '2 offset out_of_range',
    '2 force not_positive',
  ]);
  const right = [{ offset: 0, force: 1 }];
  expect(readWheels(right)).toEqual({ ok: true, value: right });
});
