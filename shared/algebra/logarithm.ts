/** Logarithms taken apart and put together. */
import { addendsOf, ln, multiply, number, product, sum } from './construct.ts';
import type { Expression } from './expression.ts';
import * as Q from './rational.ts';
import { isPositive } from './sign.ts';

/**
 * ln x with products and powers taken apart, ln(x^a y/z) = a ln x + ln y − ln z, as far as that is
 * right for real numbers: factors not known to be positive stay together, since two negative ones
 * have a positive product. A single such factor stands alone: the logarithm exists only where it is
 * positive. A power whose exponent is no even number exists only for a positive base as well.
 */
export function expandLn(x: Expression): Expression {
  if (x.kind === 'power' && mayLeave(x)) {
    // N ln(V/Λ³) becomes N ln V − 3 N ln Λ: each term of ln Q stands for itself.
    return sum(addendsOf(expandLn(x.base)).map((addend) => multiply(x.exponent, addend)));
  }
  if (x.kind !== 'product') return ln(x);
  const apart = x.factors.filter(isPositive);
  const together = x.factors.filter((factor) => !isPositive(factor));
  const [single] = together;
  const isNegative = Q.sign(x.coefficient) < 0;
  const terms = apart.map(expandLn);
  if (together.length === 1 && single && !isNegative) {
    terms.push(expandLn(single));
  } else if (together.length > 0 || isNegative) {
    terms.push(ln(product([...(isNegative ? [number(Q.MINUS_ONE)] : []), ...together])));
  }
  const magnitude = isNegative ? Q.negate(x.coefficient) : x.coefficient;
  if (!Q.isOne(magnitude)) terms.push(expandLnOfNumber(magnitude));
  return sum(terms);
}

/** ln(3/2) stays one logarithm of a number; ln(1/2) is −ln 2. */
function expandLnOfNumber(r: Q.Rational): Expression {
  if (r.numerator === 1n) {
    return multiply(number(Q.MINUS_ONE), ln(number(Q.rational(r.denominator))));
  }
  return ln(number(r));
}

function mayLeave(x: Extract<Expression, { kind: 'power' }>): boolean {
  if (isPositive(x.base)) return true;
  const { exponent } = x;
  // (−2)^N has no meaning for the real N of thermodynamics, so the base is positive; (−2)^3 has.
  return (
    exponent.kind !== 'number' ||
    !Q.isInteger(exponent.value) ||
    exponent.value.numerator % 2n !== 0n
  );
}
