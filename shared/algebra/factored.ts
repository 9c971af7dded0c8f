/**
 * Products of powers of numbered bases: coefficient · Π base^exponent with rational exponents.
 * What the numbers stand for is the business of the workspace that made them.
 */
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';

export interface Factored {
  readonly coefficient: Rational;
  /** By base, in ascending order of the bases; no exponent is zero. Empty where 0 is meant. */
  readonly exponents: ReadonlyMap<number, Rational>;
}

const NO_EXPONENTS: ReadonlyMap<number, Rational> = new Map();

export const FACTORED_ZERO: Factored = { coefficient: Q.ZERO, exponents: NO_EXPONENTS };
export const FACTORED_ONE: Factored = { coefficient: Q.ONE, exponents: NO_EXPONENTS };

export function factoredNumber(coefficient: Rational): Factored {
  return { coefficient, exponents: NO_EXPONENTS };
}

export function factoredBase(base: number, exponent: Rational = Q.ONE): Factored {
  return { coefficient: Q.ONE, exponents: new Map([[base, exponent]]) };
}

function sorted(exponents: Map<number, Rational>): ReadonlyMap<number, Rational> {
  const entries = [...exponents].filter(([, exponent]) => !Q.isZero(exponent));
  entries.sort(([a], [b]) => a - b);
  return new Map(entries);
}

export function multiplyFactored(a: Factored, b: Factored): Factored {
  if (Q.isZero(a.coefficient) || Q.isZero(b.coefficient)) return FACTORED_ZERO;
  const coefficient = Q.multiply(a.coefficient, b.coefficient);
  if (a.exponents.size === 0) return { coefficient, exponents: b.exponents };
  if (b.exponents.size === 0) return { coefficient, exponents: a.exponents };
  const exponents = new Map(a.exponents);
  for (const [base, exponent] of b.exponents) {
    exponents.set(base, Q.add(exponents.get(base) ?? Q.ZERO, exponent));
  }
  return { coefficient, exponents: sorted(exponents) };
}

/**
 * a^exponent where the coefficient allows it: any exponent for 1, whole ones for every other
 * number. Throws RangeError otherwise, and for 0 to a negative power.
 */
export function raiseFactored(a: Factored, exponent: Rational): Factored {
  if (Q.isOne(exponent)) return a;
  if (!Q.isInteger(exponent) && !Q.isOne(a.coefficient)) {
    throw new RangeError('a fractional power of a number is no rational number');
  }
  const coefficient = Q.isOne(a.coefficient)
    ? Q.ONE
    : Q.power(a.coefficient, Number(exponent.numerator));
  const exponents = new Map<number, Rational>();
  for (const [base, e] of a.exponents) exponents.set(base, Q.multiply(e, exponent));
  return { coefficient, exponents };
}

/** The exponents alone as a key: like terms of a sum share it. */
export function baseKey(a: Factored): string {
  let key = '';
  for (const [base, exponent] of a.exponents) key += `${base}^${Q.toText(exponent)} `;
  return key;
}

/** For every base the lowest exponent over all the terms (0 where a term lacks the base). */
export function commonExponents(terms: readonly Factored[]): ReadonlyMap<number, Rational> {
  const lowest = new Map<number, Rational>();
  const bases = new Set(terms.flatMap((term) => [...term.exponents.keys()]));
  for (const base of bases) {
    let low: Rational | undefined;
    for (const term of terms) {
      const exponent = term.exponents.get(base) ?? Q.ZERO;
      if (!low || Q.compare(exponent, low) < 0) low = exponent;
    }
    if (low && !Q.isZero(low)) lowest.set(base, low);
  }
  return sorted(lowest);
}

/** a divided by Π base^exponent. */
export function withoutExponents(a: Factored, taken: ReadonlyMap<number, Rational>): Factored {
  if (taken.size === 0) return a;
  const exponents = new Map(a.exponents);
  for (const [base, exponent] of taken) {
    exponents.set(base, Q.subtract(exponents.get(base) ?? Q.ZERO, exponent));
  }
  return { coefficient: a.coefficient, exponents: sorted(exponents) };
}
