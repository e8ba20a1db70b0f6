/** Results beyond the diagrams, each proven: what the endpoints answer and the page draws. Needs no schema. */
import {
  type AbsoluteMoment,
  type AskedQuantity,
  absoluteMoment,
  type Direction,
  type InfluenceLine,
  influenceLine,
  readInfluenceQuantity,
  readWheels,
  type SolveMoved,
  type TrainExtreme,
  type Wheel,
  worstTrain,
} from '@/engine/influence/index';
import {
  type Beam,
  type BeamDocument,
  checkRedundants,
  type Fault,
  type Reading,
  type Redundant,
  readBeam,
} from '@/engine/model/index';
import { isProven } from '@/engine/proof/index';
import {
  type FirstFrequency,
  firstFrequency,
  type Masses,
  type Prepare,
  readMasses,
  vibratingBeam,
} from '@/engine/vibration/index';
import { unproven, unsolvable } from './solve';

/** A beam whose redundants, if any are chosen, are in order. */
export type ReadBeam = { beam: Beam; redundants?: readonly Redundant[] | undefined };

export function readWithRedundants(document: BeamDocument): Reading<ReadBeam> {
  const beam = readBeam(document);
  if (!beam.ok) return beam;
  const { redundants } = document;
  const faults = redundants ? checkRedundants(beam.value, redundants) : [];
  return faults.length > 0 ? { ok: false, faults } : { ok: true, value: { beam: beam.value, redundants } };
}

/** The influence line of a quantity; faults of what was asked for are at `quantity`. */
export function solveInfluence(
  { beam, redundants }: ReadBeam,
  asked: AskedQuantity,
  solve?: SolveMoved,
): Reading<InfluenceLine> {
  const quantity = readInfluenceQuantity(beam, asked);
  if (!quantity.ok) return { ok: false, faults: within('quantity', quantity.faults) };
  return attempt({ beam, redundants }, () => {
    const line = influenceLine(beam, quantity.value, redundants, solve);
    return isProven(line.proof, beam) ? { ok: true, value: line } : unproven('Its proof is off by too much.');
  });
}

export type Train = {
  wheels: readonly Wheel[];
  directions: readonly Direction[];
};

export type TrainOnLine = { influence: InfluenceLine; max: TrainExtreme; min: TrainExtreme };

/** The worst positions of a train for one quantity; faults are at `wheels` and `quantity`. */
export function solveTrain(
  read: ReadBeam,
  asked: AskedQuantity,
  train: Train,
  solve?: SolveMoved,
): Reading<TrainOnLine> {
  const wheels = readWheels(train.wheels);
  const influence = solveInfluence(read, asked, solve);
  if (!wheels.ok || !influence.ok) {
    return { ok: false, faults: [...wheelFaults(wheels), ...(influence.ok ? [] : influence.faults)] };
  }
  const worst = worstTrain(influence.value.line, wheels.value, train.directions);
  return { ok: true, value: { influence: influence.value, ...worst } };
}

export type AbsoluteMoments = { max: AbsoluteMoment; min: AbsoluteMoment };

/** Influence lines of the moments at joints, times the points of the beam, times SOLVING and the wheels squared: a second. */
const MOST_WORK = 330_000;
/** What it takes to solve a line, beside the pairs of wheels on it. */
const SOLVING = 2;

/** How many influence lines the absolute moment is found from: one for a joint, two where it holds rotation. */
export const jointLines = ({ supports }: Beam): number =>
  supports.reduce((count, { rotation }) => count + (rotation.kind === 'free' ? 1 : 2), 2);

/** The largest and smallest moment of a train at any section in any position; faults are at `wheels`. */
export function solveAbsoluteMoment(
  read: ReadBeam,
  train: Train,
  solve?: SolveMoved,
): Reading<AbsoluteMoments> {
  const { beam, redundants } = read;
  const wheels = readWheels(train.wheels);
  if (!wheels.ok) return { ok: false, faults: wheelFaults(wheels) };
  const lines = jointLines(beam);
  const work = lines * (beam.supports.length + beam.hinges.length + beam.segments.length + 2);
  const most = Math.floor(Math.sqrt(Math.max(0, MOST_WORK / work - SOLVING)));
  if (wheels.value.length > most) {
    const message =
      most < 1
        ? 'The absolute moment of a beam with so many supports takes too long. Ask for one section.'
        : `The absolute moment of a beam with so many supports takes at most ${most} wheels. Leave some out, or ask for one section.`;
    return { ok: false, faults: [{ path: ['wheels'], code: 'out_of_range', message }] };
  }
  return attempt(read, () => {
    const { max, min, proof } = absoluteMoment(beam, wheels.value, train.directions, redundants, solve);
    return isProven(proof, beam)
      ? { ok: true, value: { max, min } }
      : unproven('Its proof is off by too much.');
  });
}

/** Pieces that the supports, hinges, steps and masses may cut a beam into whose frequency is asked for: about a second. */
const MOST_PIECES = 400;

/** The first natural frequency; faults are at `distributed` and `lumped`, and at the top where nothing moves. */
export function solveFrequency(
  { beam }: Pick<ReadBeam, 'beam'>,
  given: Masses,
  prepare?: Prepare,
): Reading<FirstFrequency> {
  const masses = readMasses(beam, given);
  if (!masses.ok) return masses;
  const { length } = vibratingBeam(beam, masses.value).pieces;
  if (length > MOST_PIECES) {
    const message = `The supports, steps and masses cut the beam into ${length} pieces, and at most ${MOST_PIECES} are possible. Put masses together.`;
    return { ok: false, faults: [{ path: [], code: 'out_of_range', message }] };
  }
  return attempt({ beam }, () => {
    const found = firstFrequency(beam, masses.value, prepare);
    if (found) return { ok: true, value: found };
    const message = 'No mass can move: without one there is no natural frequency. Give the mass of the beam.';
    return { ok: false, faults: [{ path: [], code: 'required', message }] };
  });
}

function attempt<T>({ beam, redundants }: ReadBeam, work: () => Reading<T>): Reading<T> {
  try {
    return work();
  } catch (error) {
    return unsolvable(error, beam, redundants);
  }
}

const within = (field: string, faults: readonly Fault[]): Fault[] =>
  faults.map((fault) => ({ ...fault, path: [field, ...fault.path] }));

const wheelFaults = (reading: Reading<readonly Wheel[]>): Fault[] =>
  reading.ok ? [] : within('wheels', reading.faults);
