import { describe, expect, test } from 'vitest';
import { type BeamDocument, readBeam, spansOf } from '../model/index';
import { evaluate, extremes } from '../polynomial/index';
import { type Datum, deflectionFrom, solveBeam, zeroShear } from './index';

function solved(document: BeamDocument) {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return { beam: reading.value, solution: solveBeam(reading.value) };
}

/** A span of 6 whose supports sink by 10 and 40 mm, with an arm of 2, under a uniform load of the span alone. */
const [L, a, EI, w] = [6, 2, 4e6, 10e3];
const sinking = solved({
  length: L + a,
  ei: EI,
  supports: [
    { at: 0, kind: 'pin', rise: -0.01 },
    { at: L, kind: 'roller', rise: -0.04 },
  ],
  loads: [{ kind: 'line', from: 0, to: L, w0: w, w1: w }],
});

const from = (datum: Datum) => deflectionFrom(sinking.beam, sinking.solution.diagrams.deflection, datum)!;

describe('deflectionFrom', () => {
  const sag = (5 * w * L ** 4) / (384 * EI); // AISC Manual, Table 3-23, case 1 (from memory)
  const tipSlope = (w * L ** 3) / (24 * EI);

  test('from where the beam was holds the movement of the supports', () => {
    const line = from({ kind: 'absolute' });
    expect(evaluate(line, L / 2)[0]).toBeCloseTo(-0.025 - sag, 12);
    expect(evaluate(line, L + a)[0]).toBeCloseTo(-0.04 - 0.005 * a + tipSlope * a, 12);
  });

  test('from the chord between the supports is that of supports that stay, on the overhang too', () => {
    const line = from({ kind: 'chord' });
    expect(extremes(line).min.value).toBeCloseTo(-sag, 12);
    expect(extremes(line).min.at).toEqual([expect.closeTo(L / 2, 9)]);
    expect(evaluate(line, L)[0]).toBeCloseTo(0, 15);
    expect(evaluate(line, L + a)[0]).toBeCloseTo(tipSlope * a, 12);
  });

  test('from a support is what the beam moves beyond it', () => {
    expect(evaluate(from({ kind: 'support', support: 0 }), L / 2)[0]).toBeCloseTo(-0.015 - sag, 12);
    expect(evaluate(from({ kind: 'support', support: 1 }), L / 2)[0]).toBeCloseTo(0.015 - sag, 12);
  });

  test('has a chord for each span, and an overhang at the left goes on with the first', () => {
    const { beam, solution } = solved({
      length: 5,
      ei: 1,
      supports: [
        { at: 1, kind: 'roller', rise: 0 },
        { at: 3, kind: 'roller', rise: 0.2 },
        { at: 5, kind: 'roller', rise: 0 },
      ],
    });
    const line = deflectionFrom(beam, solution.diagrams.deflection, { kind: 'chord' })!;
    for (const { at } of beam.supports) expect(evaluate(line, at)[0]).toBeCloseTo(0, 14);
    const tip = evaluate(solution.diagrams.deflection, 0)[0];
    expect(evaluate(line, 0)[0]).toBeCloseTo(tip + 0.1, 13);
  });

  test('from a support adds no break of its own', () => {
    expect(from({ kind: 'support', support: 1 }).breaks).toEqual(sinking.solution.diagrams.deflection.breaks);
  });

  test('has no chord on one support', () => {
    const { beam, solution } = solved({ length: 2, ei: 1, supports: [{ at: 0, kind: 'fixed' }] });
    expect(deflectionFrom(beam, solution.diagrams.deflection, { kind: 'chord' })).toBeNull();
  });
});

test('spansOf names the supports of spans and overhangs from the left, whatever their order', () => {
  const { beam } = solved({
    length: 9,
    ei: 1,
    supports: [
      { at: 7, kind: 'roller' },
      { at: 5, kind: 'guided' },
      { at: 1, kind: 'free', kv: 3 },
    ],
  });
  expect(spansOf(beam)).toEqual([
    { from: 0, to: 1, left: null, right: 2 },
    { from: 1, to: 7, left: 2, right: 0 },
    { from: 7, to: 9, left: 0, right: null },
  ]);
});

describe('zeroShear', () => {
  test('is where the moment of a propped span peaks, and the support of an overhang', () => {
    // 5/8 of the span from the built-in end: AISC Manual, Table 3-23, case 12 (from memory)
    const propped = solved({
      length: L,
      ei: EI,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: L, kind: 'roller' },
      ],
      loads: [{ kind: 'line', from: 0, to: L, w0: w, w1: w }],
    });
    expect(zeroShear(propped.solution)).toEqual([expect.closeTo((5 / 8) * L, 9)]);
    const overhang = solved({
      length: L + a,
      ei: EI,
      supports: [
        { at: 0, kind: 'pin' },
        { at: L, kind: 'roller' },
      ],
      loads: [{ kind: 'line', from: 0, to: L + a, w0: w, w1: w }],
    });
    // L/2 · (1 − a²/L²) and the support: AISC Manual, Table 3-23, case 24 (from memory)
    expect(zeroShear(overhang.solution)).toEqual([expect.closeTo((L / 2) * (1 - (a / L) ** 2), 9), L]);
  });

  test('is under a force, and at both ends of a stretch without shear', () => {
    const points = (...places: number[]) =>
      solved({
        length: 6,
        ei: EI,
        supports: [
          { at: 0, kind: 'pin' },
          { at: 6, kind: 'roller' },
        ],
        loads: places.map((at) => ({ kind: 'point', at, p: 1 })),
      });
    expect(zeroShear(points(4).solution)).toEqual([4]);
    expect(zeroShear(points(2, 4).solution)).toEqual([2, 4]);
  });
});
