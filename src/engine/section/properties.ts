import { channelMinorPlastic } from './channel';
import { depthOf, dimensionFaults, ImpossibleSection, type SectionDimensions, widthOf } from './dimensions';
import { fillet, fourFillets, type Part, plasticModulus, rectangle, sumOf } from './part';
import { shearArea, webArea, webThickness } from './shear';
import { channelShearCentre, torsionConstant, warpingConstant } from './torsion';

/** Geometric properties in m, m², m³, m⁴ and m⁶. The major axis is the one across the web: EN y–y, US x–x. */
export type SectionProperties = {
  area: number;
  iMajor: number;
  iMinor: number;
  wElMajor: number;
  wElMinor: number;
  wPlMajor: number;
  wPlMinor: number;
  /** Radii of gyration √(I/A). */
  rMajor: number;
  rMinor: number;
  /** St Venant torsion constant, I_t. */
  j: number;
  /** Warping constant, C_w. */
  iw: number;
  /** For the deflection: GA = G · shearArea. */
  shearArea: number;
  /** For the mean shear stress V/A_w. */
  webArea: number;
  /** First moment of the half section about the major axis, and the width there: τ = V Q/(I t). */
  firstMoment: number;
  webThickness: number;
  /** Centroid and shear centre, from the left edge (the back of a channel). */
  centroid: number;
  shearCentre: number;
};

/** The section as rectangles and fillets; z from its line of symmetry, of a channel from the back of the web. */
function partsOf(d: SectionDimensions): Part[] {
  switch (d.shape) {
    case 'i': {
      const flange = (d.h - d.tf) / 2;
      return [
        rectangle(d.tw, d.h - 2 * d.tf),
        rectangle(d.b, d.tf, flange),
        rectangle(d.b, d.tf, -flange),
        ...fourFillets(d.r, d.h / 2 - d.tf, d.tw / 2, { up: -1, right: 1 }, 1),
      ];
    }
    case 'channel': {
      const flange = (d.h - d.tf) / 2;
      const outstand = d.b - d.tw;
      return [
        rectangle(d.tw, d.h, 0, d.tw / 2),
        rectangle(outstand, d.tf, flange, d.tw + outstand / 2),
        rectangle(outstand, d.tf, -flange, d.tw + outstand / 2),
        fillet(d.r, { y: d.h / 2 - d.tf, z: d.tw }, -1, 1, 1),
        fillet(d.r, { y: d.tf - d.h / 2, z: d.tw }, 1, 1, 1),
      ];
    }
    case 'rhs':
    case 'shs':
      return [
        rectangle(d.b, d.h),
        rectangle(d.b - 2 * d.t, d.h - 2 * d.t, 0, 0, -1),
        ...fourFillets(d.ro, d.h / 2, d.b / 2, { up: -1, right: -1 }, -1),
        ...fourFillets(d.ri, d.h / 2 - d.t, d.b / 2 - d.t, { up: -1, right: -1 }, 1),
      ];
    case 'rectangle':
      return [rectangle(d.b, d.h)];
    case 'chs':
      return [...disc(d.d, 1), ...disc(d.d - 2 * d.t, -1)];
    case 'round':
      return disc(d.d, 1);
  }
}

function disc(d: number, sign: 1 | -1): Part[] {
  const own = (sign * Math.PI * d ** 4) / 64;
  const plastic = (sign * d ** 3) / 6;
  const area = (sign * Math.PI * d ** 2) / 4;
  return [{ area, y: 0, z: 0, ownMajor: own, ownMinor: own, plasticMajor: plastic, plasticMinor: plastic }];
}

/** Position of the centroid, of the shear centre and of the farthest fibre across the minor axis. */
function acrossMinor(d: SectionDimensions, parts: readonly Part[], area: number) {
  const half = widthOf(d) / 2;
  if (d.shape !== 'channel') return { axis: 0, centroid: half, shearCentre: half, farthest: half };
  const centroid = sumOf(parts, (part) => part.area * part.z) / area;
  return {
    axis: centroid,
    centroid,
    shearCentre: channelShearCentre(d),
    farthest: Math.max(centroid, d.b - centroid),
  };
}

/**
 * Properties of a section from its dimensions, by rectangles and fillets: A = ΣA_i, I = Σ(I_i + A_i d²), W_el = I/c,
 * W_pl = Σ A_i |d| about the axis of equal areas. Exact for the shape as drawn; J, I_w and the shear areas as their own
 * functions say. All in m. Throws ImpossibleSection where the dimensions describe none.
 */
export function sectionProperties(d: SectionDimensions): SectionProperties {
  const faults = dimensionFaults(d);
  if (faults.length > 0) throw new ImpossibleSection(faults);
  const parts = partsOf(d);
  const area = sumOf(parts, (part) => part.area);
  const { axis, centroid, shearCentre, farthest } = acrossMinor(d, parts, area);
  const iMajor = sumOf(parts, (part) => part.ownMajor + part.area * part.y ** 2);
  const iMinor = sumOf(parts, (part) => part.ownMinor + part.area * (part.z - axis) ** 2);
  const wPlMajor = plasticModulus(parts, 'major');
  return {
    area,
    iMajor,
    iMinor,
    wElMajor: iMajor / (depthOf(d) / 2),
    wElMinor: iMinor / farthest,
    wPlMajor,
    wPlMinor: d.shape === 'channel' ? channelMinorPlastic(d) : plasticModulus(parts, 'minor'),
    rMajor: Math.sqrt(iMajor / area),
    rMinor: Math.sqrt(iMinor / area),
    j: torsionConstant(d),
    iw: warpingConstant(d, iMinor),
    shearArea: shearArea(d),
    webArea: webArea(d),
    firstMoment: wPlMajor / 2, // symmetric about the major axis: both halves of W_pl are Q
    webThickness: webThickness(d),
    centroid,
    shearCentre,
  };
}
