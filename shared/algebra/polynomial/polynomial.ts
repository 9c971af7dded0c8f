/**
 * Sparse polynomials in numbered variables with integer coefficients: parallel lists of monomials,
 * highest first in lexicographic order, and their coefficients. 3x₀² − x₁ is
 *
 *     monomials ["\u0002", "\u0000\u0001"], coefficients [3, −1]
 *
 * What loops over terms spends from the work budget, so that (a + b + c + …)^200 ends in a fault.
 */
import { spend } from '../budget.ts';
import {
  dividedExactly,
  opposite,
  plus,
  shortened,
  times,
  type Coefficient,
} from './coefficient.ts';
import {
  divideMonomials,
  exponentIn,
  exponentsOf,
  monomialOf,
  multiplyMonomials,
  UNIT,
  withoutVariable,
  type Monomial,
} from './monomial.ts';

export interface Polynomial {
  readonly monomials: readonly Monomial[];
  readonly coefficients: readonly Coefficient[];
}

export interface Term {
  readonly coefficient: bigint;
  readonly exponents: readonly (readonly [variable: number, exponent: number])[];
}

export const zero: Polynomial = { monomials: [], coefficients: [] };
export const one: Polynomial = { monomials: [UNIT], coefficients: [1] };

export function constant(n: bigint): Polynomial {
  return n === 0n ? zero : { monomials: [UNIT], coefficients: [shortened(n)] };
}

export function variable(index: number): Polynomial {
  return { monomials: [monomialOf(index, 1)], coefficients: [1] };
}

export function fromTerm(monomial: Monomial, coefficient: Coefficient): Polynomial {
  return coefficient === 0 ? zero : { monomials: [monomial], coefficients: [coefficient] };
}

export function isZero(p: Polynomial): boolean {
  return p.monomials.length === 0;
}

export function isConstant(p: Polynomial): boolean {
  return p.monomials.length === 0 || (p.monomials.length === 1 && p.monomials[0] === UNIT);
}

export function termCount(p: Polynomial): number {
  return p.monomials.length;
}

export function leadingMonomial(p: Polynomial): Monomial {
  return p.monomials[0] ?? UNIT;
}

export function leadingCoefficient(p: Polynomial): Coefficient {
  return p.coefficients[0] ?? 0;
}

/** The terms, highest first. */
export function termsOf(p: Polynomial): Term[] {
  return p.monomials.map((monomial, i) => ({
    coefficient: BigInt(p.coefficients[i] ?? 0),
    exponents: exponentsOf(monomial),
  }));
}

/** The same text for equal polynomials and for no others. */
export function toKey(p: Polynomial): string {
  return `${p.coefficients.join(' ')}|${p.monomials.join('\uffff')}`;
}

export function equals(p: Polynomial, q: Polynomial): boolean {
  return (
    p.monomials.length === q.monomials.length &&
    p.monomials.every((m, i) => m === q.monomials[i]) &&
    p.coefficients.every((c, i) => c === q.coefficients[i])
  );
}

export function add(p: Polynomial, q: Polynomial): Polynomial {
  if (isZero(p)) return q;
  if (isZero(q)) return p;
  spend(p.monomials.length + q.monomials.length);
  const monomials: Monomial[] = [];
  const coefficients: Coefficient[] = [];
  let i = 0;
  let j = 0;
  while (i < p.monomials.length || j < q.monomials.length) {
    const left = p.monomials[i];
    const right = q.monomials[j];
    if (right === undefined || (left !== undefined && left > right)) {
      monomials.push(left ?? UNIT);
      coefficients.push(p.coefficients[i++] ?? 0);
    } else if (left === undefined || left < right) {
      monomials.push(right);
      coefficients.push(q.coefficients[j++] ?? 0);
    } else {
      const sum = plus(p.coefficients[i++] ?? 0, q.coefficients[j++] ?? 0);
      if (sum !== 0) {
        monomials.push(left);
        coefficients.push(sum);
      }
    }
  }
  return { monomials, coefficients };
}

export function negate(p: Polynomial): Polynomial {
  return { monomials: p.monomials, coefficients: p.coefficients.map(opposite) };
}

export function subtract(p: Polynomial, q: Polynomial): Polynomial {
  return add(p, negate(q));
}

export function scale(p: Polynomial, factor: bigint): Polynomial {
  return scaleBy(p, shortened(factor));
}

export function scaleBy(p: Polynomial, factor: Coefficient): Polynomial {
  if (factor === 0) return zero;
  if (factor === 1) return p;
  return { monomials: p.monomials, coefficients: p.coefficients.map((c) => times(c, factor)) };
}

/** p divided by a number that divides all its coefficients. Throws RangeError for another one. */
export function divideByNumber(p: Polynomial, divisor: Coefficient): Polynomial {
  if (divisor === 1) return p;
  const coefficients = p.coefficients.map((c) => {
    const quotient = dividedExactly(c, divisor);
    if (quotient === undefined) throw new RangeError('the number does not divide the polynomial');
    return quotient;
  });
  return { monomials: p.monomials, coefficients };
}

/** p times one term; the order of monomials is kept by multiplication. */
export function multiplyByTerm(p: Polynomial, monomial: Monomial, factor: Coefficient): Polynomial {
  if (factor === 0) return zero;
  spend(p.monomials.length);
  return {
    monomials:
      monomial === UNIT ? p.monomials : p.monomials.map((m) => multiplyMonomials(m, monomial)),
    coefficients: factor === 1 ? p.coefficients : p.coefficients.map((c) => times(c, factor)),
  };
}

export function multiply(p: Polynomial, q: Polynomial): Polynomial {
  if (p.monomials.length > q.monomials.length) return multiply(q, p);
  if (isZero(p)) return zero;
  const [only] = p.monomials;
  if (p.monomials.length === 1 && only !== undefined) {
    return multiplyByTerm(q, only, p.coefficients[0] ?? 0);
  }
  spend(p.monomials.length * q.monomials.length);
  const collected = new Map<Monomial, Coefficient>();
  p.monomials.forEach((left, i) => {
    const a = p.coefficients[i] ?? 0;
    for (let j = 0; j < q.monomials.length; j++) {
      const monomial = multiplyMonomials(left, q.monomials[j] ?? UNIT);
      const product = times(a, q.coefficients[j] ?? 0);
      const known = collected.get(monomial);
      collected.set(monomial, known === undefined ? product : plus(known, product));
    }
  });
  return fromMap(collected);
}

function fromMap(collected: ReadonlyMap<Monomial, Coefficient>): Polynomial {
  const monomials: Monomial[] = [];
  for (const [monomial, coefficient] of collected) if (coefficient !== 0) monomials.push(monomial);
  monomials.sort((a, b) => (a < b ? 1 : a > b ? -1 : 0));
  return { monomials, coefficients: monomials.map((monomial) => collected.get(monomial) ?? 0) };
}

/** p^n for a whole n ≥ 0. */
export function power(p: Polynomial, n: number): Polynomial {
  if (n === 0) return one;
  if (n === 1) return p;
  const [only] = p.monomials;
  if (p.monomials.length === 1 && only !== undefined) {
    const exponents = exponentsOf(only);
    const monomial = exponents.reduce(
      (product, [index, e]) => multiplyMonomials(product, monomialOf(index, e * n)),
      UNIT,
    );
    return fromTerm(monomial, shortened(BigInt(p.coefficients[0] ?? 0) ** BigInt(n)));
  }
  // Sparse polynomials are multiplied one by one faster than squared.
  let result = p;
  for (let i = 1; i < n; i++) result = multiply(result, p);
  return result;
}

/** p/q where q divides p over the integers, else undefined. Throws RangeError for q = 0. */
export function divideExact(p: Polynomial, q: Polynomial): Polynomial | undefined {
  if (isZero(q)) throw new RangeError('division by the zero polynomial');
  if (isZero(p)) return zero;
  if (!mayDivide(p, q)) return undefined;
  const lead = leadingMonomial(q);
  const leadCoefficient = leadingCoefficient(q);
  const monomials: Monomial[] = [];
  const coefficients: Coefficient[] = [];
  let rest = p;
  while (!isZero(rest)) {
    const monomial = divideMonomials(leadingMonomial(rest), lead);
    const coefficient = dividedExactly(leadingCoefficient(rest), leadCoefficient);
    if (monomial === undefined || coefficient === undefined) return undefined;
    monomials.push(monomial);
    coefficients.push(coefficient);
    rest = add(rest, multiplyByTerm(q, monomial, opposite(coefficient)));
  }
  return { monomials, coefficients };
}

/** Quick reasons why q cannot divide p: its highest and its lowest term must divide those of p. */
function mayDivide(p: Polynomial, q: Polynomial): boolean {
  const lastP = p.monomials.length - 1;
  const lastQ = q.monomials.length - 1;
  return (
    divideMonomials(leadingMonomial(p), leadingMonomial(q)) !== undefined &&
    divideMonomials(p.monomials[lastP] ?? UNIT, q.monomials[lastQ] ?? UNIT) !== undefined &&
    dividedExactly(leadingCoefficient(p), leadingCoefficient(q)) !== undefined &&
    dividedExactly(p.coefficients[lastP] ?? 0, q.coefficients[lastQ] ?? 0) !== undefined
  );
}

/** The variables that occur, in ascending order. */
export function variablesOf(p: Polynomial): number[] {
  const found = new Set<number>();
  for (const monomial of p.monomials) {
    for (let i = 0; i < monomial.length; i++) if (monomial.charCodeAt(i) > 0) found.add(i);
  }
  return [...found].sort((a, b) => a - b);
}

/** The highest power of a variable; 0 for the zero polynomial as well. */
export function degree(p: Polynomial, index: number): number {
  let highest = 0;
  for (const monomial of p.monomials) highest = Math.max(highest, exponentIn(monomial, index));
  return highest;
}

/** The coefficients of the powers of a variable, which are polynomials in the others; lowest first. */
export function coefficientsIn(p: Polynomial, index: number): Polynomial[] {
  const parts = Array.from({ length: degree(p, index) + 1 }, () => ({
    monomials: [] as Monomial[],
    coefficients: [] as Coefficient[],
  }));
  p.monomials.forEach((monomial, i) => {
    const part = parts[exponentIn(monomial, index)];
    // Taking out one and the same power keeps the order among the terms of a part.
    part?.monomials.push(withoutVariable(monomial, index));
    part?.coefficients.push(p.coefficients[i] ?? 0);
  });
  return parts;
}

export function derivative(p: Polynomial, index: number): Polynomial {
  const lower = monomialOf(index, 1);
  const monomials: Monomial[] = [];
  const coefficients: Coefficient[] = [];
  p.monomials.forEach((monomial, i) => {
    const quotient = divideMonomials(monomial, lower);
    if (quotient === undefined) return;
    monomials.push(quotient);
    coefficients.push(times(p.coefficients[i] ?? 0, exponentIn(monomial, index)));
  });
  return { monomials, coefficients };
}

/** p with an integer in place of a variable. */
export function substituteInteger(p: Polynomial, index: number, value: bigint): Polynomial {
  const collected = new Map<Monomial, Coefficient>();
  const powers: bigint[] = [1n];
  p.monomials.forEach((monomial, i) => {
    const exponent = exponentIn(monomial, index);
    while (powers.length <= exponent) powers.push((powers[powers.length - 1] ?? 1n) * value);
    const rest = withoutVariable(monomial, index);
    const term = times(p.coefficients[i] ?? 0, shortened(powers[exponent] ?? 1n));
    const known = collected.get(rest);
    collected.set(rest, known === undefined ? term : plus(known, term));
  });
  spend(p.monomials.length);
  return fromMap(collected);
}

/** Σ of those terms of p that the highest (lowest) term of q divides, each divided by it. */
export function divideTermwise(p: Polynomial, q: Polynomial, by: 'highest' | 'lowest'): Polynomial {
  const at = by === 'highest' ? 0 : q.monomials.length - 1;
  const divisor = q.monomials[at] ?? UNIT;
  const number = q.coefficients[at] ?? 1;
  const monomials: Monomial[] = [];
  const coefficients: Coefficient[] = [];
  p.monomials.forEach((m, i) => {
    const coefficient = dividedExactly(p.coefficients[i] ?? 0, number);
    const monomial = coefficient === undefined ? undefined : divideMonomials(m, divisor);
    if (monomial === undefined || coefficient === undefined) return;
    monomials.push(monomial);
    coefficients.push(coefficient);
  });
  return { monomials, coefficients };
}
