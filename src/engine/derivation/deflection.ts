import { constant, type Expression, expand, multiply, subtract } from '../chart/index';
import { type Extreme, evaluate, extremes, type Piecewise, piecewise } from '../polynomial/index';
import { chartedDeflection } from './charted';
import { placeWords } from './display';
import { finalDeflection } from './final';
import { type Found, fromChart, fromWork, type MovementPart, movementSteps } from './movement';
import type { NamedBeam, NamedSupport } from './named-beam';
import { type Piece, piecesOf } from './pieces';
import type { DerivationStep } from './types';
import type { Worked } from './values';
import { ReleasedStates, underLoads, workParts } from './virtual-work';

/** Where a deflection is worked out. */
type Spot = { x: number; name: string; index: string };

/**
 * Of a determinate beam, the largest deflection of each span and those of free ends; else the largest of all and those
 * of free ends. By the charts where they hold it, else by a unit load there on the released beam.
 */
export function deflectionSteps(worked: Worked): DerivationStep[] {
  const { beam, unknowns } = worked;
  const pieces = unknowns.length === 0 ? piecesOf(beam, []) : null;
  const spots = pieces
    ? [...pieces.flatMap((piece) => spanSpots(worked, piece)), ...freeEnds(beam)]
    : mainSpots(worked);
  return spots.flatMap((spot) => stepsAt(worked, pieces, spot));
}

/** The places of free ends, whose deflection is given whatever it is. */
function freeEnds({ beam, supports }: NamedBeam): Spot[] {
  const isHeld = (x: number) => supports.some((s) => s.x === x && s.support.vertical.kind !== 'free');
  return [
    ...(isHeld(0) ? [] : [{ x: 0, name: 'Deflection at the left end', index: '\\mathrm{left}' }]),
    ...(isHeld(beam.length)
      ? []
      : [{ x: beam.length, name: 'Deflection at the right end', index: '\\mathrm{right}' }]),
  ];
}

function spanSpots(worked: Worked, { vertical: [first, second] }: Piece): Spot[] {
  if (!first || !second) return [];
  const { deflection } = worked.solution.diagrams;
  const { max, min } = extremes(within(deflection, first.x, second.x));
  const name = `Largest deflection between ${first.letter} and ${second.letter}`;
  return spotAt(worked.beam, larger(max, min), name, `${first.letter}${second.letter}`, [first, second]);
}

/** A diagram between two of its breaks. */
function within({ breaks, degree, coefficients }: Piecewise, from: number, to: number): Piecewise {
  const pieces = [...breaks.subarray(0, -1).keys()].filter((k) => from <= breaks[k]! && breaks[k + 1]! <= to);
  return piecewise(
    [...pieces.map((k) => breaks[k]!), to],
    pieces.map((k) => [...coefficients.subarray(k * (degree + 1), (k + 1) * (degree + 1))]),
  );
}

function mainSpots(worked: Worked): Spot[] {
  const { beam, solution } = worked;
  const ends = freeEnds(beam);
  const { max, min } = solution.extremes.deflection;
  const extreme = larger(max, min);
  if (ends.some(({ x }) => extreme.at.includes(x))) return ends;
  return [...spotAt(beam, extreme, 'Largest deflection', '\\mathrm{max}', []), ...ends];
}

/** Downward if there is a choice. */
const larger = (max: Extreme, min: Extreme): Extreme => (-min.value >= max.value ? min : max);

function spotAt(
  beam: NamedBeam,
  { at, value }: Extreme,
  name: string,
  index: string,
  span: readonly NamedSupport[],
): Spot[] {
  const x = at[0]!;
  if (value === 0 || span.some((support) => support.x === x)) return [];
  const isMiddle = isHalfway(beam, x);
  const where = placeWords(x, beam.letters.units.of('length', 'base'));
  return [
    {
      x,
      index,
      name: isMiddle && beam.supports.length === 2 ? 'Deflection at midspan' : `${name}, ${where}`,
    },
  ];
}

/** The supports on either side of a place. */
function around({ supports }: NamedBeam, x: number): [NamedSupport | undefined, NamedSupport | undefined] {
  const held = supports.filter(({ support }) => support.vertical.kind !== 'free');
  return [held.findLast((s) => s.x < x), held.find((s) => s.x > x)];
}

const isHalfway = (beam: NamedBeam, x: number): boolean => {
  const [left, right] = around(beam, x);
  return (
    left !== undefined && right !== undefined && Math.abs(left.x + right.x - 2 * x) <= 1e-7 * beam.beam.length
  );
};

const PLACE = 'x_{\\delta}';

/** The place's formula: half of a span, or else a letter of its own. */
function placeOf(beam: NamedBeam, x: number): Expression {
  const known = beam.places.find(x);
  if (known) return known;
  const [left, right] = around(beam, x);
  if (left && right && isHalfway(beam, x)) {
    const half = multiply(constant({ n: 1, d: 2 }), expand(subtract(right.at, left.at)));
    return expand([...left.at, ...half]);
  }
  let tex = PLACE;
  for (let k = 2; beam.letters.has(tex); k++) tex = `x_{\\delta ${k}}`;
  return beam.places.give(x, beam.letters.define(tex, x, 'length'));
}

function stepsAt(worked: Worked, pieces: Piece[] | null, { x, name, index }: Spot): DerivationStep[] {
  const { beam, solution } = worked;
  const found = (title: string): Found => ({
    id: `deflection-${x.toFixed(3)}`,
    title,
    short: 'Of it',
    left: `\\delta_{${index}}`,
    partTex: (part) => `\\delta_{${index},${part}}`,
    kind: 'deflection',
    value: -evaluate(solution.diagrams.deflection, x)[0],
    extra: { figure: { structure: 'built' } },
  });
  const place = placeOf(beam, x);
  const charted = pieces ? chartedParts(beam, pieces, x, place) : finalDeflection(worked, x, place);
  if (charted && isSame(beam, charted.parts, found('').value))
    return movementSteps(beam.letters, found(`${name}${charted.how}`), charted.parts);
  return movementSteps(beam.letters, found(`${name}, by a unit load there`), byUnitLoad(worked, x));
}

function chartedParts(beam: NamedBeam, pieces: readonly Piece[], x: number, place: Expression) {
  const piece = pieces.find(({ from, to }) => from <= x && x <= to)!;
  const parts = [...chartedDeflection(beam, piece, place).values()];
  if (!parts.every((part) => part !== null)) return null;
  return { parts: parts.map((part) => fromChart(beam.letters, part)), how: '' };
}

const SAME = 1e-9;

function isSame({ letters }: NamedBeam, parts: readonly MovementPart[], want: number): boolean {
  const sizes = parts.map((part) =>
    'expression' in part ? letters.largest(part.expression) : Math.abs(part.value),
  );
  const total = parts.reduce((sum, { value }) => sum + value, 0);
  return Math.abs(total - want) <= SAME * Math.max(Math.abs(want), ...sizes);
}

/** The work of the moments on those of a unit load: of the released beam, on which it does no work at the redundants. */
function byUnitLoad(worked: Worked, x: number): MovementPart[] {
  const { beam, unknowns, solution } = worked;
  const own = new ReleasedStates(beam.beam, unknowns).unitLoad(x);
  const other = underLoads(solution, '');
  const work = { beam, unknowns, own, other, isLoaded: true, sense: 1 as const, cuts: [x] };
  return workParts(work).map((part) => fromWork(beam.letters, part, 'deflection'));
}
