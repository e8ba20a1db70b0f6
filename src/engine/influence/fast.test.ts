import { describe, expect, test } from 'vitest';
import { type BeamDocument, readBeam } from '../model/index';
import { evaluate } from '../polynomial/index';
import { isProven } from '../proof/index';
import { fastSolver, type InfluenceQuantity, influenceLine } from './index';

function beamOf(document: BeamDocument) {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return reading.value;
}

const L = 6;
const supports = [0, L, 2 * L].map((at) => ({ at, kind: 'roller' as const }));
const twoSpans = beamOf({ length: 2 * L, ei: 2e7, supports });
/** Steps of EI a hair beside the supports: stiffness in doubles keeps few digits of pieces so short. */
const stepped = beamOf({
  length: 2 * L,
  supports,
  segments: [0, 1e-7, L, L + 1e-7].map((from, k, all) => ({ from, to: all[k + 1] ?? 2 * L, ei: 2e7 })),
});
const hinged = beamOf({ length: 2 * L, ei: 2e7, supports, hinges: [4] });
const middle: InfluenceQuantity = { kind: 'reaction', support: 1, component: 'vertical' };
/** R = (3 ξ − ξ³)/2 for a force at ξ L from an outer support, from the three-moment equation. */
const middleReaction = (x: number) => (3 * (x / L) - (x / L) ** 3) / 2;

describe('fastSolver', () => {
  test.each([
    ['a beam of two spans', twoSpans],
    ['the same with points that lie close together', stepped],
  ])('gives the middle reaction of %s, proven', (_, beam) => {
    const { line, proof } = influenceLine(beam, middle, undefined, fastSolver());
    for (const x of [0.5, 2, 3.7, 6]) expect(evaluate(line, x)[0]).toBeCloseTo(middleReaction(x), 9);
    expect(isProven(proof, beam)).toBe(true);
  });

  test('solves a hinged beam in 32 digits: to the last digit what those give', () => {
    const { line } = influenceLine(hinged, middle, undefined, fastSolver());
    expect(line).toEqual(influenceLine(hinged, middle).line);
    // Statics alone: half of a force at 2 comes to the hinge, and 8/6 of that to the support.
    expect(evaluate(line, 2)[0]).toBeCloseTo((1 / 2) * (8 / 6), 12);
  });

  test('goes from one line to the next in the same memory', () => {
    const solve = fastSolver();
    const first = influenceLine(twoSpans, middle, undefined, solve);
    influenceLine(twoSpans, { kind: 'moment', at: 3, side: 'left' }, undefined, solve);
    expect(influenceLine(twoSpans, middle, undefined, solve)).toEqual(first);
  });
});
