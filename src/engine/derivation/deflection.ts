import type { Expression } from '../chart/index';
import { type Extreme, evaluate, extremes, type Piecewise, piecewise } from '../polynomial/index';
import { chartedDeflection } from './charted';
import { placeWords } from './display';
import { finalDeflection } from './final';
import {
  addUpTo,
  type Found,
  fromChart,
  fromWork,
  type MovementPart,
  movementSteps,
  together,
} from './movement';
import type { NamedBeam } from './named-beam';
import { type Piece, piecesOf } from './pieces';
import { isHalfway, placeOf } from './spot';
import type { DerivationStep } from './types';
import type { Worked } from './values';
import { ReleasedStates, underLoads, workParts } from './virtual-work';

/** Where a deflection is worked out: what its step is called, and those of its parts. */
type Spot = { x: number; name: string; short: string; index: string };

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
  return (['left', 'right'] as const).flatMap((side) => {
    const x = side === 'left' ? 0 : beam.length;
    const name = `Deflection at the ${side} end`;
    return isHeld(x) ? [] : [{ x, name, short: name, index: `\\mathrm{${side}}` }];
  });
}

function spanSpots(worked: Worked, { vertical: [first, second] }: Piece): Spot[] {
  if (!first || !second) return [];
  const { deflection } = worked.solution.diagrams;
  const { max, min } = extremes(within(deflection, first.x, second.x));
  const name = `Largest deflection between ${first.letter} and ${second.letter}`;
  return spotAt(worked.beam, larger(max, min), name, `${first.letter}${second.letter}`);
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
  return [...spotAt(beam, extreme, 'Largest deflection', '\\mathrm{max}'), ...ends];
}

/** Downward if there is a choice. */
const larger = (max: Extreme, min: Extreme): Extreme => (-min.value >= max.value ? min : max);

/** Nothing where a support is: its movement is given, or found by its spring. */
function spotAt(beam: NamedBeam, { at, value }: Extreme, name: string, index: string): Spot[] {
  const x = at[0]!;
  if (value === 0 || beam.supports.some((support) => support.x === x)) return [];
  if (beam.supports.length === 2 && isHalfway(beam, x)) {
    const midspan = 'Deflection at midspan';
    return [{ x, index, name: midspan, short: midspan }];
  }
  const where = placeWords(x, beam.letters.units.of('length', 'base'));
  return [{ x, index, name: `${name}, ${where}`, short: `Deflection ${where}` }];
}

const PLACE = 'x_{\\delta}';

function stepsAt(worked: Worked, pieces: Piece[] | null, { x, name, short, index }: Spot): DerivationStep[] {
  const { beam, solution } = worked;
  const found = (title: string): Found => ({
    id: `deflection-${x.toFixed(3)}`,
    title,
    short,
    left: `\\delta_{${index}}`,
    partTex: (part) => `\\delta_{${index},${part}}`,
    kind: 'deflection',
    value: -evaluate(solution.diagrams.deflection, x)[0],
    extra: { figure: { structure: 'built' } },
  });
  const place = placeOf(beam, x, PLACE);
  const charted = pieces ? chartedParts(beam, pieces, x, place) : finalDeflection(worked, x, place);
  if (charted && addUpTo(beam.letters, charted.parts, found('').value))
    return movementSteps(beam.letters, found(`${name}${charted.how}`), charted.parts);
  return movementSteps(beam.letters, found(`${name}, by a unit load there`), byUnitLoad(worked, x));
}

function chartedParts(beam: NamedBeam, pieces: readonly Piece[], x: number, place: Expression) {
  const piece = pieces.find(({ from, to }) => from <= x && x <= to)!;
  const parts = [...chartedDeflection(beam, piece, place).values()];
  if (!parts.every((part) => part !== null)) return null;
  return { parts: together(parts.map((part) => fromChart(beam.letters, part))), how: '' };
}

/** The work of the moments on those of a unit load: of the released beam, on which it does no work at the redundants. */
function byUnitLoad(worked: Worked, x: number): MovementPart[] {
  const { beam, unknowns, solution } = worked;
  const own = new ReleasedStates(beam.beam, unknowns).unitLoad(x);
  const other = underLoads(solution, '');
  const work = { beam, unknowns, own, other, isLoaded: true, sense: 1 as const, cuts: [x] };
  return workParts(work).map((part) => fromWork(beam.letters, part, 'deflection'));
}
