import { type Point, type Ring, roundCorners, sweepOf } from './rings';

/** Integrals over an area: of 1, y, z, y², z² and yz; m² to m⁴. */
export type AreaMoments = { area: number; y: number; z: number; yy: number; zz: number; yz: number };

// Gauss and Legendre, 8 points on −1 … 1: exact for an edge's polynomials, within 1e-10 for a quarter of a circle.
const GAUSS = [
  [0.1834346424956498, 0.362683783378362],
  [0.525532409916329, 0.3137066458778873],
  [0.7966664774136267, 0.2223810344533745],
  [0.9602898564975363, 0.1012285362903763],
].flatMap(([x = 0, weight = 0]) => [
  { at: (1 - x) / 2, weight: weight / 2 },
  { at: (1 + x) / 2, weight: weight / 2 },
]);

/**
 * The moments of what the rings bound, by Green's theorem: ∬ ∂F/∂z dA = ∮ F dy along every straight edge and rounded
 * corner. An anticlockwise ring counts, a clockwise one is a hole.
 */
export function areaMoments(rings: readonly Ring[]): AreaMoments {
  const sums: AreaMoments = { area: 0, y: 0, z: 0, yy: 0, zz: 0, yz: 0 };
  for (const ring of rings) {
    const corners = roundCorners(ring);
    for (const [index, rounding] of corners.entries()) {
      if (rounding.r > 0) addArc(sums, rounding);
      addEdge(sums, rounding.end, corners[(index + 1) % corners.length]?.start ?? rounding.end);
    }
  }
  return sums;
}

function addEdge(sums: AreaMoments, from: Point, to: Point): void {
  for (const { at, weight } of GAUSS) {
    const z = from.z + at * (to.z - from.z);
    add(sums, z, from.y + at * (to.y - from.y), weight * (to.y - from.y));
  }
}

function addArc(sums: AreaMoments, rounding: ReturnType<typeof roundCorners>[number]): void {
  const { from, turn } = sweepOf(rounding);
  const { centre, r } = rounding;
  for (const { at, weight } of GAUSS) {
    const angle = from + at * turn;
    const z = centre.z + r * Math.cos(angle);
    add(sums, z, centre.y + r * Math.sin(angle), weight * turn * r * Math.cos(angle));
  }
}

function add(sums: AreaMoments, z: number, y: number, dy: number): void {
  sums.area += z * dy;
  sums.y += z * y * dy;
  sums.z += (z ** 2 / 2) * dy;
  sums.yy += z * y ** 2 * dy;
  sums.zz += (z ** 3 / 3) * dy;
  sums.yz += ((z ** 2 * y) / 2) * dy;
}

/** The same of a polygon's part above a level (Sutherland and Hodgman): area, and first moment about y = 0. */
export function above(
  polygons: readonly (readonly Point[])[],
  level: number,
): { area: number; moment: number } {
  let area = 0;
  let moment = 0;
  for (const polygon of polygons) {
    const kept = clip(polygon, level);
    for (const [index, a] of kept.entries()) {
      const b = kept[(index + 1) % kept.length] ?? a;
      const cross = a.z * b.y - b.z * a.y;
      area += cross / 2;
      moment += (cross * (a.y + b.y)) / 6;
    }
  }
  return { area, moment };
}

function clip(polygon: readonly Point[], level: number): Point[] {
  return polygon.flatMap((a, index) => {
    const b = polygon[(index + 1) % polygon.length] ?? a;
    const kept = a.y >= level ? [a] : [];
    if (a.y >= level === b.y >= level) return kept;
    const share = (level - a.y) / (b.y - a.y);
    return [...kept, { z: a.z + share * (b.z - a.z), y: level }];
  });
}

const HALVINGS = 60; // each halves the bracket: below the last bit of the depth

/**
 * Plastic modulus about the level that parts the area in two, m³: the first moment of both halves about it. The level is
 * found by halving.
 */
export function plasticAbove(polygons: readonly (readonly Point[])[]): number {
  const heights = polygons.flatMap((polygon) => polygon.map(({ y }) => y));
  let low = Math.min(...heights);
  let high = Math.max(...heights);
  const whole = above(polygons, low);
  for (let step = 0; step < HALVINGS; step++) {
    const middle = (low + high) / 2;
    if (above(polygons, middle).area > whole.area / 2) low = middle;
    else high = middle;
  }
  const upper = above(polygons, low);
  return 2 * upper.moment - whole.moment - low * (2 * upper.area - whole.area);
}
