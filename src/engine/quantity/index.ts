export { FOOT, INCH, STANDARD_GRAVITY } from './atoms';
export {
  DIMENSION_NAMES,
  DIMENSION_WORDS,
  DIMENSIONS,
  type Dimension,
  type DimensionName,
  divideDimensions,
  equalDimensions,
  isDimensionless,
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
export { type QuantityReading, readQuantity } from './read';
export { type Purpose, type Rounding, UNIT_SYSTEMS, type UnitSystemName } from './system';
export { unitFactor, unitText } from './unit';
