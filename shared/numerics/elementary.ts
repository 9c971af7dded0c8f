/** The functions of the language in doubles. */
import type { FunctionName } from '../algebra/expression.ts';
import {
  besselI,
  debyeFunction,
  digamma,
  erf,
  gamma,
  lnGamma,
  polygamma,
  polylogarithm,
} from './special/index.ts';
import type { Binary, Unary } from './tape.ts';

export const UNARY: Partial<Record<FunctionName, Unary>> = {
  exp: Math.exp,
  ln: Math.log,
  log10: Math.log10,
  sinh: Math.sinh,
  cosh: Math.cosh,
  tanh: Math.tanh,
  coth: (x) => 1 / Math.tanh(x),
  sin: Math.sin,
  cos: Math.cos,
  tan: Math.tan,
  arcsinh: Math.asinh,
  arctanh: Math.atanh,
  erf,
  Gamma: gamma,
  lnGamma,
  digamma,
  factorial: (x) => gamma(x + 1),
  abs: Math.abs,
  heaviside: (x) => (x >= 0 ? 1 : x < 0 ? 0 : NaN),
};

export const BINARY: Partial<Record<FunctionName, Binary>> = {
  polygamma,
  polylog: polylogarithm,
  besselI,
  debye: debyeFunction,
  binomial,
  min: Math.min,
  max: Math.max,
};

/** Up to here a binomial coefficient is multiplied out, which keeps all digits. */
const LARGEST_LOWER_INDEX = 1000;

/** n (n − 1) … (n − k + 1)/k! for whole k, by gamma functions for others (DLMF 1.2.6). */
function binomial(n: number, k: number): number {
  const lower = Number.isInteger(n) && n >= k && n - k < k ? n - k : k;
  if (Number.isInteger(lower) && lower <= LARGEST_LOWER_INDEX) {
    if (lower < 0) return 0;
    let result = 1;
    // Each product is divisible, so that coefficients below 2^53 are exact.
    for (let i = 1; i <= lower; i++) result = (result * (n - lower + i)) / i;
    return result;
  }
  return Math.exp(lnGamma(n + 1) - lnGamma(k + 1) - lnGamma(n - k + 1));
}
