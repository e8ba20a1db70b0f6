import { describe, expect, test } from 'vitest';
import { stableBeam } from '../../../tests/support/stable-beam';
import type { BeamDocument, Load } from '../model/index';
import { evaluate } from '../polynomial/index';
import { forceMethod, solveBeam } from './index';

const beam = (document: Omit<BeamDocument, 'horizontal'>) =>
  stableBeam({ ...document, horizontal: 'ignore' });
const rollers = (...places: number[]) => places.map((at) => ({ at, kind: 'roller' as const }));
const uniform = (w: number, from: number, to: number): Load => ({ kind: 'line', from, to, w0: w, w1: w });

describe('the flexibility matrix of support moments', () => {
  test('holds 2ℓ/3EI and ℓ/6EI of the three-moment equation, and 0 where the spans do not meet', () => {
    // Clapeyron’s theorem (from memory)
    const [ℓ, ei] = [6, 1e6];
    const spans = beam({ length: 4 * ℓ, ei, supports: rollers(0, ℓ, 2 * ℓ, 3 * ℓ, 4 * ℓ) });
    const { flexibility } = solveBeam(
      spans,
      [1, 2, 3].map((k) => ({ at: k * ℓ, component: 'moment' })),
    ).forceMethod;
    const [own, beside] = [(2 * ℓ) / (3 * ei), ℓ / (6 * ei)];
    expect(flexibility).toEqual([
      [expect.closeTo(own, 18), expect.closeTo(beside, 18), 0],
      [expect.closeTo(beside, 18), expect.closeTo(own, 18), expect.closeTo(beside, 18)],
      [0, expect.closeTo(beside, 18), expect.closeTo(own, 18)],
    ]);
  });

  test('counts an entry that happens to be 1', () => {
    // ℓ/6EI = 1; three equal spans have 0.1 wℓ² over the inner supports (from memory, as in every handbook)
    const spans = beam({ length: 18, ei: 1, supports: rollers(0, 6, 12, 18), loads: [uniform(5, 0, 18)] });
    const { flexibility, values } = solveBeam(spans).forceMethod;
    expect(flexibility[1]![0]).toBe(1);
    for (const value of values) expect(value).toBeCloseTo(-0.1 * 5 * 36, 12);
  });
});

test('taken apart has the numbers of the solution', () => {
  const spans = beam({
    length: 11,
    ei: 3e6,
    supports: [
      { at: 0, kind: 'fixed', rotation: 0.001 },
      ...rollers(5, 11).map((one) => ({ ...one, rise: -0.003 })),
    ],
    loads: [uniform(7000, 0, 11)],
  });
  const redundants = [1, 2].map((support) => ({ support, component: 'vertical' as const }));
  const { flexibility, gaps, imposed, values } = forceMethod(spans, redundants);
  expect({ flexibility, gaps, imposed, values }).toMatchObject({ imposed: [-0.003, -0.003] });
  const solved = solveBeam(spans, redundants).forceMethod;
  expect(solved).toMatchObject({ flexibility, gaps, imposed, values });
  // F·X + Δ₀ = Δ_imposed
  flexibility.forEach((row, i) => {
    const closed = row.reduce((sum, f, j) => sum + f * values[j]!, gaps[i]!);
    expect(closed).toBeCloseTo(imposed[i]!, 14);
  });
});

test('the released beam has its hinges from the left', () => {
  const hinged = beam({
    length: 12,
    ei: 1e6,
    supports: [{ at: 0, kind: 'fixed' }, ...rollers(6, 12)],
    hinges: [8],
  });
  expect(forceMethod(hinged, [{ at: 3, component: 'moment' }]).released.hinges).toEqual([3, 8]);
});

test('a redundant does nothing to a reaction beyond a hinge', () => {
  // Fixed at 0, propped at 2, hinge at 4, roller at 10: what is right of the hinge is a simple span of 6.
  const hinged = beam({
    length: 10,
    ei: 1e6,
    supports: [{ at: 0, kind: 'fixed' }, ...rollers(2, 10)],
    hinges: [4],
    loads: [uniform(5000, 4, 10)],
  });
  const redundant = { support: 1, component: 'vertical' } as const;
  const { units } = forceMethod(hinged, [redundant]);
  expect(units[0]!.reactions.map(({ vertical }) => vertical)).toEqual([-1, 1, 0]);
  const { reactions } = solveBeam(hinged, [redundant]);
  expect(reactions[2]!.vertical).toBeCloseTo(15_000, 9);
  // The end force P of the overhang a beyond a propped span ℓ: P (1 + 3a/2ℓ) on the prop (from memory)
  expect(reactions[1]!.vertical).toBeCloseTo(15_000 * (1 + (3 * 2) / (2 * 2)), 9);
});

describe('what is nothing is measured by the whole beam', () => {
  const [length, ei, m] = [8, 2e7, 5000];

  test('the force in the softest spring is not, even where two points are close', () => {
    const k = 1e-13;
    const { reactions, diagrams } = solveBeam(
      beam({
        length,
        ei,
        supports: [
          { at: 0, kind: 'fixed' },
          { at: length, kind: 'free', kv: k },
        ],
        loads: [
          { kind: 'couple', at: length, m },
          { kind: 'point', at: 1e-8 * length, p: 0 },
        ],
      }),
    );
    // The spring holds nothing: the tip rises by m L²/2EI.
    const tip = (m * length ** 2) / (2 * ei);
    expect(evaluate(diagrams.deflection, length)[0]).toBeCloseTo(tip, 12);
    expect(reactions[1]!.vertical / (-k * tip)).toBeCloseTo(1, 9);
  });

  test('a free curvature of 1 in an overhang, where it may bend the beam, makes no forces', () => {
    const place = (x: number) => x / 3;
    const { extremes, contraflexure } = solveBeam(
      beam({
        length: place(15.55),
        ei: 180,
        supports: [
          { at: place(10.9), kind: 'roller', kr: 60 },
          { at: place(13.4), kind: 'fixed' },
          { at: place(7.6), kind: 'roller', kr: 180 / 7 },
          { at: place(11.25), kind: 'guided' },
          { at: place(15.55), kind: 'roller' },
        ],
        loads: [{ kind: 'curvature', from: place(2.28), to: place(4.56), kappa: 1 }],
      }),
    );
    const { shear, moment } = extremes;
    expect([shear.max.value, shear.min.value, moment.max.value, moment.min.value]).toEqual([0, 0, 0, 0]);
    expect(contraflexure).toEqual([]);
  });
});
