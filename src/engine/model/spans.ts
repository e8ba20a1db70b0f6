import type { Beam } from './types';

/** A stretch between neighbouring vertical supports, rigid or sprung, or an overhang, which has one of them only. */
export type Span = {
  from: number;
  to: number;
  /** The support at its left and at its right, by its place in the beam's list; null at a free end. */
  left: number | null;
  right: number | null;
};

/** The spans and overhangs from the left. An overhang of no length is none. */
export function spansOf({ length, supports }: Pick<Beam, 'length' | 'supports'>): Span[] {
  const held = supports
    .map(({ at, vertical }, index) => ({ at, index, holds: vertical.kind !== 'free' }))
    .filter(({ holds }) => holds)
    .sort((a, b) => a.at - b.at);
  const ends = [{ at: 0, index: null }, ...held, { at: length, index: null }];
  return ends.slice(1).flatMap(({ at: to, index: right }, k) => {
    const { at: from, index: left } = ends[k]!;
    return from < to ? [{ from, to, left, right }] : [];
  });
}
