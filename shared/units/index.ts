/** Dimensions, units, and the constants of nature. */
export {
  BASE_UNITS,
  dimension,
  DIMENSIONLESS,
  divideDimensions,
  equalDimensions,
  isDimensionless,
  multiplyDimensions,
  powerDimension,
  type Dimension,
} from './dimension.ts';
export { unitNamed, USUAL_UNITS, type Unit } from './unit.ts';
export { parseUnit, type UnitFault, type UnitResult, type UnitValue } from './parseUnit.ts';
export { describeDimension, formatDimension } from './formatDimension.ts';
export {
  NATURAL_CONSTANTS,
  naturalConstant,
  PI_VALUE,
  type NaturalConstantFacts,
} from './constants.ts';
