export {
  asciiDesignation,
  type DesignationParts,
  designationKey,
  designationParts,
  designationRank,
  keyOfParts,
} from './designation';
export {
  cornerRadii,
  depthOf,
  designWall,
  dimensionFaults,
  governingThickness,
  type IDimensions,
  ImpossibleSection,
  SECTION_SHAPES,
  type SectionDimensions,
  type SectionShape,
  TUBE_STANDARDS,
  tube,
  widthOf,
} from './dimensions';
export { elasticStrength, MATERIALS, materialFor, materialIn, yieldStrength } from './material';
export { type MaterialEntry, type MaterialSet, materialsOf } from './material-set';
export type { Material } from './material-types';
export { outlineCorners, outlinePath, roundCorners } from './outline';
export {
  type Finding,
  plausibilityFindings,
  type Severity,
  TABULATED,
  type Tabulated,
  type TabulatedName,
} from './plausibility';
export { type SectionProperties, sectionProperties } from './properties';
