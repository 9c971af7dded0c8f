/** Special functions of real arguments in doubles. */
export { digamma, gamma, lnGamma, polygamma } from './gamma.ts';
export { erf } from './errorFunction.ts';
export { riemannZeta } from './zeta.ts';
export { polylogarithm } from './polylogarithm.ts';
export { besselI } from './bessel.ts';
export { debyeFunction } from './debye.ts';
