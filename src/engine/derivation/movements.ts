import { type ChartedPart, chartedFlexibility, chartedGap } from './charted';
import { addUpTo, fromChart, fromWork, type MovementPart } from './movement';
import { type Piece, piecesOf } from './pieces';
import type { Kind } from './units';
import { moves, type Unknown } from './unknown';
import type { Worked } from './values';
import { ReleasedStates, workParts } from './virtual-work';

/** The movements of the released beam, each by its parts; found when they are first asked for. */
export type Movements = {
  pieces: Piece[] | null;
  gap: (i: number) => MovementPart[];
  flexibility: (i: number, j: number) => MovementPart[];
};

export function movementsOf(worked: Worked): Movements {
  const { beam, unknowns, gaps, flexibility } = worked;
  const pieces = piecesOf(beam, unknowns);
  const states = lazily(() => new ReleasedStates(beam.beam, unknowns));
  return {
    pieces,
    gap: (i) => {
      const at = unknowns[i]!;
      const found = pieces && [...chartedGap(beam, pieces, at)];
      const parts = found?.flatMap(([tex, part]) =>
        part ? [fromChart(beam.letters, part)] : alone(worked, states(), at, tex),
      );
      return parts && addUpTo(beam.letters, parts, gaps[i]!) ? parts : underLoads(worked, states(), at);
    },
    flexibility: (i, j) => {
      const found = pieces && chartedFlexibility(beam, pieces, unknowns[i]!, unknowns[j]!);
      const parts = found?.map((part: ChartedPart) => fromChart(beam.letters, part));
      return parts && addUpTo(beam.letters, parts, flexibility[i]![j]!)
        ? parts
        : underUnit(worked, states(), unknowns[i]!, unknowns[j]!);
    },
  };
}

function lazily<T>(make: () => T): () => T {
  let made: { value: T } | null = null;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}

export const gapKind = (unknown: Unknown): Kind => moves(unknown);

/** f_ij is a movement at i for a unit value at j. */
export const flexibilityKind = (at: Unknown, unit: Unknown): Kind =>
  `${moves(at)} per ${unit.kind === 'reaction' ? 'force' : 'moment'}`;

/** A gap is against the sense of a reaction and in that of an internal moment. */
const senseOf = (at: Unknown): 1 | -1 => (at.kind === 'internal' ? 1 : -1);

function underLoads({ beam, unknowns }: Worked, states: ReleasedStates, at: Unknown): MovementPart[] {
  const own = states.unit(at);
  const work = { beam, unknowns, own, other: states.loads(), isLoaded: true, sense: senseOf(at) };
  return workParts(work).map((part) => fromWork(beam.letters, part, gapKind(at)));
}

/** A load that no case covers, by itself. */
function alone({ beam, unknowns }: Worked, states: ReleasedStates, at: Unknown, tex: string): MovementPart[] {
  const loads = beam.groups.filter((group) => group.tex === tex).map(({ numeric }) => numeric);
  const work = {
    beam: { ...beam, beam: { ...beam.beam, loads } },
    unknowns,
    own: states.unit(at),
    other: states.load(tex, loads),
    isLoaded: true,
    sense: senseOf(at),
  };
  return workParts(work)
    .filter(({ kind }) => kind === 'bending' || kind === 'curvature')
    .map((part) => fromWork(beam.letters, part, gapKind(at), { kind: 'load', tex }));
}

function underUnit(
  { beam, unknowns }: Worked,
  states: ReleasedStates,
  at: Unknown,
  unit: Unknown,
): MovementPart[] {
  const [own, other] = [states.unit(at), states.unit(unit)];
  const work = { beam, unknowns, own, other, isLoaded: false, sense: 1 as const };
  return workParts(work).map((part) => fromWork(beam.letters, part, flexibilityKind(at, unit)));
}
