import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { prepareBeam } from '@/engine/beam/index';
import type { Beam, Load, Restraint } from '@/engine/model/index';
import { evaluate, integralOfProduct, multiply, type Piecewise, piecewise } from '@/engine/polynomial/index';
import { firstFrequency, type Masses } from '@/engine/vibration/index';
import { dice } from '../support/random';
import { anyBeam, runs } from '../support/stable-beam';

const RUNS = runs(20);

/** Of the beam, for Dunkerley's sum. */
const STRIPS = 40;

/** Own mass all along, half as much again on one stretch, and up to three masses at points. */
function massesFor({ length }: Beam, seed: number): Masses {
  const roll = dice(seed);
  const own = roll.logBetween(5, 500);
  const [a, b] = [roll.between(0, 0.5) * length, roll.between(0.5, 1) * length];
  return {
    distributed: [
      { from: 0, to: length, start: own, end: own },
      { from: a, to: b, start: own * roll.between(0, 1), end: own * roll.between(0, 1) },
    ],
    lumped: Array.from({ length: roll.whole(0, 3) }, () => ({
      at: roll.between(0, 1) * length,
      mass: own * length * roll.logBetween(0.01, 1),
    })),
  };
}

const times = (masses: Masses, factor: number): Masses => ({
  distributed: masses.distributed.map((one) => ({
    ...one,
    start: one.start * factor,
    end: one.end * factor,
  })),
  lumped: masses.lumped.map((one) => ({ ...one, mass: one.mass * factor })),
});

/** kg/m as a function of x. */
function along({ length }: Beam, { distributed }: Masses): Piecewise[] {
  return distributed.map(({ from, to, start, end }) => {
    const pieces: [number, number[]][] = [
      [from, [0]],
      [to, [start, (end - start) / (to - from)]],
      [length, [0]],
    ];
    const kept = pieces.filter(([x], k) => x > (pieces[k - 1]?.[0] ?? 0));
    return piecewise(
      [0, ...kept.map(([x]) => x)],
      kept.map(([, piece]) => piece),
    );
  });
}

const stiffened = (restraint: Restraint, k: number): Restraint =>
  restraint.kind === 'spring' ? { ...restraint, stiffness: restraint.stiffness * k } : restraint;

describe('the first natural frequency of any beam', { timeout: 60_000 }, () => {
  test('lies between Dunkerley’s bound and Rayleigh’s quotient of the sag', () => {
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, seed) => {
        const masses = massesFor(beam, seed);
        const { frequency, lower, upper } = firstFrequency(beam, masses)!;
        expect(upper / lower - 1).toBeLessThan(1e-12);
        const omega2 = (2 * Math.PI * frequency) ** 2;

        // Rayleigh: any shape that the supports allow gives too much. Here the one under the masses' weight, g left out;
        // what it stores is half the work of the weight.
        const loads: Load[] = [
          ...masses.distributed.map(
            ({ from, to, start, end }) => ({ kind: 'line', from, to, w0: start, w1: end }) as const,
          ),
          ...masses.lumped.map(({ at, mass }) => ({ kind: 'point', at, p: mass }) as const),
        ];
        const { deflection } = prepareBeam({ ...beam, loads }).solve(loads, { movements: false }).diagrams;
        const squared = multiply(deflection, deflection);
        const total = (shape: Piecewise) =>
          along(beam, masses).reduce((sum, mass) => sum + integralOfProduct(mass, shape), 0) +
          masses.lumped.reduce((sum, { at, mass }) => sum + mass * evaluate(shape, at)[0], 0);
        expect(omega2).toBeLessThanOrEqual((-total(deflection) / total(squared)) * (1 + 1e-9));

        // Dunkerley: 1/ω² is less than Σ m δ, with δ the deflection of a unit force where the mass is.
        const h = beam.length / STRIPS;
        const strips = Array.from({ length: STRIPS }, (_, k) => (k + 0.5) * h);
        const units = [...strips, ...masses.lumped.map(({ at }) => at)].map(
          (at) => ({ kind: 'point', at, p: 1 }) as const,
        );
        const prepared = prepareBeam({ ...beam, loads: units });
        const own = (at: number) => {
          const unit = units.filter((load) => load.at === at).slice(0, 1);
          return -evaluate(prepared.solve(unit, { movements: false }).diagrams.deflection, at)[0];
        };
        const density = (x: number) =>
          along(beam, masses).reduce((sum, mass) => sum + evaluate(mass, x)[0], 0);
        const compliance =
          strips.reduce((sum, x) => sum + density(x) * h * own(x), 0) +
          masses.lumped.reduce((sum, { at, mass }) => sum + mass * own(at), 0);
        expect(omega2).toBeGreaterThanOrEqual(0.98 / compliance); // 2 % for the strips
      }),
      RUNS,
    );
  });

  test('falls with the root of the masses, and rises with that of the stiffness', () => {
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, seed) => {
        const masses = massesFor(beam, seed);
        const { frequency } = firstFrequency(beam, masses)!;
        expect(firstFrequency(beam, times(masses, 9))!.frequency / frequency).toBeCloseTo(1 / 3, 9);
        const stiff = {
          ...beam,
          segments: beam.segments.map(({ ei, ga, ...place }) => ({ ...place, ei: 4 * ei, ga: ga && 4 * ga })),
          supports: beam.supports.map((support) => ({
            ...support,
            vertical: stiffened(support.vertical, 4),
            rotation: stiffened(support.rotation, 4),
          })),
        };
        expect(firstFrequency(stiff, masses)!.frequency / frequency).toBeCloseTo(2, 9);
      }),
      RUNS,
    );
  });
});
