import { describe, expect, test } from 'vitest';
import { type Beam, type BeamDocument, readBeam } from '../model/index';
import { firstFrequency, joinMasses, type Masses, massOfLoads, readMasses, totalMass } from './index';

type Given = Partial<BeamDocument> & Pick<BeamDocument, 'supports'>;
const [L, EI, MASS] = [7, 3e6, 150];

function beamOf(given: Given): Beam {
  const reading = readBeam({
    length: L,
    ei: given.segments ? undefined : EI,
    horizontal: 'ignore',
    ...given,
  });
  if (!reading.ok) throw new Error(reading.faults[0]?.message);
  return reading.value;
}

const uniform = (length = L, mass = MASS): Masses => ({
  distributed: [{ from: 0, to: length, start: mass, end: mass }],
  lumped: [],
});
const at = (x: number, mass: number): Masses => ({ distributed: [], lumped: [{ at: x, mass }] });

function omegaOf(given: Given, masses: Masses): number {
  const found = firstFrequency(beamOf(given), masses);
  if (!found) throw new Error('nothing vibrates');
  return 2 * Math.PI * found.frequency;
}

/** βL of a uniform beam: ω = (βL)² √(EI/(m L⁴)). */
const waveNumber = (given: Given, masses = uniform(given.length)): number =>
  Math.sqrt(omegaOf(given, masses) / Math.sqrt(EI / (MASS * (given.length ?? L) ** 4)));

const printed = (value: number, text: string) =>
  expect(Math.abs(value - Number(text))).toBeLessThanOrEqual(0.5 * 10 ** -(text.split('.')[1]?.length ?? 0));

const pin = (x: number) => ({ at: x, kind: 'pin' }) as const;
const fixed = (x: number) => ({ at: x, kind: 'fixed' }) as const;
const guided = (x: number) => ({ at: x, kind: 'guided' }) as const;

/** The root of f between two places where it has different signs. */
function rootOf(f: (x: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  const rising = f(low) < 0;
  expect(f(high) > 0).toBe(rising);
  for (let step = 0; step < 100; step++) {
    const middle = (low + high) / 2;
    if (f(middle) < 0 === rising) low = middle;
    else high = middle;
  }
  return low;
}

describe('firstFrequency of a uniform beam', () => {
  // W. T. Thomson, Theory of Vibration with Applications, appendix D
  test('is that of the printed βL = 4.7300 between built-in ends, 1.8751 of a cantilever', () => {
    printed(waveNumber({ supports: [fixed(0), fixed(L)] }), '4.7300');
    printed(waveNumber({ supports: [fixed(0)] }), '1.8751');
    printed(waveNumber({ supports: [fixed(L)] }), '1.8751');
  });

  test('is βL = π of a simple span, and 3.9266 of a propped one', () => {
    expect(waveNumber({ supports: [pin(0), pin(L)] })).toBeCloseTo(Math.PI, 11);
    // R. D. Blevins, Formulas for Natural Frequency and Mode Shape, table 8-1 (from memory)
    printed(waveNumber({ supports: [fixed(0), pin(L)] }), '3.9266');
    printed(waveNumber({ supports: [fixed(0), guided(L)] }), '2.3650');
    expect(waveNumber({ supports: [guided(0), pin(L)] })).toBeCloseTo(Math.PI / 2, 11);
  });

  test('over equal spans is that of one simple span, however many', () => {
    for (const spans of [2, 3, 6]) {
      const supports = Array.from({ length: spans + 1 }, (_, k) => pin(k * L));
      const omega = omegaOf({ length: spans * L, supports }, uniform(spans * L));
      expect(omega).toBeCloseTo(Math.PI ** 2 * Math.sqrt(EI / (MASS * L ** 4)), 8);
    }
  });

  test('is passed by two at once where two like spans do not know of each other', () => {
    const apart = firstFrequency(
      beamOf({ length: 2 * L, supports: [pin(0), pin(L), pin(2 * L)], hinges: [L] }),
      uniform(2 * L),
    );
    expect(apart).toMatchObject({ count: 2 });
    const one = firstFrequency(beamOf({ supports: [pin(0), pin(L)] }), uniform())!;
    expect(apart!.frequency).toBeCloseTo(one.frequency, 9);
    expect(one.count).toBe(1);
    expect(one.upper / one.lower - 1).toBeLessThan(1e-12);
    expect(one.lower).toBeLessThanOrEqual(one.frequency);
    expect(one.frequency).toBeLessThanOrEqual(one.upper);
  });

  test('with an overhang is the root of the characteristic equation of its two parts', () => {
    for (const a of [0.5, 2, 4, 9]) {
      // X = A sin βx + B sinh βx on the span; Y = C (cos + cosh) + D (sin + sinh) from the tip
      const determinant = (b: number) => {
        const [s, c] = [b * L, b * a];
        const y = [Math.cos(c) + Math.cosh(c), Math.sin(c) + Math.sinh(c)] as const;
        const slope = [-Math.sin(c) + Math.sinh(c), Math.cos(c) + Math.cosh(c)] as const;
        const bend = [-Math.cos(c) + Math.cosh(c), -Math.sin(c) + Math.sinh(c)] as const;
        // X(L) = 0 and Y(a) = 0 leave one unknown each; slope and curvature meet at the support.
        const span = { slope: Math.cos(s) / Math.sin(s) - Math.cosh(s) / Math.sinh(s), bend: -2 };
        const tip = { slope: slope[0] * y[1] - slope[1] * y[0], bend: bend[0] * y[1] - bend[1] * y[0] };
        return (span.slope * tip.bend + span.bend * tip.slope) * Math.sin(s);
      };
      const found = waveNumber({ length: L + a, supports: [pin(0), pin(L)] }) / (L + a);
      expect(rootOf(determinant, found * 0.97, found * 1.03)).toBeCloseTo(found, 9);
      // No root below: the determinant keeps its sign.
      const signs = Array.from({ length: 40 }, (_, k) => Math.sign(determinant((found * (k + 0.5)) / 41)));
      expect(new Set(signs).size).toBe(1);
    }
  });

  test('between two like rotational springs is the root of their own equation', () => {
    // k L/EI = 1 at both ends: βL of tan βL/2 + tanh βL/2 = −2 βL EI/(kL), symmetric mode, by hand
    const k = EI / L;
    const found = waveNumber({
      supports: [
        { ...pin(0), kr: k },
        { ...pin(L), kr: k },
      ],
    });
    const equation = (x: number) => Math.tan(x / 2) + Math.tanh(x / 2) + 2 * x;
    expect(rootOf(equation, Math.PI + 1e-6, 4.7)).toBeCloseTo(found, 9);
  });
});

describe('firstFrequency with masses at points', () => {
  test('of a cantilever with a tip mass is the root of the published frequency equation', () => {
    // I. A. Karnovsky, O. I. Lebed, Formulas for Structural Dynamics: 1 + cos λ cosh λ − nλ(sin λ cosh λ − cos λ sinh λ) = 0
    for (const n of [0.05, 0.5, 1, 10]) {
      const equation = (x: number) =>
        1 + Math.cos(x) * Math.cosh(x) - n * x * (Math.sin(x) * Math.cosh(x) - Math.cos(x) * Math.sinh(x));
      const found = waveNumber({ supports: [fixed(0)] }, joinMasses(uniform(), at(L, n * MASS * L)));
      expect(rootOf(equation, 0.1, 1.8752)).toBeCloseTo(found, 10);
    }
  });

  test('of a cantilever as heavy as its tip mass is the printed 1.557298', () => {
    // "Frequency equation of flexural vibrating cantilever beam considering the rotary inertial moment of an attached
    // mass", Mathematical Problems in Engineering 2017, table 1: ω √(mL⁴/EI)
    const found = waveNumber({ supports: [fixed(0)] }, joinMasses(uniform(), at(L, MASS * L)));
    printed(found ** 2, '1.557298');
  });

  test('of a beam without mass is √(1/(mδ)) of one mass', () => {
    const simple = omegaOf({ supports: [pin(0), pin(L)] }, at(L / 2, 900));
    expect(simple).toBeCloseTo(Math.sqrt((48 * EI) / (900 * L ** 3)), 9);
    const onSpring = omegaOf({ supports: [pin(0), { at: L, kind: 'free', kv: 2e5 }] }, at(L, 900));
    expect(onSpring).toBeCloseTo(Math.sqrt(2e5 / 900), 9);
  });

  test('adds masses at one point, and takes one a rounding beside a point to be there', () => {
    const two = joinMasses(at(L / 2, 400), at(L / 2, 500));
    expect(omegaOf({ supports: [pin(0), pin(L)] }, two)).toBeCloseTo(
      Math.sqrt((48 * EI) / (900 * L ** 3)),
      9,
    );
    expect(firstFrequency(beamOf({ supports: [pin(0), pin(L)] }), at(L * (1 + 2 ** -51), 500))).toBeNull();
  });

  test('has none where no mass can move', () => {
    const simple = beamOf({ supports: [pin(0), pin(L)] });
    expect(firstFrequency(simple, at(0, 500))).toBeNull();
    expect(firstFrequency(simple, at(3, 0))).toBeNull();
    expect(firstFrequency(simple, uniform(L, 0))).toBeNull();
    expect(
      firstFrequency(simple, { distributed: [{ from: 2, to: 2, start: 5, end: 5 }], lumped: [] }),
    ).toBeNull();
  });
});

describe('firstFrequency with shear flexibility and steps', () => {
  test('of a simple span is EI β⁴/m over 1 + EI β²/GA, β = π/L', () => {
    // S. M. Han, H. Benaroya, T. Wei, "Dynamics of transversely vibrating beams using four engineering theories",
    // Journal of Sound and Vibration 225 (1999): the shear model, whose hinged wave numbers are those of bending alone
    for (const ga of [2e7, 1e6, 2e4]) {
      const b2 = (Math.PI / L) ** 2;
      const expected = Math.sqrt((EI * b2 ** 2) / MASS / (1 + (EI * b2) / ga));
      expect(omegaOf({ supports: [pin(0), pin(L)], ga }, uniform()) / expected).toBeCloseTo(1, 11);
    }
  });

  test('of any cantilever lets the end be free: the equations, integrated step by step, meet there', () => {
    const segments = [
      { from: 0, to: 3, ei: EI, ga: 4e6 },
      { from: 3, to: L, ei: EI / 4, ga: null },
    ];
    const masses = { distributed: [{ from: 0, to: L, start: 20, end: 400 }], lumped: [] };
    const found = omegaOf({ supports: [fixed(0)], segments }, masses);
    const freeEnd = (omega: number) => {
      const steps = 1400; // the step of the beam falls between two of them
      const h = L / steps;
      const rate = (k: number, t: number, [v, p, m, q]: readonly number[]) => {
        const { ei, ga } = (k + 0.5) * h < 3 ? segments[0]! : segments[1]!;
        const mass = 20 + (380 * (k + t) * h) / L;
        return [p! - (ga === null ? 0 : q! / ga), m! / ei, q!, mass * omega ** 2 * v!];
      };
      const end = (start: readonly number[]) => {
        let y = start;
        const ahead = (by: readonly number[], t: number) => y.map((one, i) => one + t * by[i]!);
        for (let k = 0; k < steps; k++) {
          const k1 = rate(k, 0, y);
          const k2 = rate(k, 0.5, ahead(k1, h / 2));
          const k3 = rate(k, 0.5, ahead(k2, h / 2));
          const k4 = rate(k, 1, ahead(k3, h));
          y = y.map((one, i) => one + (h / 6) * (k1[i]! + 2 * k2[i]! + 2 * k3[i]! + k4[i]!));
        }
        return y;
      };
      const [a, b] = [end([0, 0, 1, 0]), end([0, 0, 0, 1])];
      return a[2]! * b[3]! - a[3]! * b[2]!;
    };
    expect(rootOf(freeEnd, found * 0.9, found * 1.1) / found).toBeCloseTo(1, 8);
  });

  test('is not lost beside a piece ten thousand times shorter', () => {
    const near = 1e-4 * L;
    const twin = beamOf({ supports: [pin(0), pin(near), pin(L)] });
    const found = firstFrequency(twin, uniform())!;
    // Two pins so near to each other build the end in: 3.9266 less a correction of the order of their distance.
    expect(Math.sqrt((2 * Math.PI * found.frequency) / Math.sqrt(EI / (MASS * L ** 4)))).toBeCloseTo(
      3.9266,
      3,
    );
  });
});

describe('the estimate', () => {
  test('of a simple span is 18/√δ where the exact figure is 17.75/√δ', () => {
    const found = firstFrequency(beamOf({ supports: [pin(0), pin(L)] }), uniform())!;
    const delta = (5 * MASS * 9.80665 * L ** 4) / (384 * EI);
    expect(found.sag).toEqual({ deflection: expect.closeTo(delta, 12), at: expect.closeTo(L / 2, 9) });
    expect(found.estimate).toBeCloseTo(18 / Math.sqrt(1000 * delta), 9);
    // "Design guide on the vibration of floors": 17.8/√δ, rounded to 18 (from memory)
    printed((found.frequency / found.estimate) * 18, '17.8');
  });

  test('takes the largest movement, up or down, and no movement of the supports', () => {
    const found = firstFrequency(beamOf({ length: 9, supports: [{ ...pin(1), rise: -0.3 }, pin(3)] }), {
      distributed: [{ from: 3, to: 9, start: 40, end: 40 }],
      lumped: [],
    })!;
    expect(found.sag.at).toBe(9);
    const uplifted = firstFrequency(beamOf({ length: 12, supports: [pin(10), pin(12)] }), {
      distributed: [{ from: 10, to: 12, start: 40, end: 40 }],
      lumped: [],
    })!;
    expect(uplifted.sag.at).toBe(0);
  });
});

describe('masses', () => {
  test('of loads are those of the weights among them', () => {
    const g = 9.80665;
    const { masses, leftOut } = massOfLoads(
      [
        { kind: 'point', at: 2, p: 100 * g, group: 'G' },
        { kind: 'line', from: 0, to: 4, w0: 10 * g, w1: 30 * g, group: 'G' },
        { kind: 'couple', at: 1, m: 5, group: 'G' },
        { kind: 'curvature', from: 0, to: 1, kappa: 1, group: 'G' },
        { kind: 'point', at: 3, p: -1, group: 'G' },
        { kind: 'line', from: 0, to: 4, w0: 1, w1: -1, group: 'G' },
        { kind: 'point', at: 3, p: 50 * g, group: 'Q' },
      ],
      ({ group }) => group === 'G',
    );
    expect(leftOut).toEqual([2, 3, 4, 5]);
    expect(masses).toEqual({
      lumped: [{ at: 2, mass: expect.closeTo(100, 12) }],
      distributed: [{ from: 0, to: 4, start: expect.closeTo(10, 12), end: expect.closeTo(30, 12) }],
    });
    expect(totalMass(masses)).toEqual({
      distributed: expect.closeTo(80, 12),
      lumped: expect.closeTo(100, 12),
    });
  });

  test('are refused with their place', () => {
    const beam = beamOf({ supports: [pin(0), pin(L)] });
    const reading = readMasses(beam, {
      distributed: [
        { from: 0, to: L, start: 1, end: 1 },
        { from: 3, to: 2, start: -1, end: Number.NaN },
        { from: -1, to: L + 1, start: 1, end: 1 },
      ],
      lumped: [{ at: L + 2, mass: -3 }],
    });
    expect(reading.ok ? [] : reading.faults.map(({ path, code }) => [...path, code].join(' '))).toEqual([
      'distributed 1 from order',
      'distributed 1 start out_of_range',
      'distributed 1 end out_of_range',
      'distributed 2 from out_of_range',
      'distributed 2 to out_of_range',
      'lumped 0 at out_of_range',
      'lumped 0 mass out_of_range',
    ]);
    expect(readMasses(beam, uniform())).toEqual({ ok: true, value: uniform() });
  });
});
