/**
 * The numbered bases of a workspace: kernels, which are the variables of polynomials, and the
 * polynomials that have turned up as factors, each with the shortest way found to write it.
 */
import {
  add,
  addendsOf,
  exp,
  integer,
  multiply,
  negate,
  number,
  one,
  power,
  product,
  splitCoefficient,
  sum,
} from './construct.ts';
import { readingCost } from './cost.ts';
import { childrenOf, type Expression, type SymbolNode } from './expression.ts';
import { factoredBase, factoredNumber, multiplyFactored, type Factored } from './factored.ts';
import { gatherLogarithms } from './logarithm.ts';
import * as P from './polynomial/index.ts';
import type { Polynomial } from './polynomial/index.ts';
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';

/** A base that is no polynomial in others; in polynomials its variable means expression^(1/root). */
export interface Kernel {
  readonly kind: 'kernel';
  readonly expression: Expression;
  readonly variable: number;
  readonly root: number;
}

/** A primitive polynomial of at least two terms, and the shortest way found to write it. */
export interface PolynomialBase {
  readonly kind: 'polynomial';
  readonly polynomial: Polynomial;
  expression: Expression;
}

export type Base = Kernel | PolynomialBase;

/** A product that would multiply out to more terms than this is left as it stands. */
export const MOST_EXPANDED_TERMS = 4000;

/** A way of writing that is so much shorter than the plain one is not improved upon. */
const SHORT_ENOUGH = 0.75;
/** Larger polynomials are not tried against powers of known bases. */
const MOST_TERMS_REWRITTEN = 24;

export interface BasesOptions {
  readonly mode: 'display' | 'equality';
  /**
   * Symbols that are large where a model is best behaved (V, T), most important first: a difference
   * is written with the sign that makes it positive there, V − N b and not N b − V.
   */
  readonly dominant?: readonly SymbolNode[];
}

export class Bases {
  private readonly options: BasesOptions;
  private readonly bases: Base[] = [];
  private readonly kernels: Kernel[] = [];
  private readonly kernelNumber = new Map<Expression, number>();
  private readonly polynomialNumber = new Map<string, number>();
  private readonly roots = new Map<Expression, number>();

  constructor(options: BasesOptions) {
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

  /** The number of the base that is this kernel. */
  kernel(expression: Expression): number {
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

  /** The number of the base that is this kernel; undefined where it has not been met. */
  numberOf(expression: Expression): number | undefined {
    return this.kernelNumber.get(expression);
  }

  baseAt(index: number): Base {
    const base = this.bases[index];
    if (!base) throw new Error(`no base ${index}`);
    return base;
  }

  kernelAt(variable: number): Kernel {
    const kernel = this.kernels[variable];
    if (!kernel) throw new Error(`no kernel ${variable}`);
    return kernel;
  }

  /** The polynomial bases met so far. */
  polynomials(): Polynomial[] {
    const found: Polynomial[] = [];
    for (const base of this.bases) if (base.kind === 'polynomial') found.push(base.polynomial);
    return found;
  }

  /** A primitive polynomial as ± one of the bases, which is made when it is new. */
  polynomialFactor(polynomial: Polynomial, hint: Expression | undefined): Factored {
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
      const plain = readingCost(expression);
      const isShort = hint !== undefined && readingCost(hint) < SHORT_ENOUGH * plain;
      if (!isShort) {
        for (const writing of this.writingsByBases(polynomial)) this.offerWriting(index, writing);
      }
    }
    return index;
  }

  /** Keeps the shorter of the known and the offered way to write a polynomial base. */
  private offerWriting(index: number, hint: Expression | undefined): void {
    const base = this.baseAt(index);
    if (!hint || base.kind !== 'polynomial') return;
    const offered = gatherLogarithms(hint);
    if (readingCost(offered) < readingCost(base.expression)) base.expression = offered;
  }

  /**
   * A polynomial by powers of bases met before: 2a V² − 4a b N V + 2a b² N² − b k T V² is
   * 2a (V − N b)² − b k T V². One step of division at each end of the known base, tried for the
   * higher powers first.
   */
  private *writingsByBases(polynomial: Polynomial): Generator<Expression> {
    const size = P.termCount(polynomial);
    if (size < 4 || size > MOST_TERMS_REWRITTEN) return;
    const variables = new Set(P.variablesOf(polynomial));
    for (const base of this.bases) {
      if (base.kind !== 'polynomial' || base.polynomial === polynomial) continue;
      const terms = P.termCount(base.polynomial);
      if (terms > 3 || !P.variablesOf(base.polynomial).every((v) => variables.has(v))) continue;
      for (let n = 4; n >= 1; n--) {
        const raised = P.power(base.polynomial, n);
        for (const pivot of ['highest', 'lowest'] as const) {
          const quotient = P.divideTermwise(polynomial, raised, pivot);
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

  expandedSize(term: Factored): number {
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
  expanded(term: Factored): Polynomial {
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

  writePolynomial(polynomial: Polynomial): Expression {
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
}
