import { describe, expect, test } from 'vitest';
import { solveBeam } from '@/engine/beam/index';
import { isProven, proveSolution } from '@/engine/proof/index';
import { featuresOf } from '../support/beam-features';
import { differences, exactBeams, fromRational, kindsOf } from '../support/exact-beams';
import { stableBeam } from '../support/stable-beam';

/** Of the largest value of each kind; forces and moments beside the reactions as well as the diagrams. */
const WITHIN = 1e-9;
const beams = exactBeams();

describe('beams solved as rationals by sympy', () => {
  test.each(beams)('$name', ({ document, positions, exact }) => {
    const beam = stableBeam(document);
    const solution = solveBeam(beam);
    expect(isProven(proveSolution(beam, solution), beam)).toBe(true);
    for (const [kind, apart] of Object.entries(differences(kindsOf(solution, positions), exact))) {
      expect(Math.max(...apart), kind).toBeLessThanOrEqual(WITHIN);
    }
  });

  test('are 66, and hold every kind of support, load and step', () => {
    expect(beams).toHaveLength(66);
    const held = new Set(beams.flatMap(({ document }) => featuresOf(document)));
    for (const feature of [
      'support: fixed',
      'support: pin',
      'support: roller',
      'support: guided',
      'support: free',
      'spring against movement',
      'spring against rotation',
      'prescribed rise',
      'prescribed rotation',
      'rise of a spring’s ground',
      'rotation of a spring’s ground',
      'hinge',
      'hinges: several',
      'load: point',
      'load: couple',
      'load: curvature',
      'load: uniform',
      'load: triangular',
      'load: trapezoidal',
      'overhang at the left',
      'overhang at the right',
      'cantilever',
      'point at a hinge',
      'couple on a support',
      'couple at an end of the beam',
    ])
      expect([...held]).toContain(feature);
    const segments = beams.flatMap(({ document }) => document.segments ?? []);
    expect(segments.some(({ ga }) => ga != null)).toBe(true);
    expect(beams.some(({ document }) => (document.segments ?? []).length > 2)).toBe(true);
  });

  test('are read from their rationals as the nearest doubles', () => {
    expect(fromRational('1/3')).toBe(1 / 3);
    expect(fromRational('-39/5')).toBe(-7.8);
    expect(fromRational(`${10n ** 30n}/${3n * 10n ** 29n}`)).toBe(10 / 3);
  });
});
