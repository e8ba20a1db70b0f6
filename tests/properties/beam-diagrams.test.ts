import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { solveBeam, stationPositions, stationsAt } from '@/engine/beam/index';
import type { Beam } from '@/engine/model/index';
import { differentiate, evaluate, magnitude } from '@/engine/polynomial/index';
import { anyBeam, runs, samplesOf } from '../support/stable-beam';

const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
const RUNS = runs(100);

/** Downward line load and free curvature just right of x. */
function actingAt(beam: Beam, x: number): { w: number; kappa: number } {
  const total = { w: 0, kappa: 0 };
  for (const load of beam.loads) {
    if (!('from' in load) || x < load.from || x >= load.to) continue;
    if (load.kind === 'line')
      total.w += load.w0 + ((load.w1 - load.w0) * (x - load.from)) / (load.to - load.from);
    else total.kappa += load.kappa;
  }
  return total;
}

describe('the diagrams of any beam', { timeout: 60_000 }, () => {
  test('obey V′ = −w, M′ = V, v′ = θ, and θ′ = M/EI + κ + w/GA', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { shear, moment, slope, deflection } = solveBeam(beam).diagrams;
        const [dV, dM, dTheta, dv] = [shear, moment, slope, deflection].map(differentiate) as [
          typeof shear,
          typeof shear,
          typeof shear,
          typeof shear,
        ];
        const right = (p: typeof shear, x: number) => evaluate(p, x)[1];
        const close = (a: number, b: number, size: number) => {
          expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-11 * size);
        };
        for (const x of samplesOf(shear)) {
          if (x === beam.length) continue;
          const { ei, ga } = beam.segments.find(({ from, to }) => from <= x && x < to)!;
          const { w, kappa } = actingAt(beam, x);
          close(right(dV, x), -w, magnitude(dV) || 1e-300);
          close(right(dM, x), right(shear, x), magnitude(shear));
          close(right(dv, x), right(slope, x), magnitude(slope));
          close(
            right(dTheta, x),
            right(moment, x) / ei + kappa + (ga === null ? 0 : w / ga),
            magnitude(dTheta),
          );
        }
      }),
      RUNS,
    );
  });

  test('jump by the forces and couples at a point, and nowhere else', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { diagrams, reactions } = solveBeam(beam);
        for (const x of diagrams.shear.breaks.slice(1, -1)) {
          const here = beam.supports.findIndex(({ at }) => at === x);
          const { vertical, moment } = reactions[here] ?? { vertical: 0, moment: 0 };
          let [force, couple] = [vertical, moment];
          for (const load of beam.loads) {
            if (load.kind === 'point' && load.at === x) force -= load.p;
            if (load.kind === 'couple' && load.at === x) couple += load.m;
          }
          const [V, M] = [evaluate(diagrams.shear, x), evaluate(diagrams.moment, x)];
          expect(Math.abs(V[1] - V[0] - force)).toBeLessThanOrEqual(
            1e-11 * Math.max(magnitude(diagrams.shear), Math.abs(vertical)),
          );
          expect(Math.abs(M[0] - M[1] - couple)).toBeLessThanOrEqual(
            1e-11 * Math.max(magnitude(diagrams.moment), Math.abs(moment)),
          );
        }
      }),
      RUNS,
    );
  });

  test('never exceed their extremes, and attain them wherever it is said', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { diagrams, extremes } = solveBeam(beam);
        for (const quantity of QUANTITIES) {
          const p = diagrams[quantity];
          const { max, min } = extremes[quantity];
          const slack = 1e-12 * magnitude(p);
          for (const x of samplesOf(p)) {
            for (const value of evaluate(p, x)) {
              expect(value).toBeLessThanOrEqual(max.value + slack);
              expect(value).toBeGreaterThanOrEqual(min.value - slack);
            }
          }
          for (const { value, at } of [max, min]) {
            expect(at.length).toBeGreaterThan(0);
            expect(at).toEqual([...new Set(at)].sort((a, b) => a - b));
            for (const x of at) {
              const nearest = Math.min(...evaluate(p, x).map((side) => Math.abs(side - value)));
              expect(nearest).toBeLessThanOrEqual(1.1e-9 * magnitude(p));
            }
          }
        }
      }),
      RUNS,
    );
  });

  test('have opposite moments on the two sides of a contraflexure, and one sign in between', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { diagrams, contraflexure } = solveBeam(beam);
        const size = magnitude(diagrams.moment);
        const cuts = [0, ...contraflexure, beam.length];
        const samples = samplesOf(diagrams.moment);
        cuts.slice(1).forEach((to, i) => {
          const inside = samples
            .filter((x) => x > cuts[i]! && x < to)
            .flatMap((x) => evaluate(diagrams.moment, x));
          const signs = new Set(inside.filter((M) => Math.abs(M) > 1e-9 * size).map(Math.sign));
          expect(signs.size).toBeLessThanOrEqual(1);
        });
      }),
      RUNS,
    );
  });

  test('are read at the stations without −0 and without a value that is not a number', () => {
    fc.assert(
      fc.property(anyBeam, fc.integer({ min: 2, max: 40 }), ({ beam }, count) => {
        const positions = stationPositions(beam, count);
        expect(positions).toHaveLength(count);
        expect(positions.at(-1)).toBe(beam.length);
        for (const { x, shear, moment, slope, deflection } of stationsAt(solveBeam(beam), positions)) {
          for (const value of [x, ...shear, ...moment, ...slope, deflection]) {
            expect(Number.isFinite(value) && !Object.is(value, -0)).toBe(true);
          }
        }
      }),
      RUNS,
    );
  });
});
