/** Values and derivatives of expressions with many digits. */
import { childrenOf, type Expression, type Relation } from '../algebra/expression.ts';
import { symbolsOf } from '../algebra/traverse.ts';
import { big, BIG_ONE, BIG_PI, BIG_ZERO, bigOfRational, type BigNumber } from './bigNumber.ts';
import { breakpointsOf } from './breakpoints.ts';
import { holdsInfinity } from './infinitePotential.ts';
import { integratePrecisely } from './preciseQuadrature.ts';
import {
  preciseBesselI,
  preciseErf,
  preciseGamma,
  preciseLnGamma,
  precisePolygamma,
  precisePolylogarithm,
  sumPrecisely,
} from './preciseSpecial.ts';

export type PreciseValues = ReadonlyMap<string, BigNumber | number | string>;

/** Sums with whole ends are taken term by term up to this many. */
const MOST_TERMS = 20_000;

class Evaluator {
  private readonly values: PreciseValues;
  private readonly memory = new Map<Expression, BigNumber | undefined>();
  private readonly outer: Evaluator | undefined;
  private readonly running: string | undefined;

  /** Within a sum or an integral, what does not hold the running variable is left to `outer`. */
  constructor(values: PreciseValues, outer?: Evaluator, running?: string) {
    this.values = values;
    this.outer = outer;
    this.running = running;
  }

  at(e: Expression): BigNumber | undefined {
    if (this.memory.has(e)) return this.memory.get(e);
    const value = this.outer && !this.isOwn(e) ? this.outer.at(e) : this.work(e);
    const result = value?.isNaN() ? undefined : value;
    this.memory.set(e, result);
    return result;
  }

  private isOwn(e: Expression): boolean {
    for (const { name } of symbolsOf(e)) if (name === this.running) return true;
    return false;
  }

  private work(e: Expression): BigNumber | undefined {
    switch (e.kind) {
      case 'number':
        return bigOfRational(e.value);
      case 'infinity':
        return big('Infinity');
      case 'symbol': {
        const value = this.values.get(e.name);
        if (value === undefined) return e.name === 'pi' ? BIG_PI : undefined;
        return big(value);
      }
      case 'abbreviation':
        return this.at(e.definition);
      case 'sum':
        return this.fold(e.terms, bigOfRational(e.constant), (a, b) => a.plus(b));
      case 'product':
        if (this.vanishes(e)) return BIG_ZERO;
        return this.fold(e.factors, bigOfRational(e.coefficient), (a, b) => a.times(b));
      case 'power': {
        const base = this.at(e.base);
        const exponent = this.at(e.exponent);
        if (!base || !exponent) return undefined;
        if (e.exponent.kind === 'number' && e.exponent.value.denominator === 2n && base.gte(0)) {
          const root = base.sqrt();
          const n = e.exponent.value.numerator;
          return n === 1n ? root : root.pow(Number(n));
        }
        return base.pow(exponent);
      }
      case 'call':
        return this.call(e);
      case 'summation':
      case 'productOver':
      case 'integral':
        return this.binding(e);
      case 'piecewise': {
        for (const { condition, value } of e.branches) {
          const verdict = this.holds(condition);
          if (verdict === undefined) return undefined;
          if (verdict) return this.at(value);
        }
        return this.at(e.otherwise);
      }
      case 'element': {
        const index = this.at(e.index);
        const value = index?.isInteger() ? e.values[index.toNumber() - 1] : undefined;
        return value ? bigOfRational(value) : undefined;
      }
    }
  }

  /** u e^(−u) within a hard core, where u is infinite. */
  private vanishes(e: Extract<Expression, { kind: 'product' }>): boolean {
    return e.factors.some((factor) => {
      if (factor.kind !== 'call' || factor.name !== 'exp') return false;
      const [u] = factor.arguments;
      if (!u || !holdsInfinity(u) || !e.factors.some((f) => f !== factor && holdsInfinity(f))) {
        return false;
      }
      const value = this.at(u);
      return value !== undefined && !value.isFinite() && value.isNegative();
    });
  }

  private fold(
    parts: readonly Expression[],
    start: BigNumber,
    join: (a: BigNumber, b: BigNumber) => BigNumber,
  ): BigNumber | undefined {
    let result = start;
    for (const part of parts) {
      const value = this.at(part);
      if (!value) return undefined;
      result = join(result, value);
    }
    return result;
  }

  private holds({ left, sign, right }: Relation): boolean | undefined {
    const a = this.at(left);
    const b = this.at(right);
    if (!a || !b) return undefined;
    switch (sign) {
      case '<':
        return a.lt(b);
      case '<=':
        return a.lte(b);
      case '=':
        return a.eq(b);
      case '>=':
        return a.gte(b);
      case '>':
        return a.gt(b);
    }
  }

  private call(e: Extract<Expression, { kind: 'call' }>): BigNumber | undefined {
    const args: BigNumber[] = [];
    for (const argument of e.arguments) {
      const value = this.at(argument);
      if (!value) return undefined;
      args.push(value);
    }
    const [x, y] = args;
    if (!x) return undefined;
    switch (e.name) {
      case 'exp':
        return x.exp();
      case 'ln':
        return x.gt(0) ? x.ln() : undefined;
      case 'log10':
        return x.gt(0) ? x.log(10) : undefined;
      case 'sinh':
        return x.sinh();
      case 'cosh':
        return x.cosh();
      case 'tanh':
        return x.tanh();
      case 'coth':
        return BIG_ONE.div(x.tanh());
      case 'sin':
        return x.sin();
      case 'cos':
        return x.cos();
      case 'tan':
        return x.tan();
      case 'arcsinh':
        return x.asinh();
      case 'arctanh':
        return x.atanh();
      case 'abs':
        return x.abs();
      case 'heaviside':
        return x.isNegative() ? BIG_ZERO : BIG_ONE;
      case 'min':
      case 'max':
        return args.reduce((a, b) => ((e.name === 'min' ? b.lt(a) : b.gt(a)) ? b : a));
      case 'erf':
        return preciseErf(x);
      case 'lnGamma':
        return preciseLnGamma(x);
      case 'Gamma':
        return preciseGamma(x);
      case 'factorial':
        return preciseGamma(x.plus(1));
      case 'digamma':
        return precisePolygamma(0, x);
      case 'polygamma':
        return y && precisePolygamma(x.toNumber(), y);
      case 'binomial': {
        if (!y) return undefined;
        const [a, b, c] = [x.plus(1), y.plus(1), x.minus(y).plus(1)].map(preciseLnGamma);
        return a && b && c ? a.minus(b).minus(c).exp() : undefined;
      }
      case 'polylog':
        return y && precisePolylogarithm(x, y);
      case 'besselI':
        return y && preciseBesselI(x, y);
      case 'debye': {
        if (!y?.gt(0)) return undefined;
        const integral = integratePrecisely((t) => t.pow(x).div(t.exp().minus(1)), BIG_ZERO, y);
        return integral?.times(x).div(y.pow(x));
      }
      case 'partial':
        return undefined;
    }
  }

  private binding(
    e: Extract<Expression, { kind: 'summation' | 'productOver' | 'integral' }>,
  ): BigNumber | undefined {
    const from = this.at(e.from);
    const to = this.at(e.to);
    if (!from || !to) return undefined;
    const { name } = e.variable;
    const values = new Map(this.values);
    const body = (x: BigNumber): BigNumber | undefined => {
      values.set(name, x);
      return new Evaluator(values, this, name).at(e.body);
    };
    if (e.kind === 'integral') {
      const points = breakpointsOf(e.body, e.variable).flatMap((point) => this.at(point) ?? []);
      return integratePrecisely(body, from, to, points);
    }
    const first = from.toNumber();
    if (!to.isFinite()) {
      return e.kind === 'summation' ? sumPrecisely((n) => body(big(n)), first) : undefined;
    }
    const last = to.toNumber();
    if (last - first > MOST_TERMS) return undefined;
    let result = e.kind === 'summation' ? BIG_ZERO : BIG_ONE;
    for (let n = first; n <= last; n++) {
      const term = body(big(n));
      if (!term) return undefined;
      result = e.kind === 'summation' ? result.plus(term) : result.times(term);
    }
    return result;
  }
}

/**
 * The value to some sixty digits, for values of all free symbols by name; undefined outside the
 * domain and for what cannot be had to so many digits.
 */
export function evaluatePrecisely(e: Expression, values: PreciseValues): BigNumber | undefined {
  return new Evaluator(values).at(e);
}

const costly = new WeakMap<Expression, boolean>();

/** True where the expression holds sums or integrals, which cost many evaluations each. */
export function isCostly(e: Expression): boolean {
  if (e.kind === 'summation' || e.kind === 'integral' || e.kind === 'productOver') return true;
  const known = costly.get(e);
  if (known !== undefined) return known;
  const result = childrenOf(e).some(isCostly);
  costly.set(e, result);
  return result;
}

/**
 * The derivative of order 1 or 2 of a function at x by the central difference. With 64 digits and a
 * step of 10^−17 x (10^−13 x) its error is of the order of 10^−34 (10^−26) of the value.
 */
export function preciseDerivative(
  f: (x: BigNumber) => BigNumber | undefined,
  x: BigNumber,
  order: 1 | 2 = 1,
): BigNumber | undefined {
  const h = x.isZero() ? big('1e-17') : x.abs().times(order === 1 ? '1e-17' : '1e-13');
  const above = f(x.plus(h));
  const below = f(x.minus(h));
  if (!above || !below) return undefined;
  if (order === 1) return above.minus(below).div(h.times(2));
  const middle = f(x);
  return middle && above.plus(below).minus(middle.times(2)).div(h.times(h));
}

/** ∂²f/∂x∂y by the four-point difference, to about 10^−26 of the value. */
export function preciseMixedDerivative(
  f: (x: BigNumber, y: BigNumber) => BigNumber | undefined,
  x: BigNumber,
  y: BigNumber,
): BigNumber | undefined {
  const step = (of: BigNumber): BigNumber => (of.isZero() ? big('1e-13') : of.abs().times('1e-13'));
  const h = step(x);
  const k = step(y);
  const corners = [
    f(x.plus(h), y.plus(k)),
    f(x.plus(h), y.minus(k)),
    f(x.minus(h), y.plus(k)),
    f(x.minus(h), y.minus(k)),
  ];
  const [a, b, c, d] = corners;
  if (!a || !b || !c || !d) return undefined;
  return a.minus(b).minus(c).plus(d).div(h.times(k).times(4));
}
