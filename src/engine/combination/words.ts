import type { Beam } from '../model/index';
import { type Combination, factorOf } from './combine';
import { cutLoads } from './cut';
import { type Region, regionsOf } from './regions';

/** Names loads that act at once: the combination and, where that makes a difference, the spans that are loaded. */
export type ArrangementNamer = (of: { combination: string; pattern: readonly number[] }) => string;

/**
 * "1.35 G + 1.5 Q, spans A–B and C–D loaded", in the letters of the drawing. The combination alone says it where its
 * patterned groups stand nowhere, or on one span and that is loaded.
 */
export function arrangementNamer(
  beam: Pick<Beam, 'length' | 'supports' | 'loads'>,
  patterns: readonly string[],
  combinations: readonly Combination[],
): ArrangementNamer {
  const spans = regionsOf(beam);
  const patterned = beam.loads.filter(({ group }) => group !== undefined && patterns.includes(group));
  const carrying = new Map(
    combinations.map((combination) => {
      const acting = patterned.filter(({ group = '' }) => factorOf(combination, group) !== 0);
      return [combination.name, [...new Set(cutLoads(acting, spans).map(({ span }) => span))]];
    }),
  );
  return ({ combination, pattern }) => {
    const words = patternWords(spans, carrying.get(combination) ?? [], pattern);
    return words === '' ? combination : `${combination}, ${words}`;
  };
}

function patternWords(
  spans: readonly Region[],
  carrying: readonly number[],
  pattern: readonly number[],
): string {
  if (carrying.length === 0) return '';
  if (pattern.length === 0) return 'no span loaded';
  if (carrying.every((span) => pattern.includes(span))) return carrying.length > 1 ? 'all spans loaded' : '';
  const loaded = pattern.flatMap((span) => spans[span] ?? []);
  const kinds = [named('span', loaded, /^span /), named('overhang', loaded, /^overhang /)];
  return `${kinds.filter((words) => words !== '').join(' and the ')} loaded`;
}

/** "spans A–B and C–D", "overhang beyond D". */
function named(kind: Region['kind'], regions: readonly Region[], prefix: RegExp): string {
  const names = regions.filter((region) => region.kind === kind).map(({ name }) => name.replace(prefix, ''));
  if (names.length === 0) return '';
  const [last] = names.slice(-1);
  const list = names.length > 1 ? `${names.slice(0, -1).join(', ')} and ${last}` : last;
  return `${kind}${names.length > 1 ? 's' : ''} ${list}`;
}
