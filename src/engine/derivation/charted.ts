import {
  add,
  type ChartTerm,
  chartTerms,
  constant,
  divide,
  type Expression,
  type Movement,
  movementTerms,
  type NamedLoad,
  negate,
  type SupportForces,
  shearTerms,
  supportForces,
  ZERO,
} from '../chart/index';
import { type NamedBeam, springOf, turningSpringOf } from './named-beam';
import { loadsOn, movementsOn, type Piece, unitOn, yieldingOn } from './pieces';
import type { Unknown } from './unknown';

/** A part of a movement with its closed form: under one load, by shear, by the springs, by the supports' movements. */
export type ChartedPart = { cause: Cause; value: Expression; terms: ChartTerm[] };

/** Why the beam moves: a load by its letter, or else. */
export type Cause =
  | { kind: 'load'; tex: string }
  | { kind: 'loads' | 'ends' | 'bending' | 'shear' | 'springs' | 'movements' };

/** The movement of a piece at a place, down or clockwise; null where no case covers it. */
type TermsAt = (piece: Piece, place: Expression, movement: Movement) => ChartTerm[] | null;

/**
 * The parts of the movement of the released beam at a redundant under the loads and the movements of its supports:
 * against the sense of a reaction, in the sense of an internal moment. Null for a load that no case covers.
 */
export function chartedGap(
  beam: NamedBeam,
  pieces: readonly Piece[],
  at: Unknown,
): Map<string, ChartedPart | null> {
  const place = placeOf(beam, at);
  const part = (cause: Cause, termsAt: TermsAt) => charted(cause, atUnknown(pieces, at, place, termsAt));
  return partsUnder(beam, part);
}

/** The same of one place of a piece: what it deflects, down. */
export function chartedDeflection(
  beam: NamedBeam,
  piece: Piece,
  place: Expression,
  more: readonly NamedLoad[] = [],
): Map<string, ChartedPart | null> {
  return partsUnder(beam, (cause, termsAt) => charted(cause, termsAt(piece, place, 'deflection')), more);
}

type PartOf = (cause: Cause, termsAt: TermsAt) => ChartedPart | null;

/** One part for every letter of a load, then what the supports, the springs and shear add. */
function partsUnder(
  beam: NamedBeam,
  part: PartOf,
  more: readonly NamedLoad[] = [],
): Map<string, ChartedPart | null> {
  const found = new Map<string, ChartedPart | null>();
  const keep = (key: string, one: ChartedPart | null) => {
    if (one === null || one.terms.length > 0) found.set(key, one);
  };
  for (const [tex, loads] of loadsByLetter(beam)) {
    keep(tex, part({ kind: 'load', tex }, bendingUnder(beam, loads)));
  }
  const all = [...beam.groups.flatMap(({ coarse }) => coarse), ...more];
  keep('movements', part({ kind: 'movements' }, movedSupports(beam)));
  keep('springs', part({ kind: 'springs' }, givenSprings(beam, all)));
  keep('shear', part({ kind: 'shear' }, shearUnder(beam, all)));
  return found;
}

function loadsByLetter({ groups }: NamedBeam): Map<string, NamedLoad[]> {
  const found = new Map<string, NamedLoad[]>();
  for (const { tex, coarse } of groups) found.set(tex, [...(found.get(tex) ?? []), ...coarse]);
  return found;
}

/** f_ij: the movement at one redundant, in its sense, for a unit value of another. Null where no case covers it. */
export function chartedFlexibility(
  beam: NamedBeam,
  pieces: readonly Piece[],
  at: Unknown,
  unit: Unknown,
): ChartedPart[] | null {
  const place = placeOf(beam, at);
  const sense = at.kind === 'internal' ? (terms: ChartTerm[]) => terms : turnedRound;
  const loads = (piece: Piece): NamedLoad[] => {
    const load = unitOn(beam, unit, piece);
    return load ? [load] : [];
  };
  const parts = [
    { kind: 'bending' as const, termsAt: bendingOf(beam, loads) },
    { kind: 'shear' as const, termsAt: shearOf(beam, loads) },
    { kind: 'springs' as const, termsAt: springsOf(beam, loads) },
  ].map(({ kind, termsAt }) => {
    const terms = atUnknown(pieces, at, place, termsAt);
    return charted({ kind }, terms && sense(terms));
  });
  if (!parts.every((part) => part !== null)) return null;
  const own = at === unit ? ownCompliance(at) : ZERO;
  return parts
    .map((part) => (part.cause.kind === 'springs' ? { ...part, value: [...part.value, ...own] } : part))
    .filter(({ value }) => value.length > 0);
}

/** 1/k where the redundant is the force in a spring. */
function ownCompliance({ kind, support }: Unknown): Expression {
  const stiffness =
    support &&
    (kind === 'reaction' ? springOf(support) : kind === 'fixing' ? turningSpringOf(support) : null);
  return stiffness ? divide(constant(1), stiffness) : ZERO;
}

const placeOf = (beam: NamedBeam, at: Unknown): Expression => at.support?.at ?? beam.places.load(at.x);

const bendingUnder = (beam: NamedBeam, loads: readonly NamedLoad[]): TermsAt =>
  bendingOf(beam, (piece) => loadsOn(beam, piece, loads));

function bendingOf(beam: NamedBeam, loads: (piece: Piece) => NamedLoad[]): TermsAt {
  return (piece, place, movement) => {
    const setting = beam.setting(piece.ei);
    const found = loads(piece).map((load) => chartTerms(piece.released, load, place, movement, setting));
    return found.some((terms) => terms === null) ? null : found.flatMap((terms) => terms ?? []);
  };
}

const movedSupports =
  (beam: NamedBeam): TermsAt =>
  (piece, place, movement) =>
    movementTerms(piece.released, movementsOn(piece), place, movement, beam.setting(piece.ei));

const givenSprings = (beam: NamedBeam, loads: readonly NamedLoad[]): TermsAt =>
  springsOf(beam, (piece) => loadsOn(beam, piece, loads));

function springsOf(beam: NamedBeam, loads: (piece: Piece) => NamedLoad[]): TermsAt {
  return (piece, place, movement) => {
    if (!isSprung(piece)) return [];
    const carried = loads(piece).map((load) => supportForces(piece.released, load));
    const together: SupportForces = {
      forces: [
        add(...carried.map(({ forces: [first] }) => first)),
        add(...carried.map(({ forces: [, second] }) => second)),
      ],
      couple: add(...carried.map(({ couple }) => couple)),
    };
    const movements = yieldingOn(piece, together);
    return movementTerms(piece.released, movements, place, movement, beam.setting(piece.ei));
  };
}

const isSprung = ({ vertical, turning }: Piece): boolean =>
  vertical.some(({ support }) => support.vertical.kind === 'spring') ||
  turning?.support.rotation.kind === 'spring';

const shearUnder = (beam: NamedBeam, loads: readonly NamedLoad[]): TermsAt =>
  shearOf(beam, (piece) => loadsOn(beam, piece, loads));

function shearOf(beam: NamedBeam, loads: (piece: Piece) => NamedLoad[]): TermsAt {
  return (piece, place, movement) => {
    const { released, ei, ga } = piece;
    return ga ? shearTerms(released, loads(piece), place, movement, beam.setting(ei), ga) : [];
  };
}

/** What the pieces beside a redundant do there: clockwise slopes, so that a kink is the right side's less the left's. */
function atUnknown(
  pieces: readonly Piece[],
  at: Unknown,
  place: Expression,
  termsAt: TermsAt,
): ChartTerm[] | null {
  const beside = pieces.filter(({ from, to }) => from <= at.x && at.x <= to);
  if (at.kind === 'internal') {
    const [left, right] = beside.map((piece) => termsAt(piece, place, 'slope'));
    return left && right ? [...turnedRound(left), ...right] : null;
  }
  const terms = termsAt(beside[0]!, place, at.kind === 'reaction' ? 'deflection' : 'slope');
  return terms && at.sense < 0 ? turnedRound(terms) : terms;
}

const turnedRound = (terms: readonly ChartTerm[]): ChartTerm[] =>
  terms.map((term) => ({ ...term, value: negate(term.value) }));

/** Every term by itself, so that each can be told by its chart. */
const charted = (cause: Cause, terms: ChartTerm[] | null): ChartedPart | null =>
  terms && { cause, terms, value: terms.flatMap(({ value }) => value) };
