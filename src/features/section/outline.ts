import type { UnitSystemName } from '@/engine/quantity';
import { outlinePath, type SectionDimensions, sectionProperties } from '@/engine/section';
import { axesOfTable, shownName } from './display';
import type { EditionView } from './edition';
import { dimensionsOf, type SectionItem } from './section';

const MM = 1000;

/** A section as drawings take it: its true outline, and the axis letters of its table. */
export function outlineOf(item: SectionItem, axes: EditionView['axes'], system: UnitSystemName) {
  const dimensions = dimensionsOf(item);
  const { centroid, centroidUp } = sectionProperties(dimensions);
  return {
    name: shownName(item.designation),
    outline: outlinePath(dimensions),
    axes: axesOfTable(axes, system),
    minorAt: centroid * MM,
    majorAt: centroidUp * MM,
  };
}

/** The same for a page of its own: with thicknesses, centroid, shear centre and principal axes. */
export function detailedOutlineOf(item: SectionItem, axes: EditionView['axes'], system: UnitSystemName) {
  const plain = outlineOf(item, axes, system);
  const dimensions = dimensionsOf(item);
  const { centroid, centroidUp, principal } = sectionProperties(dimensions);
  const { width, height } = plain.outline;
  const detail = {
    centroid: { x: centroid * MM, y: centroidUp * MM },
    shearCentre: shearCentreOf(dimensions),
    principal: principal && { angle: principal.angle, reach: Math.min(width, height) / 2 },
    thicknesses: thicknessesOf(dimensions).map(({ along, ...places }) => ({
      along,
      from: places.from * MM,
      to: places.to * MM,
      at: places.at * MM,
    })),
  };
  return { ...plain, detail };
}

/** Where symmetry does not put it at the centroid and the engine knows it: of channels, tees and angles. */
function shearCentreOf(d: SectionDimensions): { x: number; y: number } | null {
  const { shearCentre, centroidUp } = sectionProperties(d);
  switch (d.shape) {
    case 'channel':
    case 'tapered_channel':
      return { x: shearCentre * MM, y: centroidUp * MM };
    case 'tee':
      return { x: shearCentre * MM, y: (d.h - d.tf / 2) * MM };
    case 'angle':
      return { x: shearCentre * MM, y: (d.t / 2) * MM };
    default:
      return null;
  }
}

/** From edge to edge: across at a height, or upwards at a distance from the left. */
type Thickness = { along: 'across' | 'up'; from: number; to: number; at: number };

/** Web, flange, leg or wall, where there is room for a figure beside it, m. */
function thicknessesOf(d: SectionDimensions): Thickness[] {
  switch (d.shape) {
    case 'i':
    case 'tapered_i':
    case 'tee':
    case 'channel':
    case 'tapered_channel': {
      const face = d.shape === 'channel' || d.shape === 'tapered_channel' ? 0 : (d.b - d.tw) / 2;
      const tip = 'at' in d ? d.at : (d.b - face - d.tw) / 4;
      return [
        { along: 'across', from: face, to: face + d.tw, at: 0.3 * d.h },
        { along: 'up', from: d.h - d.tf, to: d.h, at: d.b - tip },
      ];
    }
    case 'angle':
      return [{ along: 'across', from: 0, to: d.t, at: 0.75 * d.h }];
    case 'rhs':
    case 'shs':
      return [{ along: 'across', from: 0, to: d.t, at: 0.3 * d.h }];
    case 'chs':
      return [{ along: 'across', from: 0, to: d.t, at: d.d / 2 }];
    default:
      return [];
  }
}
