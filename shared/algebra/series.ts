/**
 * Expansions in powers of a small positive symbol t, t^start (c₀ + c₁ t + c₂ t² + …), cut after so
 * many terms. They give limits, leading behaviour and virial coefficients.
 */
import {
  add,
  call,
  divide,
  exp,
  fraction,
  integer,
  ln,
  multiply,
  negate,
  number,
  one,
  power,
  product,
  sum,
  symbol,
  zero,
} from './construct.ts';
import { differentiate } from './differentiate.ts';
import { isZero } from './equality.ts';
import type { Expression, SymbolNode } from './expression.ts';
import * as Q from './rational.ts';
import { isPositive } from './sign.ts';
import { dependsOn, expandAbbreviations, substitute } from './traverse.ts';

export interface Series {
  /** The power of t of the first coefficient. */
  readonly start: number;
  /** c₀, c₁ …; the error is of the order of the first one left out. Empty: zero to all orders. */
  readonly coefficients: readonly Expression[];
}

/** Why an expression has no such expansion: an essential singularity, a logarithm of t. */
class NoSeries extends Error {
  override name = 'NoSeries';
}

/**
 * The expansion of e in the positive symbol t to `count` terms, with leading zeros dropped as far
 * as they can be told; undefined where there is none in whole powers of t. Coefficients are not
 * simplified.
 */
export function seriesIn(e: Expression, t: SymbolNode, count: number): Series | undefined {
  try {
    return strip(expandIn(expandAbbreviations(e), t, count));
  } catch (fault) {
    if (fault instanceof NoSeries || fault instanceof RangeError) return undefined;
    throw fault;
  }
}

const ZERO_SERIES: Series = { start: 0, coefficients: [] };

function constantSeries(e: Expression, count: number): Series {
  if (e === zero) return ZERO_SERIES;
  return { start: 0, coefficients: [e, ...Array<Expression>(count - 1).fill(zero)] };
}

/** Drops leading coefficients that are identically zero. */
function strip(s: Series): Series {
  let drop = 0;
  for (const c of s.coefficients) {
    if (c !== zero && isZero(c) !== 'zero') break;
    drop++;
  }
  if (drop === 0) return s;
  return { start: s.start + drop, coefficients: s.coefficients.slice(drop) };
}

/** True for the expansion of 0, or of what vanishes faster than any power of t. */
export function isExactZero(s: Series): boolean {
  return s === ZERO_SERIES;
}

function addSeries(a: Series, b: Series): Series {
  if (isExactZero(a)) return b;
  if (isExactZero(b)) return a;
  const start = Math.min(a.start, b.start);
  const end = Math.min(a.start + a.coefficients.length, b.start + b.coefficients.length);
  const coefficients: Expression[] = [];
  for (let n = start; n < end; n++) {
    coefficients.push(
      add(a.coefficients[n - a.start] ?? zero, b.coefficients[n - b.start] ?? zero),
    );
  }
  return strip({ start, coefficients });
}

function multiplySeries(a: Series, b: Series): Series {
  if (isExactZero(a) || isExactZero(b)) return ZERO_SERIES;
  const count = Math.min(a.coefficients.length, b.coefficients.length);
  const coefficients: Expression[] = [];
  for (let n = 0; n < count; n++) {
    const terms: Expression[] = [];
    for (let i = 0; i <= n; i++) {
      terms.push(multiply(a.coefficients[i] ?? zero, b.coefficients[n - i] ?? zero));
    }
    coefficients.push(sum(terms));
  }
  return { start: a.start + b.start, coefficients };
}

function expandIn(e: Expression, t: SymbolNode, count: number): Series {
  if (!dependsOn(e, t)) return constantSeries(e, count);
  switch (e.kind) {
    case 'symbol':
      return { start: 1, coefficients: [one, ...Array<Expression>(count - 1).fill(zero)] };
    case 'sum':
      return [number(e.constant), ...e.terms]
        .map((term) => expandIn(term, t, count))
        .reduce(addSeries, ZERO_SERIES);
    case 'product':
      return [number(e.coefficient), ...e.factors]
        .map((factor) => expandIn(factor, t, count))
        .reduce(multiplySeries);
    case 'power':
      return powerSeries(e.base, e.exponent, t, count);
    case 'call':
      return callSeries(e, t, count);
    default:
      throw new NoSeries(e.kind);
  }
}

/** (c t^k (1 + v))^r = c^r t^(kr) Σ C(r, n) v^n, for a constant exponent r. */
function powerSeries(base: Expression, exponent: Expression, t: SymbolNode, count: number): Series {
  if (dependsOn(exponent, t)) {
    return expandIn(call('exp', [multiply(exponent, callLn(base))]), t, count);
  }
  const inner = strip(expandIn(base, t, count));
  const [lead] = inner.coefficients;
  if (!lead) throw new NoSeries('a power of what vanishes to the order computed');
  let start = 0;
  if (inner.start !== 0) {
    if (exponent.kind !== 'number') throw new NoSeries('a symbolic power of t');
    const shifted = Q.multiply(exponent.value, Q.rational(inner.start));
    if (!Q.isInteger(shifted)) throw new NoSeries('a fractional power of t');
    start = Number(shifted.numerator);
  }
  const relative = relativeSeries(inner, lead);
  let factor: Expression = one;
  const weights: Expression[] = [];
  for (let n = 0; n < relative.coefficients.length; n++) {
    weights.push(factor);
    factor = product([factor, add(exponent, integer(-n)), fraction(1, n + 1)]);
  }
  const result = compose(weights, relative);
  const outside = power(lead, exponent);
  return {
    start,
    coefficients: result.coefficients.map((c) => multiply(outside, c)),
  };
}

function callLn(base: Expression): Expression {
  return base.kind === 'number' && base === one ? zero : ln(base);
}

/** v of c t^k (1 + v), as a series that starts with t at the earliest. */
function relativeSeries(s: Series, lead: Expression): Series {
  return {
    start: 0,
    coefficients: s.coefficients.map((c, n) => (n === 0 ? zero : divide(c, lead))),
  };
}

/** Σ weights[n] v^n for a series v without constant term. */
function compose(weights: readonly Expression[], v: Series): Series {
  const count = v.coefficients.length;
  let result: Expression[] = Array<Expression>(count).fill(zero);
  let powers: Series = constantSeries(one, count);
  weights.slice(0, count).forEach((weight, n) => {
    if (n > 0) powers = multiplySeries(powers, v);
    result = result.map((c, i) => add(c, multiply(weight, powers.coefficients[i] ?? zero)));
  });
  return { start: 0, coefficients: result };
}

function callSeries(
  e: Extract<Expression, { kind: 'call' }>,
  t: SymbolNode,
  count: number,
): Series {
  const varying = e.arguments.filter((argument) => dependsOn(argument, t));
  const [u] = varying;
  if (varying.length !== 1 || !u) throw new NoSeries(e.name);
  const inner = strip(expandIn(u, t, count));
  if (e.name === 'ln') {
    const [lead] = inner.coefficients;
    if (!lead || inner.start !== 0) throw new NoSeries('a logarithm of t');
    // ln(1 + v) = v − v²/2 + …
    const weights = inner.coefficients.map((_, n) =>
      n === 0 ? zero : fraction(n % 2 ? 1 : -1, n),
    );
    return addSeries(
      constantSeries(ln(lead), count),
      compose(weights, relativeSeries(inner, lead)),
    );
  }
  if (inner.start < 0) {
    const [lead] = inner.coefficients;
    if (e.name === 'exp' && lead && isPositive(negate(lead))) return ZERO_SERIES;
    throw new NoSeries('an essential singularity');
  }
  const shifted =
    inner.start === 0
      ? inner
      : {
          start: 0,
          coefficients: [...Array<Expression>(inner.start).fill(zero), ...inner.coefficients].slice(
            0,
            Math.max(count, 1),
          ),
        };
  const at = shifted.coefficients[0] ?? zero;
  const v: Series = {
    start: 0,
    coefficients: shifted.coefficients.map((c, n) => (n === 0 ? zero : c)),
  };
  if (e.name === 'exp') {
    const weights: Expression[] = [];
    let factorial = 1n;
    for (let n = 0; n < v.coefficients.length; n++) {
      if (n > 1) factorial *= BigInt(n);
      weights.push(fraction(1n, factorial));
    }
    const outside = exp(at);
    return {
      start: 0,
      coefficients: compose(weights, v).coefficients.map((c) => multiply(outside, c)),
    };
  }
  return taylor(e, u, at, v);
}

/** f(at + v) = Σ f⁽ⁿ⁾(at) vⁿ/n!, for a function without a shorter rule. */
function taylor(
  e: Extract<Expression, { kind: 'call' }>,
  u: Expression,
  at: Expression,
  v: Series,
): Series {
  const x = symbol('expansion variable');
  let f: Expression = call(
    e.name,
    e.arguments.map((argument) => (argument === u ? x : argument)),
  );
  const weights: Expression[] = [];
  let factorial = 1n;
  for (let n = 0; n < v.coefficients.length; n++) {
    if (n > 1) factorial *= BigInt(n);
    const value = substitute(f, new Map<Expression, Expression>([[x, at]]));
    weights.push(multiply(value, fraction(1n, factorial)));
    f = differentiate(f, x);
  }
  return compose(weights, v);
}
