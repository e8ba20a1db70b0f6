import {
  type AngleDimensions,
  depthOf,
  type OutlineDimensions,
  type SectionDimensions,
  type TeeDimensions,
  type ValuesDimensions,
} from './dimensions';
import { outlineCorners } from './outline';
import { flatten, widthAt } from './rings';

type Unsymmetric = TeeDimensions | AngleDimensions | OutlineDimensions | ValuesDimensions;

/** A slice of the depth with one width, between two distances from the major axis. */
type Slice = { from: number; to: number; width: number };

/** 3-point Gauss: exact for Q², a polynomial of degree 4 within a slice. */
const GAUSS = [
  { x: -Math.sqrt(3 / 5), weight: 5 / 9 },
  { x: 0, weight: 8 / 9 },
  { x: Math.sqrt(3 / 5), weight: 5 / 9 },
] as const;

/** The slices on one side of the major axis, outermost first; `from` and `to` are distances from it. */
function side(slices: readonly Slice[]): { secondMoment: number; flow: number } {
  let secondMoment = 0;
  let above = 0;
  let flow = 0;
  for (const { from, to, width } of slices) {
    secondMoment += (width * (to ** 3 - from ** 3)) / 3;
    for (const { x, weight } of GAUSS) {
      const y = (from + to) / 2 + ((to - from) / 2) * x;
      const Q = above + (width * (to ** 2 - y ** 2)) / 2;
      flow += (weight * ((to - from) / 2) * Q ** 2) / width;
    }
    above += (width * (to ** 2 - from ** 2)) / 2;
  }
  return { secondMoment, flow };
}

/** I²/∫(Q²/b) dy over the depth: the area that stores the strain energy of VQ/(I b). */
function energyArea(upper: readonly Slice[], lower: readonly Slice[] = upper): number {
  const [up, down] = [side(upper), side(lower)];
  return (up.secondMoment + down.secondMoment) ** 2 / (up.flow + down.flow);
}

const flanged = (h: number, b: number, flange: number, web: number): Slice[] => [
  { from: h / 2 - flange, to: h / 2, width: b },
  { from: 0, to: h / 2 - flange, width: web },
];

/** A depth of two widths with the axis `up` above its bottom: the slices above the axis, and those below it. */
function stepped(h: number, step: number, above: number, below: number, up: number): [Slice[], Slice[]] {
  const upper: Slice[] = [{ from: Math.max(step - up, 0), to: h - up, width: above }];
  if (step > up) upper.push({ from: 0, to: step - up, width: below });
  const lower: Slice[] = [{ from: Math.max(up - step, 0), to: up, width: below }];
  if (step < up) lower.push({ from: 0, to: up - step, width: above });
  return [upper, lower];
}

const SLICES = 200; // of an outline, above the axis and below it
const CHORDS = 16;

function sliced(d: OutlineDimensions, up: number): [Slice[], Slice[]] {
  const polygons = outlineCorners(d).map((ring) => flatten(ring, CHORDS));
  const depth = depthOf(d);
  const slices = (height: number, way: 1 | -1): Slice[] =>
    Array.from({ length: SLICES }, (_, k) => {
      const [to, from] = [height * (1 - k / SLICES), height * (1 - (k + 1) / SLICES)];
      return { from, to, width: widthAt(polygons, up + (way * (from + to)) / 2) };
    }).filter(({ width }) => width > 0);
  return [slices(depth - up, 1), slices(up, -1)];
}

/**
 * Shear area for the deflection, m²: GA of a beam is G times this. Strain energy of τ = VQ/(It) (S. Timoshenko,
 * Strength of Materials, Part I); root and corner radii ignored; 5/6 of a rectangle, 9/10 of a round bar. A thin round
 * tube has half its area, a thick one up to a tenth more. An outline is cut into 400 slices. `up` is the centroid's height.
 */
export function shearArea(d: Exclude<SectionDimensions, ValuesDimensions>, up: number): number {
  switch (d.shape) {
    case 'i':
    case 'tapered_i':
    case 'channel':
    case 'tapered_channel':
      return energyArea(flanged(d.h, d.b, d.tf, d.tw));
    case 'tee':
      return energyArea(...stepped(d.h, d.h - d.tf, d.b, d.tw, up));
    case 'angle':
      return energyArea(...stepped(d.h, d.t, d.t, d.b, up));
    case 'rhs':
    case 'shs':
      return energyArea(flanged(d.h, d.b, d.t, 2 * d.t));
    case 'chs':
      return (Math.PI / 2) * d.t * (d.d - d.t);
    case 'rectangle':
      return (5 / 6) * d.h * d.b;
    case 'round':
      return (9 / 10) * (Math.PI / 4) * d.d ** 2;
    case 'outline':
      return energyArea(...sliced(d, up));
  }
}

/**
 * Area for the mean shear stress V/A_w, m²: the whole depth times the web (AISC 360-22 G2.1) or both walls, half of a
 * round tube, 2/3 of a rectangle and 3/4 of a round bar, so that the mean is the largest stress of the solid ones; of an
 * outline I t/Q at its centroid, for the same reason.
 */
export function webArea(
  d: Exclude<SectionDimensions, ValuesDimensions>,
  { iMajor, firstMoment, width }: { iMajor: number; firstMoment: number; width: number },
): number {
  switch (d.shape) {
    case 'i':
    case 'tapered_i':
    case 'channel':
    case 'tapered_channel':
    case 'tee':
      return d.h * d.tw;
    case 'angle':
      return d.h * d.t;
    case 'rhs':
    case 'shs':
      return 2 * d.t * d.h;
    case 'chs':
      return (Math.PI / 2) * d.t * (d.d - d.t);
    case 'rectangle':
      return (2 / 3) * d.h * d.b;
    case 'round':
      return (3 / 4) * (Math.PI / 4) * d.d ** 2;
    case 'outline':
      return (iMajor * width) / firstMoment;
  }
}

/** Width at mid-depth of a section that is symmetric about it, m: t of τ = VQ/(It) where Q is largest. */
export function webThickness(d: Exclude<SectionDimensions, Unsymmetric>): number {
  switch (d.shape) {
    case 'i':
    case 'tapered_i':
    case 'channel':
    case 'tapered_channel':
      return d.tw;
    case 'rhs':
    case 'shs':
    case 'chs':
      return 2 * d.t;
    case 'rectangle':
      return d.b;
    case 'round':
      return d.d;
  }
}
