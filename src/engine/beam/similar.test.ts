import { describe, expect, test } from 'vitest';
import { exactBeams, kindsOf } from '../../../tests/support/exact-beams';
import { stableBeam } from '../../../tests/support/stable-beam';
import type { Beam, Load, Restraint } from '../model/index';
import { PlainStiffness, solveStiffness } from '../stiffness/index';
import { forceMethod, solveBeam, stationsAt, tipParts } from './index';

/**
 * The law of similarity (dimensional analysis): lengths k times and forces q times as large have reactions, moments and
 * deflections q, kq and k times as large, and the same slopes. With powers of two no digit changes by it, so that
 * nothing inside may be measured against a metre or a newton.
 */
const UNITS = [
  { name: 'forces of 2⁻¹⁰⁰', k: 1, q: 2 ** -100 },
  { name: 'forces of 2¹⁰⁰', k: 1, q: 2 ** 100 },
  { name: 'lengths of 2⁻⁵⁰', k: 2 ** -50, q: 1 },
  { name: 'lengths of 2⁵⁰', k: 2 ** 50, q: 1 },
];

const beams = exactBeams();

/** Of the beam that was read: a document so small or so large is refused. */
function similar({ segments, supports, loads, hinges, ...beam }: Beam, k: number, q: number): Beam {
  const held = (restraint: Restraint, of: { stiffness: number; movement: number }): Restraint => {
    if (restraint.kind === 'free') return restraint;
    const movement = restraint.movement * of.movement;
    return restraint.kind === 'rigid'
      ? { ...restraint, movement }
      : { ...restraint, movement, stiffness: restraint.stiffness * of.stiffness };
  };
  return {
    ...beam,
    length: beam.length * k,
    hinges: hinges.map((at) => at * k),
    segments: segments.map(({ from, to, ei, ga }) => ({
      from: from * k,
      to: to * k,
      ei: ei * q * k * k,
      ga: ga === null ? null : ga * q,
    })),
    supports: supports.map(({ at, vertical, rotation, ...support }) => ({
      ...support,
      at: at * k,
      vertical: held(vertical, { stiffness: q / k, movement: k }),
      rotation: held(rotation, { stiffness: q * k, movement: 1 }),
    })),
    loads: loads.map((load): Load => {
      if (load.kind === 'point') return { ...load, at: load.at * k, p: load.p * q };
      if (load.kind === 'couple') return { ...load, at: load.at * k, m: load.m * q * k };
      const [from, to] = [load.from * k, load.to * k];
      return load.kind === 'line'
        ? { ...load, from, to, w0: (load.w0 * q) / k, w1: (load.w1 * q) / k }
        : { ...load, from, to, kappa: load.kappa / k };
    }),
  };
}

/** Every value of the three solvers, brought back to the beam's own units. */
function allOf(beam: Beam, positions: readonly number[], k: number, q: number) {
  const solution = solveBeam(beam);
  const { force, couple, shear, moment, slope, deflection } = kindsOf(solution, positions);
  const plain = new PlainStiffness();
  const reactions = solveStiffness(beam).reactions;
  if (plain.take(beam)) plain.solve();
  return {
    force: [...force, ...reactions.map(({ vertical }) => vertical), ...plain.vertical].map((x) => x / q),
    shear: shear.map((x) => x / q),
    moment: [...couple, ...moment, ...reactions.map((one) => one.moment), ...plain.moment].map(
      (x) => x / (q * k),
    ),
    slope,
    deflection: deflection.map((x) => x / k),
    tips: tipParts(beam, solution).map(({ bending, shear: slip, total }) => [
      bending / k,
      slip / k,
      total / k,
    ]),
  };
}

describe.each(UNITS)('with $name', ({ k, q }) => {
  test.each(beams)('$name is the same beam', ({ document, positions }) => {
    const beam = stableBeam(document);
    const scaled = positions.map((x) => x * k);
    expect(allOf(similar(beam, k, q), scaled, k, q)).toEqual(allOf(beam, positions, 1, 1));
  });
});

describe('nothing is −0', () => {
  /** Where the value of any number in it is −0. */
  function negativeZeros(value: unknown, path = ''): string[] {
    if (typeof value === 'number') return Object.is(value, -0) ? [path] : [];
    if (typeof value !== 'object' || value === null) return [];
    const entries: [string, unknown][] = ArrayBuffer.isView(value)
      ? Array.from(value as Float64Array, (x, i) => [String(i), x])
      : Object.entries(value);
    return entries.flatMap(([key, one]) => negativeZeros(one, `${path}.${key}`));
  }

  test.each(beams)('in $name', ({ document, positions }) => {
    const beam = stableBeam(document);
    const solution = solveBeam(beam);
    const { released: _, ...parts } = forceMethod(beam);
    const found = {
      solution,
      parts,
      tips: tipParts(beam, solution),
      stations: stationsAt(solution, positions),
    };
    expect(negativeZeros(found)).toEqual([]);
  });

  test('even where a station is asked for at −0', () => {
    const beam = stableBeam(beams[0]!.document);
    expect(stationsAt(solveBeam(beam), [-0])[0]!.x).toBe(0);
  });
});
