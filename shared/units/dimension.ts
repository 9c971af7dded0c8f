/**
 * Dimensions of quantities: exact rational exponents over the seven base quantities of the SI.
 * mol is a base quantity of its own; a number of molecules is a pure number.
 */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';

/** In the order of ISO 80000-1: length, mass, time, current, temperature, amount, luminous intensity. */
export const BASE_UNITS = ['m', 'kg', 's', 'A', 'K', 'mol', 'cd'] as const;

/** One exponent for each of `BASE_UNITS`. */
export type Dimension = readonly Rational[];

export const DIMENSIONLESS: Dimension = BASE_UNITS.map(() => Q.ZERO);

/** The dimension with whole exponents in the order of `BASE_UNITS`; missing ones are zero. */
export function dimension(...exponents: number[]): Dimension {
  return BASE_UNITS.map((_, i) => Q.rational(exponents[i] ?? 0));
}

export function multiplyDimensions(a: Dimension, b: Dimension): Dimension {
  return a.map((exponent, i) => Q.add(exponent, b[i] ?? Q.ZERO));
}

export function divideDimensions(a: Dimension, b: Dimension): Dimension {
  return a.map((exponent, i) => Q.subtract(exponent, b[i] ?? Q.ZERO));
}

export function powerDimension(a: Dimension, exponent: Rational): Dimension {
  return a.map((e) => Q.multiply(e, exponent));
}

export function equalDimensions(a: Dimension, b: Dimension): boolean {
  return a.every((exponent, i) => Q.equals(exponent, b[i] ?? Q.ZERO));
}

export function isDimensionless(a: Dimension): boolean {
  return a.every(Q.isZero);
}
