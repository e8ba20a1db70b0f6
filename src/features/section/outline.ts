import type { UnitSystemName } from '@/engine/quantity';
import { outlinePath, sectionProperties } from '@/engine/section';
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
