import { describe, expect, test } from 'vitest';
import { prepareBeam } from '../beam/index';
import { type Beam, type BeamDocument, readBeam } from '../model/index';
import { prepareFast } from './index';

function beamOf(document: BeamDocument): Beam {
  const reading = readBeam({ horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

const LOADS: BeamDocument['loads'] = [
  { kind: 'point', at: 2, p: 3000 },
  { kind: 'line', from: 0, to: 10, w0: 500, w1: 800 },
];
const PROPPED = beamOf({
  length: 10,
  ei: 1e7,
  supports: [
    { at: 0, kind: 'fixed' },
    { at: 6, kind: 'roller', rise: -0.01 },
    { at: 10, kind: 'roller' },
  ],
  loads: LOADS,
});

/** A column of springs under a beam ten thousand million times stiffer: stiffness in doubles keeps few of its digits. */
const STIFF = beamOf({
  length: 10,
  ei: 1e15,
  supports: [0, 3, 7, 10].map((at) => ({ at, kind: 'free', kv: 1e3 }) as const),
  loads: LOADS,
});

describe('prepareFast', () => {
  test('a continuous beam that proves itself is solved in doubles, as 32 digits would solve it', () => {
    const { by, reactions, diagrams, extremes } = prepareFast(PROPPED).solve();
    const wide = prepareBeam(PROPPED).solve();
    expect(by).toBe('doubles');
    reactions.forEach(({ at, vertical, moment }, i) => {
      expect(at).toBe(wide.reactions[i]!.at);
      expect(vertical).toBeCloseTo(wide.reactions[i]!.vertical, 8);
      expect(moment).toBeCloseTo(wide.reactions[i]!.moment, 8);
    });
    expect([...diagrams.moment.breaks]).toEqual([...wide.diagrams.moment.breaks]);
    expect(extremes.moment.max.value).toBeCloseTo(wide.extremes.moment.max.value, 8);
    expect(extremes.deflection.min.at).toHaveLength(1);
  });

  test('a hinged beam is solved with 32 digits', () => {
    const hinged = { ...PROPPED, hinges: [3], degree: 1 };
    const { by, reactions } = prepareFast(hinged).solve();
    expect(by).toBe('wide');
    expect(reactions).toEqual(prepareBeam(hinged).solve().reactions);
  });

  test('a beam that doubles do not prove is solved with 32 digits, unless nobody asks for the proof', () => {
    const fast = prepareFast(STIFF);
    expect(fast.solve().by).toBe('wide');
    expect(fast.solve().reactions).toEqual(prepareBeam(STIFF).solve().reactions);
    expect(fast.solve(STIFF.loads, { check: false }).by).toBe('doubles');
  });

  test('loads and movements as of prepareBeam, by either solver', () => {
    for (const beam of [PROPPED, { ...PROPPED, hinges: [3], degree: 1 }]) {
      const fast = prepareFast(beam);
      expect(fast.beam).toBe(beam);
      const { reactions } = fast.solve(beam.loads.slice(0, 1), { movements: false });
      const wide = prepareBeam(beam).solve(beam.loads.slice(0, 1), { movements: false });
      reactions.forEach(({ vertical }, i) => {
        expect(vertical).toBeCloseTo(wide.reactions[i]!.vertical, 8);
      });
      expect(Math.abs(reactions[1]!.vertical - fast.solve().reactions[1]!.vertical)).toBeGreaterThan(1);
    }
  });
});
