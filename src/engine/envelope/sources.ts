import { cutLoads, type Region, supportsMove } from '../combination/index';
import type { Beam, Load } from '../model/index';

/**
 * An elementary load case that the combinations are made of: a group on its whole length, a patterned group on one
 * span, or, with no group, the movements of the supports, which act once and unfactored in every combination.
 */
export type Source = {
  readonly group: string | null;
  /** Index of the pattern span; null where it always acts. */
  readonly span: number | null;
  readonly loads: readonly Load[];
};

/** What always acts first: the supports' movements, then whole groups. Then the patterned groups span by span. */
export function sourcesOf(beam: Beam, spans: readonly Region[], patterns: readonly string[]): Source[] {
  const groups = [...new Set(beam.loads.flatMap(({ group }) => (group === undefined ? [] : [group])))];
  const loadsOf = (group: string) => beam.loads.filter((load) => load.group === group);
  const whole = groups.filter((group) => !patterns.includes(group));
  const cut = groups
    .filter((group) => patterns.includes(group))
    .map((group) => ({ group, parts: cutLoads(loadsOf(group), spans) }));
  return [
    ...(supportsMove(beam) || groups.length === 0 ? [{ group: null, span: null, loads: [] }] : []),
    ...whole.map((group) => ({ group, span: null, loads: loadsOf(group) })),
    ...spans.flatMap((_, span) =>
      cut.flatMap(({ group, parts }) => {
        const loads = parts.filter((part) => part.span === span).map(({ load }) => load);
        // Loads of no length are in no span; their group is there all the same.
        return loads.length > 0 || (parts.length === 0 && span === 0) ? [{ group, span, loads }] : [];
      }),
    ),
  ];
}
