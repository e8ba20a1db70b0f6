import { type Corner, depthOf, type SectionDimensions, type TeeDimensions, widthOf } from './dimensions';
import { roundCorners } from './rings';

const box = (z0: number, y0: number, z1: number, y1: number, r: number): Corner[] => [
  { z: z0, y: y0, r },
  { z: z1, y: y0, r },
  { z: z1, y: y1, r },
  { z: z0, y: y1, r },
];

/**
 * The rings of a section, from its left edge and its bottom, m: an outer one anticlockwise and first, a hole clockwise
 * after it. A circle is a square with corners of its radius; a section known by its values is the box of its sizes.
 */
export function outlineCorners(d: SectionDimensions): readonly (readonly Corner[])[] {
  switch (d.shape) {
    case 'i':
      return [flangedCorners({ ...PARALLEL, ...d }, (d.b - d.tw) / 2)];
    case 'tapered_i':
      return [flangedCorners(d, (d.b - d.tw) / 2)];
    case 'channel':
      return [flangedCorners({ ...PARALLEL, ...d }, 0)];
    case 'tapered_channel':
      return [flangedCorners(d, 0)];
    case 'tee':
      return [teeCorners(d)];
    case 'angle':
      return [
        [
          { z: 0, y: 0, r: 0 },
          { z: d.b, y: 0, r: 0 },
          { z: d.b, y: d.t, r: d.toe },
          { z: d.t, y: d.t, r: d.r },
          { z: d.t, y: d.h, r: d.toe },
          { z: 0, y: d.h, r: 0 },
        ],
      ];
    case 'rhs':
    case 'shs':
      return [box(0, 0, d.b, d.h, d.ro), box(d.t, d.t, d.b - d.t, d.h - d.t, d.ri).reverse()];
    case 'chs':
      return [box(0, 0, d.d, d.d, d.d / 2), box(d.t, d.t, d.d - d.t, d.d - d.t, d.d / 2 - d.t).reverse()];
    case 'rectangle':
    case 'values':
      return [box(0, 0, d.b, d.h, 0)];
    case 'round':
      return [box(0, 0, d.d, d.d, d.d / 2)];
    case 'outline':
      return placed(d.rings);
  }
}

/** Moved so that the left edge and the bottom are at 0, wherever they were drawn. */
function placed(rings: readonly (readonly Corner[])[]): Corner[][] {
  const corners = rings.flat();
  const left = Math.min(...corners.map(({ z }) => z));
  const bottom = Math.min(...corners.map(({ y }) => y));
  return rings.map((ring) => ring.map(({ z, y, r }) => ({ z: z - left, y: y - bottom, r })));
}

const PARALLEL = { slope: 0, at: 0, toe: 0 };

type Flanges = {
  h: number;
  b: number;
  tw: number;
  tf: number;
  r: number;
  slope: number;
  at: number;
  toe: number;
};

function flangedCorners(d: Flanges, back: number): Corner[] {
  const { h, b, r, toe } = d;
  const face = back + d.tw;
  const tip = d.tf - d.slope * d.at;
  const root = tip + d.slope * (b - face);
  const right: Corner[] = [
    { z: 0, y: 0, r: 0 },
    { z: b, y: 0, r: 0 },
    { z: b, y: tip, r: toe },
    { z: face, y: root, r },
    { z: face, y: h - root, r },
    { z: b, y: h - tip, r: toe },
    { z: b, y: h, r: 0 },
    { z: 0, y: h, r: 0 },
  ];
  if (back === 0) return right;
  return [
    ...right,
    { z: 0, y: h - tip, r: toe },
    { z: back, y: h - root, r },
    { z: back, y: root, r },
    { z: 0, y: tip, r: toe },
  ];
}

function teeCorners({ h, b, tw, tf, r }: TeeDimensions): Corner[] {
  const [left, right] = [(b - tw) / 2, (b + tw) / 2];
  return [
    { z: left, y: 0, r: 0 },
    { z: right, y: 0, r: 0 },
    { z: right, y: h - tf, r },
    { z: b, y: h - tf, r: 0 },
    { z: b, y: h, r: 0 },
    { z: 0, y: h, r: 0 },
    { z: 0, y: h - tf, r: 0 },
    { z: left, y: h - tf, r },
  ];
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
