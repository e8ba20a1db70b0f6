export const SECTION_SHAPES = [
  'i',
  'tapered_i',
  'channel',
  'tapered_channel',
  'tee',
  'angle',
  'rhs',
  'shs',
  'chs',
  'rectangle',
  'round',
  'outline',
  'values',
] as const;
export type SectionShape = (typeof SECTION_SHAPES)[number];
/** Shapes that a row of sizes describes: an outline is drawn, and what is known by its values has none. */
export type MeasuredShape = Exclude<SectionShape, 'outline' | 'values'>;
export const MEASURED_SHAPES = SECTION_SHAPES.filter(
  (shape): shape is MeasuredShape => shape !== 'outline' && shape !== 'values',
);

type Flanged = { h: number; b: number; tw: number; tf: number; r: number };
/** Rolled I or H with parallel flanges: depth, width, web, flange, root radius. */
export type IDimensions = { shape: 'i' } & Flanged;
/** Channel with parallel flanges. */
export type ChannelDimensions = { shape: 'channel' } & Flanged;
/** Tee: flange on top, h over all. */
export type TeeDimensions = { shape: 'tee' } & Flanged;
/**
 * I or channel whose flanges' inner faces slope (0.14 is 14 %). tf is measured at `at` from the flange's tip; toe is the
 * radius there.
 */
type Tapered = Flanged & { toe: number; slope: number; at: number };
export type TaperedIDimensions = { shape: 'tapered_i' } & Tapered;
export type TaperedChannelDimensions = { shape: 'tapered_channel' } & Tapered;
/** Angle: leg h upright and leg b lying, of one thickness; root radius and radius of both toes. */
export type AngleDimensions = { shape: 'angle'; h: number; b: number; t: number; r: number; toe: number };
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
/** A corner of an outline: z to the right, y up, m, rounded by r. */
export type Corner = { z: number; y: number; r: number };
/**
 * Any outline: rings of corners, an outer one anticlockwise, a hole clockwise. Several outer rings act as one section, as
 * far as their connection lets them. No formula of torsion covers every outline, so whoever drew it says J and I_w, and
 * the thickness t of its thickest part.
 */
export type OutlineDimensions = {
  shape: 'outline';
  rings: readonly (readonly Corner[])[];
  /** What it was put together from, each with how many of the rings are its own, in their order. */
  parts?: readonly OutlinePart[] | undefined;
  t: number;
  j: number;
  iw: number;
};
export type OutlinePart = { name: string; rings: number };
/** Known by its values alone: sizes over all, properties as supplied, and the area that V is divided by for τ. */
export type ValuesDimensions = {
  shape: 'values';
  h: number;
  b: number;
  t: number;
  area: number;
  iMajor: number;
  iMinor: number;
  wElMajor: number;
  wElMinor: number;
  wPlMajor: number;
  wPlMinor: number;
  j: number;
  iw: number;
  shearArea: number;
};

/** What is measured of a section, in m. h is along the web (or upright), b across it. */
export type SectionDimensions =
  | IDimensions
  | TaperedIDimensions
  | ChannelDimensions
  | TaperedChannelDimensions
  | TeeDimensions
  | AngleDimensions
  | TubeDimensions
  | RoundTubeDimensions
  | RectangleDimensions
  | RoundBarDimensions
  | OutlineDimensions
  | ValuesDimensions;

export const depthOf = (d: SectionDimensions): number =>
  d.shape === 'outline' ? extent(d, 'y') : 'h' in d ? d.h : d.d;
export const widthOf = (d: SectionDimensions): number =>
  d.shape === 'outline' ? extent(d, 'z') : 'b' in d ? d.b : d.d;

function extent({ rings }: OutlineDimensions, along: 'y' | 'z'): number {
  const places = rings.flatMap((ring) => ring.map((corner) => corner[along]));
  return Math.max(...places) - Math.min(...places);
}

/** The thickness that decides the strength: the thicker of flange and web, since either may govern. */
export function governingThickness(d: SectionDimensions): number {
  if ('tf' in d) return Math.max(d.tf, d.tw);
  return 't' in d ? d.t : Math.min(depthOf(d), widthOf(d));
}

/**
 * How flanges taper, and their toe radius, where a table gives h, b, t_w, t_f and r alone. European I (DIN 1025-1): 14 %,
 * t_f at a quarter of the width, toe 0.6 t_w. European channels (DIN 1026-1): 8 % and t_f at half the width up to h =
 * 300 mm, above it 5 % and in the middle of the outstand, toe half the root. American S and C (ASTM A6): 1 in 6, t_f in the
 * middle of the outstand, toe half the root. From memory.
 */
export function taper(
  shape: 'tapered_i' | 'tapered_channel',
  d: Flanged,
  origin: 'european' | 'american',
): TaperedIDimensions | TaperedChannelDimensions {
  const middle = (shape === 'tapered_i' ? (d.b - d.tw) / 2 : d.b - d.tw) / 2;
  if (origin === 'american') return { shape, ...d, toe: d.r / 2, slope: 1 / 6, at: middle };
  if (shape === 'tapered_i') return { shape, ...d, toe: 0.6 * d.tw, slope: 0.14, at: d.b / 4 };
  return d.h > 0.3
    ? { shape, ...d, toe: d.r / 2, slope: 0.05, at: middle }
    : { shape, ...d, toe: d.r / 2, slope: 0.08, at: d.b / 2 };
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
