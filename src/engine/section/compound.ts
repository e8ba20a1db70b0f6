import {
  governingThickness,
  type OutlineDimensions,
  type OutlinePart,
  type SectionDimensions,
  type ValuesDimensions,
  widthOf,
} from './dimensions';
import { areaMoments } from './green';
import { outlineCorners } from './outline';
import { sectionProperties } from './properties';

/** A section whose left edge and bottom stand at z and y, m, and what it is called. */
export type Placed = {
  name: string;
  of: Exclude<SectionDimensions, ValuesDimensions>;
  z: number;
  y: number;
};

/**
 * Sections that act as one: beams side by side, a plate on a flange. Their parts are taken to be joined for the shear
 * between them. J and I_w are the sums of the parts' own, a lower bound: what they enclose together would add to it.
 */
export function compound(parts: readonly Placed[]): OutlineDimensions {
  const own = parts.map(({ of }) => sectionProperties(of));
  return {
    shape: 'outline',
    rings: parts.flatMap(({ of, z, y }) =>
      outlineCorners(of).map((ring) =>
        ring.map((corner) => ({ z: corner.z + z, y: corner.y + y, r: corner.r })),
      ),
    ),
    parts: parts.map(({ name, of }) => ({ name, rings: outlineCorners(of).length })),
    t: Math.max(...parts.map(({ of }) => governingThickness(of))),
    j: own.reduce((sum, { j }) => sum + j, 0),
    iw: own.reduce((sum, { iw }) => sum + iw, 0),
  };
}

/** So many equal sections side by side, `gap` apart. */
export const sideBySide = (
  { name, of }: Pick<Placed, 'name' | 'of'>,
  count: number,
  gap: number,
): OutlineDimensions =>
  compound(Array.from({ length: count }, (_, k) => ({ name, of, z: k * (widthOf(of) + gap), y: 0 })));

/** A part of a section about the axis that it has in common with the others. SI: m², m, m⁴. */
export type Contribution = {
  name: string;
  area: number;
  /** Its centroid from the left edge and from the bottom. */
  z: number;
  y: number;
  /** How far its centroid lies above that of the whole. */
  offset: number;
  /** About the horizontal axis through its own centroid. */
  own: number;
  /** A·offset², by the parallel-axis theorem: I = Σ(own + shifted). */
  shifted: number;
};

/** What every part of an outline adds to I about the major axis: the parts it was put together from, else its rings. */
export function contributionsOf(d: OutlineDimensions): Contribution[] {
  const rings = outlineCorners(d);
  const { centroidUp } = sectionProperties(d);
  let first = 0;
  return partsOfOutline(d).map(({ name, rings: count }) => {
    const sums = areaMoments(rings.slice(first, first + count));
    first += count;
    const [area, y] = [sums.area, sums.y / sums.area];
    const offset = y - centroidUp;
    const own = sums.yy - area * y ** 2;
    return { name, area, z: sums.z / area, y, offset, own, shifted: area * offset ** 2 };
  });
}

function partsOfOutline({ parts, rings }: OutlineDimensions): readonly OutlinePart[] {
  if (parts) return parts;
  return rings.map((ring) => ({ name: areaMoments([ring]).area < 0 ? 'Hole' : 'Outline', rings: 1 }));
}

/**
 * A solid bar of any outline, a polygon of three corners or more: J ≈ A⁴/(40 I_p) with I_p the polar second moment
 * (St Venant's approximation for compact outlines: a square within 7 %, a circle within 1.5 %; not for thin walls), I_w = 0.
 */
export function solidOutline(rings: OutlineDimensions['rings'], thickness: number): OutlineDimensions {
  const outline: OutlineDimensions = { shape: 'outline', rings, t: thickness, j: 0, iw: 0 };
  const { area, iMajor, iMinor } = sectionProperties(outline);
  return { ...outline, j: area ** 4 / (40 * (iMajor + iMinor)) };
}
