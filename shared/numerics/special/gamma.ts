/** The gamma function, its logarithm and its logarithmic derivatives for real arguments. */
import { zetaSum } from './zetaSum.ts';

/**
 * Coefficients B_{2n}/(2n (2n − 1)) of Stirling's series (DLMF 5.11.1), exact fractions in doubles.
 */
const STIRLING = [
  1 / 12,
  -1 / 360,
  1 / 1260,
  -1 / 1680,
  1 / 1188,
  -691 / 360360,
  1 / 156,
  -3617 / 122400,
  43867 / 244188,
  -174611 / 125400,
];

/** From here on ten terms of Stirling's series are exact to rounding. */
const STIRLING_FROM = 10;

const HALF_LN_TWO_PI = 0.5 * Math.log(2 * Math.PI);

/** ln Γ(x) for x > 0; NaN at the poles and for other x where Γ is negative. */
export function lnGamma(x: number): number {
  if (!(x > 0)) {
    const value = gamma(x);
    return value > 0 ? Math.log(value) : NaN;
  }
  if (x === 1 || x === 2) return 0;
  if (x < STIRLING_FROM) {
    // Γ(x) = Γ(x + n)/(x (x + 1) …); near 1 and 2 the logarithm of the quotient keeps its digits
    // only as far as log1p can, so those have the series about the zero.
    if (Math.abs(x - 1) < NEAR) return nearOne(x - 1);
    if (Math.abs(x - 2) < NEAR) return Math.log1p(x - 2) + nearOne(x - 2);
    let shifted = x;
    let product = 1;
    while (shifted < STIRLING_FROM) product *= shifted++;
    return stirling(shifted) - Math.log(product);
  }
  return stirling(x);
}

function stirling(x: number): number {
  let sum = 0;
  const inverse = 1 / x;
  const square = inverse * inverse;
  for (let n = STIRLING.length - 1; n >= 0; n--) sum = sum * square + (STIRLING[n] ?? 0);
  return (x - 0.5) * Math.log(x) - x + HALF_LN_TWO_PI + sum * inverse;
}

/** ζ(n) for n = 2, 3 …, for the series about the zeros of ln Γ. */
const ZETA: readonly number[] = Array.from({ length: 44 }, (_, i) => zetaSum(i + 2));
/** How far from 1 and 2 that series is used. */
const NEAR = 0.4;

const EULER_GAMMA = 0.5772156649015329;

/** ln Γ(1 + z) = −γ z + Σ ζ(n) (−z)^n/n for |z| < 1 (DLMF 5.7.3). */
function nearOne(z: number): number {
  let sum = 0;
  for (let n = ZETA.length + 1; n >= 2; n--) sum = (sum + (ZETA[n - 2] ?? 1) / n) * -z;
  return -EULER_GAMMA * z + sum * -z;
}

/** Γ(x); NaN at 0, −1, −2 …. */
export function gamma(x: number): number {
  if (Number.isInteger(x)) {
    if (x <= 0) return NaN;
    if (x <= 23) {
      let product = 1;
      for (let i = 2; i < x; i++) product *= i;
      return product;
    }
  }
  if (x < 0.5) return Math.PI / (Math.sin(Math.PI * x) * gamma(1 - x));
  if (x > 171.7) return Infinity;
  // Stirling's formula about 10, and the functional equation from there: the power x^x of a large x
  // would cost two digits.
  let shifted = x;
  let below = 1;
  let above = 1;
  while (shifted < STIRLING_FROM) below *= shifted++;
  while (shifted >= STIRLING_FROM + 1) above *= --shifted;
  return (Math.exp(stirling(shifted)) / below) * above;
}

/** Bernoulli numbers B_2, B_4 … B_20. */
const BERNOULLI = [
  1 / 6,
  -1 / 30,
  1 / 42,
  -1 / 30,
  5 / 66,
  -691 / 2730,
  7 / 6,
  -3617 / 510,
  43867 / 798,
  -174611 / 330,
];

/** ψ(x) = Γ′(x)/Γ(x); NaN at the poles. */
export function digamma(x: number): number {
  if (x <= 0 && Number.isInteger(x)) return NaN;
  if (x < 0) return digamma(1 - x) - Math.PI / Math.tan(Math.PI * x);
  let shifted = x;
  let sum = 0;
  while (shifted < STIRLING_FROM) sum -= 1 / shifted++;
  const square = 1 / (shifted * shifted);
  let series = 0;
  for (let n = BERNOULLI.length; n >= 1; n--) {
    series = (series + (BERNOULLI[n - 1] ?? 0) / (2 * n)) * square;
  }
  return sum + Math.log(shifted) - 0.5 / shifted - series;
}

/** ψ⁽ⁿ⁾(x) for whole n ≥ 0 and x > 0 (DLMF 5.15.8); NaN elsewhere. */
export function polygamma(n: number, x: number): number {
  if (!Number.isInteger(n) || n < 0) return NaN;
  if (n === 0) return digamma(x);
  if (!(x > 0)) return NaN;
  const sign = n % 2 ? 1 : -1;
  const from = STIRLING_FROM + n;
  const factorial = gamma(n + 1);
  let shifted = x;
  let sum = 0;
  while (shifted < from) sum += factorial / Math.pow(shifted++, n + 1);
  let series = gamma(n) / Math.pow(shifted, n) + factorial / (2 * Math.pow(shifted, n + 1));
  let rising = factorial;
  for (let k = 1; k <= BERNOULLI.length; k++) {
    // (2k + n − 1)!/(2k)! by recursion from n!/0!·….
    rising = gamma(2 * k + n) / gamma(2 * k + 1);
    series += ((BERNOULLI[k - 1] ?? 0) * rising) / Math.pow(shifted, 2 * k + n);
  }
  return sign * (sum + series);
}
