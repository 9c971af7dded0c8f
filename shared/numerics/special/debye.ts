/** Debye functions. */
import { integrate } from '../quadrature.ts';

/** D_n(x) = n/x^n ∫₀^x tⁿ/(eᵗ − 1) dt (P. Debye 1912; Abramowitz and Stegun 27.1) for x ≥ 0. */
export function debyeFunction(n: number, x: number): number {
  if (x === 0) return 1;
  if (!(x > 0)) return NaN;
  const { value } = integrate((t) => t ** n / Math.expm1(t), 0, x);
  return (n * value) / x ** n;
}
