/**
 * The constructors: every expression is made by one of these, and comes out in canonical form.
 *
 * They do what is always right and always shorter: flatten sums and products, add up equal terms
 * and powers of equal bases, compute with numbers, put a number times a sum into the sum
 * (2·(x + y) is 2x + 2y, yet 2z(x + y) keeps its factor), merge exponentials. What is a matter of
 * choice (common denominators, factoring, logarithms of products) is left to `simplify.ts`.
 */
import {
  compareExpressions,
  intern,
  type Expression,
  type FunctionName,
  type NumberNode,
  type Relation,
  type SymbolNode,
} from './expression.ts';
import * as Q from './rational.ts';
import type { Rational } from './rational.ts';
import { isPositive } from './sign.ts';

export function number(value: Rational): NumberNode {
  return intern({ kind: 'number', value });
}

export function integer(n: number | bigint): NumberNode {
  return number(Q.rational(n));
}

export function fraction(numerator: number | bigint, denominator: number | bigint): NumberNode {
  return number(Q.rational(numerator, denominator));
}

export const zero = integer(0);
export const one = integer(1);
export const two = integer(2);
export const minusOne = integer(-1);
export const half = fraction(1, 2);
export const infinity: Expression = intern({ kind: 'infinity' });

/** A name without definition. Names carry ASCII spellings (`theta`, never `θ`). */
export function symbol(
  name: string,
  assumptions: { positive?: boolean; integer?: boolean } = {},
): SymbolNode {
  return intern({
    kind: 'symbol',
    name,
    positive: assumptions.positive ?? false,
    integer: assumptions.integer ?? false,
  });
}

/** The ratio of a circle's circumference to its diameter; a symbol, since it is no rational. */
export const pi = symbol('pi', { positive: true });

export function abbreviation(name: string, definition: Expression): Expression {
  return intern({ kind: 'abbreviation', name, definition });
}

export function isNumber(e: Expression): e is NumberNode {
  return e.kind === 'number';
}

/** e as coefficient · rest, where the rest has no numerical factor of its own. */
export function splitCoefficient(e: Expression): { coefficient: Rational; rest: Expression } {
  if (e.kind === 'number') return { coefficient: e.value, rest: one };
  if (e.kind === 'product' && !Q.isOne(e.coefficient)) {
    const [only] = e.factors;
    const rest =
      e.factors.length === 1 && only
        ? only
        : intern({ kind: 'product', coefficient: Q.ONE, factors: e.factors });
    return { coefficient: e.coefficient, rest };
  }
  return { coefficient: Q.ONE, rest: e };
}

/** coefficient · rest for a rest without numerical factor. */
export function scale(coefficient: Rational, rest: Expression): Expression {
  if (Q.isZero(coefficient)) return zero;
  if (Q.isOne(coefficient)) return rest;
  if (rest.kind === 'number') return number(Q.multiply(coefficient, rest.value));
  if (rest.kind === 'product') {
    return fromFactors(Q.multiply(coefficient, rest.coefficient), rest.factors);
  }
  if (rest.kind === 'sum') {
    return intern({
      kind: 'sum',
      constant: Q.multiply(coefficient, rest.constant),
      // A common factor changes the hashes of the terms and so their order.
      terms: rest.terms.map((term) => scale(coefficient, term)).sort(compareExpressions),
    });
  }
  return intern({ kind: 'product', coefficient, factors: [rest] });
}

/** A product whose factors are canonical and sorted already. */
function fromFactors(coefficient: Rational, factors: readonly Expression[]): Expression {
  if (factors.length === 0) return number(coefficient);
  const [only] = factors;
  if (factors.length === 1 && only) {
    if (Q.isOne(coefficient)) return only;
    if (only.kind === 'sum') return scale(coefficient, only);
  }
  return intern({ kind: 'product', coefficient, factors });
}

/** The sum of any number of expressions; 0 for none. */
export function sum(addends: readonly Expression[]): Expression {
  let constant = Q.ZERO;
  const coefficients = new Map<Expression, Rational>();
  const collect = (e: Expression): void => {
    if (e.kind === 'number') {
      constant = Q.add(constant, e.value);
    } else if (e.kind === 'sum') {
      constant = Q.add(constant, e.constant);
      for (const term of e.terms) collect(term);
    } else {
      const { coefficient, rest } = splitCoefficient(e);
      const known = coefficients.get(rest);
      coefficients.set(rest, known ? Q.add(known, coefficient) : coefficient);
    }
  };
  for (const e of addends) collect(e);

  const terms: Expression[] = [];
  for (const [rest, coefficient] of coefficients) {
    if (!Q.isZero(coefficient)) terms.push(scale(coefficient, rest));
  }
  const [only] = terms;
  if (!only) return number(constant);
  if (terms.length === 1 && Q.isZero(constant)) return only;
  return intern({ kind: 'sum', constant, terms: terms.sort(compareExpressions) });
}

/** What is added up in e, its constant included; e alone where it is no sum. */
export function addendsOf(e: Expression): readonly Expression[] {
  if (e.kind !== 'sum') return [e];
  return Q.isZero(e.constant) ? e.terms : [...e.terms, number(e.constant)];
}

export function add(a: Expression, b: Expression): Expression {
  return sum([a, b]);
}

export function negate(e: Expression): Expression {
  return scale(Q.MINUS_ONE, e);
}

export function subtract(a: Expression, b: Expression): Expression {
  return sum([a, negate(b)]);
}

/** e as base^exponent; the base is e itself where e is no power. */
export function splitPower(e: Expression): { base: Expression; exponent: Expression } {
  return e.kind === 'power' ? { base: e.base, exponent: e.exponent } : { base: e, exponent: one };
}

/**
 * The positive rational content of a sum: the greatest number that divides all its coefficients.
 * In products and powers sums stand without it, so that 2x + 2y and x + y are seen to be one base.
 * Where a sum has logarithms, theirs alone count: 3N + 2N ln x is 2N (3/2 + ln x) to everybody.
 */
function contentOf(e: Extract<Expression, { kind: 'sum' }>): Rational {
  const logarithmic = e.terms.filter(hasLogarithm);
  let content: Rational | undefined;
  for (const term of logarithmic.length > 0 ? logarithmic : e.terms) {
    const { coefficient } = splitCoefficient(term);
    content = content ? Q.contentGcd(content, coefficient) : coefficient;
  }
  if (logarithmic.length === 0 && content && !Q.isZero(e.constant)) {
    content = Q.contentGcd(content, e.constant);
  }
  const found = content ?? Q.ONE;
  return Q.sign(found) < 0 ? Q.negate(found) : found;
}

function hasLogarithm(term: Expression): boolean {
  if (term.kind === 'product') return term.factors.some(hasLogarithm);
  return term.kind === 'call' && term.name === 'ln';
}

/** The product of any number of expressions; 1 for none. */
export function product(multiplicands: readonly Expression[]): Expression {
  let coefficient = Q.ONE;
  const exponents = new Map<Expression, Expression[]>();
  const exponentials: Expression[] = [];
  const collect = (e: Expression): void => {
    if (e.kind === 'number') {
      coefficient = Q.multiply(coefficient, e.value);
    } else if (e.kind === 'product') {
      coefficient = Q.multiply(coefficient, e.coefficient);
      for (const factor of e.factors) collect(factor);
    } else if (e.kind === 'call' && e.name === 'exp' && e.arguments[0]) {
      exponentials.push(e.arguments[0]);
    } else if (e.kind === 'sum') {
      const content = contentOf(e);
      coefficient = Q.multiply(coefficient, content);
      gather(scale(Q.invert(content), e), one);
    } else {
      const { base, exponent } = splitPower(e);
      gather(base, exponent);
    }
  };
  const gather = (base: Expression, exponent: Expression): void => {
    const known = exponents.get(base);
    if (known) known.push(exponent);
    else exponents.set(base, [exponent]);
  };
  for (const e of multiplicands) collect(e);
  if (Q.isZero(coefficient)) return zero;

  const factors: Expression[] = [];
  // Adding exponents can turn a factor into a number (2^(1/2)·2^(1/2)) or a product; then once more.
  let settled = true;
  const place = (e: Expression): void => {
    if (e.kind === 'number') coefficient = Q.multiply(coefficient, e.value);
    else if (e.kind === 'product') {
      settled = false;
      factors.push(e);
    } else factors.push(e);
  };
  for (const [base, list] of exponents) {
    const [first] = list;
    place(list.length === 1 && first ? rawPower(base, first) : power(base, sum(list)));
  }
  if (exponentials.length > 0) place(exp(sum(exponentials)));
  if (!settled) return product([number(coefficient), ...factors]);
  return fromFactors(coefficient, factors.sort(compareExpressions));
}

export function multiply(a: Expression, b: Expression): Expression {
  return product([a, b]);
}

export function divide(a: Expression, b: Expression): Expression {
  return product([a, power(b, minusOne)]);
}

function rawPower(base: Expression, exponent: Expression): Expression {
  return exponent === one ? base : intern({ kind: 'power', base, exponent });
}

/** Square and higher perfect factors are looked for up to this prime; larger ones stay inside. */
const LARGEST_ROOT_FACTOR = 97n;

/** n^(1/root) = outside · inside^(1/root) with the perfect powers of small primes taken out. */
function extractRoot(n: bigint, root: bigint): { outside: bigint; inside: bigint } {
  let outside = 1n;
  let inside = 1n;
  let rest = n;
  for (let prime = 2n; prime <= LARGEST_ROOT_FACTOR && prime * prime <= rest; prime++) {
    let multiplicity = 0n;
    while (rest % prime === 0n) {
      rest /= prime;
      multiplicity++;
    }
    outside *= prime ** (multiplicity / root);
    inside *= prime ** (multiplicity % root);
  }
  const whole = BigInt(Math.round(Number(rest) ** (1 / Number(root))));
  if (whole > 1n && whole ** root === rest) return { outside: outside * whole, inside };
  return { outside, inside: inside * rest };
}

/** r^(p/q) for positive r: the rational part is taken out, √8 = 2·√2. */
function numberPower(base: Rational, exponent: Rational): Expression {
  if (Q.isInteger(exponent)) return number(Q.power(base, Number(exponent.numerator)));
  const whole = Q.floor(exponent);
  const rest = Q.subtract(exponent, Q.rational(whole));
  const root = rest.denominator;
  if (root > 24n) return rawPower(number(base), number(exponent));
  // b^(p/q) = (n d^(q−1))^(p/q) / d^p keeps the root over a whole number.
  const inner = extractRoot(
    (base.numerator * base.denominator ** (root - 1n)) ** rest.numerator,
    root,
  );
  const outside = Q.multiply(
    Q.power(base, Number(whole)),
    Q.rational(inner.outside, base.denominator ** rest.numerator),
  );
  if (inner.inside === 1n) return number(outside);
  // Roots of equal powers again: 4^(1/4) is 2^(1/2).
  let inside = inner.inside;
  let degree = root;
  for (let p = 2n; p <= degree; p++) {
    while (degree % p === 0n) {
      const r = BigInt(Math.round(Number(inside) ** (1 / Number(p))));
      if (r ** p !== inside) break;
      inside = r;
      degree /= p;
    }
  }
  const radical = rawPower(integer(inside), fraction(1n, degree));
  return Q.isOne(outside)
    ? radical
    : intern({ kind: 'product', coefficient: outside, factors: [radical] });
}

/** An integer power above this is not multiplied out for numbers: 2^(10^9) would fill the memory. */
const LARGEST_NUMBER_EXPONENT = 4096n;

/**
 * base^exponent. 0^0 is 1 as usual in sums. Throws RangeError for 0 to a negative power: whoever
 * builds from a user's text asks first.
 */
export function power(base: Expression, exponent: Expression): Expression {
  if (exponent === zero) return one;
  if (exponent === one) return base;
  if (base === one) return one;
  if (exponent.kind === 'number') {
    const e = exponent.value;
    if (base.kind === 'number') {
      if (base === zero) {
        if (Q.sign(e) > 0) return zero;
        throw new RangeError('division by zero');
      }
      const size = e.numerator < 0n ? -e.numerator : e.numerator;
      if (size <= LARGEST_NUMBER_EXPONENT) {
        if (Q.sign(base.value) > 0) return numberPower(base.value, e);
        if (Q.isInteger(e)) return number(Q.power(base.value, Number(e.numerator)));
      }
      return rawPower(base, exponent);
    }
    if (Q.isInteger(e)) {
      if (base.kind === 'product') {
        const n = Number(e.numerator);
        return product([
          number(Q.power(base.coefficient, n)),
          ...base.factors.map((factor) => power(factor, exponent)),
        ]);
      }
      if (base.kind === 'power') return power(base.base, multiply(base.exponent, exponent));
    }
  }
  if (base.kind === 'call' && base.name === 'exp' && base.arguments[0]) {
    return exp(multiply(base.arguments[0], exponent));
  }
  if (base.kind === 'power' && isPositive(base.base)) {
    return power(base.base, multiply(base.exponent, exponent));
  }
  if (base.kind === 'product') {
    // (x y)^r = x^r y^r where all but one factor are known to be positive.
    const positive = base.factors.filter(isPositive);
    const others = base.factors.filter((factor) => !isPositive(factor));
    const rest = others.length === 0 ? one : fromFactors(Q.ONE, others);
    const isNegative = Q.sign(base.coefficient) < 0;
    if (others.length === 0 && !isNegative) {
      return product([
        power(number(base.coefficient), exponent),
        ...positive.map((factor) => power(factor, exponent)),
      ]);
    }
    const magnitude = isNegative ? Q.negate(base.coefficient) : base.coefficient;
    if (positive.length > 0 || !Q.isOne(magnitude)) {
      return product([
        power(number(magnitude), exponent),
        ...positive.map((factor) => power(factor, exponent)),
        rawPower(isNegative ? negate(rest) : rest, exponent),
      ]);
    }
  }
  if (base.kind === 'sum') {
    const content = contentOf(base);
    if (!Q.isOne(content)) {
      return product([
        power(number(content), exponent),
        rawPower(scale(Q.invert(content), base), exponent),
      ]);
    }
  }
  return rawPower(base, exponent);
}

export function square(e: Expression): Expression {
  return power(e, two);
}

export function sqrt(e: Expression): Expression {
  return power(e, half);
}

/** exp(x); exp(0) = 1, exp(ln x) = x, and a sum's logarithms leave the exponent. */
export function exp(x: Expression): Expression {
  if (x === zero) return one;
  const terms = x.kind === 'sum' ? [...x.terms, number(x.constant)] : [x];
  const outside: Expression[] = [];
  const inside: Expression[] = [];
  for (const term of terms) {
    const factors: readonly Expression[] = term.kind === 'product' ? term.factors : [term];
    const logarithm = factors.find((f) => f.kind === 'call' && f.name === 'ln');
    if (logarithm?.kind === 'call' && logarithm.arguments[0]) {
      const { coefficient } = splitCoefficient(term);
      const rest = factors.filter((f) => f !== logarithm);
      outside.push(power(logarithm.arguments[0], product([number(coefficient), ...rest])));
    } else {
      inside.push(term);
    }
  }
  if (outside.length === 0) return intern({ kind: 'call', name: 'exp', arguments: [x] });
  return product([exp(sum(inside)), ...outside]);
}

/** ln x; ln 1 = 0, ln exp x = x. Throws RangeError for ln 0. */
export function ln(x: Expression): Expression {
  if (x === one) return zero;
  if (x === zero) throw new RangeError('the logarithm of zero');
  if (x.kind === 'call' && x.name === 'exp' && x.arguments[0]) return x.arguments[0];
  return intern({ kind: 'call', name: 'ln', arguments: [x] });
}

const ODD: ReadonlySet<FunctionName> = new Set([
  'sinh',
  'tanh',
  'coth',
  'sin',
  'tan',
  'arcsinh',
  'arctanh',
  'erf',
]);
const EVEN: ReadonlySet<FunctionName> = new Set(['cosh', 'cos', 'abs']);

/**
 * A function of its arguments, with the values that are exact whatever the rest: f(0), and the
 * sign taken out of odd and even functions.
 */
export function call(name: FunctionName, args: readonly Expression[]): Expression {
  const [x] = args;
  if (!x) throw new RangeError(`${name} needs an argument`);
  if (name === 'exp') return exp(x);
  if (name === 'ln') return ln(x);
  if (name === 'log10') return divide(ln(x), ln(integer(10)));
  if (name === 'abs' && isPositive(x)) return x;
  const isNegative =
    (x.kind === 'number' && Q.sign(x.value) < 0) ||
    (x.kind === 'product' && Q.sign(x.coefficient) < 0);
  if (isNegative && args.length === 1) {
    if (ODD.has(name)) return negate(call(name, [negate(x)]));
    if (EVEN.has(name)) return call(name, [negate(x)]);
  }
  if (x === zero) {
    if (name === 'cosh' || name === 'cos') return one;
    if (name !== 'coth' && (ODD.has(name) || name === 'abs')) return zero;
  }
  if (name === 'factorial' && x.kind === 'number' && Q.isInteger(x.value)) {
    const n = x.value.numerator;
    if (n >= 0n && n <= 100n) {
      let value = 1n;
      for (let i = 2n; i <= n; i++) value *= i;
      return integer(value);
    }
  }
  if (name === 'binomial' && args[1]?.kind === 'number' && Q.isInteger(args[1].value)) {
    const lower = args[1].value.numerator;
    // binomial(n, j) = n (n − 1) … (n − j + 1)/j! for a small whole j.
    if (lower >= 0n && lower <= 12n) {
      const factors: Expression[] = [];
      for (let i = 0n; i < lower; i++) {
        factors.push(divide(subtract(x, integer(i)), integer(i + 1n)));
      }
      return product(factors);
    }
  }
  return intern({ kind: 'call', name, arguments: args });
}

/** Σ over the integer `variable` from `from` to `to`; an empty or constant body is summed at once. */
export function summation(
  variable: SymbolNode,
  from: Expression,
  to: Expression,
  body: Expression,
): Expression {
  if (body === zero) return zero;
  return intern({ kind: 'summation', variable, from, to, body });
}

/** Π over the integer `variable` from `from` to `to`. */
export function productOver(
  variable: SymbolNode,
  from: Expression,
  to: Expression,
  body: Expression,
): Expression {
  if (body === one) return one;
  return intern({ kind: 'productOver', variable, from, to, body });
}

/** ∫ body d variable between the ends. */
export function integral(
  variable: SymbolNode,
  from: Expression,
  to: Expression,
  body: Expression,
): Expression {
  if (body === zero || from === to) return zero;
  return intern({ kind: 'integral', variable, from, to, body });
}

/** The value of the first branch whose condition holds, else `otherwise`. */
export function piecewise(
  branches: readonly { readonly condition: Relation; readonly value: Expression }[],
  otherwise: Expression,
): Expression {
  if (branches.every(({ value }) => value === otherwise)) return otherwise;
  return intern({ kind: 'piecewise', branches, otherwise });
}

/** The element of a list of numbers at an index counted from 1. */
export function element(list: string, values: readonly Rational[], index: Expression): Expression {
  if (index.kind === 'number' && Q.isInteger(index.value)) {
    const value = values[Number(index.value.numerator) - 1];
    if (value) return number(value);
  }
  return intern({ kind: 'element', list, values, index });
}
