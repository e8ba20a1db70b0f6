import { describe, expect, test } from 'vitest';
import { exactBeams, kindsOf } from '../../../tests/support/exact-beams';
import { stableBeam } from '../../../tests/support/stable-beam';
import { solveBeam, tipParts } from '../beam/index';
import type { Beam, Load, Restraint } from '../model/index';
import { PlainStiffness, solveStiffness } from './index';

/**
 * The laws of similarity (dimensional analysis) and of proportion: lengths k times and forces q times as large have
 * reactions, moments and deflections q, kq and k times as large, and the same slopes; loads and movements s times as
 * large make all of it s times as large. Powers of two change no digit, so that nothing inside may be measured against
 * a metre, a newton or a radian.
 */
type Sizes = { k: number; q: number; s: number };
const ONE: Sizes = { k: 1, q: 1, s: 1 };
const SIZES = [
  { name: 'forces of 2⁻¹⁰⁰', ...ONE, q: 2 ** -100 },
  { name: 'forces of 2¹⁰⁰', ...ONE, q: 2 ** 100 },
  { name: 'lengths of 2⁻⁵⁰', ...ONE, k: 2 ** -50 },
  { name: 'lengths of 2⁵⁰', ...ONE, k: 2 ** 50 },
  { name: 'loads and movements of 2⁻¹⁰⁰', ...ONE, s: 2 ** -100 },
];

const beams = exactBeams();

/** Of the beam that was read: a document so small or so large is refused. */
function similar({ segments, supports, loads, hinges, ...beam }: Beam, { k, q, s }: Sizes): Beam {
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
      vertical: held(vertical, { stiffness: q / k, movement: k * s }),
      rotation: held(rotation, { stiffness: q * k, movement: s }),
    })),
    loads: loads.map((load): Load => {
      if (load.kind === 'point') return { ...load, at: load.at * k, p: load.p * q * s };
      if (load.kind === 'couple') return { ...load, at: load.at * k, m: load.m * q * k * s };
      const [from, to] = [load.from * k, load.to * k];
      return load.kind === 'line'
        ? { ...load, from, to, w0: (load.w0 * q * s) / k, w1: (load.w1 * q * s) / k }
        : { ...load, from, to, kappa: (load.kappa * s) / k };
    }),
  };
}

/** Every value of the three solvers, brought back to the beam's own sizes. */
function allOf(beam: Beam, positions: readonly number[], { k, q, s }: Sizes) {
  const solution = solveBeam(beam);
  const { force, couple, shear, moment, slope, deflection } = kindsOf(solution, positions);
  const plain = new PlainStiffness();
  const { reactions } = solveStiffness(beam);
  if (plain.take(beam)) plain.solve();
  const by = (values: readonly number[], size: number) => values.map((value) => value / (size * s));
  return {
    force: by([...force, ...shear, ...reactions.map(({ vertical }) => vertical), ...plain.vertical], q),
    moment: by([...couple, ...moment, ...reactions.map((one) => one.moment), ...plain.moment], q * k),
    slope: by(slope, 1),
    deflection: by(deflection, k),
    tips: by(
      tipParts(beam, solution).flatMap(({ bending, shear: slip, total }) => [bending, slip, total]),
      k,
    ),
  };
}

describe.each(SIZES)('with $name', (sizes) => {
  test.each(beams)('$name is the same beam', ({ document, positions }) => {
    const beam = stableBeam(document);
    const scaled = positions.map((x) => x * sizes.k);
    expect(allOf(similar(beam, sizes), scaled, sizes)).toEqual(allOf(beam, positions, ONE));
  });
});
