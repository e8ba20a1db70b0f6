import type { DimensionFault } from './dimension-faults';
import { crossings, flatten, type Point, type Ring, roundCorners } from './rings';

const CHORDS = 8; // of a rounded corner: enough to see what overlaps
const MARGIN = 0.001; // of a slab between two corners: its ends are looked at, not the corners themselves
const TOUCHING = 1e-9; // of the largest size: rings that share an edge meet within this

/**
 * Why rings of three corners or more bound no section; empty where they do. Material lies once where it lies: a ring
 * does not cross itself or another one, outer rings run anticlockwise, and holes clockwise inside them.
 */
export function ringFaults(rings: readonly Ring[]): DimensionFault[] {
  if (rings.some((ring) => !radiiFit(ring)))
    return [{ dimension: 'rings', message: 'a corner radius is too large for its edges' }];
  const polygons = rings.map((ring) => flatten(ring, CHORDS));
  const levels = [...new Set(polygons.flat().map(({ y }) => y))].sort((a, b) => a - b);
  const size = (levels.at(-1) ?? 0) - (levels[0] ?? 0);
  if (!(size > 0)) return [{ dimension: 'rings', message: 'the outline has no height' }];
  const isSound = levels.slice(1).every((top, index) => {
    const bottom = levels[index] ?? top;
    if (top - bottom <= TOUCHING * size) return true;
    return [MARGIN, 1 - MARGIN].every((share) => liesOnce(polygons, bottom + share * (top - bottom), size));
  });
  return isSound
    ? []
    : [
        {
          dimension: 'rings',
          message:
            'the outline crosses itself, overlaps another, or runs the wrong way: outer rings run anticlockwise, holes clockwise',
        },
      ];
}

function radiiFit(ring: Ring): boolean {
  const rounded = roundCorners(ring);
  return rounded.every(({ end }, index) => {
    const corner = ring[index];
    const next = (index + 1) % ring.length;
    const [following, start] = [ring[next], rounded[next]?.start];
    if (!corner || !following || !start) return true;
    const edge = Math.hypot(following.z - corner.z, following.y - corner.y);
    const used =
      Math.hypot(end.z - corner.z, end.y - corner.y) +
      Math.hypot(start.z - following.z, start.y - following.y);
    return edge > 0 && used <= edge * (1 + TOUCHING);
  });
}

/** Whether along a level there is material once or not at all. */
function liesOnce(polygons: readonly (readonly Point[])[], y: number, size: number): boolean {
  let layers = 0;
  let from = Number.NEGATIVE_INFINITY;
  for (const { z, opens } of crossings(polygons, y)) {
    if ((layers < 0 || layers > 1) && z - from > TOUCHING * size) return false;
    layers += opens ? 1 : -1;
    from = z;
  }
  return true;
}
