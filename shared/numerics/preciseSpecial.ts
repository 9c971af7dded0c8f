/** Special functions to all the digits of `bigNumber.ts`. */
import * as Q from '../algebra/rational.ts';
import { integratePrecisely } from './preciseQuadrature.ts';
import {
  big,
  BIG_ONE,
  BIG_PI,
  BIG_ZERO,
  bigOfRational,
  DIGITS,
  type BigNumber,
} from './bigNumber.ts';

/** Bernoulli numbers B_0, B_2, … B_(2n) by the recursion Σ C(m + 1, j) B_j = 0, exactly. */
function bernoulliNumbers(count: number): Q.Rational[] {
  const all: Q.Rational[] = [];
  for (let m = 0; m <= 2 * count; m++) {
    let sum = Q.ZERO;
    let binomial = 1n;
    for (let j = 0; j < m; j++) {
      sum = Q.add(sum, Q.multiply(Q.rational(binomial), all[j] ?? Q.ZERO));
      binomial = (binomial * BigInt(m + 1 - j)) / BigInt(j + 1);
    }
    all.push(m === 0 ? Q.ONE : Q.divide(Q.negate(sum), Q.rational(m + 1)));
  }
  return all.filter((_, i) => i % 2 === 0);
}

const BERNOULLI = bernoulliNumbers(40);
/** From here on Stirling's series with forty terms is exact to `DIGITS`. */
const STIRLING_FROM = 60;

/** ln Γ(x) for x > 0 by Stirling's series (DLMF 5.11.1); undefined elsewhere. */
export function preciseLnGamma(x: BigNumber): BigNumber | undefined {
  if (!x.gt(0)) return undefined;
  let shifted = x;
  let product = BIG_ONE;
  while (shifted.lt(STIRLING_FROM)) {
    product = product.times(shifted);
    shifted = shifted.plus(1);
  }
  let series = BIG_ZERO;
  const square = shifted.times(shifted);
  let power = shifted;
  for (let n = 1; n < BERNOULLI.length; n++) {
    const term = bigOfRational(BERNOULLI[n] ?? Q.ZERO).div(power.times(2 * n * (2 * n - 1)));
    series = series.plus(term);
    if (term.abs().lt(big(`1e-${DIGITS}`))) break;
    power = power.times(square);
  }
  const lead = shifted.minus(0.5).times(shifted.ln()).minus(shifted);
  return lead.plus(BIG_PI.times(2).ln().div(2)).plus(series).minus(product.ln());
}

/** Γ(x), by reflection (DLMF 5.5.3) for negative x; undefined at the poles. */
export function preciseGamma(x: BigNumber): BigNumber | undefined {
  if (x.gt(0)) return preciseLnGamma(x)?.exp();
  if (x.isInteger()) return undefined;
  const reflected = preciseLnGamma(BIG_ONE.minus(x))?.exp();
  return reflected && BIG_PI.div(BIG_PI.times(x).sin().times(reflected));
}

/** ψ⁽ⁿ⁾(x) for x > 0 by the derivative of Stirling's series (DLMF 5.15.8). */
export function precisePolygamma(order: number, x: BigNumber): BigNumber | undefined {
  if (!x.gt(0) || !Number.isInteger(order) || order < 0) return undefined;
  let shifted = x;
  let sum = BIG_ZERO;
  const factorial = (n: number): BigNumber => {
    let result = BIG_ONE;
    for (let i = 2; i <= n; i++) result = result.times(i);
    return result;
  };
  const from = STIRLING_FROM + order;
  const sign = order % 2 ? 1 : -1;
  while (shifted.lt(from)) {
    sum = sum.plus(
      factorial(order)
        .times(sign)
        .div(shifted.pow(order + 1)),
    );
    shifted = shifted.plus(1);
  }
  let series =
    order === 0
      ? shifted.ln().minus(BIG_ONE.div(shifted.times(2)))
      : factorial(order - 1)
          .div(shifted.pow(order))
          .plus(factorial(order).div(shifted.pow(order + 1).times(2)))
          .times(sign);
  for (let k = 1; k < BERNOULLI.length; k++) {
    const factor = factorial(2 * k + order - 1).div(factorial(2 * k));
    const term = bigOfRational(BERNOULLI[k] ?? Q.ZERO)
      .times(factor)
      .div(shifted.pow(2 * k + order))
      .times(sign);
    series = series.plus(term);
    if (term.abs().lt(big(`1e-${DIGITS}`))) break;
  }
  return sum.plus(series);
}

/** Σ over terms until they no longer count; undefined where they do not settle. */
export function sumPrecisely(
  term: (n: number) => BigNumber | undefined,
  from: number,
  most = 20_000,
): BigNumber | undefined {
  let sum = BIG_ZERO;
  let small = 0;
  const negligible = big(`1e-${DIGITS + 2}`);
  for (let n = from; n < from + most; n++) {
    const next = term(n);
    if (!next?.isFinite()) return undefined;
    sum = sum.plus(next);
    small = next.abs().lte(sum.abs().times(negligible)) ? small + 1 : 0;
    if (small >= 3 && n > from + 8) return sum;
  }
  return undefined;
}

/** erf x by its series in Kummer's form (DLMF 7.6.2). */
export function preciseErf(x: BigNumber): BigNumber | undefined {
  if (x.abs().gt(13)) return big(x.isNegative() ? -1 : 1);
  let power = x;
  const square = x.times(x).times(2);
  const sum = sumPrecisely((n) => {
    if (n > 0) power = power.times(square).div(2 * n + 1);
    return power;
  }, 0);
  return sum?.times(2).div(BIG_PI.sqrt()).times(x.times(x).neg().exp());
}

/**
 * Li_s(z) by its series for |z| < 0.97, for other z ≤ 1 by the integral
 * z/Γ(s) ∫ t^(s−1)/(e^t − z) dt (DLMF 25.12.11), which needs s > 0 (s > 1 at z = 1).
 */
export function precisePolylogarithm(s: BigNumber, z: BigNumber): BigNumber | undefined {
  if (z.isZero()) return BIG_ZERO;
  if (z.abs().gt(0.97)) {
    if (z.gt(1) || !s.gt(z.eq(1) ? 1 : 0)) return undefined;
    const gamma = preciseGamma(s);
    const integral = integratePrecisely(
      // e^t − 1 of a small t has lost its digits, but t^(s−1)/t has not.
      (t) =>
        z.eq(1) && t.lt('1e-30') ? t.pow(s.minus(2)) : t.pow(s.minus(1)).div(t.exp().minus(z)),
      BIG_ZERO,
      big('Infinity'),
    );
    return gamma && integral?.times(z).div(gamma);
  }
  let power = BIG_ONE;
  return sumPrecisely((n) => {
    power = power.times(z);
    return power.div(big(n).pow(s));
  }, 1);
}

/** I_ν(x) by its power series (DLMF 10.25.2) for ν ≥ 0 or whole ν. */
export function preciseBesselI(order: BigNumber, x: BigNumber): BigNumber | undefined {
  const nu = order.isInteger() ? order.abs() : order;
  if (nu.isNegative() || !x.gt(0)) return undefined;
  const lnGamma = preciseLnGamma(nu.plus(1));
  if (!lnGamma) return undefined;
  const quarter = x.times(x).div(4);
  let term = nu.times(x.div(2).ln()).minus(lnGamma).exp();
  return sumPrecisely((n) => {
    if (n > 0) term = term.times(quarter).div(nu.plus(n).times(n));
    return term;
  }, 0);
}
