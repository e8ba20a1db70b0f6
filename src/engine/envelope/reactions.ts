import { Adverse, type Cases } from './cases';
import { governingOf } from './governing';
import type { Source } from './sources';
import type { Elementary, EnvelopeReaction, GroupReaction, Range, ReactionComponent } from './types';

/** Reads the most and the least of every support's reactions over combinations first … last − 1, all unless said. */
export function reactionsOf(
  sources: readonly Source[],
  elementary: readonly Elementary[],
  cases: Cases,
): (first?: number, last?: number) => EnvelopeReaction[] {
  const adverse = new Adverse(cases);
  const supports = elementary[0]?.reactions ?? [];
  const groups = groupReactions(sources, elementary);
  const componentOf = (component: ReactionComponent) => {
    const values = supports.map((_, support) => [valuesOf(elementary, support, component)]);
    const largest = Math.max(0, ...values.flatMap(([each]) => [...each!].map(Math.abs)));
    return (support: number, first?: number, last?: number) =>
      governingOf(adverse, values[support]!, largest, first, last);
  };
  const [vertical, moment] = [componentOf('vertical'), componentOf('moment')];
  return (first, last) =>
    supports.map(({ at }, support) => {
      const force = vertical(support, first, last);
      const couple = moment(support, first, last);
      return {
        at,
        max: { vertical: force.max, moment: couple.max },
        min: { vertical: force.min, moment: couple.min },
        groups: groups[support]!,
      };
    });
}

function valuesOf(
  elementary: readonly Elementary[],
  support: number,
  component: ReactionComponent,
): Float64Array {
  const values = new Float64Array(elementary.length);
  for (let i = 0; i < values.length; i++) values[i] = elementary[i]!.reactions[support]![component];
  return values;
}

/** Each group's own reactions, support by support, unfactored: of a patterned group its adverse spans, up and down. */
export function groupReactions(
  sources: readonly Source[],
  elementary: readonly Elementary[],
): Record<string, GroupReaction>[] {
  const supports = elementary[0]?.reactions ?? [];
  return supports.map((_, support) => {
    const groups: Record<string, GroupReaction> = {};
    const vertical = valuesOf(elementary, support, 'vertical');
    const moment = valuesOf(elementary, support, 'moment');
    for (const { group, span } of sources) {
      if (group === null || Object.hasOwn(groups, group)) continue;
      const reactionOf = span === null ? wholeValue : patternedRange;
      groups[group] = {
        vertical: reactionOf(sources, group, vertical),
        moment: reactionOf(sources, group, moment),
      };
    }
    return groups;
  });
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
