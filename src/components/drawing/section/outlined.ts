import { roundStep } from '@/lib/round-step';

/** A section as drawn: its true outline in mm, x from the left edge and y down from the top, and the table's own axis letters. */
export type OutlinedSection = {
  name: string;
  outline: { path: string; width: number; height: number };
  axes: { major: string; minor: string };
  /** The minor axis from the left edge, mm, where it is not in the middle, as in a channel. */
  minorAt?: number | undefined;
  /** The major axis from the bottom, mm, where it is not in the middle, as in a tee. */
  majorAt?: number | undefined;
  /** What only a section that stands alone has room for. */
  detail?: OutlineDetail | undefined;
};

/** A place in mm, x from the left edge and y up from the bottom. */
type Place = { x: number; y: number };

export type OutlineDetail = {
  centroid: Place;
  /** Where it is known and not the centroid. */
  shearCentre: Place | null;
  /** Axis u, radians anticlockwise of the major axis; `reach` mm is half the smaller size over all. */
  principal: { angle: number; reach: number } | null;
  thicknesses: readonly Thickness[];
};

/** A wall, web or flange from edge to edge, mm: across at a height, or upwards at a distance from the left. */
export type Thickness = { along: 'across' | 'up'; from: number; to: number; at: number };

/** px per mm at which every section of a row fits its slot; all are drawn at this one scale. */
export function commonScale(
  sections: readonly OutlinedSection[],
  slot: number,
  tallest: number,
  aside: number,
): number {
  const height = Math.max(...sections.map(({ outline }) => outline.height));
  const width = Math.max(...sections.map(({ outline }) => outline.width));
  return Math.min(tallest / height, Math.max(24, slot - aside) / width);
}

/** A scale bar of two round divisions, each at least `least` px long; `unit` is in mm. */
export function scaleBarOf(
  pxPerMm: number,
  unit: number,
  least: number,
): { division: number; value: number } {
  const value = roundStep(least / (pxPerMm * unit));
  return { division: value * unit * pxPerMm, value };
}
