import { describe, expect, test } from 'vitest';
import { solveBeam } from '../beam/index';
import {
  type BeamDocument,
  checkRedundants,
  MOST_REACHING,
  readBeam,
  type SupportDocument,
} from '../model/index';
import { isProven, proveSolution } from './index';

const SPAN = 3; // m
const LOAD = 5000; // N/m

/** `count` equal spans under a uniform load, on supports of one kind; the first is what holds the beam sideways. */
function spans(count: number, kind: Omit<SupportDocument, 'at'>, more: Partial<BeamDocument> = {}) {
  const length = SPAN * count;
  const supports = Array.from({ length: count + 1 }, (_, i) => ({ at: SPAN * i, ...kind }));
  const loads = [{ kind: 'line' as const, from: 0, to: length, w0: LOAD, w1: LOAD }];
  const reading = readBeam({ length, ei: 2e7, horizontal: 'ignore', supports, loads, ...more });
  if (!reading.ok) throw new Error(reading.faults[0]!.message);
  return reading.value;
}

const hinges = (count: number, at: number) => Array.from({ length: count }, (_, i) => SPAN * i + at);

/** A bound on the entries of a row whose redundants bend only what is beside them, springs included. */
const BAND = 9;

describe('a beam of more redundants than may reach over all of it', () => {
  test.each([
    ['fixed supports', spans(70, { kind: 'fixed' })],
    ['fixed supports with a hinge in each span', spans(150, { kind: 'fixed' }, { hinges: hinges(150, 0.5) })],
    ['guided supports', spans(150, { kind: 'guided' }, { supports: guidedFrom(150) })],
    ['springs against movement and rotation', spans(70, { kind: 'free', kv: 1e6, kr: 1e5 })],
    ['rollers', spans(150, { kind: 'roller' })],
  ])('on %s is released near to where each acts, and proven', (_, beam) => {
    expect(beam.degree).toBeGreaterThan(MOST_REACHING);
    const solution = solveBeam(beam);
    const { redundants, flexibility } = solution.forceMethod;
    expect(checkRedundants(beam, redundants)).toEqual([]);
    for (const row of flexibility)
      expect(row.filter((entry) => entry !== 0).length).toBeLessThanOrEqual(BAND);
    expect(isProven(proveSolution(beam, solution), beam)).toBe(true);
  });

  // Each span is held at both ends: M = −wL²/12 there and wL²/24 in the middle, and two half spans rest on a support.
  // S. Timoshenko, Strength of Materials, part I, on beams with built-in ends (from memory).
  test('is held at every fixed support as a beam of one span is', () => {
    const { reactions, extremes } = solveBeam(spans(399, { kind: 'fixed' }));
    expect(extremes.moment.min.value).toBeCloseTo((-LOAD * SPAN ** 2) / 12, 9);
    expect(extremes.moment.max.value).toBeCloseTo((LOAD * SPAN ** 2) / 24, 9);
    expect(reactions[200]!.vertical).toBeCloseTo(LOAD * SPAN, 9);
    expect(reactions[200]!.moment).toBeCloseTo(0, 9);
    expect(reactions[0]!.moment).toBeCloseTo((LOAD * SPAN ** 2) / 12, 9);
  });

  test('is released by its reactions while it has no more than may reach', () => {
    const beam = spans(60, { kind: 'fixed' });
    expect(beam.degree).toBe(MOST_REACHING);
    expect(solveBeam(beam).forceMethod.redundants.every((r) => r.component !== 'moment')).toBe(true);
  });
});

/** One fixed support, since guided ones alone let the beam slide. */
function guidedFrom(count: number): SupportDocument[] {
  return Array.from({ length: count + 1 }, (_, i) => ({ at: SPAN * i, kind: i === 0 ? 'fixed' : 'guided' }));
}
