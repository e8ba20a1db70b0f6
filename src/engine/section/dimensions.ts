export const SECTION_SHAPES = ['i', 'channel', 'rhs', 'shs', 'chs', 'rectangle', 'round'] as const;
export type SectionShape = (typeof SECTION_SHAPES)[number];

/** Rolled I or H with parallel flanges: depth, width, web, flange, root radius. */
export type IDimensions = { shape: 'i'; h: number; b: number; tw: number; tf: number; r: number };
/** Channel with parallel flanges; a taper of the flanges is ignored: give the mean flange thickness. */
export type ChannelDimensions = { shape: 'channel'; h: number; b: number; tw: number; tf: number; r: number };
/** Rectangular or square tube: wall, outer and inner corner radius. */
export type TubeDimensions = {
  shape: 'rhs' | 'shs';
  h: number;
  b: number;
  t: number;
  ro: number;
  ri: number;
};
type RoundTubeDimensions = { shape: 'chs'; d: number; t: number };
/** Solid rectangle: sawn timber, glued laminated timber, bar. */
type RectangleDimensions = { shape: 'rectangle'; h: number; b: number };
type RoundBarDimensions = { shape: 'round'; d: number };

/** What is measured of a section, in m. h is along the web (or upright), b across it. */
export type SectionDimensions =
  | IDimensions
  | ChannelDimensions
  | TubeDimensions
  | RoundTubeDimensions
  | RectangleDimensions
  | RoundBarDimensions;

export const depthOf = (d: SectionDimensions): number => ('h' in d ? d.h : d.d);
export const widthOf = (d: SectionDimensions): number => ('b' in d ? d.b : d.d);

/** The thickness that decides the strength: the thicker of flange and web, since either may govern. */
export function governingThickness(d: SectionDimensions): number {
  if ('tf' in d) return Math.max(d.tf, d.tw);
  return 't' in d ? d.t : Math.min(depthOf(d), 'b' in d ? d.b : depthOf(d));
}

/** EN 10210 hot finished, EN 10219 cold formed, ASTM A500 cold formed. */
export const TUBE_STANDARDS = ['EN 10210', 'EN 10219', 'ASTM A500'] as const;
export type TubeStandard = (typeof TUBE_STANDARDS)[number];

const A500_DESIGN_WALL = 0.93; // AISC 360-16 B4.2: tubes to A500 are rolled to the lower tolerance of the wall

/**
 * The wall that properties are computed with: 0.93 of the nominal one for ASTM A500, else the nominal one.
 * (A tabulated US weight is of the nominal wall.)
 */
export const designWall = (nominal: number, standard: TubeStandard): number =>
  standard === 'ASTM A500' ? A500_DESIGN_WALL * nominal : nominal;

/** The wall that a design wall was made from. */
export const nominalWall = (design: number, standard: TubeStandard): number =>
  standard === 'ASTM A500' ? design / A500_DESIGN_WALL : design;

/**
 * Corner radii for calculation. EN 10210-2:2006 Annex B: 1.5 t and 1.0 t. EN 10219-2:2006 Annex B: 2.0, 2.5, 3.0 t
 * outside up to 6, up to 10 and over 10 mm, and t less inside. ASTM A500: 2.0 t outside, as the AISC tables.
 */
export function cornerRadii(t: number, standard: TubeStandard): { ro: number; ri: number } {
  if (standard === 'EN 10210') return { ro: 1.5 * t, ri: t };
  const ratio = standard === 'ASTM A500' || t <= 0.006 ? 2 : t <= 0.01 ? 2.5 : 3;
  return { ro: ratio * t, ri: (ratio - 1) * t };
}

/** A square or rectangular tube from its outside sizes and nominal wall. */
export function tube(h: number, b: number, nominalWall: number, standard: TubeStandard): TubeDimensions {
  const t = designWall(nominalWall, standard);
  return { shape: h === b ? 'shs' : 'rhs', h, b, t, ...cornerRadii(t, standard) };
}

export type DimensionFault = { dimension: string; message: string };

const positive = (entries: readonly (readonly [string, number])[]): DimensionFault[] =>
  entries
    .filter(([, value]) => !(value > 0 && Number.isFinite(value))) // !(>) also catches NaN
    .map(([dimension]) => ({ dimension, message: `${dimension} must be more than 0` }));

function flangedFaults(d: IDimensions | ChannelDimensions): DimensionFault[] {
  const faults = positive([
    ['h', d.h],
    ['b', d.b],
    ['tw', d.tw],
    ['tf', d.tf],
  ]);
  if (!(d.r >= 0)) faults.push({ dimension: 'r', message: 'r must not be negative' });
  if (faults.length > 0) return faults;
  if (2 * (d.tf + d.r) >= d.h)
    faults.push({ dimension: 'h', message: 'flanges and root radii fill the depth' });
  const roots = d.shape === 'i' ? 2 : 1;
  if (d.tw + roots * d.r > d.b) {
    faults.push({ dimension: 'b', message: 'web and root radii are wider than the flange' });
  }
  return faults;
}

function tubeFaults(d: TubeDimensions): DimensionFault[] {
  const faults = positive([
    ['h', d.h],
    ['b', d.b],
    ['t', d.t],
  ]);
  const least = Math.min(d.h, d.b);
  if (2 * d.t >= least) faults.push({ dimension: 't', message: 'the walls fill the tube' });
  if (!(d.ro >= 0 && d.ri >= 0 && 2 * d.ro <= least && 2 * (d.ri + d.t) <= least)) {
    faults.push({ dimension: 'ro', message: 'the corner radii do not fit into the tube' });
  }
  return faults;
}

/** Why a section with these dimensions cannot exist; empty where it can. */
export function dimensionFaults(d: SectionDimensions): DimensionFault[] {
  switch (d.shape) {
    case 'i':
    case 'channel':
      return flangedFaults(d);
    case 'rhs':
    case 'shs':
      return tubeFaults(d);
    case 'chs': {
      const faults = positive([
        ['d', d.d],
        ['t', d.t],
      ]);
      return 2 * d.t > d.d ? [...faults, { dimension: 't', message: 'the walls fill the tube' }] : faults;
    }
    case 'rectangle':
      return positive([
        ['h', d.h],
        ['b', d.b],
      ]);
    case 'round':
      return positive([['d', d.d]]);
  }
}

export class ImpossibleSection extends Error {
  constructor(readonly faults: readonly DimensionFault[]) {
    super(faults.map((fault) => fault.message).join('; '));
    this.name = 'ImpossibleSection';
  }
}
