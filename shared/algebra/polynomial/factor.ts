/** Factors of polynomials over the integers, as far as a derivation needs them. */
import { dividedExactly, isNegative, shortened, times, type Coefficient } from './coefficient.ts';
import {
  content,
  contentIn,
  greatestCommonDivisor,
  monomialContent,
} from './greatestCommonDivisor.ts';
import { divideMonomials, exponentsOf, UNIT, type Monomial } from './monomial.ts';
import {
  coefficientsIn,
  degree,
  derivative,
  divideByNumber,
  divideExact,
  fromTerm,
  isConstant,
  isZero,
  leadingCoefficient,
  leadingMonomial,
  multiply,
  multiplyByTerm,
  negate,
  add,
  scale,
  subtract,
  termCount,
  variable,
  variablesOf,
  zero,
  type Polynomial,
} from './polynomial.ts';

export interface Factorization {
  readonly content: bigint;
  /** Each base once; their product with the content is the polynomial. */
  readonly factors: readonly { readonly base: Polynomial; readonly exponent: number }[];
}

/** Larger polynomials are not searched for factors that nothing points to. */
const MOST_TERMS_SEARCHED = 200;

/**
 * Splits off the numerical content, powers of single variables, the known polynomials that divide,
 * repeated factors (D. Y. Y. Yun 1976), factors free of some variable, and the factors of what is
 * quadratic in some variable. Further factors may stay together; none is ever wrong.
 */
export function factorOver(p: Polynomial, known: readonly Polynomial[]): Factorization {
  if (isZero(p)) return { content: 0n, factors: [] };
  const factors: { base: Polynomial; exponent: number }[] = [];
  const number = content(p);
  const monomial = monomialContent(p);
  let rest = divideByNumber(divideExact(p, fromTerm(monomial, 1)) ?? p, number);
  for (const [index, exponent] of exponentsOf(monomial)) {
    factors.push({ base: variable(index), exponent });
  }
  for (const base of known) {
    if (termCount(rest) < 2) break;
    let exponent = 0;
    for (;;) {
      const quotient = divideExact(rest, base);
      if (!quotient) break;
      rest = quotient;
      exponent++;
    }
    if (exponent > 0) factors.push({ base, exponent });
  }
  let sign: Coefficient = 1;
  if (isConstant(rest)) {
    sign = leadingCoefficient(rest);
  } else if (termCount(rest) > MOST_TERMS_SEARCHED) {
    factors.push({ base: rest, exponent: 1 });
  } else {
    for (const { base, exponent } of squareFree(rest)) {
      for (const part of split(base)) factors.push({ base: part, exponent });
    }
    // Parts are found up to their signs; the product decides.
    const product = factors.reduce(
      (whole, { base, exponent }) => {
        let result = whole;
        for (let i = 0; i < exponent; i++) result = multiply(result, base);
        return result;
      },
      fromTerm(UNIT, number),
    );
    if (isNegative(leadingCoefficient(product)) !== isNegative(leadingCoefficient(p))) {
      const odd = factors.findLast(
        ({ base, exponent }) => exponent % 2 === 1 && termCount(base) > 1,
      );
      if (odd) odd.base = negate(odd.base);
      else sign = -1;
    }
  }
  return { content: BigInt(times(number, sign)), factors: merged(factors) };
}

/** Equal bases once, with the sum of their exponents. */
function merged(
  factors: readonly { base: Polynomial; exponent: number }[],
): { base: Polynomial; exponent: number }[] {
  const result: { base: Polynomial; exponent: number }[] = [];
  for (const { base, exponent } of factors) {
    const same = result.find(
      (other) => termCount(other.base) === termCount(base) && isZero(subtract(other.base, base)),
    );
    if (same) same.exponent += exponent;
    else result.push({ base, exponent });
  }
  return result;
}

/** p = Π base^exponent with bases that have no repeated factor, by gcds with the derivative. */
function squareFree(p: Polynomial): { base: Polynomial; exponent: number }[] {
  const main = variablesOf(p).reduce<number | undefined>(
    (best, v) => (best === undefined || degree(p, v) < degree(p, best) ? v : best),
    undefined,
  );
  if (main === undefined) return [];
  const outside = contentIn(p, main);
  const inner = divideExact(p, outside) ?? p;
  const result: { base: Polynomial; exponent: number }[] = isConstant(outside)
    ? []
    : squareFree(outside);
  // Linear in the variable and without content: nothing can be repeated.
  if (degree(inner, main) < 2) return [...result, { base: inner, exponent: 1 }];
  const slope = derivative(inner, main);
  let repeated = greatestCommonDivisor(inner, slope);
  let distinct = divideExact(inner, repeated) ?? inner;
  for (let exponent = 1; !isConstant(distinct); exponent++) {
    const common = greatestCommonDivisor(distinct, repeated);
    const base = divideExact(distinct, common) ?? distinct;
    if (!isConstant(base)) result.push({ base, exponent });
    distinct = common;
    repeated = divideExact(repeated, common) ?? repeated;
  }
  return result;
}

/** Factors of a polynomial without repeated ones: those free of a variable, and of quadratics. */
function split(p: Polynomial): Polynomial[] {
  const variables = variablesOf(p);
  for (const v of variables) {
    const free = contentIn(p, v);
    if (isConstant(free)) continue;
    const rest = divideExact(p, free);
    if (rest && !isConstant(rest)) return [...split(free), ...split(rest)];
  }
  for (const v of variables) {
    if (degree(p, v) !== 2) continue;
    const parts = splitQuadratic(p, v);
    if (parts) return parts.flatMap(split);
  }
  return [p];
}

/** a x² + b x + c in two linear factors, where b² − 4ac is a perfect square. */
function splitQuadratic(p: Polynomial, v: number): [Polynomial, Polynomial] | undefined {
  const [c = zero, b = zero, a = zero] = coefficientsIn(p, v);
  const root = squareRoot(subtract(multiply(b, b), scale(multiply(a, c), 4n)));
  if (!root) return undefined;
  // 4a p = (2a x + b − r)(2a x + b + r); one side, made primitive in x, is a factor of p.
  const linear = add(scale(multiply(a, variable(v)), 2n), subtract(b, root));
  const outside = contentIn(linear, v);
  const factor = divideExact(linear, outside);
  const rest = factor && divideExact(p, factor);
  return factor && rest ? [factor, rest] : undefined;
}

/** The polynomial whose square is p; undefined where there is none. */
export function squareRoot(p: Polynomial): Polynomial | undefined {
  if (isZero(p)) return zero;
  const lead = squareRootOfTerm(leadingMonomial(p), leadingCoefficient(p));
  if (!lead) return undefined;
  let root = fromTerm(lead.monomial, lead.coefficient);
  let rest = subtract(p, multiply(root, root));
  const double = times(lead.coefficient, 2);
  // Each step settles the highest term that is left, so there are no more steps than terms.
  for (let i = 0; !isZero(rest); i++) {
    const monomial = divideMonomials(leadingMonomial(rest), lead.monomial);
    const coefficient = dividedExactly(leadingCoefficient(rest), double);
    if (monomial === undefined || coefficient === undefined || i > termCount(p)) return undefined;
    const next = fromTerm(monomial, coefficient);
    // (r + t)² = r² + (2r + t) t.
    rest = subtract(rest, multiplyByTerm(add(scale(root, 2n), next), monomial, coefficient));
    root = add(root, next);
  }
  return root;
}

function squareRootOfTerm(
  monomial: Monomial,
  coefficient: Coefficient,
): { monomial: Monomial; coefficient: Coefficient } | undefined {
  if (isNegative(coefficient)) return undefined;
  const root = shortened(integerRoot(BigInt(coefficient)));
  if (times(root, root) !== coefficient) return undefined;
  let half = '';
  for (let i = 0; i < monomial.length; i++) {
    const exponent = monomial.charCodeAt(i);
    if (exponent % 2 === 1) return undefined;
    half += String.fromCharCode(exponent / 2);
  }
  return { monomial: half, coefficient: root };
}

/** ⌊√n⌋ by Newton's iteration. */
function integerRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let x = BigInt(Math.floor(Math.sqrt(Number(n)))) + 1n;
  for (;;) {
    const next = (x + n / x) / 2n;
    if (next >= x) return x;
    x = next;
  }
}
