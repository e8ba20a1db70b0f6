import type { Reaction } from '../beam/index';
import type { Beam, Load, Restraint } from '../model/index';
import type { State, StiffnessSolution } from '../stiffness/index';

/** The largest value of each kind, which every difference is measured against. N, N·m, rad, m. */
export type Scales = { force: number; moment: number; rotation: number; deflection: number };

/**
 * Part of the natural size of a quantity that counts as its size where the beam happens to have (almost) none: a load
 * that stands on a support bends nothing, and rounding must not be measured against rounding. A relative limit of
 * 1e-9 then allows 1e-14 of the natural size, about fifty roundings.
 */
const FLOOR = 1e-5;

/**
 * Largest values found in the beam and both its solutions. Natural sizes follow from them by F·L, M/L, M·L/EI and θ·L, and
 * from what movement or curvature would cost if it were wholly prevented, EI times the strain.
 */
export function scalesOf(beam: Beam, reactions: readonly Reaction[], check: StiffnessSolution): Scales {
  const states = check.pieces.flatMap(({ left, middle, right }) => [left, middle, right]);
  const all = [...reactions, ...check.reactions];
  const largest = (of: (state: State) => number) => Math.max(...states.map((state) => Math.abs(of(state))));
  const loads = beam.loads.map(effectOf);
  const rises = beam.supports.map(({ vertical }) => movementOf(vertical));
  const turns = beam.supports.map(({ rotation }) => movementOf(rotation));
  const curvature = magnitude(loads.map((load) => load.curvature));
  const { stiffest, softest, span } = sizesOf(beam);

  const force = magnitude([
    largest((s) => s.shear),
    ...all.map((r) => r.vertical),
    ...loads.map((load) => load.force),
  ]);
  const moment = magnitude([
    largest((s) => s.moment),
    ...all.map((r) => r.moment),
    ...loads.map((load) => load.moment),
  ]);
  const rotation = magnitude([largest((s) => s.slope), ...turns]);
  const deflection = magnitude([largest((s) => s.deflection), ...rises]);

  const strain = curvature + magnitude(turns) / span + magnitude(rises) / span ** 2;
  const restrained = stiffest * strain;
  const naturalForce = Math.max(force, moment / beam.length, restrained / span);
  const naturalMoment = Math.max(moment, restrained, naturalForce * beam.length);
  const naturalRotation = Math.max(
    rotation,
    (naturalMoment / softest + curvature) * beam.length,
    magnitude(rises) / beam.length,
  );
  return {
    force: Math.max(force, FLOOR * naturalForce),
    moment: Math.max(moment, FLOOR * naturalMoment),
    rotation: Math.max(rotation, FLOOR * naturalRotation),
    deflection: Math.max(deflection, FLOOR * naturalRotation * beam.length),
  };
}

/** |difference| / scale, where nothing beside nothing is 0. */
export function relative(difference: number, scale: number): number {
  return difference === 0 ? 0 : Math.abs(difference) / scale;
}

export function magnitude(values: readonly number[]): number {
  return values.reduce((largest, value) => Math.max(largest, Math.abs(value)), 0);
}

type Effect = { force: number; moment: number; curvature: number };

function effectOf(load: Load): Effect {
  switch (load.kind) {
    case 'point':
      return { force: load.p, moment: 0, curvature: 0 };
    case 'line':
      return { force: (magnitude([load.w0, load.w1]) * (load.to - load.from)) / 2, moment: 0, curvature: 0 };
    case 'couple':
      return { force: 0, moment: load.m, curvature: 0 };
    case 'curvature':
      return { force: 0, moment: 0, curvature: load.to > load.from ? load.kappa : 0 };
  }
}

function movementOf(restraint: Restraint): number {
  return restraint.kind === 'free' ? 0 : restraint.movement;
}

/** Largest and smallest EI, and the shortest distance between supports (the length, where there is but one). */
function sizesOf(beam: Beam): { stiffest: number; softest: number; span: number } {
  const stiffnesses = beam.segments.map(({ ei }) => ei);
  const places = beam.supports.map(({ at }) => at).sort((a, b) => a - b);
  const spans = places.slice(1).map((at, k) => at - places[k]!);
  return {
    stiffest: Math.max(...stiffnesses),
    softest: Math.min(...stiffnesses),
    span: Math.min(beam.length, ...spans),
  };
}
