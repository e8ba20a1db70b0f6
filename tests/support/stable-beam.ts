import fc from 'fast-check';
import { expect } from 'vitest';
import {
  type Beam,
  type BeamDocument,
  eligibleRedundants,
  findMotion,
  frameOf,
  type Redundant,
  readBeam,
} from '@/engine/model/index';
import { evaluate, magnitude, type Piecewise } from '@/engine/polynomial/index';
import { dice } from './random';
import { randomBeam } from './random-beam';

export type StableBeam = { seed: number; document: BeamDocument; beam: Beam };

export function stableBeam(document: BeamDocument): Beam {
  const reading = readBeam(document);
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

/** The first stable beam of the seeded series from `seed` on. */
function fromSeed(first: number): StableBeam {
  for (let seed = first; ; seed++) {
    const document = randomBeam(seed);
    const reading = readBeam(document);
    if (reading.ok) return { seed, document, beam: reading.value };
  }
}

/** Any stable beam: 1 to 12 spans, any support, spring, movement, hinge, step and load, degenerate positions included. */
export const anyBeam: fc.Arbitrary<StableBeam> = fc.integer({ min: 1, max: 1_000_000 }).map(fromSeed);

/** The same, statically indeterminate. */
export const indeterminateBeam = anyBeam.filter(({ beam }) => beam.degree > 0);

/** An admissible set of redundants drawn from all eligible ones, in no order. */
export function randomRedundants(beam: Beam, seed: number): Redundant[] {
  const roll = dice(seed);
  const drawn = eligibleRedundants(beam)
    .map((redundant) => ({ redundant, order: roll.between(0, 1) }))
    .sort((a, b) => a.order - b.order);
  const set: Redundant[] = [];
  for (const { redundant } of drawn) {
    if (set.length < beam.degree && !findMotion(frameOf(beam, [...set, redundant]))) set.push(redundant);
  }
  return set;
}

/** Both diagrams have the same values, on both sides, at and between the breaks, within `limit` of the largest. */
export function expectSame(actual: Piecewise, expected: Piecewise, limit = 1e-9): void {
  const largest = Math.max(magnitude(expected), magnitude(actual));
  const differences = samplesOf(expected).flatMap((x) => {
    const [got, wanted] = [evaluate(actual, x), evaluate(expected, x)];
    return [Math.abs(got[0] - wanted[0]), Math.abs(got[1] - wanted[1])];
  });
  expect(Math.max(...differences)).toBeLessThanOrEqual(limit * largest);
}

/** Every break, and places between them. */
export function samplesOf({ breaks }: Piecewise): number[] {
  const between = Array.from(breaks.subarray(1), (to, k) => {
    const from = breaks[k]!;
    return [0.137, 0.5, 0.863].map((t) => from + t * (to - from));
  });
  return [...breaks, ...between.flat()];
}

/** What every property runs with: the same beams each time. */
export const runs = (numRuns: number) => ({ numRuns, seed: 1 });
