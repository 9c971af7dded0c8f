/** The modified Bessel function of the first kind for real order and argument. */
import { gamma } from './gamma.ts';

/**
 * I_ν(x): the power series (DLMF 10.25.2), or Hankel's expansion (DLMF 10.40.1) where x is large.
 * Negative x only for whole ν.
 */
export function besselI(order: number, x: number): number {
  if (x < 0) {
    if (!Number.isInteger(order)) return NaN;
    return (order % 2 === 0 ? 1 : -1) * besselI(order, -x);
  }
  const nu = Number.isInteger(order) ? Math.abs(order) : order;
  if (x === 0) return nu === 0 ? 1 : nu > 0 ? 0 : NaN;
  if (x > Math.max(40, nu * nu)) {
    let term = 1;
    let sum = 1;
    for (let n = 1; n < 60; n++) {
      const next = (-term * (4 * nu * nu - (2 * n - 1) ** 2)) / (n * 8 * x);
      if (Math.abs(next) > Math.abs(term)) break;
      term = next;
      sum += term;
      if (Math.abs(term) < 1e-17 * Math.abs(sum)) break;
    }
    return (Math.exp(x / 2) / Math.sqrt(2 * Math.PI * x)) * sum * Math.exp(x / 2);
  }
  const quarter = (x * x) / 4;
  let term = (x / 2) ** nu / gamma(nu + 1);
  let sum = term;
  for (let n = 1; n < 500; n++) {
    term *= quarter / (n * (n + nu));
    sum += term;
    if (Math.abs(term) < 1e-17 * Math.abs(sum)) break;
  }
  return sum;
}
