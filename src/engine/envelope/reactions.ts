import type { GoverningSearch } from './governing';
import type { Source } from './sources';
import type { Elementary, EnvelopeReaction, GroupReaction, Range, ReactionComponent } from './types';

/** The reactions of a beam under each of its sources, and what the sources' sums come to. */
export class SourceReactions {
  /** Each group's own, support by support, unfactored: of a patterned group its adverse spans, up and down. */
  readonly groups: readonly Record<string, GroupReaction>[];
  private readonly vertical: ComponentValues;
  private readonly moment: ComponentValues;
  private readonly positions: readonly number[];
  private readonly count: number;

  constructor(sources: readonly Source[], elementary: readonly Elementary[]) {
    this.count = sources.length;
    this.positions = (elementary[0]?.reactions ?? []).map(({ at }) => at);
    this.vertical = valuesOf(elementary, this.positions.length, 'vertical');
    this.moment = valuesOf(elementary, this.positions.length, 'moment');
    this.groups = this.positions.map((_, support) => this.groupsAt(support, sources));
  }

  /** The most and the least at every support. */
  envelope(governing: GoverningSearch): EnvelopeReaction[] {
    const { vertical, moment, count } = this;
    return this.positions.map((at, support) => {
      const force = governing.find(vertical.values.subarray(support * count), 1, vertical.largest);
      const couple = governing.find(moment.values.subarray(support * count), 1, moment.largest);
      return {
        at,
        max: { vertical: force.max, moment: couple.max },
        min: { vertical: force.min, moment: couple.min },
        groups: this.groups[support]!,
      };
    });
  }

  private groupsAt(support: number, sources: readonly Source[]): Record<string, GroupReaction> {
    const at = support * this.count;
    const groups: Record<string, GroupReaction> = {};
    for (const { group, span } of sources) {
      if (group === null || Object.hasOwn(groups, group)) continue;
      const reactionOf = span === null ? wholeValue : patternedRange;
      groups[group] = {
        vertical: reactionOf(sources, group, this.vertical.values, at),
        moment: reactionOf(sources, group, this.moment.values, at),
      };
    }
    return groups;
  }
}

/** One component at every support, under source i at support·count + i, and the largest magnitude of them all. */
type ComponentValues = { readonly values: Float64Array; readonly largest: number };

function valuesOf(
  elementary: readonly Elementary[],
  supports: number,
  component: ReactionComponent,
): ComponentValues {
  const count = elementary.length;
  const values = new Float64Array(supports * count);
  let largest = 0;
  for (let i = 0; i < count; i++) {
    const { reactions } = elementary[i]!;
    for (let support = 0; support < supports; support++) {
      const value = reactions[support]![component];
      values[support * count + i] = value;
      largest = Math.max(largest, Math.abs(value));
    }
  }
  return { values, largest };
}

function wholeValue(sources: readonly Source[], group: string, values: Float64Array, at: number): number {
  return values[at + sources.findIndex((source) => source.group === group)]!;
}

function patternedRange(
  sources: readonly Source[],
  group: string,
  values: Float64Array,
  at: number,
): Range<number> {
  const range = { max: 0, min: 0 };
  for (let i = 0; i < sources.length; i++) {
    const value = values[at + i]!;
    if (sources[i]!.group === group) range[value > 0 ? 'max' : 'min'] += value;
  }
  return range;
}
