import { type Extremes, type Pair, type Solution, stationsAt } from '../beam/index';
import { factorOf } from '../combination/index';
import { arrangementLoads, type LoadArrangement } from './arrangement';
import { NOTHING } from './cases';
import type { ContactBeam } from './contact';
import type { EnvelopeTask } from './read';
import {
  byQuantity,
  type Envelope,
  type EnvelopeReaction,
  type EnvelopeStation,
  type Governing,
  type GoverningExtreme,
  type GroupReaction,
  type Range,
} from './types';

export type RestingEnvelope =
  | { readonly ok: true; readonly envelope: Envelope }
  | { readonly ok: false; readonly arrangement: LoadArrangement; readonly message: string };

/**
 * The envelope of a beam with supports that cannot pull: every combination with every set of loaded spans is solved
 * anew, since what a beam does that lifts off is not the sum of what its loads do one by one.
 */
export function restingEnvelope(
  task: EnvelopeTask,
  contact: ContactBeam,
  positions: readonly number[],
  groups: readonly Record<string, GroupReaction>[],
): RestingEnvelope {
  let envelope: Envelope | undefined;
  for (const arrangement of arrangementsOf(task)) {
    const outcome = contact.solve(arrangementLoads(task, arrangement));
    if (!outcome.ok) return { ok: false, arrangement, message: outcome.message };
    const { solution, lifted } = outcome.value;
    const by = { combination: arrangement.combination, pattern: [...arrangement.pattern], lifted };
    const own = envelopeOfOne(solution, by, positions, groups);
    envelope = envelope ? widened(envelope, own, solution.extremes) : own;
  }
  return { ok: true, envelope: envelope! };
}

/** Every combination with every set of its spans that carry patterned loads, the empty set first. */
function arrangementsOf({ sources, combinations }: EnvelopeTask): LoadArrangement[] {
  return combinations.flatMap((combination) => {
    const acting = sources.filter(({ group }) => group !== null && factorOf(combination, group) !== 0);
    const spans = [...new Set(acting.flatMap(({ span }) => (span === null ? [] : [span])))];
    return Array.from({ length: 2 ** spans.length }, (_, set) => ({
      combination: combination.name,
      pattern: spans.filter((_, bit) => (set >> bit) & 1),
    }));
  });
}

/** How many there are, without listing them. */
export const arrangementCount = ({
  sources,
  combinations,
}: Pick<EnvelopeTask, 'sources' | 'combinations'>): number =>
  combinations.reduce((total, combination) => {
    const acting = sources.filter(({ group }) => group !== null && factorOf(combination, group) !== 0);
    return total + 2 ** new Set(acting.flatMap(({ span }) => (span === null ? [] : [span]))).size;
  }, 0);

type By = Omit<Governing, 'value'>;

/** The envelope of one arrangement: its own values, both ways. */
function envelopeOfOne(
  solution: Solution,
  by: By,
  positions: readonly number[],
  groups: readonly Record<string, GroupReaction>[],
): Envelope {
  const one = (value: number): Governing => ({ value, ...by });
  const both = (...[left, right]: Pair): Range<Governing> => ({
    max: one(Math.max(left, right)),
    min: one(Math.min(left, right)),
  });
  return {
    stations: stationsAt(solution, positions).map(({ x, shear, moment, slope, deflection }) => ({
      x,
      shear: both(...shear),
      moment: both(...moment),
      slope: both(...slope),
      deflection: both(deflection, deflection),
    })),
    extremes: byQuantity((quantity) => {
      const { max, min } = solution.extremes[quantity];
      return { max: { ...max, ...by }, min: { ...min, ...by } };
    }),
    reactions: solution.reactions.map(({ at, vertical, moment }, support): EnvelopeReaction => {
      const reaction = { vertical: one(vertical), moment: one(moment) };
      return { at, max: reaction, min: { ...reaction }, groups: groups[support]! };
    }),
  };
}

/** Both envelopes in one; of values that differ by rounding the first stays. */
function widened(envelope: Envelope, other: Envelope, extremes: Extremes): Envelope {
  const sizes = byQuantity((quantity) => {
    const { max, min } = extremes[quantity];
    return NOTHING * Math.max(Math.abs(max.value), Math.abs(min.value));
  });
  const { shear: force, moment: couple } = sizes;
  return {
    stations: envelope.stations.map(
      (station, i): EnvelopeStation => ({
        x: station.x,
        ...byQuantity((quantity) => wider(station[quantity], other.stations[i]![quantity], sizes[quantity])),
      }),
    ),
    extremes: byQuantity((quantity) =>
      wider<GoverningExtreme>(envelope.extremes[quantity], other.extremes[quantity], sizes[quantity]),
    ),
    reactions: envelope.reactions.map((reaction, i): EnvelopeReaction => {
      const second = other.reactions[i]!;
      return {
        ...reaction,
        max: {
          vertical: larger(reaction.max.vertical, second.max.vertical, force),
          moment: larger(reaction.max.moment, second.max.moment, couple),
        },
        min: {
          vertical: smaller(reaction.min.vertical, second.min.vertical, force),
          moment: smaller(reaction.min.moment, second.min.moment, couple),
        },
      };
    }),
  };
}

const larger = <T extends Governing>(a: T, b: T, nothing: number): T => (b.value > a.value + nothing ? b : a);
const smaller = <T extends Governing>(a: T, b: T, nothing: number): T =>
  b.value < a.value - nothing ? b : a;
const wider = <T extends Governing>(a: Range<T>, b: Range<T>, nothing: number): Range<T> => ({
  max: larger(a.max, b.max, nothing),
  min: smaller(a.min, b.min, nothing),
});
