/** Numbers from expressions. */
export { compile, type Compiled } from './compile.ts';
export { integrate, integratePieces, isSettled, type Quadrature } from './quadrature.ts';
export { sumSeries, type SeriesSum } from './sumSeries.ts';
export { brent, newton } from './roots.ts';
export {
  evaluatePrecisely,
  isCostly,
  preciseDerivative,
  preciseMixedDerivative,
  type PreciseValues,
} from './precise.ts';
export { big, DIGITS, type BigNumber } from './bigNumber.ts';
