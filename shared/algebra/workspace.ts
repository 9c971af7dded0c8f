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
import { BudgetExceeded, spend } from './budget.ts';
import {
  addendsOf,
  call,
  divide,
  exp,
  integer,
  ln,
  multiply,
  negate,
  number,
  one,
  power,
  product,
  scale,
  splitCoefficient,
  splitPower,
  subtract,
  sum,
  add,
  two,
  zero,
} from './construct.ts';
import { readingCost } from './cost.ts';
import type { Expression, SymbolNode } from './expression.ts';
import { childrenOf } from './expression.ts';
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
import { expandLn, gatherLogarithms } from './logarithm.ts';
import * as P from './polynomial/index.ts';
import type { Polynomial } from './polynomial/index.ts';
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';
import { isPositive } from './sign.ts';
import { rebuild } from './traverse.ts';

/** A base that is no polynomial in others; in polynomials its variable means expression^(1/root). */
interface Kernel {
  readonly kind: 'kernel';
  readonly expression: Expression;
  readonly variable: number;
  readonly root: number;
}

/** A primitive polynomial of at least two terms, and the shortest way found to write it. */
interface PolynomialBase {
  readonly kind: 'polynomial';
  readonly polynomial: Polynomial;
  expression: Expression;
}

type Base = Kernel | PolynomialBase;

/** A product that would multiply out to more terms than this is left as it stands. */
const MOST_EXPANDED_TERMS = 4000;

export interface WorkspaceOptions {
  readonly mode: 'display' | 'equality';
  /**
   * Symbols that are large where a model is best behaved (V, T), most important first: a difference
   * is written with the sign that makes it positive there, V − N b and not N b − V.
   */
  readonly dominant?: readonly SymbolNode[];
}

export class Workspace {
  private readonly options: WorkspaceOptions;
  private readonly bases: Base[] = [];
  private readonly kernels: Kernel[] = [];
  private readonly kernelNumber = new Map<Expression, number>();
  private readonly polynomialNumber = new Map<string, number>();
  private readonly roots = new Map<Expression, number>();
  private readonly memory = new Map<Expression, Factored>();

  constructor(options: WorkspaceOptions) {
    this.options = options;
  }

  /**
   * Tells the workspace of an expression before it is worked on: its fractional powers decide by
   * which roots the kernels are counted.
   */
  prepare(e: Expression): void {
    const seen = new Set<Expression>();
    const visit = (part: Expression): void => {
      if (seen.has(part)) return;
      seen.add(part);
      if (part.kind === 'power' && part.exponent.kind === 'number') {
        this.needRoot(part.base, part.exponent.value);
      }
      if (part.kind === 'call' && part.name === 'exp' && part.arguments[0]) {
        for (const term of addendsOf(part.arguments[0])) {
          const { coefficient, rest } = splitCoefficient(term);
          if (rest !== one) this.needRoot(exp(rest), coefficient);
        }
      }
      if (part.kind !== 'abbreviation') childrenOf(part).forEach(visit);
    };
    visit(e);
  }

  private needRoot(base: Expression, exponent: Rational): void {
    if (Q.isInteger(exponent)) return;
    const root = Number(exponent.denominator);
    const known = this.roots.get(base) ?? 1;
    this.roots.set(base, (known * root) / Number(Q.gcd(BigInt(known), BigInt(root))));
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
        return factoredBase(this.kernel(e));
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
        return factoredBase(this.kernel(rebuild(e, (part) => this.written(part))));
    }
  }

  /** The expression or its normal form, whichever reads shorter; in `equality` the normal form. */
  private written(e: Expression): Expression {
    const normal = this.write(this.factored(e));
    if (this.options.mode === 'equality') return normal;
    return readingCost(normal) < readingCost(e) ? normal : e;
  }

  private function(e: Extract<Expression, { kind: 'call' }>): Factored {
    const [x] = e.arguments;
    if (!x) return FACTORED_ZERO;
    if (e.name === 'exp') return this.exponential(x);
    if (e.name === 'ln') return this.logarithm(x);
    if (this.options.mode === 'equality') {
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
    return rebuilt.kind === 'call' ? factoredBase(this.kernel(rebuilt)) : this.factored(rebuilt);
  }

  /** exp of a sum is a product of exp of monomials: exp(2x − y) = exp(x)² exp(y)^(−1). */
  private exponential(x: Expression): Factored {
    const written = this.options.mode === 'equality' ? expand(this.written(x)) : this.written(x);
    let result = FACTORED_ONE;
    for (const term of addendsOf(written)) {
      const { coefficient, rest } = splitCoefficient(term);
      const base = rest === one ? exp(one) : exp(rest);
      if (base.kind === 'call' && base.name === 'exp') {
        result = multiplyFactored(result, factoredBase(this.kernel(base), coefficient));
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
      if (this.options.mode === 'equality' && argument?.kind === 'number') {
        return this.logarithmOfNumber(argument.value);
      }
      return factoredBase(this.kernel(apart));
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
      const base = factoredBase(this.kernel(ln(integer(n))));
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
          ? factoredBase(this.kernel(whole), coefficient)
          : this.factored(power(whole, number(coefficient)));
      result = multiplyFactored(result, part);
    }
    return result;
  }

  private raiseToFraction(base: Expression, inner: Factored, exponent: Rational): Factored {
    const bases = [...inner.exponents];
    const unknown = bases.filter(([index]) => !isPositive(this.baseAt(index).expression));
    const [single] = unknown;
    const mayDistribute =
      Q.sign(inner.coefficient) > 0 &&
      (unknown.length === 0 || (unknown.length === 1 && single && Q.isOne(single[1])));
    if (!mayDistribute) {
      const written = this.write(inner);
      return factoredBase(this.kernel(written === zero ? base : written), exponent);
    }
    const radical = power(number(inner.coefficient), number(exponent));
    const { coefficient, rest } = splitCoefficient(radical);
    const numberPart =
      rest === one
        ? factoredNumber(coefficient)
        : multiplyFactored(
            factoredNumber(coefficient),
            factoredBase(this.kernel(splitPower(rest).base), exponentOf(rest)),
          );
    return multiplyFactored(
      numberPart,
      raiseFactored({ coefficient: Q.ONE, exponents: inner.exponents }, exponent),
    );
  }

  private baseAt(index: number): Base {
    const base = this.bases[index];
    if (!base) throw new Error(`no base ${index}`);
    return base;
  }

  /** The number of the base that is this kernel. */
  private kernel(expression: Expression): number {
    const known = this.kernelNumber.get(expression);
    if (known !== undefined) return known;
    const kernel: Kernel = {
      kind: 'kernel',
      expression,
      variable: this.kernels.length,
      root: this.roots.get(expression) ?? 1,
    };
    this.kernels.push(kernel);
    const index = this.bases.push(kernel) - 1;
    this.kernelNumber.set(expression, index);
    return index;
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

  /** The sum of terms without negative exponents and without a base common to all of them. */
  private addRemainders(terms: readonly Factored[]): Factored {
    let content = Q.ZERO;
    for (const term of terms) content = Q.contentGcd(content, term.coefficient);
    const expandedSize = terms.reduce((size, term) => size + this.expandedSize(term), 0);
    if (expandedSize > MOST_EXPANDED_TERMS) {
      if (this.options.mode === 'equality') throw new BudgetExceeded('a common denominator');
      const written = sum(terms.map((term) => this.write(term)));
      return written.kind === 'sum' ? factoredBase(this.kernel(written)) : this.factored(written);
    }
    let polynomial = P.zero;
    for (const term of terms) {
      const scaled = Q.divide(term.coefficient, content);
      polynomial = P.add(polynomial, P.scale(this.expanded(term), scaled.numerator));
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
    const known: Polynomial[] = [];
    for (const base of this.bases) if (base.kind === 'polynomial') known.push(base.polynomial);
    const { content, factors } = P.factorOver(polynomial, known);
    let result = factoredNumber(Q.rational(content));
    const isWhole = factors.length === 1 && factors[0]?.exponent === 1;
    for (const { base, exponent } of factors) {
      const offered = isWhole && hint !== zero ? scaleHint(hint, content) : undefined;
      const factor = this.polynomialFactor(base, offered);
      result = multiplyFactored(result, raiseFactored(factor, Q.rational(exponent)));
    }
    return result;
  }

  /** A primitive polynomial as ± one of the bases, which is made when it is new. */
  private polynomialFactor(polynomial: Polynomial, hint: Expression | undefined): Factored {
    const monomial = this.asMonomial(polynomial);
    if (monomial) return monomial;
    const index = this.polynomialNumber.get(P.toKey(polynomial));
    if (index !== undefined) {
      this.offerWriting(index, hint);
      return factoredBase(index);
    }
    const opposite = P.negate(polynomial);
    const oppositeIndex = this.polynomialNumber.get(P.toKey(opposite));
    const minus = factoredNumber(Q.MINUS_ONE);
    if (oppositeIndex !== undefined) {
      this.offerWriting(oppositeIndex, hint && negate(hint));
      return multiplyFactored(minus, factoredBase(oppositeIndex));
    }
    if (this.prefersOpposite(polynomial)) {
      return multiplyFactored(minus, factoredBase(this.register(opposite, hint && negate(hint))));
    }
    return factoredBase(this.register(polynomial, hint));
  }

  private register(polynomial: Polynomial, hint: Expression | undefined): number {
    const expression = gatherLogarithms(this.writePolynomial(polynomial));
    const index = this.bases.push({ kind: 'polynomial', polynomial, expression }) - 1;
    this.polynomialNumber.set(P.toKey(polynomial), index);
    if (this.options.mode === 'display') {
      this.offerWriting(index, hint);
      for (const writing of this.writingsByBases(polynomial)) this.offerWriting(index, writing);
    }
    return index;
  }

  /**
   * A polynomial by powers of bases met before: 2a V² − 4a b N V + 2a b² N² − b k T V² is
   * 2a (V − N b)² − b k T V². One step of division at each end of the known base, tried for the
   * higher powers first.
   */
  private *writingsByBases(polynomial: Polynomial): Generator<Expression> {
    const size = P.termCount(polynomial);
    if (size < 4 || size > 60) return;
    const variables = new Set(P.variablesOf(polynomial));
    for (const base of this.bases) {
      if (base.kind !== 'polynomial' || base.polynomial === polynomial) continue;
      const terms = P.termCount(base.polynomial);
      if (terms > 3 || !P.variablesOf(base.polynomial).every((v) => variables.has(v))) continue;
      for (let n = 4; n >= 1; n--) {
        const raised = P.power(base.polynomial, n);
        const all = [...P.termsOf(raised)];
        for (const pivot of [all[0], all[all.length - 1]]) {
          if (!pivot) continue;
          const quotient = divideTermwise(polynomial, pivot);
          const taken = P.termCount(quotient);
          if (taken === 0 || taken > 3) continue;
          const rest = P.add(polynomial, P.negate(P.multiply(quotient, raised)));
          if (taken + P.termCount(rest) >= size) continue;
          yield add(
            multiply(this.writePolynomial(quotient), power(base.expression, integer(n))),
            this.writePolynomial(rest),
          );
        }
      }
    }
  }

  /** Takes common factors out of numerator and denominator that the bases do not show. */
  private cancel(f: Factored): Factored {
    const above: number[] = [];
    const below: number[] = [];
    for (const [index, exponent] of f.exponents) {
      if (this.baseAt(index).kind !== 'polynomial') continue;
      (Q.sign(exponent) > 0 ? above : below).push(index);
    }
    for (const i of above) {
      for (const j of below) {
        const numerator = this.baseAt(i);
        const denominator = this.baseAt(j);
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
    const base = this.baseAt(index);
    if (base.kind !== 'polynomial') return factoredBase(index);
    const rest = P.divideExact(base.polynomial, divisor);
    if (!rest) return factoredBase(index);
    return multiplyFactored(
      this.factorPolynomial(divisor, zero),
      this.factorPolynomial(rest, zero),
    );
  }

  /** Keeps the shorter of the known and the offered way to write a polynomial base. */
  private offerWriting(index: number, hint: Expression | undefined): void {
    const base = this.baseAt(index);
    if (!hint || base.kind !== 'polynomial') return;
    const offered = gatherLogarithms(hint);
    if (readingCost(offered) < readingCost(base.expression)) base.expression = offered;
  }

  private asMonomial(polynomial: Polynomial): Factored | undefined {
    if (P.termCount(polynomial) !== 1) return undefined;
    for (const { coefficient, exponents } of P.termsOf(polynomial)) {
      let result = factoredNumber(Q.rational(coefficient));
      for (const [variable, exponent] of exponents) {
        const kernel = this.kernelAt(variable);
        const index = this.kernel(kernel.expression);
        result = multiplyFactored(result, factoredBase(index, Q.rational(exponent, kernel.root)));
      }
      return result;
    }
    return undefined;
  }

  private kernelAt(variable: number): Kernel {
    const kernel = this.kernels[variable];
    if (!kernel) throw new Error(`no kernel ${variable}`);
    return kernel;
  }

  /** True where −p is positive and p is negative for large values of the dominant symbols. */
  private prefersOpposite(polynomial: Polynomial): boolean {
    let terms = [...P.termsOf(polynomial)];
    for (const symbol of this.options.dominant ?? []) {
      const index = this.kernelNumber.get(symbol);
      const base = index === undefined ? undefined : this.bases[index];
      if (base?.kind !== 'kernel') continue;
      const degree = (term: (typeof terms)[number]): number =>
        term.exponents.find(([variable]) => variable === base.variable)?.[1] ?? 0;
      const highest = Math.max(...terms.map(degree));
      if (highest === 0) continue;
      terms = terms.filter((term) => degree(term) === highest);
      if (terms.every(({ coefficient }) => coefficient < 0n)) return true;
      if (terms.every(({ coefficient }) => coefficient > 0n)) return false;
    }
    const all = [...P.termsOf(polynomial)];
    const negative = all.filter(({ coefficient }) => coefficient < 0n).length;
    return negative * 2 > all.length;
  }

  private expandedSize(term: Factored): number {
    let size = 1;
    for (const [index, exponent] of term.exponents) {
      const base = this.baseAt(index);
      if (base.kind !== 'polynomial') continue;
      const terms = P.termCount(base.polynomial);
      const n = Number(Q.floor(exponent));
      // (t terms)^n has C(n + t − 1, n) terms at most.
      for (let i = 1; i <= n && size <= MOST_EXPANDED_TERMS; i++) size *= (terms - 1 + i) / i;
    }
    return size;
  }

  /** Π base^exponent, multiplied out; the coefficient is left aside. */
  private expanded(term: Factored): Polynomial {
    let result = P.one;
    for (const [index, exponent] of term.exponents) {
      const base = this.baseAt(index);
      if (base.kind === 'kernel') {
        const steps = Q.multiply(exponent, Q.rational(base.root));
        result = P.multiply(
          result,
          Q.isInteger(steps)
            ? P.power(P.variable(base.variable), Number(steps.numerator))
            : this.radical(base.expression, exponent),
        );
        continue;
      }
      const whole = Q.floor(exponent);
      const rest = Q.subtract(exponent, Q.rational(whole));
      result = P.multiply(result, P.power(base.polynomial, Number(whole)));
      if (!Q.isZero(rest)) result = P.multiply(result, this.radical(base.expression, rest));
    }
    return result;
  }

  /** A root that is a variable of its own, since its base is counted by other roots or is a sum. */
  private radical(expression: Expression, exponent: Rational): Polynomial {
    const step = power(expression, number(Q.rational(1n, exponent.denominator)));
    const kernel = this.baseAt(this.kernel(step));
    if (kernel.kind !== 'kernel') throw new Error('a radical is a kernel');
    return P.power(P.variable(kernel.variable), Number(exponent.numerator));
  }

  /** (√2)² is 2 and (√(1 − x))² is 1 − x: powers of roots of known values are written out. */
  private reduceRoots(polynomial: Polynomial): Polynomial {
    let result = polynomial;
    for (const variable of P.variablesOf(polynomial)) {
      const kernel = this.kernelAt(variable);
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
      const { expression } = this.kernelAt(variable);
      if (expression.kind !== 'call' || expression.name !== 'sinh') continue;
      if (P.degree(result, variable) < 2) continue;
      const cosh = this.baseAt(this.kernel(call('cosh', expression.arguments)));
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
      polynomial: P.scale(this.expanded(inner), inner.coefficient.numerator),
    };
  }

  private writePolynomial(polynomial: Polynomial): Expression {
    const terms: Expression[] = [];
    for (const { coefficient, exponents } of P.termsOf(polynomial)) {
      const factors: Expression[] = [integer(coefficient)];
      for (const [variable, exponent] of exponents) {
        const { expression, root } = this.kernelAt(variable);
        factors.push(power(expression, number(Q.rational(exponent, root))));
      }
      terms.push(product(factors));
    }
    return sum(terms);
  }

  /** The factored form as an expression. */
  write(f: Factored): Expression {
    if (Q.isZero(f.coefficient)) return zero;
    const written = this.writeWith(f, undefined);
    if (this.options.mode === 'equality') return written;
    let best = written;
    for (const candidate of this.otherWritings(f)) {
      if (readingCost(candidate) < readingCost(best)) best = candidate;
    }
    return best;
  }

  private writeWith(
    f: Factored,
    replaced: { index: number; by: Expression } | undefined,
  ): Expression {
    const factors: Expression[] = [number(f.coefficient)];
    for (const [index, exponent] of f.exponents) {
      const base = replaced?.index === index ? replaced.by : this.baseAt(index).expression;
      factors.push(power(base, number(exponent)));
    }
    return product(factors);
  }

  /**
   * Writings that may be shorter: a minus sign taken into a difference, −(a − b) c = (b − a) c, and
   * an exponential taken into a sum, exp(−x)/(exp(x) − 1)^(−1) as 1 − exp(−x), and sinh x/cosh x as
   * tanh x or coth x.
   */
  private *otherWritings(f: Factored): Generator<Expression> {
    for (const [index, exponent] of f.exponents) {
      const { expression } = this.baseAt(index);
      if (expression.kind !== 'call' || expression.name !== 'sinh') continue;
      const cosh = this.kernelNumber.get(call('cosh', expression.arguments));
      const below = cosh === undefined ? undefined : f.exponents.get(cosh);
      if (cosh === undefined || !below || Q.sign(below) === Q.sign(exponent)) continue;
      const exponents = new Map(f.exponents);
      exponents.delete(index);
      const left = Q.add(below, exponent);
      if (Q.isZero(left)) exponents.delete(cosh);
      else exponents.set(cosh, left);
      const isAbove = Q.sign(exponent) > 0;
      yield multiply(
        power(
          call(isAbove ? 'tanh' : 'coth', expression.arguments),
          number(isAbove ? exponent : Q.negate(exponent)),
        ),
        this.writeWith({ coefficient: f.coefficient, exponents }, undefined),
      );
    }
    for (const [index, exponent] of f.exponents) {
      const base = this.baseAt(index);
      if (base.kind !== 'polynomial') continue;
      if (Q.sign(f.coefficient) < 0 && Q.isOne(exponent)) {
        const positive = { coefficient: Q.negate(f.coefficient), exponents: f.exponents };
        yield this.writeWith(positive, { index, by: gatherLogarithms(negate(base.expression)) });
      }
      for (const variable of P.variablesOf(base.polynomial)) {
        const kernel = this.kernelAt(variable);
        if (kernel.expression.kind !== 'call' || kernel.expression.name !== 'exp') continue;
        const kernelIndex = this.kernel(kernel.expression);
        const present = f.exponents.get(kernelIndex);
        if (!present) continue;
        const shift = Q.negate(Q.divide(present, exponent));
        const absorbed = sum(
          addendsOf(base.expression).map((addend) =>
            multiply(addend, power(kernel.expression, number(Q.negate(shift)))),
          ),
        );
        const exponents = new Map(f.exponents);
        exponents.delete(kernelIndex);
        yield this.writeWith({ coefficient: f.coefficient, exponents }, { index, by: absorbed });
      }
    }
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

/** Σ of those terms of p that the monomial divides exactly, each divided by it. */
function divideTermwise(
  p: Polynomial,
  by: { coefficient: bigint; exponents: readonly (readonly [number, number])[] },
): Polynomial {
  let result = P.zero;
  for (const { coefficient, exponents } of P.termsOf(p)) {
    if (coefficient % by.coefficient !== 0n) continue;
    const left = new Map(exponents);
    let divides = true;
    for (const [variable, exponent] of by.exponents) {
      const remaining = (left.get(variable) ?? 0) - exponent;
      if (remaining < 0) divides = false;
      left.set(variable, remaining);
    }
    if (!divides) continue;
    let term = P.constant(coefficient / by.coefficient);
    for (const [variable, exponent] of left) {
      term = P.multiply(term, P.power(P.variable(variable), exponent));
    }
    result = P.add(result, term);
  }
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

/** Hyperbolic functions by exponentials, the rest by functions that are independent of each other. */
function asExponentials(
  name: Extract<Expression, { kind: 'call' }>['name'],
  x: Expression,
): Expression | undefined {
  const plus = (): Expression => add(exp(x), exp(negate(x)));
  const minus = (): Expression => subtract(exp(x), exp(negate(x)));
  switch (name) {
    case 'cosh':
      return divide(plus(), two);
    case 'sinh':
      return divide(minus(), two);
    case 'tanh':
      return divide(minus(), plus());
    case 'coth':
      return divide(plus(), minus());
    case 'arctanh':
      return divide(subtract(ln(add(one, x)), ln(subtract(one, x))), two);
    case 'arcsinh':
      return ln(add(x, power(add(one, power(x, two)), number(Q.HALF))));
    case 'log10':
      return divide(ln(x), ln(integer(10)));
    case 'tan':
      return divide(call('sin', [x]), call('cos', [x]));
    default:
      return undefined;
  }
}

/** Products of sums multiplied out, as far as whole positive powers go. */
export function expand(e: Expression): Expression {
  if (e.kind === 'sum') return sum(addendsOf(e).map(expand));
  if (e.kind === 'power' && e.exponent.kind === 'number' && e.base.kind === 'sum') {
    const n = e.exponent.value;
    if (Q.isInteger(n) && n.numerator > 1n && n.numerator <= 8n) {
      return expand(product(Array<Expression>(Number(n.numerator)).fill(e.base)));
    }
  }
  if (e.kind !== 'product') return e;
  const sums: Expression[] = [];
  const others: Expression[] = [number(e.coefficient)];
  for (const factor of e.factors) {
    const { base, exponent } = splitPower(factor);
    const n =
      exponent.kind === 'number' && Q.isInteger(exponent.value) ? exponent.value.numerator : 0n;
    if (base.kind === 'sum' && n > 0n && n <= 8n) {
      for (let i = 0n; i < n; i++) sums.push(base);
    } else {
      others.push(factor);
    }
  }
  let terms: Expression[] = [product(others)];
  for (const factor of sums) {
    spend(terms.length);
    terms = terms.flatMap((term) => addendsOf(factor).map((addend) => multiply(term, addend)));
    terms = [...addendsOf(sum(terms))];
  }
  return sum(terms);
}
