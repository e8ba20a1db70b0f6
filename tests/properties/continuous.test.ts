import { describe, expect, test } from 'vitest';
import { type Diagrams, type Solution, solveBeam } from '@/engine/beam/index';
import { ContinuousBeam, continuousBeam } from '@/engine/continuous/index';
import { type Beam, type Load, readBeam } from '@/engine/model/index';
import { evaluate, extremes, magnitude } from '@/engine/polynomial/index';
import { isProven, proofLimit, proveSolution } from '@/engine/proof/index';
import { dice } from '../support/random';
import { randomBeam } from '../support/random-beam';
import { samplesOf, stableBeam } from '../support/stable-beam';

const BEAMS = 2000;
const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;

type Sample = { seed: number; beam: Beam; wide: Solution };

/** Random beams without their hinges, as far as they are continuous ones, with the solution of 32 digits. */
function* continuousBeams(count: number, from = 1): Generator<Sample> {
  for (let seed = from, found = 0; found < count; seed++) {
    const reading = readBeam({ ...randomBeam(seed), hinges: [] });
    if (!reading.ok || !continuousBeam(reading.value)) continue;
    found++;
    yield { seed, beam: reading.value, wide: solveBeam(reading.value) };
  }
}

/** 13 to 40 spans on rollers, every one under a uniform load of its own, in a third of the beams with one EI and span. */
function longBeam(seed: number): Beam {
  const roll = dice(seed);
  const [even, shears] = [roll.chance(0.3), roll.chance(0.2)];
  const at = [0];
  for (let k = roll.whole(13, 40); k > 0; k--) at.push(at.at(-1)! + (even ? 5 : roll.logBetween(2, 9)));
  const upward = roll.pick([0, 0.2, 1]);
  const loads = at.slice(1).flatMap((to, k): Load[] => {
    const w = (roll.chance(upward) ? -1 : 1) * (even ? 1000 : roll.logBetween(100, 5000));
    return roll.chance(0.2) ? [] : [{ kind: 'line', from: at[k]!, to, w0: w, w1: w }];
  });
  const supports = at.map((x) => ({ at: x, kind: 'roller' }) as const);
  const length = at.at(-1)!;
  return stableBeam({ length, ei: 1e7, ga: shears ? 5e6 : null, supports, loads, horizontal: 'ignore' });
}

/** Largest difference of two diagrams, at and between the breaks, beside the largest value. */
function difference(got: Diagrams, want: Diagrams, quantity: (typeof QUANTITIES)[number]): number {
  const largest = magnitude(want[quantity]);
  if (largest === 0) return 0; // a beam that moves as a whole: its proof measures against natural sizes
  const differences = samplesOf(want[quantity]).flatMap((x) => {
    const [a, b] = [evaluate(got[quantity], x), evaluate(want[quantity], x)];
    return [Math.abs(a[0] - b[0]), Math.abs(a[1] - b[1])];
  });
  return Math.max(...differences) / largest;
}

describe(`${BEAMS} random continuous beams in plain doubles`, () => {
  test('agree with 32 digits and with their stiffness, and prove themselves or say that they cannot', {
    timeout: 300_000,
  }, () => {
    const solver = new ContinuousBeam();
    let worst = 0;
    let unproven = 0;
    const beyond: string[] = [];
    for (const { seed, beam, wide } of continuousBeams(BEAMS)) {
      expect(solver.take(beam)).toBe(true);
      solver.solve();
      const [diagrams, reactions] = [solver.diagrams(), solver.reactions()];
      const limit = proofLimit(beam);
      for (const quantity of QUANTITIES) {
        const off = difference(diagrams, wide.diagrams, quantity);
        worst = Math.max(worst, off);
        if (!(off <= limit)) beyond.push(`seed ${seed}: ${quantity} ${off}`);
      }
      const proof = proveSolution(beam, { ...wide, diagrams, reactions });
      if (!isProven(proof, beam)) beyond.push(`seed ${seed}: ${JSON.stringify(proof)}`);
      if (!solver.isProven()) unproven++;
    }
    console.info(`worst of ${BEAMS}: ${worst.toExponential(1)}; not proven in doubles: ${unproven}`);
    expect(beyond).toEqual([]);
    expect(unproven).toBeLessThan(0.02 * BEAMS);
  });

  test('have the extremes that their diagrams have', { timeout: 120_000 }, () => {
    const wrong: string[] = [];
    for (const { seed, beam, wide } of continuousBeams(700)) {
      const solver = continuousBeam(beam)!;
      solver.solve();
      const diagrams = solver.diagrams();
      for (const quantity of QUANTITIES) {
        const [own, diagram] = [extremes(diagrams[quantity]), diagrams[quantity]];
        const { max, maxAt, min, minAt } = solver.extremes()[quantity];
        const tolerance = 2e-13 * magnitude(diagram); // of what counts as rounding in polynomial/extremes
        const attained = (x: number, value: number) =>
          Math.min(...evaluate(diagram, x).map((there) => Math.abs(there - value)));
        const off = [
          Math.abs(max - own.max.value),
          Math.abs(min - own.min.value),
          attained(maxAt, max),
          attained(minAt, min),
        ];
        const most = 1e-9 * magnitude(wide.diagrams[quantity]) + tolerance;
        off.push(Math.abs(max - wide.extremes[quantity].max.value) > most ? Infinity : 0);
        if (!(Math.max(...off) <= tolerance)) wrong.push(`seed ${seed}: ${quantity} ${off}`);
      }
    }
    expect(wrong).toEqual([]);
  });

  test('have them also where there are many spans, loaded down, up and not at all', {
    timeout: 60_000,
  }, () => {
    const solver = new ContinuousBeam();
    for (let seed = 1; seed <= 250; seed++) {
      expect(solver.take(longBeam(seed))).toBe(true);
      solver.solve();
      const diagrams = solver.diagrams();
      for (const quantity of QUANTITIES) {
        const { max, min } = extremes(diagrams[quantity]);
        const own = solver.extremes()[quantity];
        const tolerance = 2e-13 * magnitude(diagrams[quantity]);
        expect(Math.abs(own.max - max.value), `seed ${seed}: ${quantity}`).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(own.min - min.value), `seed ${seed}: ${quantity}`).toBeLessThanOrEqual(tolerance);
      }
    }
  });

  test('read the same at stations, left and right, as from their diagrams', { timeout: 60_000 }, () => {
    for (const { seed, beam } of continuousBeams(200)) {
      const solver = continuousBeam(beam)!;
      solver.solve();
      const diagrams = solver.diagrams();
      const roll = dice(seed);
      const points = [
        ...diagrams.shear.breaks,
        ...Array.from({ length: 9 }, () => roll.between(0, beam.length)),
      ];
      const positions = points.sort((a, b) => a - b);
      for (const [side, which] of [
        ['left', 0],
        ['right', 1],
      ] as const) {
        const values = solver.stations(positions, side);
        for (const quantity of QUANTITIES) {
          const largest = magnitude(diagrams[quantity]);
          positions.forEach((x, i) => {
            const off = Math.abs(values[quantity][i]! - evaluate(diagrams[quantity], x)[which]);
            expect(off, `seed ${seed}: ${quantity} ${side} of ${x}`).toBeLessThanOrEqual(1e-12 * largest);
          });
        }
      }
    }
  });

  test('are the same to the last bit in memory that other beams have used', () => {
    const used = new ContinuousBeam();
    for (const { beam } of continuousBeams(300)) {
      const fresh = continuousBeam(beam)!;
      fresh.solve();
      used.take(beam);
      used.solve();
      expect(used.diagrams()).toEqual(fresh.diagrams());
      expect(used.reactions()).toEqual(fresh.reactions());
      expect(used.prove()).toMatchObject({ ...fresh.prove(), check: expect.anything() });
    }
  });

  test('superpose: each load alone, and the movements alone, add up to all of it', {
    timeout: 60_000,
  }, () => {
    for (const { beam } of continuousBeams(200)) {
      const solver = continuousBeam(beam)!;
      const total = solved(solver, beam.loads, true);
      const parts = [solved(solver, [], true), ...beam.loads.map((load) => solved(solver, [load], false))];
      for (const quantity of QUANTITIES) {
        const { coefficients } = total[quantity];
        const scale = Math.max(...parts.map((part) => magnitude(part[quantity])));
        const sum = {
          ...total[quantity],
          coefficients: coefficients.map((_, i) => sumOf(parts, quantity, i)),
        };
        const off = samplesOf(sum).map((x) => evaluate(sum, x)[1] - evaluate(total[quantity], x)[1]);
        expect(Math.max(...off.map(Math.abs))).toBeLessThanOrEqual(1e-11 * scale);
      }
    }
  });
});

const sumOf = (parts: readonly Diagrams[], quantity: (typeof QUANTITIES)[number], i: number): number =>
  parts.reduce((sum, part) => sum + part[quantity].coefficients[i]!, 0);

function solved(solver: ContinuousBeam, loads: readonly Load[], movements: boolean): Diagrams {
  solver.solve(loads, { movements });
  return solver.diagrams();
}
