import type { SectionDimensions } from './dimensions';

/** A slice of the depth with one width: from y = `from` to `to` above mid-depth. */
type Slice = { from: number; to: number; width: number };

/** 3-point Gauss: exact for Q², a polynomial of degree 4 within a slice. */
const GAUSS = [
  { x: -Math.sqrt(3 / 5), weight: 5 / 9 },
  { x: 0, weight: 8 / 9 },
  { x: Math.sqrt(3 / 5), weight: 5 / 9 },
] as const;

/** I²/∫(Q²/b) dy over the upper half, doubled: the area that stores the strain energy of VQ/(I b). */
function energyArea(slices: readonly Slice[]): number {
  let secondMoment = 0;
  let above = 0;
  let flow = 0;
  for (const { from, to, width } of slices) {
    secondMoment += (2 * width * (to ** 3 - from ** 3)) / 3;
    for (const { x, weight } of GAUSS) {
      const y = (from + to) / 2 + ((to - from) / 2) * x;
      const Q = above + (width * (to ** 2 - y ** 2)) / 2;
      flow += (weight * (to - from) * Q ** 2) / width; // half the slice's length, twice for both halves
    }
    above += (width * (to ** 2 - from ** 2)) / 2;
  }
  return secondMoment ** 2 / flow;
}

const flanged = (h: number, b: number, flange: number, web: number): Slice[] => [
  { from: h / 2 - flange, to: h / 2, width: b },
  { from: 0, to: h / 2 - flange, width: web },
];

/**
 * Shear area for the deflection, m²: GA of a beam is G times this. Strain energy of τ = VQ/(It) (S. Timoshenko,
 * Strength of Materials, Part I); root and corner radii ignored; 5/6 of a rectangle, 9/10 of a round bar. A thin round
 * tube has half its area, a thick one up to a tenth more.
 */
export function shearArea(d: SectionDimensions): number {
  switch (d.shape) {
    case 'i':
    case 'channel':
      return energyArea(flanged(d.h, d.b, d.tf, d.tw));
    case 'rhs':
    case 'shs':
      return energyArea(flanged(d.h, d.b, d.t, 2 * d.t));
    case 'chs':
      return (Math.PI / 2) * d.t * (d.d - d.t);
    case 'rectangle':
      return (5 / 6) * d.h * d.b;
    case 'round':
      return (9 / 10) * (Math.PI / 4) * d.d ** 2;
  }
}

/**
 * Area for the mean shear stress V/A_w, m²: the whole depth times the web (AISC 360-22 G2.1) or both walls, half of a
 * round tube, 2/3 of a rectangle and 3/4 of a round bar, so that the mean is the largest stress of the solid ones.
 */
export function webArea(d: SectionDimensions): number {
  switch (d.shape) {
    case 'i':
    case 'channel':
      return d.h * d.tw;
    case 'rhs':
    case 'shs':
      return 2 * d.t * d.h;
    case 'chs':
      return (Math.PI / 2) * d.t * (d.d - d.t);
    case 'rectangle':
      return (2 / 3) * d.h * d.b;
    case 'round':
      return (3 / 4) * (Math.PI / 4) * d.d ** 2;
  }
}

/** Width of the section at mid-depth, m: t of τ = VQ/(It) where Q is largest. */
export function webThickness(d: SectionDimensions): number {
  switch (d.shape) {
    case 'i':
    case 'channel':
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
