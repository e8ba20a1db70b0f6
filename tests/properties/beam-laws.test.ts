import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { prepareBeam, solveBeam } from '@/engine/beam/index';
import type { Beam, BeamDocument, Load, SupportDocument } from '@/engine/model/index';
import { evaluate, magnitude, type Piecewise } from '@/engine/polynomial/index';
import { anyBeam, expectSame, runs, samplesOf, stableBeam } from '../support/stable-beam';

const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
const RUNS = runs(100);

/** A place as a part of the length; those next to a rigid support by a rounding show nothing but that rounding. */
const part = fc.integer({ min: 0, max: 997 }).map((thousandths) => thousandths / 997);
/** A factor of any size, as far apart as an inch from a kilometre. */
const factor = fc.double({ min: -4, max: 4, noNaN: true }).map((power) => 10 ** power);

/** The beam under unit loads of its own choosing, its supports where they are. */
function influence(beam: Beam, loads: Load[]) {
  return prepareBeam({ ...beam, loads }).solve(loads, { movements: false }).diagrams;
}

/** What a cantilever as long and as soft as the beam would deflect under 1, m/N: what rounding is measured by. */
const naturalOf = ({ length, segments }: Beam): number =>
  length ** 3 / (3 * Math.min(...segments.map(({ ei }) => ei)));

/** Clear of hinges and of springs' grounds: a place where a couple may act. */
const inside = (beam: Beam, t: number) => {
  const x = t * beam.length;
  return beam.hinges.some((hinge) => Math.abs(hinge - x) < 1e-9 * beam.length) ? x + 1e-6 * beam.length : x;
};

describe('Maxwell and Betti: the reciprocal theorem', { timeout: 60_000 }, () => {
  test('a force at one place deflects the other as much as the other way round', () => {
    fc.assert(
      fc.property(anyBeam, part, part, ({ beam }, s, t) => {
        const [a, b] = [s * beam.length, t * beam.length];
        const ofA = influence(beam, [
          { kind: 'point', at: a, p: 1 },
          { kind: 'point', at: b, p: 0 },
        ]).deflection;
        const ofB = influence(beam, [
          { kind: 'point', at: b, p: 1 },
          { kind: 'point', at: a, p: 0 },
        ]).deflection;
        const [there, back] = [evaluate(ofA, b)[1], evaluate(ofB, a)[1]];
        const size = Math.sqrt(magnitude(ofA) * magnitude(ofB));
        expect(Math.abs(there - back)).toBeLessThanOrEqual(1e-9 * size + 1e-15 * naturalOf(beam));
      }),
      RUNS,
    );
  });

  test('a force turns a place as much as a couple there deflects where the force was', () => {
    fc.assert(
      fc.property(anyBeam, part, part, ({ beam }, s, t) => {
        // With GA a couple turns the section and not the axis: the slope is not what it works on.
        if (beam.segments.some(({ ga }) => ga !== null)) return;
        const [a, b] = [s * beam.length, inside(beam, t)];
        const ofForce = influence(beam, [
          { kind: 'point', at: a, p: 1 },
          { kind: 'couple', at: b, m: 0 },
        ]);
        const ofCouple = influence(beam, [
          { kind: 'couple', at: b, m: 1 },
          { kind: 'point', at: a, p: 0 },
        ]);
        // The force acts down, its deflection counts up.
        const work = evaluate(ofForce.slope, b)[1] + evaluate(ofCouple.deflection, a)[1];
        const size = Math.sqrt(magnitude(ofForce.deflection) * magnitude(ofCouple.slope));
        expect(Math.abs(work)).toBeLessThanOrEqual(1e-9 * size + (1e-15 * naturalOf(beam)) / beam.length);
      }),
      RUNS,
    );
  });

  test('a unit force does positive work on itself, unless a rigid support bears it', () => {
    fc.assert(
      fc.property(anyBeam, part, ({ beam }, t) => {
        const at = t * beam.length;
        const { deflection } = influence(beam, [{ kind: 'point', at, p: 1 }]);
        expect(-evaluate(deflection, at)[1]).toBeGreaterThanOrEqual(-1e-15 * naturalOf(beam));
      }),
      RUNS,
    );
  });
});

describe('scaling', { timeout: 60_000 }, () => {
  test('loads and movements k times as large make everything k times as large', () => {
    fc.assert(
      fc.property(anyBeam, factor, ({ document, beam }, k) => {
        const [once, more] = [solveBeam(beam), solveBeam(stableBeam(loaded(document, k)))];
        for (const quantity of QUANTITIES)
          expectSame(more.diagrams[quantity], scaled(once.diagrams[quantity], 1, k), 1e-12);
      }),
      RUNS,
    );
  });

  test('lengths k times as large, EI k² and GA as they are, have the same shears and slopes', () => {
    fc.assert(
      fc.property(anyBeam, factor, ({ document, beam }, k) => {
        const [small, large] = [solveBeam(beam), solveBeam(stableBeam(stretched(document, k)))];
        const powers = { shear: 1, moment: k, slope: 1, deflection: k };
        for (const quantity of QUANTITIES)
          expectSame(large.diagrams[quantity], scaled(small.diagrams[quantity], k, powers[quantity]));
      }),
      RUNS,
    );
  });
});

describe('overhangs that carry nothing', { timeout: 60_000 }, () => {
  test('of zero length, with everything that may stand on them, are not there', () => {
    fc.assert(
      fc.property(anyBeam, ({ document, beam }) => {
        const { length } = document;
        const end = length * (1 + 2 ** -52);
        const { ei, ga } = beam.segments.at(-1)!;
        const changed: BeamDocument = {
          ...document,
          segments: [...(document.segments ?? []), { from: length, to: end, ei: 7 * ei, ga }],
          loads: [
            ...(document.loads ?? []),
            { kind: 'line', from: length, to: end, w0: 1e6, w1: 2e6 },
            { kind: 'curvature', from: 0, to: 0, kappa: 1 },
            { kind: 'couple', at: length, m: 0 },
          ],
        };
        expect(solveBeam(stableBeam(changed))).toEqual(solveBeam(beam));
      }),
      RUNS,
    );
  });

  test('of any length leave the parent beam as it was', () => {
    fc.assert(
      fc.property(anyBeam, fc.double({ min: 1e-3, max: 2, noNaN: true }), ({ document, beam }, part) => {
        const length = beam.length * (1 + part);
        const { ei, ga } = beam.segments.at(-1)!;
        const segments = [...beam.segments, { from: beam.length, to: length, ei: 3 * ei, ga }];
        const parent = solveBeam(beam);
        const longer = solveBeam(stableBeam({ ...document, length, segments }));
        for (const [k, { vertical, moment }] of parent.reactions.entries()) {
          const size = Math.max(...parent.reactions.map((r) => Math.abs(r.vertical)));
          const turn = Math.max(...parent.reactions.map((r) => Math.abs(r.moment)));
          expect(Math.abs(longer.reactions[k]!.vertical - vertical)).toBeLessThanOrEqual(1e-10 * size);
          expect(Math.abs(longer.reactions[k]!.moment - moment)).toBeLessThanOrEqual(1e-10 * turn);
        }
        for (const quantity of ['shear', 'moment'] as const) {
          const [p, q] = [parent.diagrams[quantity], longer.diagrams[quantity]];
          for (const x of samplesOf(p).filter((place) => place < beam.length)) {
            const [was, is] = [evaluate(p, x)[1], evaluate(q, x)[1]];
            expect(Math.abs(is - was)).toBeLessThanOrEqual(1e-10 * magnitude(p));
          }
          expect(Math.abs(evaluate(q, length)[0])).toBeLessThanOrEqual(1e-10 * magnitude(p));
        }
      }),
      RUNS,
    );
  });
});

describe('extremes', { timeout: 60_000 }, () => {
  test('are never exceeded by 10,000 sampled points', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { diagrams, extremes } = solveBeam(beam);
        for (const quantity of QUANTITIES) {
          const p = diagrams[quantity];
          let [top, bottom] = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
          for (let i = 0; i <= 10_000; i++) {
            const [left, right] = evaluate(p, (i / 10_000) * beam.length);
            top = Math.max(top, left, right);
            bottom = Math.min(bottom, left, right);
          }
          const slack = 1e-12 * magnitude(p);
          expect(top).toBeLessThanOrEqual(extremes[quantity].max.value + slack);
          expect(bottom).toBeGreaterThanOrEqual(extremes[quantity].min.value - slack);
        }
      }),
      runs(40),
    );
  });
});

/** p with its positions `length` times and its values `value` times as large. */
function scaled(p: Piecewise, length: number, value: number): Piecewise {
  return {
    ...p,
    breaks: p.breaks.map((x) => x * length),
    coefficients: p.coefficients.map((c, i) => (c * value) / length ** (i % (p.degree + 1))),
  };
}

function loaded(document: BeamDocument, k: number): BeamDocument {
  const times = (value: number | undefined) => (value === undefined ? undefined : value * k);
  return {
    ...document,
    supports: document.supports.map((s) => ({ ...s, rise: times(s.rise), rotation: times(s.rotation) })),
    loads: document.loads?.map((load) => {
      if (load.kind === 'point') return { ...load, p: load.p * k };
      if (load.kind === 'couple') return { ...load, m: load.m * k };
      if (load.kind === 'curvature') return { ...load, kappa: load.kappa * k };
      return { ...load, w0: load.w0 * k, w1: load.w1 * k };
    }),
  };
}

/** Lengths times k; forces, rotations and GA as they are. */
function stretched(document: BeamDocument, k: number): BeamDocument {
  const support = ({ kv, kr, rise, ...rest }: SupportDocument): SupportDocument => ({
    ...rest,
    at: rest.at * k,
    ...(kv === undefined ? {} : { kv: kv / k }),
    ...(kr === undefined ? {} : { kr: kr * k }),
    ...(rise === undefined ? {} : { rise: rise * k }),
  });
  return {
    ...document,
    length: document.length * k,
    segments: document.segments?.map((s) => ({ ...s, from: s.from * k, to: s.to * k, ei: s.ei * k ** 2 })),
    supports: document.supports.map(support),
    hinges: document.hinges?.map((x) => x * k),
    loads: document.loads?.map((load) => {
      if (load.kind === 'point') return { ...load, at: load.at * k };
      if (load.kind === 'couple') return { ...load, at: load.at * k, m: load.m * k };
      const stretch = { from: load.from * k, to: load.to * k };
      if (load.kind === 'curvature') return { ...load, ...stretch, kappa: load.kappa / k };
      return { ...load, ...stretch, w0: load.w0 / k, w1: load.w1 / k };
    }),
  };
}
