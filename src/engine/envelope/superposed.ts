import { COINCIDENT } from '../model/index';
import { pieceAt, settle } from '../polynomial/index';
import { Adverse, type Cases, type Sense, type Source } from './cases';
import { type Curves, curvesOf, valuesAt } from './curves';
import { type EnvelopeExtreme, envelopeExtremes, NOTHING } from './search';
import {
  type Diagrams,
  type Envelope,
  type EnvelopeReaction,
  type EnvelopeStation,
  type Governing,
  type GroupReaction,
  QUANTITIES,
  type Quantity,
  type Range,
  type Reaction,
  type ReactionComponent,
} from './types';

/** What superposition asks of a solved source. All sources of an envelope have the same breaks. */
export type Elementary = { readonly diagrams: Diagrams; readonly reactions: readonly Reaction[] };

/**
 * The envelope of a linear beam from its solved sources: at every position, in the extremes over the whole beam and in
 * the reactions. Exact per quantity and place: what always acts plus the adverse shares of the spans, and no others.
 */
export function superposedEnvelope(
  sources: readonly Source[],
  elementary: readonly Elementary[],
  cases: Cases,
  positions: readonly number[],
): Envelope {
  const adverse = new Adverse(cases);
  const quantities = QUANTITIES.map((quantity) => {
    const curves = curvesOf(elementary.map(({ diagrams }) => diagrams[quantity]));
    const { max, min } = envelopeExtremes(curves, cases);
    return { quantity, max, min, read: reader(curves, adverse, magnitudeOf({ max, min })) };
  });
  const named = ({ combination, ...rest }: EnvelopeExtreme) => ({
    ...rest,
    combination: cases.combinations[combination]!.name,
  });
  return {
    stations: positions.map((x) => ({
      x: x + 0,
      ...record(quantities.map(({ quantity, read }) => [quantity, read(x)])),
    })),
    extremes: record(
      quantities.map(({ quantity, max, min }) => [quantity, { max: named(max), min: named(min) }]),
    ),
    reactions: reactionsOf(sources, elementary, adverse),
  };
}

/** Object.fromEntries for all four quantities. */
const record = <T>(entries: readonly (readonly [Quantity, T])[]) =>
  Object.fromEntries(entries) as Record<Quantity, T>;

const magnitudeOf = ({ max, min }: Range<{ value: number }>): number =>
  Math.max(Math.abs(max.value), Math.abs(min.value));

/** Reads the envelope of one quantity at a position, on both sides of a break. */
function reader(curves: Curves, adverse: Adverse, largest: number): (x: number) => EnvelopeStation[Quantity] {
  const { breaks, count } = curves;
  const last = breaks.length - 2;
  const tolerance = COINCIDENT * (breaks.at(-1)! - breaks[0]!);
  const sides = [new Float64Array(count), new Float64Array(count)] as const;
  return (x) => {
    const k = pieceAt(curves, x);
    const [from, to] = [breaks[k]!, breaks[k + 1]!];
    const onLeft = x - from <= tolerance && k > 0;
    const onRight = !onLeft && to - x <= tolerance && k < last;
    if (!onLeft && !onRight) {
      valuesAt(curves, k, Math.min(Math.max((x - from) / (to - from), 0), 1), sides[0]);
      return governingOf(adverse, sides.slice(0, 1), largest);
    }
    const right = onLeft ? k : k + 1;
    valuesAt(curves, right - 1, 1, sides[0]);
    valuesAt(curves, right, 0, sides[1]);
    return governingOf(adverse, sides, largest);
  };
}

/** The most and the least of what stands beside one another at one place, with the loads that give it. */
function governingOf(adverse: Adverse, sides: readonly Float64Array[], largest: number): Range<Governing> {
  const combinations = adverse.cases.combinations.length;
  const max = { value: Number.NEGATIVE_INFINITY, side: 0, combination: 0 };
  const min = { value: Number.POSITIVE_INFINITY, side: 0, combination: 0 };
  for (let c = 0; c < combinations; c++) {
    for (let side = 0; side < sides.length; side++) {
      adverse.add(sides[side]!, 0, c);
      if (adverse.most > max.value) {
        max.value = adverse.most;
        max.side = side;
        max.combination = c;
      }
      if (adverse.least < min.value) {
        min.value = adverse.least;
        min.side = side;
        min.combination = c;
      }
    }
  }
  const described = ({ value, side, combination }: typeof max, sense: Sense): Governing => ({
    value: settle(value, largest),
    combination: adverse.cases.combinations[combination]!.name,
    pattern: adverse.pattern(sides[side]!, 0, combination, sense, NOTHING * largest),
  });
  return { max: described(max, 1), min: described(min, -1) };
}

function reactionsOf(
  sources: readonly Source[],
  elementary: readonly Elementary[],
  adverse: Adverse,
): EnvelopeReaction[] {
  const supports = elementary[0]?.reactions ?? [];
  const componentOf = (component: ReactionComponent) => {
    const values = supports.map((_, support) => valuesOf(elementary, support, component));
    const largest = values.reduce(
      (most, each) => each.reduce((m, value) => Math.max(m, Math.abs(value)), most),
      0,
    );
    return values.map((each) => ({ values: each, ...governingOf(adverse, [each], largest) }));
  };
  const [vertical, moment] = [componentOf('vertical'), componentOf('moment')];
  return supports.map(({ at }, support) => {
    const [force, couple] = [vertical[support]!, moment[support]!];
    return {
      at,
      max: { vertical: force.max, moment: couple.max },
      min: { vertical: force.min, moment: couple.min },
      groups: groupReactions(sources, force.values, couple.values),
    };
  });
}

export function valuesOf(
  elementary: readonly Elementary[],
  support: number,
  component: ReactionComponent,
): Float64Array {
  const values = new Float64Array(elementary.length);
  for (let i = 0; i < values.length; i++) values[i] = elementary[i]!.reactions[support]![component];
  return values;
}

/** Each group's own reaction at one support, unfactored: of a patterned group its adverse spans, upward and downward. */
export function groupReactions(
  sources: readonly Source[],
  vertical: Float64Array,
  moment: Float64Array,
): Record<string, GroupReaction> {
  const groups: Record<string, GroupReaction> = {};
  for (const { group, span } of sources) {
    if (group === null || Object.hasOwn(groups, group)) continue;
    const reactionOf = span === null ? wholeValue : patternedRange;
    groups[group] = {
      vertical: reactionOf(sources, group, vertical),
      moment: reactionOf(sources, group, moment),
    };
  }
  return groups;
}

const wholeValue = (sources: readonly Source[], group: string, values: Float64Array): number =>
  values[sources.findIndex((source) => source.group === group)]!;

function patternedRange(sources: readonly Source[], group: string, values: Float64Array): Range<number> {
  const range = { max: 0, min: 0 };
  sources.forEach((source, i) => {
    if (source.group === group) range[values[i]! > 0 ? 'max' : 'min'] += values[i]!;
  });
  return range;
}
