/** Special functions to all the digits of `bigNumber.ts`. */
import * as Q from '../algebra/rational.ts';
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

/** Li_s(z) by its series for |z| < 1. */
export function precisePolylogarithm(s: BigNumber, z: BigNumber): BigNumber | undefined {
  if (z.isZero()) return BIG_ZERO;
  if (z.abs().gt(0.97)) return undefined;
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

/**
 * ∫ f from a to b by the double-exponential rule (Takahasi and Mori 1974), halving the step until
 * thirty-odd digits stand; undefined where they do not.
 */
export function integratePrecisely(
  f: (x: BigNumber) => BigNumber | undefined,
  a: BigNumber,
  b: BigNumber,
): BigNumber | undefined {
  if (!a.isFinite() || a.gt(b)) return undefined;
  const isEndless = !b.isFinite();
  const half = isEndless ? BIG_ONE : b.minus(a).div(2);
  const quarterTurn = BIG_PI.div(2);
  const at = (t: BigNumber): BigNumber | undefined => {
    const u = quarterTurn.times(t.sinh());
    const speed = quarterTurn.times(t.cosh());
    if (isEndless) {
      const distance = u.exp();
      const value = f(a.plus(distance));
      return value?.times(distance).times(speed);
    }
    const cosh = u.cosh();
    const distance = half.times(u.abs().neg().exp()).div(cosh);
    const x = t.isNegative() ? a.plus(distance) : b.minus(distance);
    if (x.lte(a) || x.gte(b)) return BIG_ZERO;
    return f(x)?.times(half).times(speed).div(cosh.times(cosh));
  };
  let previous: BigNumber | undefined;
  const reach = 5;
  let sum = BIG_ZERO;
  for (let level = 0; level <= 6; level++) {
    const step = big(2 ** -level);
    const stride = level === 0 ? 1 : 2;
    const count = Math.floor(reach * 2 ** level);
    for (let k = level === 0 ? 0 : 1; k <= count; k += stride) {
      for (const sign of k === 0 ? [1] : [1, -1]) {
        const value = at(step.times(k * sign));
        if (!value) return undefined;
        if (value.isFinite()) sum = sum.plus(value);
      }
    }
    const value = sum.times(step);
    if (previous && value.minus(previous).abs().lte(value.abs().times(1e-36))) return value;
    previous = value;
  }
  return undefined;
}
