export {
  type Contribution,
  compound,
  contributionsOf,
  type Placed,
  sideBySide,
  solidOutline,
} from './compound';
export {
  asciiDesignation,
  type DesignationParts,
  designationKey,
  designationParts,
  designationRank,
  keyOfParts,
} from './designation';
export { dimensionFaults, ImpossibleSection } from './dimension-faults';
export {
  type Corner,
  cornerRadii,
  depthOf,
  designWall,
  governingThickness,
  type IDimensions,
  MEASURED_SHAPES,
  type MeasuredShape,
  SECTION_SHAPES,
  type SectionDimensions,
  type SectionShape,
  TUBE_STANDARDS,
  taper,
  tube,
  widthOf,
} from './dimensions';
export { elasticStrength, MATERIALS, materialFor, materialIn, yieldStrength } from './material';
export { type MaterialEntry, type MaterialSet, materialsOf } from './material-set';
export type { Material } from './material-types';
export { outlineCorners, outlinePath } from './outline';
export {
  type Finding,
  plausibilityFindings,
  type Severity,
  TABULATED,
  type Tabulated,
  type TabulatedName,
} from './plausibility';
export { type SectionProperties, sectionProperties } from './properties';
export { roundCorners } from './rings';
export { freeBending, sectionCautions } from './unsymmetric';
