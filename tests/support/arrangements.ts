import type { BeamDocument, Load, SupportDocument } from '@/engine/model/index';

/** The beams of data/published/beam-cases.csv: spans, EI and loads of 1, so that results are the printed coefficients. */
const fixed = (at: number): SupportDocument => ({ at, kind: 'fixed' });
const roller = (at: number): SupportDocument => ({ at, kind: 'roller' });
const rollers = (spans: number) => Array.from({ length: spans + 1 }, (_, k) => roller(k));
const point = (at: number, p = 1): Load => ({ kind: 'point', at, p });
const line = (from: number, to: number, w0 = 1, w1 = w0): Load => ({ kind: 'line', from, to, w0, w1 });

function beam(length: number, supports: SupportDocument[], loads: Load[]): BeamDocument {
  return { length, ei: 1, supports, loads, horizontal: 'ignore' };
}

const simple = (...loads: Load[]) => beam(1, rollers(1), loads);
const cantilever = (...loads: Load[]) => beam(1, [fixed(0)], loads);
const propped = (...loads: Load[]) => beam(1, [fixed(0), roller(1)], loads);
const built = (...loads: Load[]) => beam(1, [fixed(0), fixed(1)], loads);
const guided = (...loads: Load[]) => beam(1, [fixed(0), { at: 1, kind: 'guided' }], loads);
const overhang = (...loads: Load[]) => beam(1.4, rollers(1), loads);
const spans = (count: number, loaded: number[]) =>
  beam(
    count,
    rollers(count),
    loaded.map((k) => line(k - 1, k)),
  );

export const ARRANGEMENTS: Readonly<Record<string, BeamDocument>> = {
  'simple uniform': simple(line(0, 1)),
  'simple rising to right': simple(line(0, 1, 0, 1)),
  'simple rising to right (W = 1)': simple(line(0, 1, 0, 2)),
  'simple rising to centre (W = 1)': simple(line(0, 0.5, 0, 2), line(0.5, 1, 2, 0)),
  'simple point at centre': simple(point(0.5)),
  'simple points at thirds': simple(point(1 / 3), point(2 / 3)),
  'simple couple at left': simple({ kind: 'couple', at: 0, m: -1 }),
  'simple free curvature 1': simple({ kind: 'curvature', from: 0, to: 1, kappa: 1 }),
  'cantilever uniform': cantilever(line(0, 1)),
  'cantilever falling from root': cantilever(line(0, 1, 1, 0)),
  'cantilever falling from root (W = 1)': cantilever(line(0, 1, 2, 0)),
  'cantilever rising to tip': cantilever(line(0, 1, 0, 1)),
  'cantilever point at 0.6': cantilever(point(0.6)),
  'cantilever point at tip': cantilever(point(1)),
  'cantilever couple at tip': cantilever({ kind: 'couple', at: 1, m: -1 }),
  'propped uniform': propped(line(0, 1)),
  'propped point at centre': propped(point(0.5)),
  'propped falling from fixed end': propped(line(0, 1, 1, 0)),
  'propped rising to prop': propped(line(0, 1, 0, 1)),
  'propped prop settles 1': beam(1, [fixed(0), { ...roller(1), rise: -1 }], []),
  'fixed uniform': built(line(0, 1)),
  'fixed point at centre': built(point(0.5)),
  'fixed rising to right': built(line(0, 1, 0, 1)),
  'fixed free curvature 1': built({ kind: 'curvature', from: 0, to: 1, kappa: 1 }),
  'fixed right end settles 1': beam(1, [fixed(0), { ...fixed(1), rise: -1 }], []),
  'fixed and guided uniform': guided(line(0, 1)),
  'fixed and guided point at guided end': guided(point(1)),
  'overhang 0.4 uniform': overhang(line(0, 1.4)),
  'overhang 0.4 uniform on overhang': overhang(line(1, 1.4)),
  'overhang 0.4 uniform on overhang (w a a = 1)': overhang(line(1, 1.4, 1 / 0.16)),
  'overhang 0.4 point at tip': overhang(point(1.4)),
  'overhang 0.4 point at tip (P a = 1)': overhang(point(1.4, 2.5)),
  'two spans uniform': spans(2, [1, 2]),
  'two spans first uniform': spans(2, [1]),
  'two spans point at first centre': beam(2, rollers(2), [point(0.5)]),
  'three spans uniform': spans(3, [1, 2, 3]),
  'three spans ends uniform': spans(3, [1, 3]),
  'three spans first two uniform': spans(3, [1, 2]),
  'four spans uniform': spans(4, [1, 2, 3, 4]),
  'four spans first two and last uniform': spans(4, [1, 2, 4]),
  'four spans first and third uniform': spans(4, [1, 3]),
};
