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

/**
 * Results by operands: a text has few dimensions, and asks for their products again and again.
 * Emptied when there are more than any text has.
 */
type Memory = Map<Dimension, Map<Dimension, Dimension>>;
const products: Memory = new Map();
const quotients: Memory = new Map();
const powers = new Map<Dimension, Map<string, Dimension>>();
const MOST_REMEMBERED = 500;

function rowOf<K>(memory: Map<Dimension, Map<K, Dimension>>, of: Dimension): Map<K, Dimension> {
  let row = memory.get(of);
  if (!row || row.size > MOST_REMEMBERED) {
    if (memory.size > MOST_REMEMBERED) memory.clear();
    memory.set(of, (row = new Map<K, Dimension>()));
  }
  return row;
}

export function multiplyDimensions(a: Dimension, b: Dimension): Dimension {
  if (a === DIMENSIONLESS) return b;
  if (b === DIMENSIONLESS) return a;
  const row = rowOf(products, a);
  let result = row.get(b);
  if (!result) row.set(b, (result = a.map((e, i) => Q.add(e, b[i] ?? Q.ZERO))));
  return result;
}

export function divideDimensions(a: Dimension, b: Dimension): Dimension {
  if (b === DIMENSIONLESS) return a;
  const row = rowOf(quotients, a);
  let result = row.get(b);
  if (!result) row.set(b, (result = a.map((e, i) => Q.subtract(e, b[i] ?? Q.ZERO))));
  return result;
}

export function powerDimension(a: Dimension, exponent: Rational): Dimension {
  if (a === DIMENSIONLESS || Q.isOne(exponent)) return a;
  if (Q.isZero(exponent)) return DIMENSIONLESS;
  const row = rowOf(powers, a);
  const key = Q.toText(exponent);
  let result = row.get(key);
  if (!result) row.set(key, (result = a.map((e) => Q.multiply(e, exponent))));
  return result;
}

export function equalDimensions(a: Dimension, b: Dimension): boolean {
  return a === b || a.every((exponent, i) => Q.equals(exponent, b[i] ?? Q.ZERO));
}

export function isDimensionless(a: Dimension): boolean {
  return a === DIMENSIONLESS || a.every(Q.isZero);
}
