import { factoredLoads } from '../combination/index';
import type { Load } from '../model/index';
import type { EnvelopeTask } from './read';
import { type Envelope, type Governing, QUANTITIES } from './types';

/** A combination, by its name, with the loads of the spans in its pattern: loads that act all at once. */
export type LoadArrangement = { readonly combination: string; readonly pattern: readonly number[] };

/** The factored loads of an arrangement. */
export function arrangementLoads(
  { sources, combinations }: Pick<EnvelopeTask, 'sources' | 'combinations'>,
  { combination: name, pattern }: LoadArrangement,
): Load[] {
  const combination = combinations.find((one) => one.name === name)!;
  const acting = sources.filter(({ span }) => span === null || pattern.includes(span));
  return factoredLoads(
    acting.flatMap(({ loads }) => loads),
    combination,
  );
}

/** Every arrangement that governs anything in the envelope, once: in the order of the combinations, then of the spans. */
export function governingArrangements({ combinations }: EnvelopeTask, envelope: Envelope): LoadArrangement[] {
  const found = new Map<string, LoadArrangement>();
  for (const { combination, pattern } of governingValues(envelope)) {
    found.set(JSON.stringify([combination, pattern]), { combination, pattern });
  }
  const place = (name: string) => combinations.findIndex((one) => one.name === name);
  return [...found.values()].sort(
    (a, b) => place(a.combination) - place(b.combination) || comparePatterns(a.pattern, b.pattern),
  );
}

function governingValues({ stations, extremes, reactions }: Envelope): Governing[] {
  return [
    ...stations.flatMap((station) => QUANTITIES.flatMap((q) => [station[q].max, station[q].min])),
    ...QUANTITIES.flatMap((q) => [extremes[q].max, extremes[q].min]),
    ...reactions.flatMap(({ max, min }) => [max.vertical, max.moment, min.vertical, min.moment]),
  ];
}

function comparePatterns(a: readonly number[], b: readonly number[]): number {
  const differs = a.findIndex((span, i) => span !== b[i]);
  return differs < 0 ? a.length - b.length : (a[differs] ?? 0) - (b[differs] ?? -1);
}
