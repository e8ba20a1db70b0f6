import {
  add,
  type ChartTerm,
  chartTerms,
  constant,
  cut,
  type Expression,
  movementTerms,
  type NamedLoad,
  negate,
  type Released,
  type SupportMovements,
  symbol,
  total,
  ZERO,
} from '../chart/index';
import { movementOf, type NamedBeam, type NamedSupport, settlement, turning } from './named-beam';
import type { Unknown } from './unknown';

/**
 * A part of the released beam that stands by itself: between two cuts, each over a support that does not yield, and of a
 * kind the charts know.
 */
export type Piece = {
  from: number;
  to: number;
  released: Released;
  movements: SupportMovements;
  ei: Expression;
  /** Of the given loads, those that act on this piece. */
  loads: NamedLoad[];
};

/** A sum of chart terms. */
export type Charted = { value: Expression; terms: ChartTerm[] };

/**
 * The released beam as pieces that the charts know; null where it is none: a cut in mid-span, a spring, two supports
 * that turn together, a change of EI, or shear that counts.
 */
export function piecesOf(beam: NamedBeam, unknowns: readonly Unknown[]): Piece[] | null {
  const cuts = [...new Set([...beam.beam.hinges, ...internalCuts(unknowns)])].sort((a, b) => a - b);
  const ends = [0, ...cuts, beam.beam.length];
  const pieces = ends.slice(1).map((to, k) => pieceBetween(beam, unknowns, ends[k]!, to));
  return pieces.every((piece) => piece !== null) ? pieces : null;
}

const internalCuts = (unknowns: readonly Unknown[]) =>
  unknowns.flatMap(({ kind, x }) => (kind === 'internal' ? [x] : []));

function pieceBetween(beam: NamedBeam, unknowns: readonly Unknown[], from: number, to: number): Piece | null {
  const isReleased = ({ index }: NamedSupport, component: 'vertical' | 'rotation') =>
    unknowns.some(({ redundant: r }) => r.component === component && r.support === index);
  const inside = beam.supports.filter(({ x }) => from <= x && x <= to);
  const holding = (component: 'vertical' | 'rotation') =>
    inside.filter((s) => s.support[component].kind !== 'free' && !isReleased(s, component));
  const [vertical, rotation] = [holding('vertical'), holding('rotation')];
  const rigid = [...vertical.map((s) => s.support.vertical), ...rotation.map((s) => s.support.rotation)];
  if (rigid.some(({ kind }) => kind !== 'rigid')) return null;
  const isCut = (x: number) => x > 0 && x < beam.beam.length;
  if ([from, to].some((x) => isCut(x) && !vertical.some((s) => s.x === x))) return null;
  const released = releasedKind(vertical, rotation);
  const ei = stiffnessBetween(beam, from, to);
  if (!released || !ei) return null;
  const rise = (s: NamedSupport | undefined) =>
    s && movementOf(s.support.vertical) !== 0 ? negate(symbol(settlement(s.letter))) : ZERO;
  const root = rotation[0];
  const turn = root && movementOf(root.support.rotation) !== 0 ? symbol(turning(root.letter)) : ZERO;
  const loads = beam.chartLoads.flatMap(({ load }) => partOn(beam, load, from, to) ?? []);
  return {
    from,
    to,
    released,
    movements: { rises: [rise(vertical[0]), rise(vertical[1])], rotation: turn },
    ei,
    loads,
  };
}

function releasedKind(vertical: readonly NamedSupport[], rotation: readonly NamedSupport[]): Released | null {
  const [first, second] = vertical;
  if (vertical.length === 2 && rotation.length === 0)
    return { kind: 'simple', left: first!.at, right: second!.at };
  const isFixed = vertical.length === 1 && rotation.length === 1 && first === rotation[0];
  return isFixed ? { kind: 'cantilever', root: first!.at } : null;
}

function stiffnessBetween({ beam, stiffness }: NamedBeam, from: number, to: number): Expression | null {
  const inside = beam.segments.flatMap((segment, k) =>
    segment.to > from && segment.from < to ? [{ segment, k }] : [],
  );
  const isUniform = inside.every(
    ({ segment }) => segment.ga === null && segment.ei === inside[0]!.segment.ei,
  );
  return isUniform ? stiffness[inside[0]!.k]! : null;
}

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

/** A unit value of a redundant in its sense, on the piece. */
function unitOn(beam: NamedBeam, unknown: Unknown, piece: Piece): NamedLoad | null {
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

/**
 * The movement of the released beam at a redundant under the loads and the movements of its supports: against the sense
 * of a reaction, in the sense of an internal moment. Null where the charts do not cover it.
 */
export function chartedGap(beam: NamedBeam, pieces: readonly Piece[], at: Unknown): Charted | null {
  return movementAt(beam, pieces, at, (piece, place, movement) => {
    const setting = beam.setting(piece.ei);
    const found = piece.loads.map((load) => chartTerms(piece.released, load, place, movement, setting));
    if (found.some((terms) => terms === null)) return null;
    return [
      ...found.flatMap((terms) => terms ?? []),
      ...movementTerms(piece.released, piece.movements, place, movement, setting),
    ];
  });
}

/** f_ij: the movement at one redundant, in its sense, for a unit value of another. */
export function chartedFlexibility(
  beam: NamedBeam,
  pieces: readonly Piece[],
  at: Unknown,
  unit: Unknown,
): Charted | null {
  const found = movementAt(beam, pieces, at, (piece, place, movement) => {
    const load = unitOn(beam, unit, piece);
    return load ? chartTerms(piece.released, load, place, movement, beam.setting(piece.ei)) : [];
  });
  return found && at.kind !== 'internal' ? turnedRound(found) : found;
}

type TermsAt = (piece: Piece, place: Expression, movement: 'deflection' | 'slope') => ChartTerm[] | null;

function movementAt(
  beam: NamedBeam,
  pieces: readonly Piece[],
  at: Unknown,
  termsAt: TermsAt,
): Charted | null {
  const place = at.support?.at ?? beam.places.load(at.x);
  const beside = pieces.filter(({ from, to }) => from <= at.x && at.x <= to);
  if (at.kind === 'internal') {
    // Slopes are clockwise: the kink is the right side's less the left side's.
    const [left, right] = beside.map((piece) => termsAt(piece, place, 'slope'));
    return left && right ? sumOf([...left.map(opposite), ...right]) : null;
  }
  const terms = termsAt(beside[0]!, place, at.kind === 'reaction' ? 'deflection' : 'slope');
  if (!terms) return null;
  return sumOf(at.sense < 0 ? terms.map(opposite) : terms);
}

const opposite = (term: ChartTerm): ChartTerm => ({ ...term, value: negate(term.value) });
const sumOf = (terms: ChartTerm[]): Charted => ({ value: total(terms), terms });
const turnedRound = ({ terms }: Charted): Charted => sumOf(terms.map(opposite));

/** The same with another sum added: a spring's 1/k. */
export const withAdded = ({ value, terms }: Charted, more: Expression): Charted => ({
  value: add(value, more),
  terms,
});
