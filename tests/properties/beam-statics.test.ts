import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { prepareBeam, solveBeam } from '@/engine/beam/index';
import type { Beam, BeamDocument, Load } from '@/engine/model/index';
import { add, evaluate, magnitude } from '@/engine/polynomial/index';
import { anyBeam, expectSame, runs, stableBeam } from '../support/stable-beam';

const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
const RUNS = runs(100);

/** Upward force and anticlockwise moment about the left end of one load. */
function resultant(load: Load): { force: number; moment: number } {
  switch (load.kind) {
    case 'point':
      return { force: -load.p, moment: -load.p * load.at };
    case 'couple':
      return { force: 0, moment: load.m };
    case 'curvature':
      return { force: 0, moment: 0 };
    case 'line': {
      const { from, to, w0, w1 } = load;
      const length = to - from;
      const arm = (length * (w0 + 2 * w1)) / 6; // ∫ w s ds / length
      return { force: (-(w0 + w1) / 2) * length, moment: (-(w0 + w1) / 2) * length * from - arm * length };
    }
  }
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
const largest = (values: readonly number[]) => Math.max(0, ...values.map(Math.abs));

describe('any beam', { timeout: 60_000 }, () => {
  test('is in equilibrium with its loads', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { reactions } = solveBeam(beam);
        const acting = [
          ...beam.loads.map(resultant),
          ...reactions.map(({ at, vertical, moment }) => ({
            force: vertical,
            moment: moment + vertical * at,
          })),
        ];
        const forces = acting.map(({ force }) => force);
        const moments = acting.map(({ moment }) => moment);
        expect(Math.abs(sum(forces))).toBeLessThanOrEqual(1e-12 * largest(forces));
        expect(Math.abs(sum(moments))).toBeLessThanOrEqual(
          1e-12 * Math.max(largest(moments), largest(forces) * beam.length),
        );
      }),
      RUNS,
    );
  });

  test('has each rigid support exactly where it is prescribed, and no kink but in a hinge', () => {
    fc.assert(
      fc.property(anyBeam, ({ beam }) => {
        const { diagrams } = solveBeam(beam);
        const sag = magnitude(diagrams.deflection);
        for (const { at, vertical } of beam.supports) {
          if (vertical.kind !== 'rigid') continue;
          for (const v of evaluate(diagrams.deflection, at))
            expect(Math.abs(v - vertical.movement)).toBeLessThanOrEqual(1e-12 * sag);
        }
        // With GA the slope jumps by V/GA at a force: what has no kink is the rotation of the section.
        if (beam.segments.some(({ ga }) => ga !== null)) return;
        const turn = magnitude(diagrams.slope);
        for (const x of diagrams.slope.breaks) {
          if (beam.hinges.includes(x)) continue;
          const [left, right] = evaluate(diagrams.slope, x);
          expect(Math.abs(left - right)).toBeLessThanOrEqual(1e-11 * turn);
        }
      }),
      RUNS,
    );
  });

  test('under two groups of loads is the sum of what it is under each, the movements counted once', () => {
    fc.assert(
      fc.property(anyBeam, fc.nat(), ({ beam }, cut) => {
        const at = cut % (beam.loads.length + 1);
        const prepared = prepareBeam(beam);
        const whole = prepared.solve();
        const first = prepared.solve(beam.loads.slice(0, at));
        const second = prepared.solve(beam.loads.slice(at), { movements: false });
        for (const quantity of QUANTITIES) {
          const [a, b] = [first.diagrams[quantity], second.diagrams[quantity]];
          const terms = Math.max(magnitude(a), magnitude(b)) / (magnitude(whole.diagrams[quantity]) || 1);
          if (terms > 1e3) continue; // the groups undo each other
          expectSame(add(a, b), whole.diagrams[quantity]);
        }
      }),
      RUNS,
    );
  });

  test('seen from the other side is the same beam', () => {
    fc.assert(
      fc.property(anyBeam, ({ document, beam }) => {
        const mirrored = solveBeam(stableBeam(mirror(document)));
        const { reactions, extremes, contraflexure } = solveBeam(beam);
        const forces = largest(reactions.map(({ vertical }) => vertical));
        const moments = largest(reactions.map(({ moment }) => moment));
        reactions.forEach(({ vertical, moment }, i) => {
          expect(Math.abs(mirrored.reactions[i]!.vertical - vertical)).toBeLessThanOrEqual(1e-9 * forces);
          expect(Math.abs(mirrored.reactions[i]!.moment + moment)).toBeLessThanOrEqual(1e-9 * moments);
        });
        const pairs = [
          [extremes.moment.max, mirrored.extremes.moment.max, 1],
          [extremes.moment.min, mirrored.extremes.moment.min, 1],
          [extremes.deflection.max, mirrored.extremes.deflection.max, 1],
          [extremes.deflection.min, mirrored.extremes.deflection.min, 1],
          [extremes.shear.max, mirrored.extremes.shear.min, -1],
          [extremes.slope.max, mirrored.extremes.slope.min, -1],
        ] as const;
        for (const [here, there, sign] of pairs) {
          expect(Math.abs(here.value - sign * there.value)).toBeLessThanOrEqual(
            1e-9 * Math.abs(here.value) + 1e-13,
          );
          expectMirrored(here.at, there.at, beam.length);
        }
        expectMirrored(contraflexure, mirrored.contraflexure, beam.length);
      }),
      RUNS,
    );
  });

  test.each([
    ['millimetres', 1000, 1],
    ['inches', 1 / 0.0254, 1],
    ['kilonewtons', 1, 1e-3],
  ])('solved in %s is the same beam', (_, length, force) => {
    fc.assert(
      fc.property(anyBeam, ({ document, beam }) => {
        const here = solveBeam(beam);
        const there = solveBeam(stableBeam(inUnits(document, length, force)));
        const scale = { shear: force, moment: force * length, slope: 1, deflection: length };
        for (const quantity of QUANTITIES) {
          const [a, b] = [here.extremes[quantity], there.extremes[quantity]];
          const size = magnitude(here.diagrams[quantity]);
          expect(Math.abs(b.max.value / scale[quantity] - a.max.value)).toBeLessThanOrEqual(1e-9 * size);
          expect(Math.abs(b.min.value / scale[quantity] - a.min.value)).toBeLessThanOrEqual(1e-9 * size);
        }
      }),
      runs(50),
    );
  });

  test('is not changed by loads and segments that are nothing', () => {
    fc.assert(
      fc.property(anyBeam, fc.double({ min: 0, max: 1, noNaN: true }), ({ beam }, t) => {
        const x = t * beam.length;
        const nothing: Load[] = [
          { kind: 'point', at: x, p: 0 },
          { kind: 'line', from: x, to: x, w0: 1e5, w1: -1e5 },
          { kind: 'curvature', from: x, to: x, kappa: 1 },
          { kind: 'line', from: 0, to: beam.length, w0: 0, w1: 0 },
        ];
        const changed: Beam = { ...beam, loads: [...beam.loads, ...nothing] };
        const [before, after] = [solveBeam(beam), solveBeam(changed)];
        expect(after.reactions).toEqual(before.reactions);
        for (const quantity of QUANTITIES)
          expectSame(after.diagrams[quantity], before.diagrams[quantity], 1e-12);
      }),
      RUNS,
    );
  });
});

/** The same places, counted from the other end. */
function expectMirrored(here: readonly number[], there: readonly number[], length: number): void {
  expect(there).toHaveLength(here.length);
  const apart = here.map((x, i) => Math.abs(length - there.at(-1 - i)! - x));
  expect(Math.max(0, ...apart)).toBeLessThanOrEqual(1e-7 * length);
}

function mirror(document: BeamDocument): BeamDocument {
  const { length } = document;
  const flip = (x: number) => length - x;
  const back = (value: number | undefined) => (value === undefined ? undefined : -value);
  const segments = document.segments?.map((s) => ({ ...s, from: flip(s.to), to: flip(s.from) }));
  return {
    ...document,
    segments,
    supports: document.supports.map((s) => ({ ...s, at: flip(s.at), rotation: back(s.rotation) })),
    hinges: document.hinges?.map(flip),
    loads: document.loads?.map((load) => mirrorLoad(load, length)),
  };
}

function mirrorLoad(load: Load, length: number): Load {
  const flip = (x: number) => length - x;
  switch (load.kind) {
    case 'point':
      return { ...load, at: flip(load.at) };
    case 'couple':
      return { ...load, at: flip(load.at), m: -load.m };
    case 'curvature':
      return { ...load, from: flip(load.to), to: flip(load.from) };
    case 'line':
      return { ...load, from: flip(load.to), to: flip(load.from), w0: load.w1, w1: load.w0 };
  }
}

/** The same beam with `length` units to the metre and `force` units to the newton. */
function inUnits(document: BeamDocument, length: number, force: number): BeamDocument {
  const times = (value: number | undefined, factor: number) =>
    value === undefined ? undefined : value * factor;
  return {
    ...document,
    length: document.length * length,
    segments: document.segments?.map(({ from, to, ei, ga }) => ({
      from: from * length,
      to: to * length,
      ei: ei * force * length ** 2,
      ga: ga == null ? ga : ga * force,
    })),
    supports: document.supports.map(({ at, kind, kv, kr, rise, rotation }) => ({
      at: at * length,
      kind,
      kv: times(kv, force / length),
      kr: times(kr, force * length),
      rise: times(rise, length),
      rotation,
    })),
    hinges: document.hinges?.map((x) => x * length),
    loads: document.loads?.map((load) => loadInUnits(load, length, force)),
  };
}

function loadInUnits(load: Load, length: number, force: number): Load {
  if ('at' in load) {
    const at = load.at * length;
    return load.kind === 'point'
      ? { ...load, at, p: load.p * force }
      : { ...load, at, m: load.m * force * length };
  }
  const stretch = { from: load.from * length, to: load.to * length };
  if (load.kind === 'curvature') return { ...load, ...stretch, kappa: load.kappa / length };
  return { ...load, ...stretch, w0: (load.w0 * force) / length, w1: (load.w1 * force) / length };
}
