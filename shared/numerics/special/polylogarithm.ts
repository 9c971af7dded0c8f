/** The polylogarithm Li_s(z) for real s and z ≤ 1. */
import { gamma } from './gamma.ts';
import { riemannZeta } from './zeta.ts';

/** Li_s(z); NaN for z > 1, where it is not real, and at z = 1 for s ≤ 1. */
export function polylogarithm(s: number, z: number): number {
  if (!(z <= 1)) return NaN;
  if (z === 0) return 0;
  if (z === 1) return s > 1 ? riemannZeta(s) : NaN;
  if (s === 1) return -Math.log1p(-z);
  if (s === 0) return z / (1 - z);
  if (z < -0.5) {
    // Duplication (DLMF 25.12.4 generalized): Li_s(z) + Li_s(−z) = 2^(1−s) Li_s(z²).
    if (z >= -1) return 2 ** (1 - s) * polylogarithm(s, z * z) - polylogarithm(s, -z);
    return fermiDirac(s, Math.log(-z));
  }
  if (z <= 0.5) return powerSeries(s, z);
  return nearOne(s, Math.log(z));
}

function powerSeries(s: number, z: number): number {
  let sum = 0;
  let power = 1;
  for (let n = 1; n < 400; n++) {
    power *= z;
    const term = power * n ** -s;
    sum += term;
    if (Math.abs(term) < 1e-17 * Math.abs(sum)) break;
  }
  return sum;
}

/** Σ ζ(s − n) u^n/n! + Γ(1 − s)(−u)^(s−1) for u = ln z, |u| < 2π (DLMF 25.12.12). */
function nearOne(s: number, u: number): number {
  const isWhole = Number.isInteger(s) && s > 0;
  let sum = 0;
  let term = 1;
  for (let n = 0; n < 80; n++) {
    if (n > 0) term *= u / n;
    if (isWhole && n === s - 1) {
      let harmonic = 0;
      for (let k = 1; k < s; k++) harmonic += 1 / k;
      sum += term * (harmonic - Math.log(-u));
    } else {
      const next = riemannZeta(s - n) * term;
      sum += next;
      if (n > s + 4 && next !== 0 && Math.abs(next) < 1e-18 * Math.abs(sum)) break;
    }
  }
  return isWhole ? sum : sum + gamma(1 - s) * (-u) ** (s - 1);
}

/** Li_s(−e^x) for x > 0 by the integral −1/Γ(s) ∫ t^(s−1)/(e^(t−x) + 1) dt, s > 0, tanh-sinh rule. */
function fermiDirac(s: number, x: number): number {
  if (!(s > 0)) {
    // Li_{s}(z) from Li_{s+1} by the central difference of its defining derivative would lose
    // digits; for negative orders the rational forms of s = 0, −1, … are exact.
    const z = -Math.exp(x);
    if (s === -1) return z / (1 - z) ** 2;
    return NaN;
  }
  let sum = 0;
  const h = 1 / 64;
  for (let k = -400; k <= 400; k++) {
    const u = k * h;
    // t = exp(u − exp(−u)) takes the half-line with double-exponential decay at 0.
    const t = Math.exp(u - Math.exp(-u));
    if (t === 0 || t > x + 750) continue;
    sum += (t ** (s - 1) / (Math.exp(t - x) + 1)) * t * (1 + Math.exp(-u)) * h;
  }
  return -sum / gamma(s);
}
