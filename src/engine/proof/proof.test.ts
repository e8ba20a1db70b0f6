import { describe, expect, test } from 'vitest';
import { type Solution, solveBeam } from '../beam/index';
import { type Beam, type BeamDocument, readBeam } from '../model/index';
import { scale } from '../polynomial/index';
import { isProven, proofLimit, proveSolution } from './index';

function read(document: BeamDocument): Beam {
  const reading = readBeam(document);
  if (!reading.ok) throw new Error(JSON.stringify(reading.faults));
  return reading.value;
}

const propped = read({
  length: 7.8,
  ei: 9.963e6,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 6, kind: 'roller' },
  ],
  loads: [
    { kind: 'line', from: 0, to: 7.8, w0: 5517, w1: 5517 },
    { kind: 'point', at: 7.8, p: 6000 },
  ],
});
const solution = solveBeam(propped);

describe('proveSolution', () => {
  test('proves the propped cantilever to rounding', () => {
    const proof = proveSolution(propped, solution);
    expect(proof.method).toBe('direct stiffness');
    expect(Math.max(proof.equilibrium, proof.compatibility, proof.agreement)).toBeLessThan(1e-13);
    expect(isProven(proof, propped)).toBe(true);
  });

  const { diagrams, reactions } = solution;
  const faults: [string, Solution, 'equilibrium' | 'compatibility' | 'agreement'][] = [
    [
      'a reaction a millionth off',
      { ...solution, reactions: reactions.map((r) => ({ ...r, vertical: r.vertical * (1 + 1e-6) })) },
      'equilibrium',
    ],
    [
      'a fixing moment with the wrong sense',
      { ...solution, reactions: reactions.map((r) => ({ ...r, moment: -r.moment })) },
      'equilibrium',
    ],
    [
      'a deflected shape turned by a millionth',
      { ...solution, diagrams: { ...diagrams, deflection: scale(diagrams.deflection, 1 + 1e-6) } },
      'agreement',
    ],
    [
      'a slope of another beam',
      { ...solution, diagrams: { ...diagrams, slope: scale(diagrams.slope, -1) } },
      'agreement',
    ],
    [
      'a shear diagram of nothing',
      { ...solution, diagrams: { ...diagrams, shear: scale(diagrams.shear, 0) } },
      'agreement',
    ],
    [
      'a diagram that is not a number',
      { ...solution, diagrams: { ...diagrams, moment: scale(diagrams.moment, Number.NaN) } },
      'agreement',
    ],
  ];
  test.each(faults)('finds %s', (_, wrong, kind) => {
    const proof = proveSolution(propped, wrong);
    expect(proof[kind]).not.toBeLessThanOrEqual(1e-7);
    expect(isProven(proof, propped)).toBe(false);
  });

  test('finds a prop that was left where it settled, though the beam is in equilibrium', () => {
    const settled: Beam = {
      ...propped,
      supports: propped.supports.map((s, k) =>
        k === 1 ? { ...s, vertical: { kind: 'rigid', movement: -0.01 } } : s,
      ),
    };
    const proof = proveSolution(settled, solution);
    expect(proof.equilibrium).toBeLessThan(1e-13);
    expect(proof.compatibility).toBeGreaterThan(0.1);
  });

  test('finds a spring whose force does not fit its movement', () => {
    const sprung: Beam = {
      ...propped,
      supports: propped.supports.map((s, k) =>
        k === 1 ? { ...s, vertical: { kind: 'spring', stiffness: 1e7, movement: 0 } } : s,
      ),
    };
    expect(proveSolution(sprung, solution).compatibility).toBeGreaterThan(0.1);
    expect(isProven(proveSolution(sprung, solveBeam(sprung)), sprung)).toBe(true);
  });

  test('finds a moment carried through a hinge', () => {
    const document: BeamDocument = {
      length: 8,
      ei: 1e7,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 8, kind: 'pin' },
      ],
      loads: [{ kind: 'point', at: 6, p: 1000 }],
    };
    const hinged = read({ ...document, hinges: [4] });
    expect(proveSolution(hinged, solveBeam(read(document))).equilibrium).toBeGreaterThan(0.1);
  });
});

describe('where there is nothing to compare with', () => {
  const supports: BeamDocument['supports'] = [
    { at: 0, kind: 'pin' },
    { at: 3, kind: 'roller' },
    { at: 6, kind: 'roller' },
  ];
  const cases: [string, Partial<BeamDocument>][] = [
    ['no load at all', {}],
    ['a zero load', { loads: [{ kind: 'point', at: 1, p: 0 }] }],
    ['a load that stands on a support', { loads: [{ kind: 'point', at: 3, p: 5000 }] }],
    ['supports that settle together', { supports: supports.map((s) => ({ ...s, rise: -0.013 })) }],
    ['supports that settle on a line', { supports: supports.map((s) => ({ ...s, rise: -0.0041 * s.at })) }],
    [
      'a couple on a fixed end',
      { supports: [{ at: 0, kind: 'fixed' }, supports[2]!], loads: [{ kind: 'couple', at: 0, m: 700 }] },
    ],
    [
      'a free curvature of a simple span',
      { supports: [supports[0]!, supports[2]!], loads: [{ kind: 'curvature', from: 1, to: 4, kappa: 1e-3 }] },
    ],
    [
      'a free curvature of no length, beside a load',
      {
        loads: [
          { kind: 'curvature', from: 2, to: 2, kappa: 1e9 },
          { kind: 'point', at: 1, p: 3 },
        ],
      },
    ],
  ];
  test.each(cases)('%s is proven', (_, more) => {
    const beam = read({ length: 6, ei: 1e7, supports, ...more });
    expect(proveSolution(beam, solveBeam(beam))).toSatisfy((proof: ReturnType<typeof proveSolution>) =>
      isProven(proof, beam),
    );
  });
});

describe('proofLimit', () => {
  const beamWith = (at: number) =>
    read({ length: 10, ei: 1, supports: [{ at: 0, kind: 'fixed' }], loads: [{ kind: 'point', at, p: 1 }] });

  test('is 1e-9 while no two points are closer than 1e-4 of the length', () => {
    expect(proofLimit(beamWith(1e-3))).toBe(1e-9);
  });

  test('is 1e-6 below that', () => {
    expect(proofLimit(beamWith(0.9e-3))).toBe(1e-6);
  });
});
