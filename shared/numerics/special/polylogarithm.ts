/** The polylogarithm Li_s(z) for real s and z ≤ 1. */
import { gamma } from './gamma.ts';
import { riemannZeta } from './zeta.ts';

/** Li_s(z); NaN for z > 1, where it is not real, and at z = 1 for s ≤ 1. */
export function polylogarithm(s: number, z: number): number {
  if (!(z <= 1)) return NaN;
  if (z === 0) return 0;
  if (z === 1) return s > 1 ? riemannZeta(s) : NaN;
  if (s === 1) return -Math.log1p(-z);
  if (Number.isInteger(s) && s <= 0) return rationalForm(-s, z);
  if (z < -1) return fermiDirac(s, Math.log(-z));
  if (z < -0.5) return alternating(s, -z);
  if (z <= 0.5) return powerSeries(s, z);
  return nearOne(s, Math.log(z));
}

/** Li_{−n}(z) = Σ k! S(n + 1, k + 1) (z/(1 − z))^(k + 1), S being Stirling's numbers. */
function rationalForm(n: number, z: number): number {
  // Li_{−n}(z) = −(−1)^n Li_{−n}(1/z) keeps the digits for large −z.
  if (n > 0 && z < -1) return (n % 2 ? 1 : -1) * rationalForm(n, 1 / z);
  let stirling = [1];
  for (let m = 1; m <= n; m++) {
    const next = [1];
    for (let k = 1; k <= m; k++) {
      next.push((k + 1) * (stirling[k] ?? 0) + (stirling[k - 1] ?? 0));
    }
    stirling = next;
  }
  const w = z / (1 - z);
  let sum = 0;
  let factor = w;
  for (let k = 0; k <= n; k++) {
    if (k > 0) factor *= k * w;
    sum += (stirling[k] ?? 0) * factor;
  }
  return sum;
}

/**
 * Li_s(−x) for 0 < x ≤ 1 as an alternating series, accelerated by algorithm 1 of H. Cohen,
 * F. Rodriguez Villegas and D. Zagier, Exp. Math. 9 (2000) 3.
 */
function alternating(s: number, x: number): number {
  const count = 24;
  const root = (3 + Math.sqrt(8)) ** count;
  const d = (root + 1 / root) / 2;
  let b = -1;
  let c = -d;
  let sum = 0;
  let power = x;
  for (let k = 0; k < count; k++) {
    c = b - c;
    sum += c * power * (k + 1) ** -s;
    b *= ((k + count) * (k - count)) / ((k + 0.5) * (k + 1));
    power *= x;
  }
  return -sum / d;
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

/**
 * Li_s(−e^x) for x > 0 and s > 0 by the integral −1/Γ(s) ∫ t^(s−1)/(e^(t−x) + 1) dt (DLMF 25.12.15),
 * for −1 < s < 0 by its derivative under the integral sign; NaN for other s. The trapezoidal rule
 * in u with t = exp(u − e^(−u)), which falls off double-exponentially at t = 0.
 */
function fermiDirac(s: number, x: number): number {
  if (s < 0) {
    if (s <= -1) return NaN;
    return -trapezoid((t) => t ** s / (4 * Math.cosh((t - x) / 2) ** 2), x) / gamma(s + 1);
  }
  return -trapezoid((t) => t ** (s - 1) / (Math.exp(t - x) + 1), x) / gamma(s);
}

function trapezoid(f: (t: number) => number, x: number): number {
  const h = 1 / 64;
  let sum = 0;
  for (let k = -400; k <= 400 + 64 * Math.log1p(x); k++) {
    const u = k * h;
    const t = Math.exp(u - Math.exp(-u));
    if (t === 0 || t > x + 750) continue;
    sum += f(t) * t * (1 + Math.exp(-u));
  }
  return sum * h;
}
