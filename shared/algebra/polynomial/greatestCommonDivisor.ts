/** The greatest common divisor of polynomials over the integers. */
import { commonDivisor, isNegative, shortened, type Coefficient } from './coefficient.ts';
import { commonMonomial, UNIT, type Monomial } from './monomial.ts';
import {
  add,
  coefficientsIn,
  constant,
  degree,
  divideByNumber,
  divideExact,
  fromTerm,
  isConstant,
  isZero,
  leadingCoefficient,
  multiply,
  negate,
  one,
  power,
  substituteInteger,
  subtract,
  termCount,
  variable,
  variablesOf,
  zero,
  type Polynomial,
} from './polynomial.ts';

/** The greatest number that divides all coefficients; 0 for the zero polynomial, never negative. */
export function content(p: Polynomial): Coefficient {
  let result: Coefficient = 0;
  for (const c of p.coefficients) {
    result = commonDivisor(result, c);
    if (result === 1) break;
  }
  return result;
}

/** The greatest monomial that divides all terms. */
export function monomialContent(p: Polynomial): Monomial {
  let result = p.monomials[0] ?? UNIT;
  for (const monomial of p.monomials) {
    if (result === UNIT) break;
    result = commonMonomial(result, monomial);
  }
  return result;
}

/** With the sign by which the highest term is positive. */
function withPositiveLead(p: Polynomial): Polynomial {
  return isNegative(leadingCoefficient(p)) ? negate(p) : p;
}

/** gcd(p, q) with a positive highest coefficient; gcd(0, 0) = 0. */
export function greatestCommonDivisor(p: Polynomial, q: Polynomial): Polynomial {
  if (isZero(p)) return withPositiveLead(q);
  if (isZero(q)) return withPositiveLead(p);
  const number = commonDivisor(content(p), content(q));
  const monomialP = monomialContent(p);
  const monomialQ = monomialContent(q);
  const outside = fromTerm(commonMonomial(monomialP, monomialQ), number);
  const a = stripped(p, monomialP);
  const b = stripped(q, monomialQ);
  return multiply(outside, primitiveGcd(a, b));
}

/** p without its content, in numbers and in monomials. */
function stripped(p: Polynomial, monomial: Monomial): Polynomial {
  const quotient = divideExact(p, fromTerm(monomial, 1)) ?? p;
  return divideByNumber(quotient, content(quotient));
}

/** gcd of polynomials without numerical and monomial content. */
function primitiveGcd(p: Polynomial, q: Polynomial): Polynomial {
  if (isConstant(p) || isConstant(q)) return one;
  const variablesP = variablesOf(p);
  const variablesQ = variablesOf(q);
  // A variable of one alone cannot be in the divisor: its coefficients must all be divisible.
  const onlyP = variablesP.find((v) => !variablesQ.includes(v));
  if (onlyP !== undefined) return gcdWithCoefficients(q, p, onlyP);
  const onlyQ = variablesQ.find((v) => !variablesP.includes(v));
  if (onlyQ !== undefined) return gcdWithCoefficients(p, q, onlyQ);
  const [long, short] = termCount(p) >= termCount(q) ? [p, q] : [q, p];
  if (divideExact(long, short)) return withPositiveLead(short);
  return heuristicGcd(p, q) ?? remainderSequenceGcd(p, q, variablesP[0] ?? 0);
}

function gcdWithCoefficients(p: Polynomial, q: Polynomial, v: number): Polynomial {
  let result = p;
  for (const c of coefficientsIn(q, v)) {
    if (isZero(c)) continue;
    result = greatestCommonDivisor(result, c);
    if (isConstant(result)) return one;
  }
  return result;
}

/** Evaluation points that have given no divisor before the heuristic is given up. */
const TRIALS = 5;
/** Integers of more bits than this cost more than the remainder sequence. */
const MOST_BITS = 6000;

/**
 * The heuristic gcd (B. W. Char, K. O. Geddes, G. H. Gonnet, J. Symb. Comp. 7 (1989) 31): the gcd
 * of the values at a large integer, read as digits of the gcd. What it finds is checked by division;
 * undefined where no point gave a divisor.
 */
function heuristicGcd(p: Polynomial, q: Polynomial): Polynomial | undefined {
  const [v] = variablesOf(p);
  if (v === undefined) {
    return constant(BigInt(commonDivisor(leadingCoefficient(p), leadingCoefficient(q))));
  }
  const size = (r: Polynomial): bigint =>
    r.coefficients.reduce((most: bigint, c) => {
      const magnitude = BigInt(c) < 0n ? -BigInt(c) : BigInt(c);
      return magnitude > most ? magnitude : most;
    }, 0n);
  const sizeP = size(p);
  const sizeQ = size(q);
  let point = 2n * (sizeP < sizeQ ? sizeP : sizeQ) + 29n;
  const highest = Math.max(degree(p, v), degree(q, v));
  for (let trial = 0; trial < TRIALS; trial++) {
    if (point.toString(2).length * highest > MOST_BITS) return undefined;
    const valueP = substituteInteger(p, v, point);
    const valueQ = substituteInteger(q, v, point);
    const inner = isZero(valueP) || isZero(valueQ) ? undefined : gcdOfValues(valueP, valueQ);
    if (inner) {
      const candidate = fromDigits(inner, point, v);
      const divisor = withPositiveLead(divideByNumber(candidate, content(candidate)));
      if (!isZero(divisor) && divideExact(p, divisor) && divideExact(q, divisor)) return divisor;
    }
    // The factor of the original paper: irrational on purpose, so that points share no structure.
    point = (point * 73_794n) / 27_011n;
  }
  return undefined;
}

function gcdOfValues(p: Polynomial, q: Polynomial): Polynomial | undefined {
  if (isConstant(p) || isConstant(q)) {
    const number = commonDivisor(content(p), content(q));
    return constant(BigInt(number));
  }
  return greatestCommonDivisor(p, q);
}

/** The polynomial whose value at the point is p, with digits between ±point/2. */
function fromDigits(p: Polynomial, point: bigint, v: number): Polynomial {
  const half = point / 2n;
  let rest = p;
  let result = zero;
  for (let i = 0; !isZero(rest); i++) {
    const digits = rest.coefficients.map((c) => {
      let digit = BigInt(c) % point;
      if (digit > half) digit -= point;
      if (digit < -half) digit += point;
      return shortened(digit);
    });
    const kept = digits.flatMap((digit, j) => (digit === 0 ? [] : [j]));
    const digit: Polynomial = {
      monomials: kept.map((j) => rest.monomials[j] ?? UNIT),
      coefficients: kept.map((j) => digits[j] ?? 0),
    };
    result = add(result, multiply(digit, power(variable(v), i)));
    rest = divideByNumber(subtract(rest, digit), shortened(point));
  }
  return result;
}

/**
 * The primitive remainder sequence in one variable (D. E. Knuth, The Art of Computer Programming 2,
 * algorithm 4.6.1 E): slower, but it always ends with the gcd.
 */
function remainderSequenceGcd(p: Polynomial, q: Polynomial, v: number): Polynomial {
  const contentP = contentIn(p, v);
  const contentQ = contentIn(q, v);
  let a = divideExact(p, contentP) ?? p;
  let b = divideExact(q, contentQ) ?? q;
  if (degree(a, v) < degree(b, v)) [a, b] = [b, a];
  while (!isZero(b) && degree(b, v) > 0) {
    const rest = pseudoRemainder(a, b, v);
    a = b;
    b = isZero(rest) ? rest : (divideExact(rest, contentIn(rest, v)) ?? rest);
  }
  const inner = isZero(b) ? a : one;
  return withPositiveLead(multiply(inner, greatestCommonDivisor(contentP, contentQ)));
}

/** The gcd of the coefficients of the powers of a variable. */
export function contentIn(p: Polynomial, v: number): Polynomial {
  let result = zero;
  for (const c of coefficientsIn(p, v)) {
    result = greatestCommonDivisor(result, c);
    if (isConstant(result) && !isZero(result) && leadingCoefficient(result) === 1) break;
  }
  return result;
}

/** The remainder of lc(q)^n p by q in one variable, n just large enough. */
function pseudoRemainder(p: Polynomial, q: Polynomial, v: number): Polynomial {
  const degreeQ = degree(q, v);
  const lead = coefficientsIn(q, v)[degreeQ] ?? zero;
  let rest = p;
  while (!isZero(rest) && degree(rest, v) >= degreeQ) {
    const degreeR = degree(rest, v);
    const leadR = coefficientsIn(rest, v)[degreeR] ?? zero;
    const shift = power(variable(v), degreeR - degreeQ);
    rest = subtract(multiply(rest, lead), multiply(multiply(leadR, shift), q));
  }
  return rest;
}
