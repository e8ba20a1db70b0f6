export { FOOT, INCH, KIP, POUND, POUND_FORCE, STANDARD_GRAVITY } from './atoms';
export {
  DIMENSION_NAMES,
  DIMENSION_WORDS,
  DIMENSIONS,
  type Dimension,
  type DimensionName,
  divideDimensions,
  equalDimensions,
  isDimensionless,
  isDimensionName,
  multiplyDimensions,
  nameDimension,
  raiseDimension,
} from './dimension';
export {
  formatFeetInches,
  formatFor,
  formatNumber,
  formatQuantity,
  formatUtilisation,
  fromUnit,
  MINUS,
  THIN_SPACE,
  toUnit,
  UnknownUnit,
} from './format';
export { type QuantityFaultCode, type QuantityReading, type ReadOptions, readQuantity } from './read';
export {
  type Display,
  PURPOSES,
  type Purpose,
  type Rounding,
  UNIT_SYSTEMS,
  type UnitSystemName,
} from './system';
export { type UnitFault, unitFactor, unitText } from './unit';
