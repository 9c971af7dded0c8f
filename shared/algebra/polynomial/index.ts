/** Exact polynomials: arithmetic, common divisors, factors. Used as a namespace, `P.multiply(p, q)`. */
export {
  add,
  coefficientsIn,
  constant,
  degree,
  derivative,
  divideExact,
  divideTermwise,
  equals,
  isConstant,
  isZero,
  multiply,
  negate,
  one,
  power,
  scale,
  subtract,
  termCount,
  termsOf,
  toKey,
  variable,
  variablesOf,
  zero,
  type Polynomial,
  type Term,
} from './polynomial.ts';
export { content, contentIn, greatestCommonDivisor } from './greatestCommonDivisor.ts';
export { factorOver, squareRoot, type Factorization } from './factor.ts';
