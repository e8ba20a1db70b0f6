import { channelMinorPlastic } from './channel';
import { dimensionFaults, ImpossibleSection } from './dimension-faults';
import { depthOf, type SectionDimensions, type ValuesDimensions, widthOf } from './dimensions';
import { above, areaMoments, plasticAbove } from './green';
import { outlineCorners } from './outline';
import { plasticModulus } from './part';
import { isMadeOfParts, momentsOf, partsOf } from './parts';
import { flatten, type Point, widthAt } from './rings';
import { shearArea, webArea, webThickness } from './shear';
import { shearCentreOf, torsionConstant, warpingConstant } from './torsion';

/**
 * Geometric properties in m, m², m³, m⁴ and m⁶. The major axis is the one across the web or the upright leg, through the
 * centroid: EN y–y, US x–x. It need not be the axis of the largest I: see `principal`.
 */
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
  /** First moment about the major axis of what lies above it, and the width there: τ = V Q/(I t). */
  firstMoment: number;
  webThickness: number;
  /** Centroid and shear centre, from the left edge (the back of a channel), and the centroid from the bottom. */
  centroid: number;
  shearCentre: number;
  centroidUp: number;
  /** Where neither axis is one of symmetry: what bends sideways under a load along the web, unless it is held. */
  principal: PrincipalAxes | null;
};

/** Second moments about the principal axes u (largest) and v, m⁴; u lies so many radians anticlockwise of the major axis. */
type PrincipalAxes = { iU: number; iV: number; angle: number };

/**
 * Properties of a section from its dimensions. A, I and their axes: by rectangles and fillets (A = ΣA_i, I = Σ(I_i +
 * A_i d²)) where the shape is made of them, else by Green's theorem along the outline, both exact for the shape as drawn;
 * W_el = I/c; W_pl = Σ A_i |d| about the axis of equal areas; J, I_w and the shear areas as their own functions say. All
 * in m. Throws ImpossibleSection where the dimensions describe none.
 */
export function sectionProperties(d: SectionDimensions): SectionProperties {
  const faults = dimensionFaults(d);
  if (faults.length > 0) throw new ImpossibleSection(faults);
  if (d.shape === 'values') return supplied(d);
  const { area, y, z, iMajor, iMinor, product } = isMadeOfParts(d)
    ? momentsOf(d, partsOf(d))
    : momentsAlong(d);
  const [depth, width] = [depthOf(d), widthOf(d)];
  const plastic = plasticModuli(d, y);
  return {
    area,
    iMajor,
    iMinor,
    wElMajor: iMajor / Math.max(y, depth - y),
    wElMinor: iMinor / Math.max(z, width - z),
    wPlMajor: plastic.major,
    wPlMinor: plastic.minor,
    rMajor: Math.sqrt(iMajor / area),
    rMinor: Math.sqrt(iMinor / area),
    j: torsionConstant(d),
    iw: warpingConstant(d, iMinor),
    shearArea: shearArea(d, y),
    webArea: webArea(d, { iMajor, ...plastic }),
    firstMoment: plastic.firstMoment,
    webThickness: plastic.width,
    centroid: z,
    shearCentre: shearCentreOf(d, z),
    centroidUp: y,
    principal: principalAxes(iMajor, iMinor, product),
  };
}

/** What is known of a section without its outline; Q and t are those that its shear area stands for: A_v = I t/Q. */
function supplied(d: ValuesDimensions): SectionProperties {
  const { shape: _shape, h, b, t: _t, shearArea: area, ...values } = d;
  return {
    ...values,
    rMajor: Math.sqrt(d.iMajor / d.area),
    rMinor: Math.sqrt(d.iMinor / d.area),
    shearArea: area,
    webArea: area,
    firstMoment: (d.iMajor * b) / area,
    webThickness: b,
    centroid: b / 2,
    shearCentre: b / 2,
    centroidUp: h / 2,
    principal: null,
  };
}

function momentsAlong(d: SectionDimensions) {
  const sums = areaMoments(outlineCorners(d));
  const [y, z] = [sums.y / sums.area, sums.z / sums.area];
  return {
    area: sums.area,
    y,
    z,
    iMajor: sums.yy - sums.area * y ** 2,
    iMinor: sums.zz - sums.area * z ** 2,
    product: sums.yz - sums.area * y * z,
  };
}

const SYMMETRIC = 1e-9; // of I_y + I_z: a product below it is rounding

/** Mohr's circle of the second moments; null where the axes are principal as they are. */
function principalAxes(iMajor: number, iMinor: number, product: number): PrincipalAxes | null {
  if (Math.abs(product) <= SYMMETRIC * (iMajor + iMinor)) return null;
  const mean = (iMajor + iMinor) / 2;
  const radius = Math.hypot((iMajor - iMinor) / 2, product);
  return { iU: mean + radius, iV: mean - radius, angle: Math.atan2(-2 * product, iMajor - iMinor) / 2 };
}

type Plastic = { major: number; minor: number; firstMoment: number; width: number };

const CHORDS = 24; // of a rounded corner: W_pl is then right within 1e-6

/** W_pl about both axes, and Q and t at the centroid `up` above the bottom. */
function plasticModuli(d: Exclude<SectionDimensions, ValuesDimensions>, up: number): Plastic {
  if (isMadeOfParts(d) && d.shape !== 'tee' && d.shape !== 'angle') {
    const parts = partsOf(d);
    const major = plasticModulus(parts, 'major');
    const minor = d.shape === 'channel' ? channelMinorPlastic(d) : plasticModulus(parts, 'minor');
    return { major, minor, firstMoment: major / 2, width: webThickness(d) }; // both halves of W_pl are Q
  }
  const polygons = outlineCorners(d).map((ring) => flatten(ring, CHORDS));
  const upper = above(polygons, up);
  return {
    major: plasticAbove(polygons),
    minor: plasticAbove(polygons.map((polygon) => polygon.map(turned))),
    firstMoment: upper.moment - up * upper.area,
    width: widthAt(polygons, up),
  };
}

/** By a quarter turn: what was to the right is up. */
const turned = ({ z, y }: Point): Point => ({ z: -y, y: z });
