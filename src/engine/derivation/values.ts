import { type Solution, solveBeam } from '../beam/index';
import type { Redundant } from '../model/index';
import type { NamedBeam } from './named-beam';
import { type Part, partsOf } from './statics';
import { type Unknown, unknownsOf } from './unknown';

/** The force method's results in the derivation's letters and senses. */
export type Worked = {
  beam: NamedBeam;
  solution: Solution;
  unknowns: Unknown[];
  /** The beam cut where its moment is known. */
  parts: Part[];
  /** Against the sense of a reaction, in the sense of an internal moment. m or rad. */
  gaps: number[];
  /** Both in their sense. */
  flexibility: number[][];
  /** What the support of each redundant moves against its sense. */
  imposed: number[];
  values: number[];
};

export function work(beam: NamedBeam, redundants?: readonly Redundant[]): Worked {
  const solution = solveBeam(beam.beam, redundants);
  const { forceMethod } = solution;
  const unknowns = unknownsOf(beam, forceMethod.redundants);
  const against = unknowns.map(({ kind, sense }) => (kind === 'internal' ? 1 : -sense));
  const values = forceMethod.values.map((value, i) => settled(solution, unknowns[i]!, value));
  return {
    beam,
    solution,
    unknowns,
    parts: partsOf(beam, unknowns),
    gaps: forceMethod.gaps.map((gap, i) => {
      const closed = forceMethod.flexibility[i]!.map((f, j) => Math.abs(f * values[j]!));
      return Math.abs(gap) <= ROUNDING * Math.max(...closed) ? 0 : gap * against[i]! + 0;
    }),
    flexibility: forceMethod.flexibility.map((row, i) =>
      row.map((f, j) => (isNothing(forceMethod, i, j) ? 0 : f * unknowns[i]!.sense * unknowns[j]!.sense)),
    ),
    imposed: forceMethod.imposed.map((movement, i) => movement * against[i]! + 0),
    values: values.map((value, i) => value * unknowns[i]!.sense + 0),
  };
}

/** What rounding leaves of what is nothing. */
const ROUNDING = 1e-13;

/** A redundant that is nothing beside the forces, or the moments, of the beam. */
function settled({ reactions, extremes }: Solution, unknown: Unknown, value: number): number {
  const { max, min } = extremes.moment;
  const largest =
    unknown.kind === 'reaction'
      ? Math.max(...reactions.map(({ vertical }) => Math.abs(vertical)))
      : Math.max(Math.abs(max.value), Math.abs(min.value));
  return Math.abs(value) <= ROUNDING * largest ? 0 : value;
}

/** A coefficient that is nothing beside the two on the diagonal. */
const isNothing = ({ flexibility }: Solution['forceMethod'], i: number, j: number): boolean =>
  Math.abs(flexibility[i]![j]!) <= ROUNDING * Math.sqrt(flexibility[i]![i]! * flexibility[j]![j]!);
