import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { anyBeam, runs } from '../../../tests/support/stable-beam';
import { type BeamDocument, readBeam } from '../model/index';
import { shearShare, solveBeam, tipParts } from './index';

function solved(document: BeamDocument) {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return { beam: reading.value, solution: solveBeam(reading.value) };
}

const [L, a, EI, GA, P] = [6, 2, 4e6, 5e6, 12e3];
const parts = (document: BeamDocument) => {
  const { beam, solution } = solved(document);
  return tipParts(beam, solution);
};

describe('tipParts', () => {
  test('of a force at the tip are PL a²/(3EI), P a³/(3EI), Pa/GA and the settlement’s own', () => {
    // AISC Manual, Table 3-23, case 26, and shear and settlement by hand (from memory)
    const [tip, ...others] = parts({
      length: L + a,
      ei: EI,
      ga: GA,
      supports: [
        { at: 0, kind: 'pin' },
        { at: L, kind: 'roller', rise: -0.012 },
      ],
      loads: [{ kind: 'point', at: L + a, p: P }],
    });
    expect(others).toEqual([]);
    // The span's own shear turns it by P a/(L GA), beside the bending and the sinking of its support.
    const turn = (P * L * a) / (3 * EI) + (P * a) / (L * GA) + 0.012 / L;
    expect(tip).toEqual({
      at: L + a,
      support: 1,
      total: expect.closeTo(-0.012 - turn * a - (P * a ** 3) / (3 * EI) - (P * a) / GA, 12),
      settlement: expect.closeTo(-0.012, 14),
      rotation: expect.closeTo(-turn * a, 12),
      bending: expect.closeTo((-P * a ** 3) / (3 * EI), 12),
      shear: expect.closeTo((-P * a) / GA, 12),
    });
  });

  test('of an overhang at the left are the same, seen from the other side', () => {
    const [tip] = parts({
      length: L + a,
      ei: EI,
      ga: GA,
      supports: [
        { at: a, kind: 'pin' },
        { at: L + a, kind: 'roller' },
      ],
      loads: [{ kind: 'point', at: 0, p: P }],
    });
    expect(tip).toMatchObject({
      at: 0,
      support: 0,
      settlement: expect.closeTo(0, 15),
      bending: expect.closeTo((-P * a ** 3) / (3 * EI), 12),
      shear: expect.closeTo((-P * a) / GA, 12),
    });
    expect(tip!.rotation).toBeCloseTo(-a * ((P * L * a) / (3 * EI) + (P * a) / (L * GA)), 12);
  });

  test('of a force at the tip are the same where the span is no longer than a unit', () => {
    const [tip] = parts({
      length: 0.9,
      ei: EI,
      supports: [
        { at: 0, kind: 'pin' },
        { at: 0.5, kind: 'roller' },
      ],
      loads: [{ kind: 'point', at: 0.9, p: P }],
    });
    expect(tip!.bending).toBeCloseTo((-P * 0.4 ** 3) / (3 * EI), 15);
    expect(tip!.rotation).toBeCloseTo((-P * 0.5 * 0.4 ** 2) / (3 * EI), 15);
  });

  test('of a cantilever under a free curvature are its bending alone', () => {
    const [tip] = parts({
      length: 3,
      ei: EI,
      supports: [{ at: 0, kind: 'fixed' }],
      loads: [{ kind: 'curvature', from: 0, to: 3, kappa: 1e-3 }],
    });
    expect(tip).toEqual({
      at: 3,
      support: 0,
      total: expect.closeTo((1e-3 * 9) / 2, 15),
      settlement: 0,
      rotation: 0,
      bending: expect.closeTo((1e-3 * 9) / 2, 15),
      shear: 0,
    });
  });

  test('are none where something holds the end, even if it may slide', () => {
    expect(
      parts({
        length: 4,
        ei: 1,
        supports: [
          { at: 0, kind: 'pin' },
          { at: 4, kind: 'guided' },
        ],
      }),
    ).toEqual([]);
  });

  test('hang on the nearest support, even if it holds rotation alone', () => {
    const [tip] = parts({
      length: 5,
      ei: EI,
      supports: [
        { at: 1, kind: 'guided' },
        { at: 5, kind: 'roller' },
      ],
      loads: [{ kind: 'point', at: 0, p: P }],
    });
    // Guided at 1 and on the roller at 5: P · 4³/(3EI) there, as the tip of a cantilever (by hand)
    const settled = (-P * 4 ** 3) / (3 * EI);
    expect(tip).toMatchObject({ support: 0, rotation: 0, settlement: expect.closeTo(settled, 12) });
    expect(tip!.bending).toBeCloseTo(-P / (3 * EI), 12);
  });

  test('add up to the movement of the tip of any beam', () => {
    let tips = 0;
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        for (const { total, settlement, rotation, bending, shear } of tipParts(beam, solveBeam(beam))) {
          tips++;
          const terms = [settlement, rotation, bending, shear];
          const largest = Math.max(...terms.map(Math.abs));
          expect(Math.abs(terms.reduce((sum, term) => sum + term, 0) - total)).toBeLessThanOrEqual(
            1e-10 * largest,
          );
        }
      }),
      runs(150),
    );
    expect(tips).toBeGreaterThan(50);
  });
});

describe('shearShare', () => {
  const span = (ga: number | null, supports: BeamDocument['supports']) =>
    solved({ length: L, ei: EI, ga, supports, loads: [{ kind: 'line', from: 0, to: L, w0: P, w1: P }] });

  test('of a simple span under a uniform load is wL²/(8GA) at midspan', () => {
    // Timoshenko, Strength of Materials, part 1, article 39: M/GA at midspan (from memory)
    const { beam, solution } = span(GA, [
      { at: 0, kind: 'pin' },
      { at: L, kind: 'roller' },
    ]);
    const share = shearShare(beam, solution, L / 2)!;
    expect(share.shear).toBeCloseTo((-P * L ** 2) / (8 * GA), 14);
    expect(share.bending).toBeCloseTo((-5 * P * L ** 4) / (384 * EI), 12);
    expect(share.total).toBeCloseTo(share.bending + share.shear, 15);
  });

  test('is none where the beam does not shear', () => {
    const { beam, solution } = span(null, [{ at: 0, kind: 'fixed' }]);
    expect(shearShare(beam, solution, L)).toBeNull();
  });
});
