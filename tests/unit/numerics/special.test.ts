import { describe, expect, it } from 'vitest';
import {
  besselI,
  debyeFunction,
  digamma,
  erf,
  gamma,
  lnGamma,
  polygamma,
  polylogarithm,
  riemannZeta,
} from '../../../shared/numerics/special/index.ts';

/** Closed forms, and numbers from the tables of Abramowitz and Stegun (1964), from memory. */
const values: [string, number, number][] = [
  ['Γ(1/2) = √π', gamma(0.5), Math.sqrt(Math.PI)],
  ['Γ(5/2) = 3√π/4', gamma(2.5), (3 * Math.sqrt(Math.PI)) / 4],
  ['Γ(−1/2) = −2√π', gamma(-0.5), -2 * Math.sqrt(Math.PI)],
  ['Γ(21) = 20!', gamma(21), 2432902008176640000],
  ['ln Γ(101) = ln 100!', lnGamma(101), 363.73937555556349014],
  ['ln Γ(1.5)', lnGamma(1.5), Math.log(Math.sqrt(Math.PI) / 2)],
  ['ln Γ(1.1), A&S table 6.1', lnGamma(1.1), -0.049872441259839762],
  ['ln Γ(3/4) by reflection', lnGamma(0.75), Math.log(Math.PI * Math.SQRT2) - lnGamma(0.25)],
  ['Γ(171) = 170!', gamma(171) / 7.257415615307998e306, 1],
  ['Li_{−1}(−1) = −1/4', polylogarithm(-1, -1), -0.25],
  ['Li_{−2}(−1) = 0', polylogarithm(-2, -1), 0],
  [
    'Li_{1/2}(−1) = (√2 − 1) ζ(1/2)',
    polylogarithm(0.5, -1),
    (Math.SQRT2 - 1) * -1.4603545088095868,
  ],
  [
    'Li_{−1/2}(−1) = (2√2 − 1) ζ(−1/2)',
    polylogarithm(-0.5, -1),
    (2 * Math.SQRT2 - 1) * -0.20788622497735457,
  ],
  ['ψ(1) = −γ', digamma(1), -0.57721566490153286],
  ['ψ(1/2) = −γ − 2 ln 2', digamma(0.5), -0.57721566490153286 - 2 * Math.LN2],
  ['ψ′(1) = π²/6', polygamma(1, 1), Math.PI ** 2 / 6],
  ['ψ′(1/2) = π²/2', polygamma(1, 0.5), Math.PI ** 2 / 2],
  ['ψ″(1) = −2ζ(3)', polygamma(2, 1), -2 * 1.2020569031595942],
  ['erf(1), A&S table 7.1', erf(1), 0.84270079294971487],
  ['erf(3), A&S table 7.1', erf(3), 0.99997790950300141],
  ['ζ(3/2)', riemannZeta(1.5), 2.6123753486854883],
  ['ζ(5/2)', riemannZeta(2.5), 1.3414872572509171],
  ['ζ(−1) = −1/12', riemannZeta(-1), -1 / 12],
  ['Li₂(1/2) = π²/12 − ln²2/2', polylogarithm(2, 0.5), Math.PI ** 2 / 12 - Math.LN2 ** 2 / 2],
  ['Li₂(−1) = −π²/12', polylogarithm(2, -1), -(Math.PI ** 2) / 12],
  ['Li_{5/2}(1) = ζ(5/2)', polylogarithm(2.5, 1), 1.3414872572509171],
  ['Li₁(0.9) = −ln 0.1', polylogarithm(1, 0.9), -Math.log(0.1)],
  [
    'Li₂(−e³) by inversion',
    polylogarithm(2, -Math.exp(3)),
    -(Math.PI ** 2) / 6 - 4.5 - polylogarithm(2, -Math.exp(-3)),
  ],
  ['I₀(1), A&S table 9.8', besselI(0, 1), 1.26606587775200834],
  ['I₁(1), A&S table 9.8', besselI(1, 1), 0.56515910399248503],
  ['I_{1/2}(2) = sinh 2/√π', besselI(0.5, 2), Math.sinh(2) / Math.sqrt(Math.PI)],
  ['D₃ at small x: 1 − 3x/8 + x²/20', debyeFunction(3, 1e-3), 1 - 3e-3 / 8 + 1e-6 / 20],
  ['D₃ at large x: π⁴/(5x³)', debyeFunction(3, 100), Math.PI ** 4 / 5 / 1e6],
];

describe('special functions', () => {
  it.each(values)('%s', (_, value, expected) => {
    expect(Math.abs(value - expected)).toBeLessThanOrEqual(1e-14 * Math.max(1, Math.abs(expected)));
  });

  it('have no value at their poles', () => {
    expect(gamma(0)).toBeNaN();
    expect(gamma(-3)).toBeNaN();
    expect(digamma(0)).toBeNaN();
    expect(polylogarithm(2, 1.5)).toBeNaN();
  });
});
