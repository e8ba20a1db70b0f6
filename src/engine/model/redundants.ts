import { describeMotion, releaseMechanism } from './motion';
import { COINCIDENT } from './reader';
import { type Frame, findMotion, frameOf, placeOf, without } from './stability';
import type { Beam, Fault, Redundant, Restraint } from './types';
import { metres, nameRedundant, nameSupport } from './words';

export const holds = (restraint: Restraint): boolean => restraint.kind !== 'free';

/** Every reaction component, springs included, in the order of the supports; then the moment over interior supports. */
function components(beam: Beam): Redundant[] {
  const reactions = beam.supports.flatMap((support, i): Redundant[] => [
    ...(holds(support.vertical) ? [{ support: i, component: 'vertical' as const }] : []),
    ...(holds(support.rotation) ? [{ support: i, component: 'rotation' as const }] : []),
  ]);
  const moments = beam.supports
    .filter(({ at, vertical, rotation }) => {
      const interior = at > 0 && at < beam.length && !beam.hinges.includes(at);
      return interior && holds(vertical) && !holds(rotation);
    })
    .map(({ at }): Redundant => ({ at, component: 'moment' }));
  return [...reactions, ...moments];
}

/**
 * Every component that may be released alone: all that equilibrium alone does not determine. Reactions in the order of
 * the supports, springs included, then the internal moment over every interior support where the beam is continuous
 * and the support does not hold rotation.
 */
export function eligibleRedundants(beam: Beam): Redundant[] {
  if (beam.degree === 0) return [];
  const frame = frameOf(beam);
  return components(beam).filter((r) => findMotion(without(frame, r, placeOf(beam, r))) === null);
}

/** Every admissible set of eligible redundants: those whose release, all at once, leaves the beam stable. */
export function* admissibleSets(beam: Beam): Generator<Redundant[]> {
  const eligible = eligibleRedundants(beam);
  function* extend(chosen: Redundant[], frame: Frame, next: number): Generator<Redundant[]> {
    if (chosen.length === beam.degree) yield chosen;
    const missing = beam.degree - chosen.length;
    for (let i = next; missing > 0 && i + missing <= eligible.length; i++) {
      const redundant = eligible[i]!;
      const less = without(frame, redundant, placeOf(beam, redundant));
      // What leaves a mechanism leaves one with more released as well.
      if (findMotion(less) === null) yield* extend([...chosen, redundant], less, i + 1);
    }
  }
  yield* extend([], frameOf(beam), 0);
}

/** The redundant with its position brought to that of a point of the beam which it coincides with. */
export function placeRedundant(beam: Beam, redundant: Redundant): Redundant {
  if (redundant.component !== 'moment') return redundant;
  const at = coincident(beam, redundant.at);
  return { at: at ?? redundant.at, component: 'moment' };
}

/** The point of the beam that x coincides with; supports, where moments are released, are looked at first. */
function coincident({ length, supports, hinges, segments, loads }: Beam, at: number): number | undefined {
  const near = (x: number) => Math.abs(x - at) <= COINCIDENT * length;
  const found = supports.find((support) => near(support.at))?.at ?? hinges.find(near);
  if (found !== undefined) return found;
  if (near(0)) return 0;
  const segment = segments.find(({ to }) => near(to));
  if (segment) return segment.to;
  for (const load of loads) {
    if ('at' in load) {
      if (near(load.at)) return load.at;
    } else if (near(load.from)) return load.from;
    else if (near(load.to)) return load.to;
  }
  return undefined;
}

/** Everything that keeps the set from being the beam's redundants. */
export function checkRedundants(beam: Beam, set: readonly Redundant[]): Fault[] {
  const faults: Fault[] = [];
  const placed = set.map((redundant) => placeRedundant(beam, redundant));
  const keys = placed.map((redundant) => JSON.stringify(Object.entries(redundant).sort()));
  placed.forEach((redundant, i) => {
    const why = ineligible(beam, redundant);
    if (why) {
      faults.push({ path: ['redundants', i], code: 'ineligible_redundant', message: why });
    } else if (keys.indexOf(keys[i]!) < i) {
      const message = `${sentence(nameRedundant(beam, redundant))} is listed twice. Choose another for one of them.`;
      faults.push({ path: ['redundants', i], code: 'duplicate', message });
    }
  });
  if (set.length !== beam.degree) {
    faults.push({ path: ['redundants'], code: 'wrong_count', message: countMessage(beam, set.length) });
  }
  const motion = faults.length === 0 ? releaseMechanism(beam, placed) : null;
  if (motion) {
    const message = `Without these redundants the beam is a mechanism. ${describeMotion(beam, placed)} Choose another set.`;
    faults.push({ path: ['redundants'], code: 'inadmissible_redundants', message, motion });
  }
  return faults;
}

function countMessage({ degree }: Beam, count: number): string {
  if (degree === 0) return 'The beam is statically determinate: it has no redundants. Leave them out.';
  const ask = degree === 1 ? 'Choose one redundant' : `Choose ${degree} redundants`;
  return `The beam is statically indeterminate to degree ${degree}. ${ask}, not ${count}.`;
}

const sentence = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** Why a component can never be a redundant of this beam; undefined where it can. */
function ineligible(beam: Beam, redundant: Redundant): string | undefined {
  const missing =
    redundant.component === 'moment' ? noMoment(beam, redundant.at) : noReaction(beam, redundant);
  if (missing) return missing;
  const motion = describeMotion(beam, [redundant]);
  return (
    motion &&
    `Equilibrium alone determines ${nameRedundant(beam, redundant)}: without it the beam moves. ${motion} Choose another redundant.`
  );
}

function noReaction(
  beam: Beam,
  { support: index, component }: Extract<Redundant, { support: number }>,
): string | undefined {
  const support = beam.supports[index];
  if (!support) {
    return `There is no support ${index}. The beam has ${beam.supports.length}, counted from 0 in the order given.`;
  }
  if (holds(support[component])) return undefined;
  const direction = component === 'vertical' ? 'vertical movement' : 'rotation';
  return `${sentence(nameSupport(support))} does not hold ${direction}: there is no reaction to release. Choose another redundant.`;
}

function noMoment(beam: Beam, at: number): string | undefined {
  if (!(at > 0 && at < beam.length)) {
    return `There is no moment to release at ${metres(at)}. Choose a position inside the beam, or a support's rotation.`;
  }
  if (beam.hinges.includes(at)) {
    return `The moment is zero in the hinge at ${metres(at)}. Choose another redundant.`;
  }
  const support = beam.supports.find((s) => s.at === at && holds(s.rotation));
  return (
    support &&
    `The moment jumps at ${nameSupport(support)}. Choose the support's rotation as the redundant instead.`
  );
}
