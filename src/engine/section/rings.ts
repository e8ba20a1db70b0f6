import type { Corner } from './dimensions';

/** To the right and up, m. */
export type Point = { z: number; y: number };
export type Ring = readonly Corner[];

/** Where the rounding of a corner starts and ends, its centre, and whether it turns anticlockwise. */
export type Rounding = { start: Point; end: Point; centre: Point; r: number; left: boolean };

/** The corners of a ring as its boundary runs: straight to `start`, round to `end`, straight on. */
export function roundCorners(ring: Ring): Rounding[] {
  return ring.map((corner, index) => {
    const before = ring.at(index - 1) ?? corner;
    const after = ring[(index + 1) % ring.length] ?? corner;
    const back = direction(corner, before);
    const on = direction(corner, after);
    const left = back.y * on.z - back.z * on.y > 0;
    if (corner.r === 0) return { start: corner, end: corner, centre: corner, r: 0, left };
    const cut = tangentLength(corner.r, back, on);
    const start = along(corner, back, cut);
    const side = left ? 1 : -1; // the centre lies to the left of the way on where the ring turns left
    return {
      start,
      end: along(corner, on, cut),
      centre: { z: start.z + side * corner.r * back.y, y: start.y - side * corner.r * back.z },
      r: corner.r,
      left,
    };
  });
}

function direction(from: Point, to: Point): Point {
  const length = Math.hypot(to.z - from.z, to.y - from.y) || 1;
  return { z: (to.z - from.z) / length, y: (to.y - from.y) / length };
}

const along = (from: Point, { z, y }: Point, distance: number): Point => ({
  z: from.z + distance * z,
  y: from.y + distance * y,
});

/** From the corner to where its rounding starts: r/tan of half the angle between the edges; r at a right angle. */
function tangentLength(r: number, back: Point, on: Point): number {
  const cosine = back.z * on.z + back.y * on.y;
  return r * Math.sqrt((1 + cosine) / (1 - cosine));
}

/** What an arc runs through, from its start anticlockwise (positive) or clockwise: angles in radians. */
export function sweepOf({ start, end, centre, left }: Rounding): { from: number; turn: number } {
  const from = Math.atan2(start.y - centre.y, start.z - centre.z);
  const to = Math.atan2(end.y - centre.y, end.z - centre.z);
  const whole = 2 * Math.PI;
  const anticlockwise = (((to - from) % whole) + whole) % whole;
  return { from, turn: left ? anticlockwise : anticlockwise - whole };
}

/** The ring as a polygon of the same area: every rounded corner as so many chords, three or more. */
export function flatten(ring: Ring, chords: number): Point[] {
  return roundCorners(ring).flatMap((rounding) => {
    if (rounding.r === 0) return [rounding.start];
    const { from, turn } = sweepOf(rounding);
    const inner = rounding.r * sameArea(Math.abs(turn), chords);
    return Array.from({ length: chords + 1 }, (_, step) => {
      const angle = from + (turn * step) / chords;
      const r = step === 0 || step === chords ? rounding.r : inner;
      return { z: rounding.centre.z + r * Math.cos(angle), y: rounding.centre.y + r * Math.sin(angle) };
    });
  });
}

/**
 * How much farther out than the arc, whose ends stay where they are, the points between its chords must lie for the sector
 * to keep its area: (n − 2) ρ² + 2 ρ = n δ/sin δ, with δ the angle of one of the n chords.
 */
function sameArea(turn: number, chords: number): number {
  const step = turn / chords;
  return (Math.sqrt(1 + ((chords - 2) * turn) / Math.sin(step)) - 1) / (chords - 2);
}

/** Where a level cuts the polygons, from left to right: going up an edge closes what a left one, going down, opens. */
export function crossings(
  polygons: readonly (readonly Point[])[],
  y: number,
): { z: number; opens: boolean }[] {
  const found = polygons.flatMap((polygon) =>
    polygon.flatMap((a, index) => {
      const b = polygon[(index + 1) % polygon.length] ?? a;
      if (a.y >= y === b.y >= y) return [];
      return [{ z: a.z + ((y - a.y) / (b.y - a.y)) * (b.z - a.z), opens: b.y < a.y }];
    }),
  );
  return found.sort((one, other) => one.z - other.z || Number(one.opens) - Number(other.opens));
}

/** Width of the material at a level, m. */
export const widthAt = (polygons: readonly (readonly Point[])[], y: number): number =>
  crossings(polygons, y).reduce((sum, { z, opens }) => sum + (opens ? -z : z), 0);
