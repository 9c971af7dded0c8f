/** Numbers from expressions. */
export { compile, type Compiled } from './compile.ts';
export { integrate, type Quadrature } from './quadrature.ts';
export { sumSeries, type SeriesSum } from './sumSeries.ts';
export { brent } from './roots.ts';
export {
  evaluatePrecisely,
  isCostly,
  preciseDerivative,
  preciseMixedDerivative,
  type PreciseValues,
} from './precise.ts';
export { big, DIGITS, type BigNumber } from './bigNumber.ts';
