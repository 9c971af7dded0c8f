/** Riemann's zeta function for real arguments. */
import { gamma } from './gamma.ts';
import { zetaSum } from './zetaSum.ts';

/** ζ(s), s ≠ 1, for s < 0 by reflection (DLMF 25.4.1). */
export function riemannZeta(s: number): number {
  if (s === 1) return NaN;
  if (s === 0) return -0.5;
  if (s > 0) return zetaSum(s);
  if (Number.isInteger(s) && s % 2 === 0) return 0;
  return 2 ** s * Math.PI ** (s - 1) * Math.sin((Math.PI * s) / 2) * gamma(1 - s) * zetaSum(1 - s);
}
