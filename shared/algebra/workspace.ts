/**
 * The factored normal form, in which equal things are found equal.
 *
 * Within a workspace every expression becomes
 *
 *     coefficient · Π base^exponent          (rational exponents; a zero coefficient for 0)
 *
 * where a base is either a kernel (a symbol, an abbreviation, exp of a monomial, ln of something,
 * any other function) or a primitive polynomial in kernels with more than one term. Sums are brought
 * over a common denominator and factored by content, by bases met before, and by what the
 * polynomials' own factorization finds. N k T/(V − N b) − a N²/V² becomes
 *
 *     N · (k T V² − a N V + a b N²) · V^(−2) · (V − N b)^(−1)
 *
 * Zero is recognized whatever the form, as long as the kernels are algebraically independent; that
 * is what the mode `equality` sees to, by writing hyperbolic functions as exponentials and taking
 * logarithms apart. In the mode `display` functions stay as the author wrote them.
 *
 * A workspace lives as long as one derivation: the bases that it has met decide how later results
 * are factored, and so its answers must not depend on what another model left behind.
 */
import { asExponentials } from './exponentials.ts';
import { Bases, MOST_EXPANDED_TERMS, type BasesOptions, type Kernel } from './bases.ts';
import { BudgetExceeded, spend } from './budget.ts';
import {
  addendsOf,
  call,
  divide,
  exp,
  integer,
  ln,
  number,
  one,
  power,
  scale,
  splitCoefficient,
  splitPower,
  sum,
  zero,
} from './construct.ts';
import { readingCost } from './cost.ts';
import { expand } from './expand.ts';
import type { Expression } from './expression.ts';
import {
  baseKey,
  commonExponents,
  FACTORED_ONE,
  FACTORED_ZERO,
  factoredBase,
  factoredNumber,
  multiplyFactored,
  raiseFactored,
  withoutExponents,
  type Factored,
} from './factored.ts';
import { expandLn } from './logarithm.ts';
import * as P from './polynomial/index.ts';
import type { Polynomial } from './polynomial/index.ts';
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';
import { isPositive } from './sign.ts';
import { rebuild } from './traverse.ts';
import { writePlainly, writeShortest } from './writing.ts';

export class Workspace {
  private readonly mode: BasesOptions['mode'];
  private readonly bases: Bases;
  private readonly memory = new Map<Expression, Factored>();

  constructor(options: BasesOptions) {
    this.mode = options.mode;
    this.bases = new Bases(options);
  }

  /**
   * Tells the workspace of an expression before it is worked on: its fractional powers decide by
   * which roots the kernels are counted.
   */
  prepare(e: Expression): void {
    this.bases.prepare(e);
  }

  /** The factored normal form. Throws RangeError for a division by what is zero. */
  factored(e: Expression): Factored {
    const known = this.memory.get(e);
    if (known) return known;
    spend(1);
    const result = this.work(e);
    this.memory.set(e, result);
    return result;
  }

  private work(e: Expression): Factored {
    switch (e.kind) {
      case 'number':
        return factoredNumber(e.value);
      case 'symbol':
      case 'infinity':
      case 'abbreviation':
        return factoredBase(this.bases.kernel(e));
      case 'product': {
        let result = factoredNumber(e.coefficient);
        for (const factor of e.factors) result = multiplyFactored(result, this.factored(factor));
        return this.cancel(result);
      }
      case 'sum':
        return this.add(addendsOf(e).map((addend) => this.factored(addend)));
      case 'power':
        return this.raise(e.base, e.exponent);
      case 'call':
        return this.function(e);
      case 'summation':
      case 'productOver':
      case 'integral':
      case 'piecewise':
      case 'element':
        return factoredBase(this.bases.kernel(rebuild(e, (part) => this.written(part))));
    }
  }

  /** The expression or its normal form, whichever reads shorter; in `equality` the normal form. */
  private written(e: Expression): Expression {
    const normal = this.write(this.factored(e));
    if (this.mode === 'equality') return normal;
    return readingCost(normal) < readingCost(e) ? normal : e;
  }

  private function(e: Extract<Expression, { kind: 'call' }>): Factored {
    const [x] = e.arguments;
    if (!x) return FACTORED_ZERO;
    if (e.name === 'exp') return this.exponential(x);
    if (e.name === 'ln') return this.logarithm(x);
    if (this.mode === 'equality') {
      const replaced = asExponentials(e.name, x);
      if (replaced) return this.factored(replaced);
    }
    // By sinh and cosh 1 − tanh² x is found to be 1/cosh² x; `otherWritings` puts tanh back.
    if (e.name === 'tanh' || e.name === 'coth') {
      const quotient = divide(call('sinh', [x]), call('cosh', [x]));
      return this.factored(e.name === 'tanh' ? quotient : power(quotient, number(Q.MINUS_ONE)));
    }
    const rebuilt = call(
      e.name,
      e.arguments.map((argument) => this.written(argument)),
    );
    // A constructor may take out a sign or find a value; then it is no kernel any more.
    return rebuilt.kind === 'call'
      ? factoredBase(this.bases.kernel(rebuilt))
      : this.factored(rebuilt);
  }

  /** exp of a sum is a product of exp of monomials: exp(2x − y) = exp(x)² exp(y)^(−1). */
  private exponential(x: Expression): Factored {
    const written = this.mode === 'equality' ? expand(this.written(x)) : this.written(x);
    let result = FACTORED_ONE;
    for (const term of addendsOf(written)) {
      const { coefficient, rest } = splitCoefficient(term);
      const base = rest === one ? exp(one) : exp(rest);
      if (base.kind === 'call' && base.name === 'exp') {
        result = multiplyFactored(result, factoredBase(this.bases.kernel(base), coefficient));
      } else {
        // exp(ln …) has dissolved.
        result = multiplyFactored(result, this.factored(power(base, number(coefficient))));
      }
    }
    return result;
  }

  private logarithm(x: Expression): Factored {
    const written = this.written(x);
    const apart = expandLn(written);
    if (apart.kind === 'call') {
      const [argument] = apart.arguments;
      if (this.mode === 'equality' && argument?.kind === 'number') {
        return this.logarithmOfNumber(argument.value);
      }
      return factoredBase(this.bases.kernel(apart));
    }
    return this.factored(apart);
  }

  /** ln 12 = 2 ln 2 + ln 3, so that logarithms of numbers are independent. */
  private logarithmOfNumber(r: Rational): Factored {
    const terms: Factored[] = [];
    const collect = (n: bigint, sign: bigint): void => {
      let rest = n;
      for (let prime = 2n; prime * prime <= rest && prime < 1000n; prime++) {
        let multiplicity = 0n;
        while (rest % prime === 0n) {
          rest /= prime;
          multiplicity++;
        }
        if (multiplicity > 0n) place(prime, sign * multiplicity);
      }
      if (rest > 1n) place(rest, sign);
    };
    const place = (n: bigint, coefficient: bigint): void => {
      const base = factoredBase(this.bases.kernel(ln(integer(n))));
      terms.push(multiplyFactored(factoredNumber(Q.rational(coefficient)), base));
    };
    collect(r.numerator, 1n);
    collect(r.denominator, -1n);
    return this.add(terms);
  }

  private raise(base: Expression, exponent: Expression): Factored {
    if (exponent.kind === 'number') {
      const inner = this.factored(base);
      if (Q.isInteger(exponent.value)) return raiseFactored(inner, exponent.value);
      return this.raiseToFraction(base, inner, exponent.value);
    }
    const written = this.written(base);
    let result = FACTORED_ONE;
    for (const term of addendsOf(this.written(exponent))) {
      const { coefficient, rest } = splitCoefficient(term);
      if (rest === one) {
        result = multiplyFactored(result, this.raise(written, number(coefficient)));
        continue;
      }
      const whole = power(written, rest);
      // Only a power that the constructor could not take apart is a kernel.
      const part =
        whole.kind === 'power' && whole.base === written && whole.exponent === rest
          ? factoredBase(this.bases.kernel(whole), coefficient)
          : this.factored(power(whole, number(coefficient)));
      result = multiplyFactored(result, part);
    }
    return result;
  }

  private raiseToFraction(base: Expression, inner: Factored, exponent: Rational): Factored {
    const bases = [...inner.exponents];
    const unknown = bases.filter(([index]) => !isPositive(this.bases.baseAt(index).expression));
    const [single] = unknown;
    const mayDistribute =
      Q.sign(inner.coefficient) > 0 &&
      (unknown.length === 0 || (unknown.length === 1 && single && Q.isOne(single[1])));
    if (!mayDistribute) {
      if (Q.isZero(inner.coefficient)) return factoredBase(this.bases.kernel(base), exponent);
      // 1/√(x/y) is √(y/x): no fraction below a fraction.
      const isQuotient = [...inner.exponents.values()].some((e) => Q.sign(e) < 0);
      return Q.sign(exponent) < 0 && isQuotient
        ? factoredBase(
            this.bases.kernel(this.write(raiseFactored(inner, Q.MINUS_ONE))),
            Q.negate(exponent),
          )
        : factoredBase(this.bases.kernel(this.write(inner)), exponent);
    }
    const radical = power(number(inner.coefficient), number(exponent));
    const { coefficient, rest } = splitCoefficient(radical);
    const numberPart =
      rest === one
        ? factoredNumber(coefficient)
        : multiplyFactored(
            factoredNumber(coefficient),
            factoredBase(this.bases.kernel(splitPower(rest).base), exponentOf(rest)),
          );
    return multiplyFactored(
      numberPart,
      raiseFactored({ coefficient: Q.ONE, exponents: inner.exponents }, exponent),
    );
  }

  /** The sum of factored terms, over their common denominator and factored again. */
  add(terms: readonly Factored[]): Factored {
    const collected = collectLikeTerms(terms);
    const [first] = collected;
    if (!first) return FACTORED_ZERO;
    if (collected.length === 1) return first;
    const common = commonExponents(collected);
    const remainders = collected.map((term) => withoutExponents(term, common));
    const outside: Factored = { coefficient: Q.ONE, exponents: common };
    return multiplyFactored(outside, this.addRemainders(remainders));
  }

  /** What a term is besides its logarithms: terms with one cofactor may have one logarithm. */
  cofactorOf(term: Factored): { readonly key: string; readonly hasLogarithm: boolean } {
    const logarithms = [...term.exponents.keys()].filter((index) => {
      const { expression } = this.bases.baseAt(index);
      return expression.kind === 'call' && expression.name === 'ln';
    });
    const taken = new Map(logarithms.map((index) => [index, term.exponents.get(index) ?? Q.ZERO]));
    return {
      key: baseKey(withoutExponents(term, taken)),
      hasLogarithm: logarithms.length > 0,
    };
  }

  /** How many terms the common numerator has before anything cancels. */
  sizeOfSum(terms: readonly Factored[]): number {
    const common = commonExponents(terms);
    return terms.reduce(
      (size, term) => size + this.bases.expandedSize(withoutExponents(term, common)),
      0,
    );
  }

  /** The sum of terms without negative exponents and without a base common to all of them. */
  private addRemainders(terms: readonly Factored[]): Factored {
    let content = Q.ZERO;
    for (const term of terms) content = Q.contentGcd(content, term.coefficient);
    const expandedSize = terms.reduce((size, term) => size + this.bases.expandedSize(term), 0);
    if (expandedSize > MOST_EXPANDED_TERMS) {
      if (this.mode === 'equality') throw new BudgetExceeded('a common denominator');
      const written = sum(terms.map((term) => this.write(term)));
      return written.kind === 'sum'
        ? factoredBase(this.bases.kernel(written))
        : this.factored(written);
    }
    let polynomial = P.zero;
    for (const term of terms) {
      const scaled = Q.divide(term.coefficient, content);
      polynomial = P.add(polynomial, P.scale(this.bases.expanded(term), scaled.numerator));
    }
    polynomial = this.reduceHyperbolic(this.reduceRoots(polynomial));
    if (P.isZero(polynomial)) return FACTORED_ZERO;
    const hint = sum(
      terms.map((term) =>
        this.write({ coefficient: Q.divide(term.coefficient, content), exponents: term.exponents }),
      ),
    );
    return multiplyFactored(factoredNumber(content), this.factorPolynomial(polynomial, hint));
  }

  private factorPolynomial(polynomial: Polynomial, hint: Expression): Factored {
    const { content, factors } = P.factorOver(polynomial, this.bases.polynomials());
    let result = factoredNumber(Q.rational(content));
    const isWhole = factors.length === 1 && factors[0]?.exponent === 1;
    for (const { base, exponent } of factors) {
      const offered = isWhole && hint !== zero ? scaleHint(hint, content) : undefined;
      const factor = this.bases.polynomialFactor(base, offered);
      result = multiplyFactored(result, raiseFactored(factor, Q.rational(exponent)));
    }
    return result;
  }

  /** Takes common factors out of numerator and denominator that the bases do not show. */
  private cancel(f: Factored): Factored {
    const above: number[] = [];
    const below: number[] = [];
    for (const [index, exponent] of f.exponents) {
      if (this.bases.baseAt(index).kind !== 'polynomial') continue;
      (Q.sign(exponent) > 0 ? above : below).push(index);
    }
    for (const i of above) {
      for (const j of below) {
        const numerator = this.bases.baseAt(i);
        const denominator = this.bases.baseAt(j);
        if (numerator.kind !== 'polynomial' || denominator.kind !== 'polynomial') continue;
        const divisor = P.greatestCommonDivisor(numerator.polynomial, denominator.polynomial);
        if (P.termCount(divisor) < 2) continue;
        let result = f;
        for (const index of [i, j]) {
          const exponent = f.exponents.get(index) ?? Q.ZERO;
          result = multiplyFactored(
            withoutExponents(result, new Map([[index, exponent]])),
            raiseFactored(this.split(index, divisor), exponent),
          );
        }
        return this.cancel(result);
      }
    }
    return f;
  }

  /** A base as the product of a divisor and what is left. */
  private split(index: number, divisor: Polynomial): Factored {
    const base = this.bases.baseAt(index);
    if (base.kind !== 'polynomial') return factoredBase(index);
    const rest = P.divideExact(base.polynomial, divisor);
    if (!rest) return factoredBase(index);
    return multiplyFactored(
      this.factorPolynomial(divisor, zero),
      this.factorPolynomial(rest, zero),
    );
  }

  /** (√2)² is 2 and (√(1 − x))² is 1 − x: powers of roots of known values are written out. */
  private reduceRoots(polynomial: Polynomial): Polynomial {
    let result = polynomial;
    for (const variable of P.variablesOf(polynomial)) {
      const kernel = this.bases.kernelAt(variable);
      const value = this.valueOfRoot(kernel);
      if (!value || P.degree(result, variable) < value.order) continue;
      result = replacePowers(result, variable, value.order, value.polynomial);
    }
    return result;
  }

  /** cosh² x − sinh² x is 1: sinh² is written by cosh² where that makes fewer terms. */
  private reduceHyperbolic(polynomial: Polynomial): Polynomial {
    let result = polynomial;
    for (const variable of P.variablesOf(polynomial)) {
      const { expression } = this.bases.kernelAt(variable);
      if (expression.kind !== 'call' || expression.name !== 'sinh') continue;
      if (P.degree(result, variable) < 2) continue;
      const cosh = this.bases.baseAt(this.bases.kernel(call('cosh', expression.arguments)));
      if (cosh.kind !== 'kernel') continue;
      const square = P.add(P.power(P.variable(cosh.variable), 2), P.constant(-1n));
      const reduced = replacePowers(result, variable, 2, square);
      if (P.termCount(reduced) < P.termCount(result)) result = reduced;
    }
    return result;
  }

  private valueOfRoot(kernel: Kernel): { order: number; polynomial: Polynomial } | undefined {
    const { expression, root } = kernel;
    if (expression.kind === 'number' && Q.isInteger(expression.value)) {
      return { order: root, polynomial: P.constant(expression.value.numerator) };
    }
    if (expression.kind !== 'power' || expression.exponent.kind !== 'number') return undefined;
    const exponent = expression.exponent.value;
    if (exponent.numerator !== 1n || root !== 1) return undefined;
    const order = Number(exponent.denominator);
    const inner = this.factored(expression.base);
    const isPolynomial =
      Q.isInteger(inner.coefficient) &&
      [...inner.exponents.values()].every((e) => Q.isInteger(e) && Q.sign(e) > 0);
    if (!isPolynomial) return undefined;
    return {
      order,
      polynomial: P.scale(this.bases.expanded(inner), inner.coefficient.numerator),
    };
  }

  /** The factored form as an expression: the shortest found, in `equality` the plain one. */
  write(f: Factored): Expression {
    return this.mode === 'equality' ? writePlainly(this.bases, f) : writeShortest(this.bases, f);
  }
}

/** p with variable^order replaced by the value, as often as it goes into each power. */
function replacePowers(
  p: Polynomial,
  variable: number,
  order: number,
  value: Polynomial,
): Polynomial {
  let result = P.zero;
  P.coefficientsIn(p, variable).forEach((coefficient, exponent) => {
    const rest = P.power(P.variable(variable), exponent % order);
    const replaced = P.power(value, Math.floor(exponent / order));
    result = P.add(result, P.multiply(P.multiply(coefficient, rest), replaced));
  });
  return result;
}

function exponentOf(e: Expression): Rational {
  const { exponent } = splitPower(e);
  return exponent.kind === 'number' ? exponent.value : Q.ONE;
}

function scaleHint(hint: Expression, content: bigint): Expression {
  return scale(Q.rational(1n, content), hint);
}

function collectLikeTerms(terms: readonly Factored[]): Factored[] {
  const byKey = new Map<string, Factored>();
  for (const term of terms) {
    if (Q.isZero(term.coefficient)) continue;
    const key = baseKey(term);
    const known = byKey.get(key);
    byKey.set(
      key,
      known
        ? { coefficient: Q.add(known.coefficient, term.coefficient), exponents: term.exponents }
        : term,
    );
  }
  return [...byKey.values()].filter(({ coefficient }) => !Q.isZero(coefficient));
}
