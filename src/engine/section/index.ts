export {
  asciiDesignation,
  type DesignationParts,
  designationKey,
  designationParts,
  designationRank,
} from './designation';
export {
  type ChannelDimensions,
  cornerRadii,
  type DimensionFault,
  depthOf,
  designWall,
  dimensionFaults,
  type IDimensions,
  ImpossibleSection,
  type RectangleDimensions,
  type RoundBarDimensions,
  type RoundTubeDimensions,
  SECTION_SHAPES,
  type SectionDimensions,
  type SectionShape,
  TUBE_STANDARDS,
  type TubeDimensions,
  type TubeStandard,
  tube,
  widthOf,
} from './dimensions';
export { elasticStrength, MATERIALS, materialFor, yieldStrength } from './material';
export { MaterialListFault, readMaterials } from './material-list';
export type {
  AmericanTimber,
  EuropeanTimber,
  Material,
  MaterialSource,
  Steel,
  StrengthBand,
} from './material-types';
export { type Corner, outlineCorners, outlinePath, type Rounding, roundCorners } from './outline';
export {
  type Finding,
  type PlausibilityOptions,
  plausibilityFindings,
  type Severity,
  TABULATED,
  type Tabulated,
  type TabulatedName,
} from './plausibility';
export { type SectionProperties, sectionProperties } from './properties';
