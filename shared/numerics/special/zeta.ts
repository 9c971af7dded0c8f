/** Riemann's zeta function for real arguments. */
import { gamma } from './gamma.ts';

/** ζ(s), s ≠ 1, by Euler and Maclaurin's formula (DLMF 25.2.9) and reflection (DLMF 25.4.1). */
export function riemannZeta(s: number): number {
  if (s === 1) return NaN;
  if (s === 0) return -0.5;
  if (s < 0) {
    if (Number.isInteger(s) && s % 2 === 0) return 0;
    return (
      2 ** s * Math.PI ** (s - 1) * Math.sin((Math.PI * s) / 2) * gamma(1 - s) * riemannZeta(1 - s)
    );
  }
  const from = 20;
  let sum = 0;
  for (let k = 1; k < from; k++) sum += k ** -s;
  sum += from ** (1 - s) / (s - 1) + from ** -s / 2;
  let term = s * from ** (-s - 1);
  const corrections = [1 / 12, -1 / 720, 1 / 30240, -1 / 1209600, 1 / 47900160];
  corrections.forEach((c, i) => {
    sum += c * term;
    term *= ((s + 2 * i + 1) * (s + 2 * i + 2)) / (from * from);
  });
  return sum;
}
