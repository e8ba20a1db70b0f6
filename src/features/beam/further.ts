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
import { type FirstFrequency, firstFrequency, type Masses, readMasses } from '@/engine/vibration/index';
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
export function solveInfluence({ beam, redundants }: ReadBeam, asked: AskedQuantity): Reading<InfluenceLine> {
  const quantity = readInfluenceQuantity(beam, asked);
  if (!quantity.ok) return { ok: false, faults: within('quantity', quantity.faults) };
  return attempt({ beam, redundants }, () => {
    const line = influenceLine(beam, quantity.value, redundants);
    return isProven(line.proof, beam) ? { ok: true, value: line } : unproven('Its proof is off by too much.');
  });
}

export type Train = {
  wheels: readonly Wheel[];
  directions: readonly Direction[];
};

export type TrainOnLine = { influence: InfluenceLine; max: TrainExtreme; min: TrainExtreme };

/** The worst positions of a train for one quantity; faults are at `wheels` and `quantity`. */
export function solveTrain(read: ReadBeam, asked: AskedQuantity, train: Train): Reading<TrainOnLine> {
  const wheels = readWheels(train.wheels);
  const influence = solveInfluence(read, asked);
  if (!wheels.ok || !influence.ok) {
    return { ok: false, faults: [...wheelFaults(wheels), ...(influence.ok ? [] : influence.faults)] };
  }
  const worst = worstTrain(influence.value.line, wheels.value, train.directions);
  return { ok: true, value: { influence: influence.value, ...worst } };
}

export type AbsoluteMoments = { max: AbsoluteMoment; min: AbsoluteMoment };

/** Joints of the beam, times its points, times the wheels squared, that one request may ask for: seconds of work. */
const MOST_WORK = 200_000;

/** The largest and smallest moment of a train at any section in any position; faults are at `wheels`. */
export function solveAbsoluteMoment(read: ReadBeam, train: Train): Reading<AbsoluteMoments> {
  const { beam, redundants } = read;
  const wheels = readWheels(train.wheels);
  if (!wheels.ok) return { ok: false, faults: wheelFaults(wheels) };
  const joints = beam.supports.length + 2;
  const points = joints + beam.hinges.length + beam.segments.length;
  if (joints * points * wheels.value.length ** 2 > MOST_WORK) {
    const most = Math.max(1, Math.floor(Math.sqrt(MOST_WORK / (joints * points))));
    const message = `The absolute moment of a beam with so many supports takes at most ${most} wheels. Leave some out, or ask for one section.`;
    return { ok: false, faults: [{ path: ['wheels'], code: 'out_of_range', message }] };
  }
  return attempt(read, () => {
    const { max, min, proof } = absoluteMoment(beam, wheels.value, train.directions, redundants);
    return isProven(proof, beam)
      ? { ok: true, value: { max, min } }
      : unproven('Its proof is off by too much.');
  });
}

/** The first natural frequency; faults are at `distributed` and `lumped`, and at the top where nothing moves. */
export function solveFrequency({ beam }: Pick<ReadBeam, 'beam'>, given: Masses): Reading<FirstFrequency> {
  const masses = readMasses(beam, given);
  if (!masses.ok) return masses;
  return attempt({ beam }, () => {
    const found = firstFrequency(beam, masses.value);
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
