import type { ChannelDimensions, IDimensions, SectionDimensions, TubeDimensions } from './dimensions';

/**
 * I: J = 2/3 b t_f³ + 1/3 (h − 2t_f) t_w³ + 2 α₁ D₁⁴ − 0.420 t_f⁴, D₁ the largest circle in the junction. El Darwish
 * and Johnston, Torsion of structural shapes, J. Struct. Div. ASCE 91 (1965); also in SCI P363. Within
 * 4 % of published values (root radii known; a radius found from a rounded mass adds 1 %).
 */
function torsionOfI({ h, b, tw: t, tf: T, r }: IDimensions): number {
  const a =
    -0.042 + (0.2204 * t) / T + (0.1355 * r) / T - (0.0865 * r * t) / T ** 2 - (0.0725 * t ** 2) / T ** 2;
  const D = ((T + r) ** 2 + (r + 0.25 * t) * t) / (2 * r + T);
  return (2 / 3) * b * T ** 3 + ((h - 2 * T) * t ** 3) / 3 + 2 * a * D ** 4 - 0.42 * T ** 4;
}

/** Channel: the same with α₃ and the circle D₃ of its corner; same source and accuracy. */
function torsionOfChannel({ h, b, tw: t, tf: T, r }: ChannelDimensions): number {
  const a =
    -0.0908 + (0.2621 * t) / T + (0.1231 * r) / T - (0.0752 * r * t) / T ** 2 - (0.0945 * t ** 2) / T ** 2;
  const D = 2 * (3 * r + t + T - Math.sqrt(2 * (2 * r + t) * (2 * r + T)));
  return (2 / 3) * b * T ** 3 + ((h - 2 * T) * t ** 3) / 3 + 2 * a * D ** 4 - 0.42 * T ** 4;
}

/** Tube: I_t = p t³/3 + 4 A_h² t/p on the mid-line of the wall. EN 10210-2:2006 and EN 10219-2:2006, Annex B. */
function torsionOfTube({ h, b, t, ro, ri }: TubeDimensions): number {
  const corner = (4 - Math.PI) * ((ro + ri) / 2);
  const perimeter = 2 * (b - t + (h - t)) - 2 * corner;
  const enclosed = (b - t) * (h - t) - corner * ((ro + ri) / 2);
  return (t ** 3 * perimeter) / 3 + (4 * enclosed ** 2 * t) / perimeter;
}

/** Rectangle: long·short³ [1/3 − 0.21 n (1 − n⁴/12)], n = short/long. Roark's Formulas, 7th ed., Table 10.1; within 0.5 %. */
function torsionOfRectangle(h: number, b: number): number {
  const long = Math.max(h, b);
  const n = Math.min(h, b) / long;
  return long * (n * long) ** 3 * (1 / 3 - 0.21 * n * (1 - n ** 4 / 12));
}

/** St Venant torsion constant J (I_t), m⁴. */
export function torsionConstant(d: SectionDimensions): number {
  switch (d.shape) {
    case 'i':
      return torsionOfI(d);
    case 'channel':
      return torsionOfChannel(d);
    case 'rhs':
    case 'shs':
      return torsionOfTube(d);
    case 'chs':
      return (Math.PI / 32) * (d.d ** 4 - (d.d - 2 * d.t) ** 4);
    case 'rectangle':
      return torsionOfRectangle(d.h, d.b);
    case 'round':
      return (Math.PI / 32) * d.d ** 4;
  }
}

/** Mid-line sizes of a channel: flange length, depth, and the areas b t_f and h t_w. */
function midLine({ h, b, tw, tf }: ChannelDimensions) {
  const flange = b - tw / 2;
  const depth = h - tf;
  return { flange, depth, flangeArea: flange * tf, webArea: depth * tw };
}

/**
 * Shear centre of a channel, m from the back of its web, negative outside: −(3 b′² t_f/(h′t_w + 6 b′t_f) − t_w/2),
 * on the mid-lines (Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., appendix).
 */
export function channelShearCentre(d: ChannelDimensions): number {
  const { flange, flangeArea, webArea } = midLine(d);
  return d.tw / 2 - (3 * flange * flangeArea) / (webArea + 6 * flangeArea);
}

/**
 * Warping constant I_w, m⁶. I: I_z (h − t_f)²/4. Channel: b′³h′²t_f/12 · (3b′t_f + 2h′t_w)/(6b′t_f + h′t_w), on the
 * mid-lines, root radii ignored: 3 to 8 % above the printed tables (Timoshenko and Gere, appendix). Closed and solid
 * sections hardly warp: 0.
 */
export function warpingConstant(d: SectionDimensions, minorSecondMoment: number): number {
  if (d.shape === 'i') return (minorSecondMoment * (d.h - d.tf) ** 2) / 4;
  if (d.shape !== 'channel') return 0;
  const { flange, depth, flangeArea, webArea } = midLine(d);
  const share = (3 * flangeArea + 2 * webArea) / (6 * flangeArea + webArea);
  return ((flange ** 3 * depth ** 2 * d.tf) / 12) * share;
}
