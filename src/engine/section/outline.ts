import { depthOf, type SectionDimensions, widthOf } from './dimensions';

/** A corner of the outline: to the right of the left edge and up from the bottom, m, rounded by `r`. */
export type Corner = { z: number; y: number; r: number };

const box = (z0: number, y0: number, z1: number, y1: number, r: number): Corner[] => [
  { z: z0, y: y0, r },
  { z: z1, y: y0, r },
  { z: z1, y: y1, r },
  { z: z0, y: y1, r },
];

/**
 * The rings of a section, the outer one anticlockwise and first, a hole clockwise after it. Every corner is a right
 * angle; a circle is a square with corners of its radius.
 */
export function outlineCorners(d: SectionDimensions): Corner[][] {
  switch (d.shape) {
    case 'i':
      return [flangedCorners(d, (d.b - d.tw) / 2)];
    case 'channel':
      return [flangedCorners(d, 0)];
    case 'rhs':
    case 'shs':
      return [box(0, 0, d.b, d.h, d.ro), box(d.t, d.t, d.b - d.t, d.h - d.t, d.ri).reverse()];
    case 'chs':
      return [box(0, 0, d.d, d.d, d.d / 2), box(d.t, d.t, d.d - d.t, d.d - d.t, d.d / 2 - d.t).reverse()];
    case 'rectangle':
      return [box(0, 0, d.b, d.h, 0)];
    case 'round':
      return [box(0, 0, d.d, d.d, d.d / 2)];
  }
}

function flangedCorners(
  d: { h: number; b: number; tw: number; tf: number; r: number },
  back: number,
): Corner[] {
  const { h, b, tf, r } = d;
  const face = back + d.tw;
  const right: Corner[] = [
    { z: 0, y: 0, r: 0 },
    { z: b, y: 0, r: 0 },
    { z: b, y: tf, r: 0 },
    { z: face, y: tf, r },
    { z: face, y: h - tf, r },
    { z: b, y: h - tf, r: 0 },
    { z: b, y: h, r: 0 },
    { z: 0, y: h, r: 0 },
  ];
  if (back === 0) return right;
  return [
    ...right,
    { z: 0, y: h - tf, r: 0 },
    { z: back, y: h - tf, r },
    { z: back, y: tf, r },
    { z: 0, y: tf, r: 0 },
  ];
}

/** Where the rounding of a corner starts and ends, and whether it turns anticlockwise. */
export type Rounding = {
  start: { z: number; y: number };
  end: { z: number; y: number };
  r: number;
  left: boolean;
};

const towards = (from: Corner, to: Corner, r: number) => {
  const length = Math.hypot(to.z - from.z, to.y - from.y) || 1;
  return { z: from.z + (r * (to.z - from.z)) / length, y: from.y + (r * (to.y - from.y)) / length };
};

export function roundCorners(ring: readonly Corner[]): Rounding[] {
  return ring.map((corner, index) => {
    const before = ring[(index + ring.length - 1) % ring.length] ?? corner;
    const after = ring[(index + 1) % ring.length] ?? corner;
    const turn = (corner.z - before.z) * (after.y - corner.y) - (corner.y - before.y) * (after.z - corner.z);
    return {
      start: towards(corner, before, corner.r),
      end: towards(corner, after, corner.r),
      r: corner.r,
      left: turn > 0,
    };
  });
}

const MM = 1000;
const figure = (metres: number) => String(Number((metres * MM).toFixed(3)));

/**
 * The outline as SVG path data in mm, x from the left edge and y down from the top, true to scale with root and
 * corner radii; fill it with the even-odd rule. Width and height are in mm too.
 */
export function outlinePath(d: SectionDimensions): { path: string; width: number; height: number } {
  const depth = depthOf(d);
  const point = ({ z, y }: { z: number; y: number }) => `${figure(z)} ${figure(depth - y)}`;
  const rings = outlineCorners(d).map((ring) => {
    const steps = roundCorners(ring).map(({ start, end, r, left }, index) => {
      const line = `${index === 0 ? 'M' : 'L'}${point(start)}`;
      // the mirrored y turns an anticlockwise corner into sweep 0
      return r > 0 ? `${line}A${figure(r)} ${figure(r)} 0 0 ${left ? 0 : 1} ${point(end)}` : line;
    });
    return `${steps.join('')}Z`;
  });
  return { path: rings.join(''), width: widthOf(d) * MM, height: depth * MM };
}
