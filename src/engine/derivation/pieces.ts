import {
  constant,
  cut,
  divide,
  type Expression,
  type NamedLoad,
  negate,
  type Released,
  type SupportForces,
  type SupportMovements,
  ZERO,
} from '../chart/index';
import {
  type NamedBeam,
  type NamedSupport,
  settlementOf,
  springOf,
  turningOf,
  turningSpringOf,
} from './named-beam';
import type { Unknown } from './unknown';

/**
 * A part of the released beam that stands by itself: between two cuts, each over a support that does not give, and of a
 * kind the charts know.
 */
export type Piece = {
  from: number;
  to: number;
  released: Released;
  /** What holds it up, from the left, and what keeps it from turning. */
  vertical: readonly NamedSupport[];
  turning: NamedSupport | null;
  ei: Expression;
  /** Null where shear adds nothing. */
  ga: Expression | null;
};

/**
 * The released beam as pieces that the charts know; null where it is none: a cut in mid-span or over a spring, or a
 * change of EI.
 */
export function piecesOf(beam: NamedBeam, unknowns: readonly Unknown[]): Piece[] | null {
  const internal = unknowns.flatMap(({ kind, x }) => (kind === 'internal' ? [x] : []));
  const cuts = [...new Set([...beam.beam.hinges, ...internal])].sort((a, b) => a - b);
  const ends = [0, ...cuts, beam.beam.length];
  const pieces = ends.slice(1).map((to, k) => pieceBetween(beam, unknowns, ends[k]!, to));
  return pieces.every((piece) => piece !== null) ? pieces : null;
}

function pieceBetween(beam: NamedBeam, unknowns: readonly Unknown[], from: number, to: number): Piece | null {
  const isReleased = ({ index }: NamedSupport, component: 'vertical' | 'rotation') =>
    unknowns.some(({ redundant: r }) => r.component === component && r.support === index);
  const inside = beam.supports.filter(({ x }) => from <= x && x <= to);
  const holding = (component: 'vertical' | 'rotation') =>
    inside.filter((s) => s.support[component].kind !== 'free' && !isReleased(s, component));
  const [vertical, rotation] = [holding('vertical'), holding('rotation')];
  const isStill = (x: number) => vertical.some((s) => s.x === x && s.support.vertical.kind === 'rigid');
  const isCut = (x: number) => x > 0 && x < beam.beam.length;
  if ([from, to].some((x) => isCut(x) && !isStill(x))) return null;
  const released = releasedKind(vertical, rotation);
  const stiffness = stiffnessBetween(beam, from, to);
  return (
    released && stiffness && { from, to, released, vertical, turning: rotation[0] ?? null, ...stiffness }
  );
}

function releasedKind(vertical: readonly NamedSupport[], rotation: readonly NamedSupport[]): Released | null {
  const [first, second] = vertical;
  const [turning] = rotation;
  if (!first) return null;
  if (second)
    return vertical.length === 2 && !turning ? { kind: 'simple', left: first.at, right: second.at } : null;
  if (!turning || rotation.length > 1) return null;
  if (first === turning) return { kind: 'cantilever', root: first.at };
  return { kind: 'guided', guide: turning.at, prop: first.at };
}

export function stiffnessBetween(
  { beam, segments }: NamedBeam,
  from: number,
  to: number,
): Pick<Piece, 'ei' | 'ga'> | null {
  const inside = beam.segments.flatMap((segment, k) =>
    segment.to > from && segment.from < to ? [{ segment, named: segments[k]! }] : [],
  );
  const [first] = inside;
  const isUniform = inside.every(
    ({ segment }) => segment.ga === first?.segment.ga && segment.ei === first.segment.ei,
  );
  return first && isUniform ? { ei: first.named.ei, ga: first.named.ga } : null;
}

/** What of the loads acts on a piece. */
export const loadsOn = (beam: NamedBeam, { from, to }: Piece, loads: readonly NamedLoad[]): NamedLoad[] =>
  loads.flatMap((load) => partOn(beam, load, from, to) ?? []);

/** What of a load acts between two cuts: a load over a cut goes into its support, a couple there turns the right side. */
export function partOn(beam: NamedBeam, load: NamedLoad, from: number, to: number): NamedLoad | null {
  const { letters } = beam;
  if (load.kind === 'point' || load.kind === 'couple') {
    const x = letters.of(load.at);
    const tolerance = 1e-10 * beam.beam.length;
    const end = beam.beam.length - to < tolerance ? to + tolerance : to - tolerance;
    return x > from - tolerance && x < end ? load : null;
  }
  const setting = beam.setting(ZERO);
  const ends = [from, to].map((x) => beam.places.load(x)) as [Expression, Expression];
  const stretch =
    load.kind === 'line'
      ? { from: load.from, to: load.to, w0: load.w0, w1: load.w1 }
      : { from: load.from, to: load.to, w0: load.kappa, w1: load.kappa };
  const [, beyond] = cut(stretch, ends[0], setting);
  const [within] = beyond ? cut(beyond, ends[1], setting) : [null];
  if (!within) return null;
  return load.kind === 'line'
    ? { kind: 'line', ...within }
    : { kind: 'curvature', from: within.from, to: within.to, kappa: within.w0 };
}

/** A unit value of a redundant in its sense, on the piece; null where it does not act there. */
export function unitOn(beam: NamedBeam, unknown: Unknown, piece: Piece): NamedLoad | null {
  const at = unknown.support?.at ?? beam.places.load(unknown.x);
  if (unknown.x < piece.from || unknown.x > piece.to) return null;
  switch (unknown.kind) {
    case 'reaction':
      return { kind: 'point', at, p: constant(-1) };
    case 'fixing':
      return { kind: 'couple', at, m: constant(unknown.sense) };
    case 'internal':
      // A sagging pair turns what is left of the cut anticlockwise, and what is right of it clockwise.
      return { kind: 'couple', at, m: constant(unknown.x === piece.to ? 1 : -1) };
  }
}

/** What the supports of a piece are made to do. */
export function movementsOn({ vertical: [first, second], turning }: Piece): SupportMovements {
  const rise = (support: NamedSupport | undefined) => {
    const settlement = support && settlementOf(support);
    return settlement ? negate(settlement) : ZERO;
  };
  return {
    rises: [rise(first), rise(second)],
    rotation: (turning && turningOf(turning)) ?? ZERO,
  };
}

/** What its springs let its supports do where they carry these forces: each gives by its force over its stiffness. */
export function yieldingOn(
  { vertical, turning }: Piece,
  { forces, couple }: SupportForces,
): SupportMovements {
  const given = (force: Expression, stiffness: Expression | null) =>
    stiffness ? negate(divide(force, stiffness)) : ZERO;
  const rise = (k: 0 | 1) => given(forces[k], vertical[k] ? springOf(vertical[k]) : null);
  return { rises: [rise(0), rise(1)], rotation: given(couple, turning && turningSpringOf(turning)) };
}
