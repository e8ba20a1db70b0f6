import type { Load } from '../model/index';
import type { Region } from './regions';

/** A load, or the part of one, that acts with the loads of one span (its index). */
export type SpanLoad = { readonly load: Load; readonly span: number };

type Spread = Extract<Load, { from: number }>;

/**
 * The loads span by span. Line loads and curvatures are cut where spans meet. A point load or couple on a support
 * belongs to the span at its left, and one at the left end of the beam to the first span. What has no length is nothing.
 */
export const cutLoads = (loads: readonly Load[], spans: readonly Region[]): SpanLoad[] =>
  loads.flatMap((load) => {
    if ('from' in load) return spans.flatMap((span, index) => partIn(load, span, index));
    const holder = spans.findIndex(({ to }) => load.at <= to);
    return [{ load, span: holder < 0 ? spans.length - 1 : holder }];
  });

function partIn(load: Spread, span: Region, index: number): SpanLoad[] {
  const from = Math.max(load.from, span.from);
  const to = Math.min(load.to, span.to);
  if (from >= to) return [];
  if (load.kind === 'curvature') return [{ load: { ...load, from, to }, span: index }];
  return [
    { load: { ...load, from, to, w0: intensityAt(load, from), w1: intensityAt(load, to) }, span: index },
  ];
}

/** Exactly w0 and w1 at the load's own ends. */
function intensityAt({ from, to, w0, w1 }: Extract<Load, { kind: 'line' }>, x: number): number {
  if (x === to) return w1;
  return w0 + ((w1 - w0) * (x - from)) / (to - from);
}
