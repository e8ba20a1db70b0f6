import { describe, expect, test } from 'vitest';
import { type BeamDocument, type Load, readBeam } from '../model/index';
import { type ContinuousBeam, continuousBeam } from './index';

/** Every kind of support, load and stiffness; the overhangs are 1 m, the spans 4, 5 and 3 m. */
const DOCUMENT: BeamDocument = {
  length: 14,
  segments: [
    { from: 0, to: 7, ei: 2e7, ga: 9e6 },
    { from: 7, to: 14, ei: 1e7 },
  ],
  supports: [
    { at: 1, kind: 'roller', rise: -0.004 },
    { at: 5, kind: 'free', kv: 4e6, kr: 2e6, rotation: 1e-3 },
    { at: 10, kind: 'fixed', rotation: -1e-3 },
    { at: 13, kind: 'roller', kr: 1e6 },
  ],
  loads: [
    { kind: 'line', from: 0, to: 6, w0: 4000, w1: 9000 },
    { kind: 'point', at: 11, p: 7000 },
    { kind: 'couple', at: 3, m: 2500 },
    { kind: 'couple', at: 10, m: -900 },
    { kind: 'point', at: 14, p: 800 },
    { kind: 'curvature', from: 7, to: 12, kappa: 2e-4 },
  ],
  horizontal: 'ignore',
};

function solverOf(document: BeamDocument): ContinuousBeam {
  const reading = readBeam(document);
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  const solver = continuousBeam(reading.value)!;
  solver.solve();
  return solver;
}

/** The residuals after the solution was spoilt. */
function spoilt(spoil: (geometry: ContinuousBeam['geometry']) => void, document = DOCUMENT) {
  const solver = solverOf(document);
  spoil(solver['geometry']);
  const { equilibrium, compatibility, agreement } = solver.prove();
  return { equilibrium, compatibility, agreement, proven: solver.isProven() };
}

describe('the proof of the fast solver', () => {
  test('of a right result is rounding, with its movements and without', () => {
    const solver = solverOf(DOCUMENT);
    for (const movements of [true, false]) {
      solver.solve(undefined, { movements });
      const { equilibrium, compatibility, agreement } = solver.prove();
      for (const residual of [equilibrium, compatibility, agreement]) expect(residual).toBeLessThan(1e-12);
      expect(solver.isProven()).toBe(true);
    }
  });

  test('of an unloaded beam is 0', () => {
    const solver = solverOf({ length: 6, ei: 1, supports: [{ at: 0, kind: 'fixed' }], horizontal: 'ignore' });
    expect(solver.prove()).toMatchObject({ equilibrium: 0, compatibility: 0, agreement: 0 });
  });

  test('finds a reaction that is off, by force and by moment about either end', () => {
    const force = spoilt(({ support }) => {
      support[1]!.up *= 1 + 1e-6;
    });
    expect(force.equilibrium).toBeGreaterThan(1e-7);
    expect(force.agreement).toBeGreaterThan(1e-7);
    const moment = spoilt(({ support }) => {
      support[2]!.couple *= 1 + 1e-6;
    });
    expect(moment.equilibrium).toBeGreaterThan(1e-8);
    // Two reactions that change against each other keep ΣF and the moment about one end.
    const lever = spoilt(({ support }) => {
      support[1]!.up += 1e-3;
      support[2]!.up -= 1e-3;
    });
    expect(lever.equilibrium).toBeGreaterThan(1e-8);
    expect([force, moment, lever].map(({ proven }) => proven)).toEqual([false, false, false]);
  });

  test.each([0, 1, 2, 3, 4, 5, 6, 7])('finds number %i of the states beside a support that is off', (n) => {
    const { agreement, proven } = spoilt(({ support, states }) => {
      const k = support[2]!.point;
      states[n < 4 ? 8 * k + n : 8 * (k - 1) + n]! += 1e-6 * [2e4, 2e4, 1e-3, 4e-3][n % 4]!;
    });
    expect(agreement).toBeGreaterThan(1e-8);
    expect(proven).toBe(false);
  });

  test.each([
    ['v right of a rigid support', (k: number) => 8 * k + 3, 4e-3],
    ['v left of it', (k: number) => 8 * (k - 1) + 7, 4e-3],
    ['ψ right of where rotation is held', (k: number) => 8 * k + 2, 1e-3],
    ['ψ left of it', (k: number) => 8 * (k - 1) + 6, 1e-3],
  ])('finds a gap: %s', (_, index, size) => {
    const { compatibility } = spoilt(({ support, states }) => {
      states[index(support[2]!.point)]! += 1e-6 * size;
    });
    expect(compatibility).toBeGreaterThan(1e-8);
  });

  test('finds a kink over a support that lets the beam turn, and a spring that yields too little', () => {
    const kink = spoilt(({ support, states }) => {
      states[8 * support[0]!.point + 2]! += 1e-9;
    });
    expect(kink.compatibility).toBeGreaterThan(1e-8);
    const spring = spoilt(({ support }) => {
      support[1]!.give *= 1 + 1e-5;
    });
    expect(spring.compatibility).toBeGreaterThan(1e-8);
    const turned = spoilt(({ support }) => {
      support[1]!.turnGive *= 1 + 1e-5;
    });
    expect(turned.compatibility).toBeGreaterThan(1e-8);
  });

  test('a result that is not a number is not proven', () => {
    const { proven, equilibrium, compatibility, agreement } = spoilt(({ support, states }) => {
      support[1]!.up = Number.NaN;
      states.fill(Number.NaN);
    });
    expect([equilibrium, compatibility, agreement]).toEqual([Number.NaN, Number.NaN, Number.NaN]);
    expect(proven).toBe(false);
  });

  test('asks less where two points are closer than 1e-4 of the beam', () => {
    const close = (gap: number): BeamDocument => ({
      ...DOCUMENT,
      loads: [
        ...DOCUMENT.loads!,
        { kind: 'point', at: 8, p: 1 } as Load,
        { kind: 'point', at: 8 + gap, p: 1 } as Load,
      ],
    });
    const off = ({ support }: ContinuousBeam['geometry']) => {
      support[1]!.up *= 1 + 1e-7;
    };
    expect(spoilt(off, close(14e-4 * 1.01)).proven).toBe(false);
    expect(spoilt(off, close(14e-4 * 0.99)).proven).toBe(true);
  });

  test('measures against what a beam that happens to carry nothing would carry', () => {
    // The load stands on a support: no moment, no deflection, and rounding beside them is nothing.
    const loads: Load[] = [{ kind: 'point', at: 3, p: 5000 }];
    const supports = [0, 3, 6].map((at) => ({ at, kind: 'roller' }) as const);
    const document: BeamDocument = { length: 6, ei: 1e7, supports, loads, horizontal: 'ignore' };
    const natural = { moment: 5000 * 6, rotation: (5000 * 6 * 6) / 1e7 };
    const by = (part: number) =>
      spoilt(({ states }) => {
        states[1]! += part * natural.moment;
        states[8 + 7]! += part * natural.rotation * 6;
      }, document).agreement;
    expect(by(1e-15)).toBeLessThan(1.1e-10);
    expect(by(1e-13)).toBeGreaterThan(0.9e-8);
  });
});
