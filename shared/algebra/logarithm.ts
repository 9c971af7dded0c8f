/** Logarithms taken apart and put together. */
import {
  addendsOf,
  ln,
  multiply,
  number,
  power,
  product,
  splitCoefficient,
  sum,
} from './construct.ts';
import { readingCost } from './cost.ts';
import type { Expression } from './expression.ts';
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';
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
function expandLnOfNumber(r: Rational): Expression {
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

/**
 * A sum with its logarithms put together, N ln V − 3 N ln Λ to N ln(V/Λ³), where that reads shorter.
 * Each argument is positive on its own where the sum has a value, so the value stays the same.
 */
export function gatherLogarithms(e: Expression): Expression {
  if (e.kind !== 'sum') return e;
  const groups = new Map<Expression, { argument: Expression; coefficient: Rational }[]>();
  const others: Expression[] = [];
  for (const addend of addendsOf(e)) {
    const found = splitLogarithm(addend);
    if (!found) {
      others.push(addend);
      continue;
    }
    const group = groups.get(found.cofactor);
    if (group) group.push(found);
    else groups.set(found.cofactor, [found]);
  }
  if (groups.size === 0) return e;
  const gathered = [...groups].map(([cofactor, group]) => shortestGathering(cofactor, group));
  const result = sum([...others, ...gathered]);
  return readingCost(result) < readingCost(e) ? result : e;
}

/** cofactor · coefficient · ln(argument), for a term with exactly one logarithm. */
function splitLogarithm(
  term: Expression,
): { argument: Expression; coefficient: Rational; cofactor: Expression } | undefined {
  const { coefficient, rest } = splitCoefficient(term);
  const factors = rest.kind === 'product' ? rest.factors : [rest];
  const logarithms = factors.filter((factor) => factor.kind === 'call' && factor.name === 'ln');
  const [logarithm] = logarithms;
  if (logarithms.length !== 1 || logarithm?.kind !== 'call') return undefined;
  const [argument] = logarithm.arguments;
  if (!argument) return undefined;
  const cofactor = product(factors.filter((factor) => factor !== logarithm));
  return { argument, coefficient, cofactor };
}

function shortestGathering(
  cofactor: Expression,
  group: readonly { argument: Expression; coefficient: Rational }[],
): Expression {
  const magnitudes = group.map(({ coefficient }) =>
    Q.sign(coefficient) < 0 ? Q.negate(coefficient) : coefficient,
  );
  const common = magnitudes.reduce((a, b) => Q.contentGcd(a, b));
  // Each different number once: with seven logarithms there are seven magnitudes, mostly equal.
  const outside = new Map([common, ...magnitudes].map((r) => [Q.toText(r), r])).values();
  let best = sum(
    group.map(({ argument, coefficient }) =>
      product([number(coefficient), cofactor, ln(argument)]),
    ),
  );
  for (const magnitude of outside) {
    for (const scale of [magnitude, Q.negate(magnitude)]) {
      const argument = product(
        group.map((member) => power(member.argument, number(Q.divide(member.coefficient, scale)))),
      );
      const candidate = product([number(scale), cofactor, ln(argument)]);
      if (readingCost(candidate) < readingCost(best)) best = candidate;
    }
  }
  return best;
}
