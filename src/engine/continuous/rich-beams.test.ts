import { describe, expect, test } from 'vitest';
import { solveBeam } from '../beam/index';
import { type Beam, type BeamDocument, type Load, readBeam, type SupportDocument } from '../model/index';
import { evaluate, extremes, magnitude } from '../polynomial/index';
import { ContinuousBeam } from './index';

const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;

/** Loads of every kind, that rise and fall, on spans and overhangs, over supports and steps, on parts and at ends. */
const LOADS: Load[] = [
  { kind: 'line', from: 0, to: 3.5, w0: 4000, w1: 9000 },
  { kind: 'line', from: 4, to: 14, w0: 6000, w1: -2000 },
  { kind: 'line', from: 12.5, to: 14, w0: 1000, w1: 1000 },
  { kind: 'point', at: 0, p: 1500 },
  { kind: 'point', at: 0.6, p: 900 },
  { kind: 'point', at: 5, p: 8000 },
  { kind: 'point', at: 8, p: -7000 },
  { kind: 'point', at: 13.5, p: 2000 },
  { kind: 'point', at: 14, p: 800 },
  { kind: 'couple', at: 0, m: 700 },
  { kind: 'couple', at: 0.3, m: -500 },
  { kind: 'couple', at: 1, m: 2100 },
  { kind: 'couple', at: 3, m: 2500 },
  { kind: 'couple', at: 5, m: -900 },
  { kind: 'couple', at: 10, m: 1300 },
  { kind: 'couple', at: 13, m: -1700 },
  { kind: 'couple', at: 14, m: 400 },
  { kind: 'curvature', from: 0.5, to: 4, kappa: 2e-4 },
  { kind: 'curvature', from: 7, to: 14, kappa: -3e-4 },
];
const STEPPED: BeamDocument['segments'] = [
  { from: 0, to: 0.8, ei: 3e7 },
  { from: 0.8, to: 7, ei: 2e7, ga: 9e6 },
  { from: 7, to: 14, ei: 1e7, ga: 2e7 },
];
const roller = (at: number, more: Partial<SupportDocument> = {}): SupportDocument => ({
  at,
  kind: 'roller',
  ...more,
});
const fixed = (at: number, more: Partial<SupportDocument> = {}): SupportDocument => ({
  at,
  kind: 'fixed',
  ...more,
});
const spring = (at: number, kv: number, more: Partial<SupportDocument> = {}): SupportDocument => ({
  at,
  kind: 'free',
  kv,
  ...more,
});

const BEAMS: Record<string, SupportDocument[]> = {
  'rollers, moved': [
    roller(1, { rise: -0.004 }),
    roller(5, { rise: 0.002 }),
    roller(10),
    roller(13, { rise: 0.01 }),
  ],
  'fixed ends inside the tips': [
    fixed(1, { rotation: 1e-3 }),
    roller(5),
    roller(10),
    fixed(13, { rise: -0.003 }),
  ],
  'sprung ends': [roller(1, { kr: 2e6, rotation: 2e-3 }), roller(5), roller(10), roller(13, { kr: 5e6 })],
  'rotation held and sprung over inner supports': [
    roller(1),
    fixed(5, { rotation: -1e-3 }),
    roller(10, { kr: 3e6, rotation: 1e-3 }),
    roller(13),
  ],
  'all supports springs': [spring(1, 3e6), spring(5, 2e6, { rise: -0.01 }), spring(10, 4e6), spring(13, 1e6)],
  'springs that hold rotation': [
    spring(1, 3e6, { kr: 1e6 }),
    { at: 5, kind: 'guided', kv: 2e6, rotation: 1e-3 },
    spring(10, 4e6, { kr: 2e6, rotation: -1e-3, rise: 0.005 }),
    roller(13, { kr: 4e6 }),
  ],
  'springs among rigid supports, ends at the tips': [fixed(0), spring(5, 2e6), roller(10), spring(14, 5e5)],
  'a fixed end at the right and a spring at the left': [spring(0, 1e6), roller(5), fixed(14)],
  'a spring every half metre, some of which hold rotation': Array.from({ length: 29 }, (_, k) =>
    spring(k / 2, 1e6 + 3e4 * k, k % 5 === 2 ? { kr: 1e6, rotation: 1e-4 * k } : {}),
  ),
  'a roller every half metre': Array.from({ length: 29 }, (_, k) => roller(k / 2, { rise: 1e-4 * (k % 3) })),
  'one support that holds rotation by a spring': [roller(5, { kr: 4e7, rotation: 1e-3, rise: 0.01 })],
  'one fixed at the right end': [fixed(14, { rotation: -2e-3, rise: -0.01 })],
  'one fixed at the left end': [fixed(0)],
};

function beamOf(supports: SupportDocument[], loads: Load[], segments: BeamDocument['segments']): Beam {
  const reading = readBeam({ length: 14, segments, supports, loads, horizontal: 'ignore' });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  return reading.value;
}

/** All beams are solved in the memory of those before. */
const solver = new ContinuousBeam();

/** Within 1e-11 of the largest value, as 32 digits give it, all along, in the extremes and in the reactions. */
function expectAsWide(beam: Beam): void {
  const wide = solveBeam(beam);
  expect(solver.take(beam)).toBe(true);
  solver.solve();
  const diagrams = solver.diagrams();
  for (const quantity of QUANTITIES) {
    const largest = magnitude(wide.diagrams[quantity]);
    const { breaks } = wide.diagrams[quantity];
    for (const x of [...breaks, ...Array.from(breaks.subarray(1), (to, k) => (to + breaks[k]!) / 2)]) {
      const [got, want] = [evaluate(diagrams[quantity], x), evaluate(wide.diagrams[quantity], x)];
      expect(Math.abs(got[0] - want[0]), `${quantity} left of ${x}`).toBeLessThanOrEqual(1e-11 * largest);
      expect(Math.abs(got[1] - want[1]), `${quantity} right of ${x}`).toBeLessThanOrEqual(1e-11 * largest);
    }
    const own = solver.extremes()[quantity];
    const { max, min } = extremes(diagrams[quantity]);
    expect(Math.abs(own.max - max.value), `${quantity} max`).toBeLessThanOrEqual(2e-13 * largest);
    expect(Math.abs(own.min - min.value), `${quantity} min`).toBeLessThanOrEqual(2e-13 * largest);
    expect(Math.min(...max.at.map((x) => Math.abs(x - own.maxAt))), `${quantity} max at`).toBeLessThan(1e-7);
    expect(Math.min(...min.at.map((x) => Math.abs(x - own.minAt))), `${quantity} min at`).toBeLessThan(1e-7);
  }
  const force = Math.max(...wide.reactions.map(({ vertical }) => Math.abs(vertical)));
  const moment = magnitude(wide.diagrams.moment);
  solver.reactions().forEach(({ vertical, moment: couple }, i) => {
    expect(Math.abs(vertical - wide.reactions[i]!.vertical)).toBeLessThanOrEqual(1e-11 * force);
    expect(Math.abs(couple - wide.reactions[i]!.moment)).toBeLessThanOrEqual(1e-11 * moment);
  });
}

function turnedOver(load: Load): Load {
  if (load.kind === 'point') return { ...load, p: -load.p };
  if (load.kind === 'couple') return { ...load, m: -load.m };
  if (load.kind === 'curvature') return { ...load, kappa: -load.kappa };
  return { ...load, w0: -load.w0, w1: -load.w1 };
}

describe.each(Object.entries(BEAMS))('as 32 digits solve it: %s', (_, supports) => {
  test('under every load, with steps and shear, and proven', () => {
    expectAsWide(beamOf(supports, LOADS, STEPPED));
    expect(solver.isProven()).toBe(true);
  });

  test('under loads turned over, without shear', () => {
    const turned = LOADS.map(turnedOver);
    expectAsWide(beamOf(supports, turned, [{ from: 0, to: 14, ei: 2e7 }]));
  });

  test('under one rising load', () => {
    const load: Load = { kind: 'line', from: 0, to: 14, w0: 500, w1: 9000 };
    expectAsWide(beamOf(supports, [load], [{ from: 0, to: 14, ei: 2e7, ga: 1e7 }]));
  });

  test('under one uniform load, up and down', () => {
    for (const w of [3000, -3000]) {
      const load: Load = { kind: 'line', from: 0, to: 14, w0: w, w1: w };
      expectAsWide(beamOf(supports, [load], [{ from: 0, to: 14, ei: 2e7 }]));
    }
  });

  test('under every load alone', () => {
    for (const load of LOADS) expectAsWide(beamOf(supports, [load], STEPPED));
  });
});

describe('extremes as of their diagrams', () => {
  const span = (supports: SupportDocument[], load: Load, ga: number | null = null): Beam => {
    const reading = readBeam({ length: 6, ei: 2e7, ga, supports, loads: [load], horizontal: 'ignore' });
    if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
    return reading.value;
  };
  const line = (w0: number, w1: number): Load => ({ kind: 'line', from: 0, to: 6, w0, w1 });

  test('where the load changes its sense, so that θ turns three times', () => {
    expectAsWide(span([fixed(0), fixed(6)], line(5000, -5000)));
    expectAsWide(span([fixed(0), fixed(6)], line(5000, -4000)));
    expectAsWide(span([fixed(0), fixed(6)], line(-3000, 5000), 3e7));
    expectAsWide(span([fixed(0), roller(6)], line(4000, -5000)));
  });

  test('where it changes its sense within the first metre, and V has its most there', () => {
    const beam = span([roller(0), roller(6)], line(-1000, 11000));
    expectAsWide(beam);
    expect(solver.extremes().shear.maxAt).toBeCloseTo(0.5, 12);
  });

  test('where shear turns θ as much as bending does', () => {
    for (const factor of [13, 16, 20, 23]) {
      expectAsWide(span([fixed(0), fixed(6)], line(5000, 5000), (factor * 2e7) / 36));
      expectAsWide(span([fixed(0), fixed(6)], line(-5000, -5000), (factor * 2e7) / 36));
    }
  });

  test('where θ does not turn, after a beam where it did', () => {
    expectAsWide(span([fixed(0), roller(6)], line(5000, 5000)));
    const short = readBeam({
      length: 1,
      ei: 2e7,
      supports: [fixed(0)],
      loads: [{ kind: 'point', at: 1, p: 100 }],
      horizontal: 'ignore',
    });
    if (!short.ok) throw new Error('this is a cantilever');
    solver.take(short.value);
    solver.solve();
    const { slope, deflection } = solver.extremes();
    expect([slope.max, slope.minAt, deflection.max, deflection.minAt]).toEqual([0, 1, 0, 1]);
    expect(slope.min).toBeCloseTo(-100 / 2 / 2e7, 18);
    expect(deflection.min).toBeCloseTo(-100 / 3 / 2e7, 18);
  });
});
