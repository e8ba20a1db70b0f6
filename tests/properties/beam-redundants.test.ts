import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { forceMethod, releasedBeam, solveBeam } from '@/engine/beam/index';
import { type Beam, checkRedundants, defaultRedundants, type Redundant } from '@/engine/model/index';
import { evaluate, integralOfProduct, magnitude, type Piecewise, piecewise } from '@/engine/polynomial/index';
import { expectSame, indeterminateBeam, randomRedundants, runs } from '../support/stable-beam';

const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
const RUNS = runs(100);

/** 1/EI or 1/GA along the beam. */
const flexibilityOf = (beam: Beam, stiffness: 'ei' | 'ga'): Piecewise =>
  piecewise(
    [0, ...beam.segments.map(({ to }) => to)],
    beam.segments.map((segment) => [segment[stiffness] === null ? 0 : 1 / segment[stiffness]!]),
  );

/** Σ r_i r_j/k of every spring, released or not. */
function springWork(beam: Beam, a: { vertical: number; moment: number }[], b: typeof a): number {
  return beam.supports.reduce((total, { vertical, rotation }, s) => {
    const up = vertical.kind === 'spring' ? (a[s]!.vertical * b[s]!.vertical) / vertical.stiffness : 0;
    const turn = rotation.kind === 'spring' ? (a[s]!.moment * b[s]!.moment) / rotation.stiffness : 0;
    return total + up + turn;
  }, 0);
}

const standsFor = (redundant: Redundant, solution: ReturnType<typeof solveBeam>): number => {
  if (redundant.component === 'moment') return evaluate(solution.diagrams.moment, redundant.at)[0];
  const { vertical, moment } = solution.reactions[redundant.support]!;
  return redundant.component === 'vertical' ? vertical : moment;
};

describe('any admissible redundants', { timeout: 60_000 }, () => {
  test('give the same answer', () => {
    fc.assert(
      fc.property(indeterminateBeam, fc.nat(), ({ beam }, seed) => {
        const set = randomRedundants(beam, seed);
        expect(checkRedundants(beam, set)).toEqual([]);
        const [usual, chosen] = [solveBeam(beam), solveBeam(beam, set)];
        for (const quantity of QUANTITIES)
          expectSame(chosen.diagrams[quantity], usual.diagrams[quantity], 1e-12);
      }),
      RUNS,
    );
  });

  test('are the reactions and moments of the beam that they stand for', () => {
    fc.assert(
      fc.property(indeterminateBeam, fc.nat(), ({ beam }, seed) => {
        const set = randomRedundants(beam, seed);
        const solution = solveBeam(beam, set);
        solution.forceMethod.values.forEach((value, i) => {
          const largest =
            set[i]!.component === 'vertical'
              ? magnitude(solution.diagrams.shear)
              : magnitude(solution.diagrams.moment);
          const reactions = solution.reactions.map((r) =>
            Math.abs(set[i]!.component === 'vertical' ? r.vertical : r.moment),
          );
          const size = Math.max(largest, ...reactions);
          expect(Math.abs(value - standsFor(set[i]!, solution))).toBeLessThanOrEqual(1e-9 * size);
        });
      }),
      RUNS,
    );
  });

  test('close their gaps: F·X + Δ₀ is the prescribed movement', () => {
    fc.assert(
      fc.property(indeterminateBeam, fc.nat(), ({ beam }, seed) => {
        const { flexibility, gaps, imposed, values } = forceMethod(beam, randomRedundants(beam, seed));
        const largest = Math.max(...values.map(Math.abs));
        flexibility.forEach((row, i) => {
          const terms = [...row.map((f, j) => f * values[j]!), gaps[i]!, -imposed[i]!];
          const sum = terms.reduce((total, term) => total + term, 0);
          // Where nothing but rounding is in the row, 1e-22 of what could be.
          const size = 1e-13 * Math.max(...terms.map(Math.abs)) + 1e-22 * row[i]! * largest;
          expect(Math.abs(sum)).toBeLessThanOrEqual(size * terms.length);
        });
      }),
      RUNS,
    );
  });
});

describe('the flexibility matrix', { timeout: 60_000 }, () => {
  test('is symmetric to the last bit, and positive definite with a positive diagonal', () => {
    fc.assert(
      fc.property(
        indeterminateBeam,
        fc.infiniteStream(fc.integer({ min: -9, max: 9 })),
        ({ beam }, stream) => {
          const { flexibility } = forceMethod(beam);
          const x = flexibility.map((row, i) => stream.next().value! / Math.sqrt(row[i]!));
          const energy = flexibility.reduce(
            (total, row, i) => total + row.reduce((t, f, j) => t + f * x[i]! * x[j]!, 0),
            0,
          );
          flexibility.forEach((row, i) => {
            expect(row[i]).toBeGreaterThan(0);
            row.forEach((f, j) => {
              expect(f).toBe(flexibility[j]![i]);
            });
          });
          if (x.some((value) => value !== 0)) expect(energy).toBeGreaterThan(0);
        },
      ),
      RUNS,
    );
  });

  test('is ∫ m_i m_j/EI + ∫ v_i v_j/GA + Σ r_i r_j/k of the unit diagrams', () => {
    fc.assert(
      fc.property(indeterminateBeam, fc.nat(), ({ beam }, seed) => {
        const { flexibility, units } = forceMethod(beam, randomRedundants(beam, seed));
        const [bending, shearing] = [flexibilityOf(beam, 'ei'), flexibilityOf(beam, 'ga')];
        const bent = units.map(({ diagrams }) => multiplied(diagrams.moment, bending));
        const sheared = units.map(({ diagrams }) => multiplied(diagrams.shear, shearing));
        units.forEach((a, i) => {
          units.slice(0, i + 1).forEach((b, j) => {
            const work =
              integralOfProduct(a.diagrams.moment, bent[j]!) +
              integralOfProduct(a.diagrams.shear, sheared[j]!) +
              springWork(beam, a.reactions, b.reactions);
            const size = Math.sqrt(flexibility[i]![i]! * flexibility[j]![j]!);
            expect(Math.abs(work - flexibility[i]![j]!)).toBeLessThanOrEqual(1e-9 * size);
          });
        });
      }),
      runs(30),
    );
  });
});

describe('the released beam', { timeout: 60_000 }, () => {
  test('is determinate, and the loads on it are the first step of the method', () => {
    fc.assert(
      fc.property(indeterminateBeam, fc.nat(), ({ beam }, seed) => {
        const set = randomRedundants(beam, seed);
        const { released, loads } = forceMethod(beam, set);
        const alone = solveBeam(released);
        expect(released).toEqual(releasedBeam(beam, set));
        expect(alone.degree).toBe(0);
        expect(alone.forceMethod).toMatchObject({
          redundants: [],
          eligible: [],
          flexibility: [],
          gaps: [],
          values: [],
        });
        for (const quantity of QUANTITIES) expectSame(alone.diagrams[quantity], loads.diagrams[quantity]);
      }),
      RUNS,
    );
  });

  test('under a unit redundant moves by the flexibility at every redundant', () => {
    fc.assert(
      fc.property(indeterminateBeam, ({ beam }) => {
        const { redundants, units, flexibility } = forceMethod(beam, defaultRedundants(beam));
        units.forEach(({ diagrams }, j) => {
          redundants.forEach((redundant, i) => {
            const spring =
              redundant.component === 'vertical' &&
              beam.supports[redundant.support]!.vertical.kind === 'spring';
            if (redundant.component !== 'vertical' || (spring && i === j)) return;
            const moved = evaluate(diagrams.deflection, beam.supports[redundant.support]!.at)[0];
            const size = Math.max(magnitude(diagrams.deflection), Math.abs(flexibility[i]![j]!));
            expect(Math.abs(moved - flexibility[i]![j]!)).toBeLessThanOrEqual(1e-9 * size);
          });
        });
      }),
      RUNS,
    );
  });
});

function multiplied(p: Piecewise, constant: Piecewise): Piecewise {
  const breaks = [...new Set([...p.breaks, ...constant.breaks])].sort((a, b) => a - b);
  // Unit diagrams have the segments' ends among their breaks.
  expect(breaks).toHaveLength(p.breaks.length);
  const coefficients = p.coefficients.map((c, i) => {
    const k = Math.floor(i / (p.degree + 1));
    return c * evaluate(constant, p.breaks[k]!)[1];
  });
  return { ...p, coefficients };
}
