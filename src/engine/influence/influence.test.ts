import { describe, expect, test } from 'vitest';
import { type BeamDocument, readBeam } from '../model/index';
import { evaluate } from '../polynomial/index';
import { type AskedQuantity, influenceLine, readInfluenceQuantity } from './index';

function beamOf(document: Omit<BeamDocument, 'ei'> & { ei?: number }) {
  const reading = readBeam({ ei: 1, horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return reading.value;
}

function lineOf(beam: ReturnType<typeof beamOf>, asked: AskedQuantity) {
  const reading = readInfluenceQuantity(beam, asked);
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return influenceLine(beam, reading.value);
}

const L = 8;
const simple = beamOf({
  length: L,
  supports: [
    { at: 0, kind: 'pin' },
    { at: L, kind: 'roller' },
  ],
});
const propped = (ga?: number) =>
  beamOf({
    length: L,
    ei: 5,
    ga,
    supports: [
      { at: 0, kind: 'fixed' },
      { at: L, kind: 'roller' },
    ],
  });
const PLACES = [0.3, 1.7, 4.4, 7.9];

describe('influenceLine of a simple span', () => {
  test('has straight lines for the reactions', () => {
    const { line, extremes } = lineOf(simple, { kind: 'reaction', support: 0, component: 'vertical' });
    for (const x of PLACES) expect(evaluate(line, x)[0]).toBeCloseTo(1 - x / L, 14);
    expect(extremes.max).toEqual({ value: 1, at: [0] });
    expect(extremes.min).toEqual({ value: 0, at: [L] });
  });

  test('steps up by 1 at the section of a shear', () => {
    const { line } = lineOf(simple, { kind: 'shear', at: 3 });
    expect(evaluate(line, 3)).toEqual([expect.closeTo(-3 / L, 14), expect.closeTo(1 - 3 / L, 14)]);
    expect(evaluate(line, 1)[0]).toBeCloseTo(-1 / L, 14);
    expect(evaluate(line, 7)[0]).toBeCloseTo(1 / L, 14);
  });

  test('peaks with ab/L at the section of a moment', () => {
    for (const at of [1, 3, 4, 6.5]) {
      const { extremes, areas } = lineOf(simple, { kind: 'moment', at });
      expect(extremes.max.at).toEqual([at]);
      expect(extremes.max.value).toBeCloseTo((at * (L - at)) / L, 13);
      expect(areas).toEqual([
        { from: 0, to: L, positive: expect.closeTo((at * (L - at)) / 2, 12), negative: 0 },
      ]);
    }
  });

  test('is the deflection curve of a force at the section', () => {
    const [a, b] = [3, L - 3];
    const { line } = lineOf(simple, { kind: 'deflection', at: a });
    for (const x of [0.5, 2, 3]) {
      // v = −b x (L² − b² − x²)/(6 L EI): AISC Manual, Table 3-23, case 8 (from memory)
      expect(evaluate(line, x)[0]).toBeCloseTo((-b * x * (L ** 2 - b ** 2 - x ** 2)) / (6 * L), 12);
    }
  });
});

describe('influenceLine of indeterminate beams', () => {
  test('is ξ²(3L − ξ)/(2L³) for the prop of a cantilever', () => {
    // AISC Manual, Table 3-23, case 14 (from memory)
    const { line } = lineOf(propped(), { kind: 'reaction', support: 1, component: 'vertical' });
    for (const x of PLACES)
      expect(evaluate(line, x)[0]).toBeCloseTo((x ** 2 * (3 * L - x)) / (2 * L ** 3), 13);
  });

  test('adds shear flexibility to both sides of the compatibility of a prop', () => {
    const [EI, GA] = [5, 0.4];
    const { line } = lineOf(propped(GA), { kind: 'reaction', support: 1, component: 'vertical' });
    for (const x of PLACES) {
      const gap = (x ** 2 * (3 * L - x)) / (6 * EI) + x / GA; // of the tip, under 1 at x
      expect(evaluate(line, x)[0]).toBeCloseTo(gap / (L ** 3 / (3 * EI) + L / GA), 13);
    }
  });

  test('is the hogging moment −ab²/L² at the left of a span built in at both ends', () => {
    const fixed = beamOf({
      length: L,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: L, kind: 'fixed' },
      ],
    });
    const moment = lineOf(fixed, { kind: 'moment', at: 0 }).line;
    const reaction = lineOf(fixed, { kind: 'reaction', support: 0, component: 'rotation' }).line;
    for (const x of PLACES) {
      // AISC Manual, Table 3-23, case 17 (from memory)
      expect(evaluate(moment, x)[0]).toBeCloseTo((-x * (L - x) ** 2) / L ** 2, 12);
      expect(evaluate(reaction, x)[0]).toBeCloseTo((x * (L - x) ** 2) / L ** 2, 12);
    }
  });

  test('has under the moment over the middle support −1/16 of each span squared', () => {
    const two = beamOf({ length: 2, supports: [0, 1, 2].map((at) => ({ at, kind: 'roller' })) });
    const { areas } = lineOf(two, { kind: 'moment', at: 1 });
    expect(areas).toEqual([
      { from: 0, to: 1, positive: 0, negative: expect.closeTo(-1 / 16, 14) },
      { from: 1, to: 2, positive: 0, negative: expect.closeTo(-1 / 16, 14) },
    ]);
  });

  test('has the shear at the left and at the right of a support, the reaction between them', () => {
    const two = beamOf({ length: 2, supports: [0, 1, 2].map((at) => ({ at, kind: 'roller' })) });
    const left = lineOf(two, { kind: 'shear', at: 1, side: 'left' }).line;
    const right = lineOf(two, { kind: 'shear', at: 1, side: 'right' }).line;
    const reaction = lineOf(two, { kind: 'reaction', support: 1, component: 'vertical' }).line;
    for (const x of [0.2, 0.9, 1.3, 1.8]) {
      expect(evaluate(right, x)[0] - evaluate(left, x)[0]).toBeCloseTo(evaluate(reaction, x)[0], 13);
    }
    expect(evaluate(left, 0.5)[0]).toBeCloseTo(-0.59375, 13); // −(1 − 0.40625): Anger, RA at 0.5 (from memory)
    expect(evaluate(right, 1.5)[0]).toBeCloseTo(0.59375, 13);
  });

  test('has the moment at both sides of a support that holds rotation', () => {
    const held = beamOf({
      length: 2,
      supports: [
        { at: 0, kind: 'roller' },
        { at: 1, kind: 'fixed' },
        { at: 2, kind: 'roller' },
      ],
    });
    const left = lineOf(held, { kind: 'moment', at: 1, side: 'left' });
    expect(evaluate(left.line, 0.5)[0]).toBeCloseTo(-3 / 16, 13); // propped, force at midspan: AISC, case 13 (from memory)
    expect(left.areas[1]).toEqual({ from: 1, to: 2, positive: 0, negative: 0 });
    expect(evaluate(lineOf(held, { kind: 'moment', at: 1, side: 'right' }).line, 1.5)[0]).toBeCloseTo(
      -3 / 16,
      13,
    );
  });
});

describe('influenceLine of a beam with a hinge', () => {
  // Anchor span 0–6 with an arm to the hinge at 8, and a suspended span to 12.
  const gerber = beamOf({
    length: 12,
    supports: [0, 6, 12].map((at) => ({ at, kind: 'roller' })),
    hinges: [8],
  });

  test('is nothing on the anchor span for the reaction of the suspended span', () => {
    const { line, areas } = lineOf(gerber, { kind: 'reaction', support: 2, component: 'vertical' });
    expect(evaluate(line, 3)).toEqual([0, 0]);
    expect(evaluate(line, 9)[0]).toBeCloseTo(1 / 4, 14);
    expect(areas.map(({ positive }) => positive)).toEqual([0, expect.closeTo(2, 13)]);
  });

  test('turns down to the hinge for the moment over the inner support', () => {
    const { line } = lineOf(gerber, { kind: 'moment', at: 6 });
    expect(evaluate(line, 8)[0]).toBeCloseTo(-2, 13);
    expect(evaluate(line, 10)[0]).toBeCloseTo(-1, 13);
    expect(evaluate(line, 2)[0]).toBeCloseTo(0, 13);
  });

  test('is zero throughout for the moment in the hinge itself', () => {
    const { line, extremes } = lineOf(gerber, { kind: 'moment', at: 8 });
    expect([...line.coefficients].every((c) => c === 0)).toBe(true);
    expect(extremes.max.value).toBe(0);
  });
});

describe('readInfluenceQuantity', () => {
  test.each<[string, AskedQuantity, string, string]>([
    ['a section off the beam', { kind: 'shear', at: L + 0.1 }, 'out_of_range', 'at'],
    ['a section that is no number', { kind: 'moment', at: Number.NaN }, 'out_of_range', 'at'],
    [
      'a support that is not there',
      { kind: 'reaction', support: 2, component: 'vertical' },
      'out_of_range',
      'support',
    ],
    [
      'a reaction that nothing holds',
      { kind: 'reaction', support: 1, component: 'rotation' },
      'unrestrained',
      'component',
    ],
  ])('refuses %s', (_, asked, code, field) => {
    expect(readInfluenceQuantity(simple, asked)).toMatchObject({
      ok: false,
      faults: [{ code, path: [field] }],
    });
  });

  test('says which movement a support does not hold', () => {
    const free = beamOf({
      length: 4,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 2, kind: 'guided' },
      ],
    });
    const reading = readInfluenceQuantity(free, { kind: 'reaction', support: 1, component: 'vertical' });
    expect(reading).toMatchObject({ faults: [{ message: expect.stringContaining('vertical movement') }] });
  });

  test('brings a section to the point that it coincides with, and to the inside at an end', () => {
    expect(readInfluenceQuantity(simple, { kind: 'shear', at: 1e-13, side: 'left' })).toEqual({
      ok: true,
      value: { kind: 'shear', at: 0, side: 'right' },
    });
    expect(readInfluenceQuantity(simple, { kind: 'moment', at: L })).toMatchObject({
      value: { side: 'left' },
    });
    expect(readInfluenceQuantity(simple, { kind: 'deflection', at: 3 })).toEqual({
      ok: true,
      value: { kind: 'deflection', at: 3 },
    });
  });
});
