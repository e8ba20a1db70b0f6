import type {
  AngleDimensions,
  ChannelDimensions,
  IDimensions,
  SectionDimensions,
  TaperedChannelDimensions,
  TaperedIDimensions,
  TeeDimensions,
  TubeDimensions,
  ValuesDimensions,
} from './dimensions';

/**
 * I: J = 2/3 b t_f³ + 1/3 (h − 2t_f) t_w³ + 2 α₁ D₁⁴ − 0.420 t_f⁴, D₁ the largest circle in the junction. El Darwish
 * and Johnston, Torsion of structural shapes, J. Struct. Div. ASCE 91 (1965); also in SCI P363. Within
 * 4 % of published values (root radii known; a radius found from a rounded mass adds 1 %).
 */
function torsionOfI(d: IDimensions): number {
  const { h, b, tw: t, tf: T } = d;
  return (2 / 3) * b * T ** 3 + ((h - 2 * T) * t ** 3) / 3 + 2 * junctionOfTee(d) - 0.42 * T ** 4;
}

/** Tee: half of that, and the free end of its stem: − 0.105 t_w⁴. Same source and accuracy. */
function torsionOfTee(d: TeeDimensions): number {
  const { h, b, tw: t, tf: T } = d;
  return (b * T ** 3 + (h - T) * t ** 3) / 3 + junctionOfTee(d) - 0.21 * T ** 4 - 0.105 * t ** 4;
}

/** α₁ D₁⁴ of a web that meets a flange in its middle. */
function junctionOfTee({ tw: t, tf: T, r }: IDimensions | TeeDimensions): number {
  const a =
    -0.042 + (0.2204 * t) / T + (0.1355 * r) / T - (0.0865 * r * t) / T ** 2 - (0.0725 * t ** 2) / T ** 2;
  return a * (((T + r) ** 2 + (r + 0.25 * t) * t) / (2 * r + T)) ** 4;
}

/**
 * I with tapered flanges, T₁ at the tip and T₂ at the web: (b − t)/6 (T₁ + T₂)(T₁² + T₂²) + 2/3 t T₂³ + 1/3 (h − 2T₂) t³ +
 * 2 α D⁴ − 4 V T₁⁴, with α of flanges that slope by 1 in 6 and V of the slope. El Darwish and Johnston as above. The
 * printed tables of European tapered I, 1.22 times the sum of bt³/3, lie 6 to 8 % above it.
 */
function torsionOfTaperedI({ h, b, tw: t, tf, r, slope: s, at }: TaperedIDimensions): number {
  const tip = tf - s * at;
  const T = tip + (s * (b - t)) / 2;
  const a =
    -0.0836 + (0.2536 * t) / T + (0.1268 * r) / T - (0.0806 * r * t) / T ** 2 - (0.0858 * t ** 2) / T ** 2;
  const F = r * s * (Math.sqrt(1 / s ** 2 + 1) - 1 - t / (2 * r || 1));
  const D = ((F + T) ** 2 + t * (r + t / 4)) / (F + r + T);
  const flanges = ((b - t) / 6) * (tip + T) * (tip ** 2 + T ** 2) + (2 / 3) * t * T ** 3;
  return flanges + ((h - 2 * T) * t ** 3) / 3 + 2 * a * D ** 4 - 4 * lossAtTip(s) * tip ** 4;
}

/** Channel: the same with α₃ and the circle D₃ of its corner; same source and accuracy. */
function torsionOfChannel({ h, b, tw: t, tf: T, r }: ChannelDimensions): number {
  return (2 / 3) * b * T ** 3 + ((h - 2 * T) * t ** 3) / 3 + 2 * junctionOfCorner(t, T, r) - 0.42 * T ** 4;
}

/**
 * Channel with tapered flanges, T₁ at the tip and T₂ at the web: (b − t)/6 (T₁ + T₂)(T₁² + T₂²) + 2/3 t T₂³ + 1/3 (h − 2T₂) t³
 * + 2 α₄ D₄⁴ − 2 V T₁⁴ − 0.21 T₂⁴, with α₄ of flanges that slope by 1 in 6 and D₄ the circle that touches both outer faces
 * and the root. El Darwish and Johnston as above, α₄ from memory; American channels within 4 % of printed values.
 */
function torsionOfTaperedChannel({ h, b, tw: t, tf, r, slope: s, at }: TaperedChannelDimensions): number {
  const tip = tf - s * at;
  const T = tip + s * (b - t);
  const a =
    -0.1325 + (0.3015 * t) / T + (0.14 * r) / T - (0.107 * r * t) / T ** 2 - (0.0956 * t ** 2) / T ** 2;
  const up = T + r * (Math.sqrt(1 + s ** 2) - s); // of the root's centre; t + r across
  const D = 2 * (t + 2 * r + up - Math.sqrt(2 * (t + 2 * r) * (up + r)));
  const flanges = ((b - t) / 6) * (tip + T) * (tip ** 2 + T ** 2) + (2 / 3) * t * T ** 3;
  return flanges + ((h - 2 * T) * t ** 3) / 3 + 2 * a * D ** 4 - 2 * lossAtTip(s) * tip ** 4 - 0.21 * T ** 4;
}

/** V: what the free tip of a flange that slopes by s loses, per T₁⁴; 0.105 where it does not slope. */
const lossAtTip = (s: number): number =>
  0.10504 - 0.1 * s + 0.0848 * s ** 2 - 0.06746 * s ** 3 + 0.05153 * s ** 4;

/** Angle: half a channel of one thickness; same source and accuracy. */
function torsionOfAngle({ h, b, t, r }: AngleDimensions): number {
  return (b * t ** 3 + (h - t) * t ** 3) / 3 + junctionOfCorner(t, t, r) - 0.21 * t ** 4;
}

/** α₃ D₃⁴ of a web that meets a flange at its end. */
function junctionOfCorner(t: number, T: number, r: number): number {
  const a =
    -0.0908 + (0.2621 * t) / T + (0.1231 * r) / T - (0.0752 * r * t) / T ** 2 - (0.0945 * t ** 2) / T ** 2;
  return a * (2 * (3 * r + t + T - Math.sqrt(2 * (2 * r + t) * (2 * r + T)))) ** 4;
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
export function torsionConstant(d: Exclude<SectionDimensions, ValuesDimensions>): number {
  switch (d.shape) {
    case 'i':
      return torsionOfI(d);
    case 'tapered_i':
      return torsionOfTaperedI(d);
    case 'channel':
      return torsionOfChannel(d);
    case 'tapered_channel':
      return torsionOfTaperedChannel(d);
    case 'tee':
      return torsionOfTee(d);
    case 'angle':
      return torsionOfAngle(d);
    case 'rhs':
    case 'shs':
      return torsionOfTube(d);
    case 'chs':
      return (Math.PI / 32) * (d.d ** 4 - (d.d - 2 * d.t) ** 4);
    case 'rectangle':
      return torsionOfRectangle(d.h, d.b);
    case 'round':
      return (Math.PI / 32) * d.d ** 4;
    case 'outline':
      return d.j;
  }
}

/** Mid-line sizes of a channel: flange length, depth, and the areas b t_f and h t_w. */
function midLine({ h, b, tw, tf }: ChannelDimensions | TaperedChannelDimensions) {
  const flange = b - tw / 2;
  const depth = h - tf;
  return { flange, depth, flangeArea: flange * tf, webArea: depth * tw };
}

/**
 * Shear centre of a channel, m from the back of its web, negative outside: −(3 b′² t_f/(h′t_w + 6 b′t_f) − t_w/2),
 * on the mid-lines (Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., appendix).
 */
function channelShearCentre(d: ChannelDimensions | TaperedChannelDimensions): number {
  const { flange, flangeArea, webArea } = midLine(d);
  return d.tw / 2 - (3 * flange * flangeArea) / (webArea + 6 * flangeArea);
}

/**
 * Shear centre, m from the left edge: of a channel outside its web, of an angle where the mid-lines of its legs meet, else
 * at the centroid, from which only that of an unsymmetric outline could differ.
 */
export function shearCentreOf(d: SectionDimensions, centroid: number): number {
  if (d.shape === 'channel' || d.shape === 'tapered_channel') return channelShearCentre(d);
  return d.shape === 'angle' ? d.t / 2 : centroid;
}

/**
 * Warping constant I_w, m⁶. I: I_z (h − t_f)²/4. Channel: b′³h′²t_f/12 · (3b′t_f + 2h′t_w)/(6b′t_f + h′t_w), on the
 * mid-lines, root radii ignored: 3 to 8 % above the printed tables. Tee: b³t_f³/144 + (h − t_f/2)³t_w³/36 (Timoshenko and
 * Gere, appendix). Angles, closed and solid sections hardly warp: 0.
 */
export function warpingConstant(
  d: Exclude<SectionDimensions, ValuesDimensions>,
  minorSecondMoment: number,
): number {
  switch (d.shape) {
    case 'i':
    case 'tapered_i':
      return (minorSecondMoment * (d.h - d.tf) ** 2) / 4;
    case 'channel':
    case 'tapered_channel': {
      const { flange, depth, flangeArea, webArea } = midLine(d);
      const share = (3 * flangeArea + 2 * webArea) / (6 * flangeArea + webArea);
      return ((flange ** 3 * depth ** 2 * d.tf) / 12) * share;
    }
    case 'tee':
      return (d.b * d.tf) ** 3 / 144 + ((d.h - d.tf / 2) * d.tw) ** 3 / 36;
    case 'outline':
      return d.iw;
    default:
      return 0;
  }
}
