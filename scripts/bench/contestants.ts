import { solveBeam, stationPositions } from '@/engine/beam/index';
import { ContinuousBeam } from '@/engine/continuous/index';
import { type EnvelopeTask, SuperposedBeam, solveEnvelope } from '@/engine/envelope/index';
import type { Beam } from '@/engine/model/index';
import { ENVELOPE, VARIANTS } from './cases';
import { STATIONS } from './frame';
import type { Contestant } from './measure';
import { mathjs, mlMatrix, type Peer } from './peers';

/** Elements per span of the finer peers. */
const FINE = 50;
/** Goes round the variants, whose number is a power of two. */
const MASK = VARIANTS - 1;

/**
 * Every contestant takes each beam anew: its geometry, its loads, the reactions, and V, M, θ and v at eleven stations.
 * ml-matrix is raced before anything of mathjs has run, so that the code they share is compiled for it alone.
 */
export const fast = (beams: readonly Beam[]): Contestant => ({
  name: 'Putlog, exact extremes',
  run: ours(beams, false),
});

export const checked = (beams: readonly Beam[]): Contestant => ({
  name: 'Putlog, exact extremes and the check',
  run: ours(beams, true),
});

export const peer = (beams: readonly Beam[]): Contestant => ({
  name: 'ml-matrix, one element per segment',
  run: theirs(beams, mlMatrix(beams[0]!, 0)),
});

export const finePeer = (beams: readonly Beam[]): Contestant => ({
  name: `ml-matrix, ${FINE} elements per span`,
  run: theirs(beams, mlMatrix(beams[0]!, FINE)),
});

export const others = (beams: readonly Beam[]): Contestant[] => [
  { name: 'mathjs, one element per segment', run: theirs(beams, mathjs(beams[0]!, 0)) },
  { name: `mathjs, ${FINE} elements per span`, run: theirs(beams, mathjs(beams[0]!, FINE)) },
  {
    name: 'Putlog, the solver of 32 digits',
    run: (k) => {
      solveBeam(beams[k & MASK]!);
    },
  },
];

/** An exact envelope over all combinations and patterns, and a single solve of the same beam by the same solver. */
export const envelopes = ({ beam, sources, combinations }: EnvelopeTask = ENVELOPE): Contestant[] => {
  const stations = stationPositions(beam, STATIONS);
  const solver = new ContinuousBeam();
  const elementary = () => {
    solver.take(beam);
    return sources.map(({ group, loads }) => {
      solver.solve(loads, { movements: group === null });
      return { diagrams: solver.diagrams(), reactions: solver.reactions() };
    });
  };
  return [
    {
      name: 'a single solve, 32 digits',
      run: () => {
        solveBeam(beam);
      },
    },
    {
      name: 'the envelope, 32 digits',
      run: () => {
        solveEnvelope(ENVELOPE, stations);
      },
    },
    {
      name: 'a single solve, fast',
      run: ours(
        Array.from({ length: VARIANTS }, () => beam),
        false,
      ),
    },
    {
      name: 'the envelope, of fast solves',
      run: () => {
        new SuperposedBeam(sources, elementary()).envelope(combinations, stations);
      },
    },
  ];
};

function ours(beams: readonly Beam[], check: boolean): (k: number) => void {
  const solver = new ContinuousBeam();
  const vertical = new Float64Array(beams[0]!.supports.length);
  const moment = new Float64Array(beams[0]!.supports.length);
  return (k) => {
    if (!solver.take(beams[k & MASK]!)) throw new Error('a beam of the bench is no continuous one');
    solver.solve();
    solver.readReactions(vertical, moment);
    solver.extremes();
    solver.stations(STATIONS);
    if (check && !solver.isProven()) throw new Error('a beam of the bench is not proven');
  };
}

const theirs =
  (beams: readonly Beam[], solve: Peer): ((k: number) => void) =>
  (k) => {
    solve(beams[k & MASK]!);
  };
