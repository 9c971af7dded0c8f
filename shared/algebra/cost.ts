/**
 * How long an expression reads: an additive estimate of its characters on paper, without building
 * a string. The simplifier compares thousands of candidates by it.
 */
import { splitPower } from './construct.ts';
import type { Expression } from './expression.ts';
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';

/** ` + ` between terms. */
const OPERATOR = 3;
/** The space between two factors; small, but a tie goes to fewer factors. */
const JUXTAPOSED = 1;
const PARENTHESES = 2;
const FRACTION = 1;
const NESTED_FRACTION = 12;
/** + ln(V/(N Λ³)) is preferred to − ln(N Λ³/V), though it may be written with more parentheses. */
const MINUS_LOGARITHM_OF_FRACTION = 5;

const known = new WeakMap<Expression, number>();

/** The estimated length in characters; always positive, the same on every machine. */
export function readingCost(e: Expression): number {
  const remembered = known.get(e);
  if (remembered !== undefined) return remembered;
  const cost = estimate(e);
  known.set(e, cost);
  return cost;
}

function numberCost(r: Rational): number {
  const digits = (n: bigint): number => {
    const size = n < 0n ? -n : n;
    return size < 10n ? 1 : size < 100n ? 2 : size.toString().length;
  };
  const whole = digits(r.numerator) + (r.numerator < 0n ? 1 : 0);
  return r.denominator === 1n ? whole : whole + FRACTION + digits(r.denominator);
}

function nameCost(name: string): number {
  const [head = '', subscript] = name.split('_');
  // A Greek letter is spelt with many characters but read as one.
  return (
    Math.min(head.length, 2) + (subscript === undefined ? 0 : Math.min(subscript.length, 2) / 2)
  );
}

function estimate(e: Expression): number {
  switch (e.kind) {
    case 'number':
      return numberCost(e.value);
    case 'infinity':
      return 1;
    case 'symbol':
    case 'abbreviation':
      return nameCost(e.name);
    case 'sum': {
      let cost = Q.isZero(e.constant) ? -OPERATOR : numberCost(e.constant);
      for (const term of e.terms) cost += OPERATOR + termCost(term);
      // A sum without a positive term starts with a minus sign.
      const startsWithMinus = Q.sign(e.constant) <= 0 && e.terms.every(isNegated);
      return startsWithMinus ? cost + 1 : cost;
    }
    case 'product':
    case 'power':
      return quotientCost(e);
    case 'call':
      return (
        (e.name === 'exp' || e.name === 'ln' ? 2 : e.name.length) +
        PARENTHESES +
        e.arguments.reduce((cost, argument) => cost + readingCost(argument), 0)
      );
    case 'summation':
    case 'productOver':
    case 'integral':
      return 6 + readingCost(e.from) + readingCost(e.to) + readingCost(e.body);
    case 'piecewise':
      return e.branches.reduce(
        (cost, { condition, value }) =>
          cost +
          4 +
          readingCost(condition.left) +
          readingCost(condition.right) +
          readingCost(value),
        4 + readingCost(e.otherwise),
      );
    case 'element':
      return e.list.length + PARENTHESES + readingCost(e.index);
  }
}

/** A term of a sum: its minus sign is the operator that the sum has counted already. */
function termCost(term: Expression): number {
  const cost = readingCost(term);
  return isNegated(term) ? cost - 1 : cost;
}

function isNegated(term: Expression): boolean {
  return term.kind === 'product' && Q.sign(term.coefficient) < 0;
}

function quotientCost(e: Extract<Expression, { kind: 'product' | 'power' }>): number {
  const coefficient = e.kind === 'product' ? e.coefficient : Q.ONE;
  const factors = e.kind === 'product' ? e.factors : [e];
  let above = 0;
  let countAbove = 0;
  let below = 0;
  let countBelow = 0;
  // Square roots of several factors are written under one sign.
  let roots = 0;
  for (const factor of factors) {
    const { base, exponent } = splitPower(factor);
    const isBelow =
      (exponent.kind === 'number' && Q.sign(exponent.value) < 0) ||
      (exponent.kind === 'product' && Q.sign(exponent.coefficient) < 0);
    const magnitude =
      exponent.kind !== 'number' ? readingCost(exponent) + 1 : exponentCost(exponent.value);
    if (exponent.kind === 'number' && !Q.isInteger(exponent.value)) roots = 3;
    const isWrapped = base.kind === 'sum' || base.kind === 'product' || base.kind === 'power';
    const cost = readingCost(base) + magnitude + (isWrapped ? PARENTHESES : 0);
    if (isBelow) {
      // A fraction within a denominator is hard to read, whatever it saves.
      below += cost + JUXTAPOSED + (base.kind === 'sum' && hasFraction(base) ? NESTED_FRACTION : 0);
      countBelow++;
    } else {
      above += cost + JUXTAPOSED;
      countAbove++;
    }
  }
  const isUnit = coefficient.numerator === 1n || coefficient.numerator === -1n;
  if (!isUnit || countAbove === 0)
    above += numberCost(Q.rational(coefficient.numerator)) + JUXTAPOSED;
  else if (coefficient.numerator < 0n) above += 1;
  if (coefficient.denominator !== 1n) {
    below += numberCost(Q.rational(coefficient.denominator)) + JUXTAPOSED;
    countBelow++;
  }
  let cost = above - JUXTAPOSED + roots;
  if (Q.sign(coefficient) < 0 && factors.some(isLogarithmOfFraction)) {
    cost += MINUS_LOGARITHM_OF_FRACTION;
  }
  if (countBelow > 0) cost += FRACTION + below - JUXTAPOSED + (countBelow > 1 ? PARENTHESES : 0);
  return cost;
}

function hasFraction(e: Extract<Expression, { kind: 'sum' }>): boolean {
  return e.terms.some(isFraction);
}

function isFraction(e: Expression): boolean {
  const factors = e.kind === 'product' ? e.factors : [e];
  return factors.some((factor) => {
    const { exponent } = splitPower(factor);
    return exponent.kind === 'number' && Q.sign(exponent.value) < 0;
  });
}

function isLogarithmOfFraction(e: Expression): boolean {
  return e.kind === 'call' && e.name === 'ln' && e.arguments.some(isFraction);
}

function exponentCost(exponent: Rational): number {
  const magnitude = Q.sign(exponent) < 0 ? Q.negate(exponent) : exponent;
  if (Q.isOne(magnitude)) return 0;
  // A lone square root is its sign; other fractional powers show their number.
  if (Q.equals(magnitude, Q.HALF)) return 0;
  return 1 + numberCost(magnitude) + (Q.isInteger(magnitude) ? 0 : PARENTHESES);
}
