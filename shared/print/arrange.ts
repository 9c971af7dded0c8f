/**
 * Expressions as they are read: fractions, roots, minus signs and the order that a colleague would
 * write, before any decision between TeX and plain text.
 */
import { splitPower } from '../algebra/construct.ts';
import type { Expression, FunctionName, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import type { NameStyle } from './nameStyle.ts';

export type Arranged =
  | { readonly kind: 'number'; readonly value: Rational }
  | { readonly kind: 'name'; readonly name: string }
  | { readonly kind: 'infinity' }
  | { readonly kind: 'negative'; readonly inside: Arranged }
  | { readonly kind: 'sum'; readonly terms: readonly { minus: boolean; term: Arranged }[] }
  | { readonly kind: 'product'; readonly factors: readonly Arranged[] }
  | { readonly kind: 'fraction'; readonly above: Arranged; readonly below: Arranged }
  | { readonly kind: 'power'; readonly base: Arranged; readonly exponent: Arranged }
  | { readonly kind: 'root'; readonly inside: Arranged }
  | { readonly kind: 'call'; readonly name: FunctionName; readonly arguments: readonly Arranged[] }
  | {
      readonly kind: 'summation' | 'productOver' | 'integral';
      readonly variable: string;
      readonly from: Arranged;
      readonly to: Arranged;
      readonly body: Arranged;
    }
  | {
      readonly kind: 'cases';
      readonly branches: readonly { condition: ArrangedRelation; value: Arranged }[];
      readonly otherwise: Arranged;
    }
  | { readonly kind: 'element'; readonly list: string; readonly index: Arranged };

export interface ArrangedRelation {
  readonly left: Arranged;
  readonly sign: Relation['sign'];
  readonly right: Arranged;
}

const ONE: Arranged = { kind: 'number', value: Q.ONE };

/** The expression in the order and the shape in which it is read. */
export function arrange(e: Expression, style: NameStyle): Arranged {
  const inner = (part: Expression): Arranged => arrange(part, style);
  switch (e.kind) {
    case 'number':
      return Q.sign(e.value) < 0
        ? { kind: 'negative', inside: { kind: 'number', value: Q.negate(e.value) } }
        : { kind: 'number', value: e.value };
    case 'infinity':
      return { kind: 'infinity' };
    case 'symbol':
    case 'abbreviation':
      return { kind: 'name', name: e.name };
    case 'sum':
      return arrangeSum(e, style);
    case 'product':
    case 'power':
      return arrangeProduct(e, style);
    case 'call':
      return { kind: 'call', name: e.name, arguments: e.arguments.map(inner) };
    case 'summation':
    case 'productOver':
    case 'integral':
      return {
        kind: e.kind,
        variable: e.variable.name,
        from: inner(e.from),
        to: inner(e.to),
        body: inner(e.body),
      };
    case 'piecewise':
      return {
        kind: 'cases',
        branches: e.branches.map(({ condition, value }) => ({
          condition: arrangeRelation(condition, style),
          value: inner(value),
        })),
        otherwise: inner(e.otherwise),
      };
    case 'element':
      return { kind: 'element', list: e.list, index: inner(e.index) };
  }
}

export function arrangeRelation(relation: Relation, style: NameStyle): ArrangedRelation {
  return {
    left: arrange(relation.left, style),
    sign: relation.sign,
    right: arrange(relation.right, style),
  };
}

interface Factor {
  readonly base: Expression;
  /** Positive: the side of the fraction bar says the sign. */
  readonly exponent: Expression;
}

function arrangeProduct(
  e: Extract<Expression, { kind: 'product' | 'power' }>,
  style: NameStyle,
): Arranged {
  let coefficient = e.kind === 'product' ? e.coefficient : Q.ONE;
  const isNegative = Q.sign(coefficient) < 0;
  if (isNegative) coefficient = Q.negate(coefficient);
  const above: Factor[] = [];
  const below: Factor[] = [];
  for (const factor of e.kind === 'product' ? e.factors : [e]) {
    const { base, exponent } = splitPower(factor);
    if (isBelow(exponent)) below.push({ base, exponent: negated(exponent) });
    else above.push({ base, exponent });
  }
  coefficient = moveNumberRoot(coefficient, above, below);
  const numerator = side(above, style);
  const denominator = side(below, style);
  const hasBelow = denominator.length > 0;
  // 3/2 N k T keeps its number in front; with something else below the bar it joins the fraction.
  if (!hasBelow) {
    const factors = Q.isOne(coefficient)
      ? numerator
      : [{ kind: 'number', value: coefficient } as const, ...numerator];
    return withSign(isNegative, asProduct(factors));
  }
  const top = Q.rational(coefficient.numerator);
  const bottom = Q.rational(coefficient.denominator);
  const fraction: Arranged = {
    kind: 'fraction',
    above: asProduct(
      Q.isOne(top) && numerator.length > 0
        ? numerator
        : [{ kind: 'number', value: top }, ...numerator],
    ),
    below: asProduct(
      Q.isOne(bottom) ? denominator : [{ kind: 'number', value: bottom }, ...denominator],
    ),
  };
  return withSign(isNegative, fraction);
}

function withSign(isNegative: boolean, inside: Arranged): Arranged {
  return isNegative ? { kind: 'negative', inside } : inside;
}

function asProduct(factors: readonly Arranged[]): Arranged {
  const [first] = factors;
  if (!first) return ONE;
  return factors.length === 1 ? first : { kind: 'product', factors };
}

function isBelow(exponent: Expression): boolean {
  return (
    (exponent.kind === 'number' && Q.sign(exponent.value) < 0) ||
    (exponent.kind === 'product' && Q.sign(exponent.coefficient) < 0)
  );
}

function negated(exponent: Expression): Expression {
  if (exponent.kind === 'number') return { ...exponent, value: Q.negate(exponent.value) };
  if (exponent.kind !== 'product') return exponent;
  const coefficient = Q.negate(exponent.coefficient);
  const [only] = exponent.factors;
  if (Q.isOne(coefficient) && exponent.factors.length === 1 && only) return only;
  return { ...exponent, coefficient };
}

/** √2/2 · h/√(π m k T) is h/√(2 π m k T): a root of a number joins the root that is there. */
function moveNumberRoot(coefficient: Rational, above: Factor[], below: Factor[]): Rational {
  if (!below.some(isSquareRoot)) return coefficient;
  const index = above.findIndex((factor) => isSquareRoot(factor) && factor.base.kind === 'number');
  const root = above[index];
  if (!root || root.base.kind !== 'number' || !Q.isInteger(root.base.value)) return coefficient;
  const n = root.base.value;
  if (coefficient.denominator % n.numerator !== 0n) return coefficient;
  above.splice(index, 1);
  below.push(root);
  return Q.multiply(coefficient, n);
}

function isSquareRoot({ exponent }: Factor): boolean {
  return exponent.kind === 'number' && Q.equals(exponent.value, Q.HALF);
}

/** The factors on one side of the bar in reading order, square roots under one sign. */
function side(factors: readonly Factor[], style: NameStyle): Arranged[] {
  const roots = factors.filter(isSquareRoot);
  const others = factors.filter((factor) => !isSquareRoot(factor));
  const result = inOrder(others, style).map(({ base, exponent }) =>
    exponent.kind === 'number' && Q.isOne(exponent.value)
      ? arrange(base, style)
      : ({
          kind: 'power',
          base: arrange(base, style),
          exponent: arrange(exponent, style),
        } as const),
  );
  if (roots.length > 0) {
    const inside = inOrder(roots, style).map(({ base }) => arrange(base, style));
    result.push({ kind: 'root', inside: asProduct(inside) });
  }
  return result;
}

function inOrder(factors: readonly Factor[], style: NameStyle): Factor[] {
  return factors
    .map((factor) => ({ factor, key: placeOf(factor.base, style) }))
    .sort((a, b) => a.key - b.key || a.factor.base.hash - b.factor.base.hash)
    .map(({ factor }) => factor);
}

/** Numbers, names by rank, differences and sums, functions, and operators with a body last. */
function placeOf(base: Expression, style: NameStyle): number {
  switch (base.kind) {
    case 'number':
      return -1;
    case 'symbol':
    case 'abbreviation':
      return base.name === 'pi' ? 0 : style.rankOf(base.name);
    case 'infinity':
    case 'element':
      return 1e4;
    case 'sum':
    case 'power':
    case 'product':
      return 2e4 + (base.kind === 'sum' ? base.terms.length : 0);
    case 'call':
      return base.name === 'exp' ? 4e4 : 3e4;
    case 'piecewise':
      return 5e4;
    case 'summation':
    case 'productOver':
    case 'integral':
      return 6e4;
  }
}

interface Term {
  readonly expression: Expression;
  readonly minus: boolean;
  readonly term: Arranged;
}

function arrangeSum(e: Extract<Expression, { kind: 'sum' }>, style: NameStyle): Arranged {
  const terms: Term[] = e.terms.map((expression) => {
    const arranged = arrange(expression, style);
    return arranged.kind === 'negative'
      ? { expression, minus: true, term: arranged.inside }
      : { expression, minus: false, term: arranged };
  });
  const { constant } = e;
  const number: { minus: boolean; term: Arranged } | undefined = Q.isZero(constant)
    ? undefined
    : {
        minus: Q.sign(constant) < 0,
        term: { kind: 'number', value: Q.sign(constant) < 0 ? Q.negate(constant) : constant },
      };
  const degrees = powersOfOneName(e);
  if (degrees) {
    const ascending = terms
      .map((term) => ({ ...term, degree: degrees.get(term.expression) ?? 0 }))
      .sort((a, b) => a.degree - b.degree);
    const all = number ? [number, ...ascending] : ascending;
    // 1 − η + η² from the lowest power up, but η − 1 and not −1 + η.
    const ordered = all[0]?.minus && !all[all.length - 1]?.minus ? [...all].reverse() : all;
    return { kind: 'sum', terms: ordered.map(({ minus, term }) => ({ minus, term })) };
  }
  const keyed = terms
    .map((term) => ({ ...term, key: termKey(term.expression, style) }))
    .sort(
      (a, b) =>
        Number(a.minus) - Number(b.minus) ||
        compareKeys(a.key, b.key) ||
        a.expression.hash - b.expression.hash,
    );
  const positive = keyed.filter(({ minus }) => !minus);
  const negative = keyed.filter(({ minus }) => minus);
  const ordered = [
    ...(number && !number.minus ? [number] : []),
    ...positive,
    ...negative,
    ...(number?.minus ? [number] : []),
  ];
  return { kind: 'sum', terms: ordered.map(({ minus, term }) => ({ minus, term })) };
}

/** For a polynomial in one name, the degree of each term; undefined for anything else. */
function powersOfOneName(
  e: Extract<Expression, { kind: 'sum' }>,
): Map<Expression, number> | undefined {
  const degrees = new Map<Expression, number>();
  let name: string | undefined;
  for (const term of e.terms) {
    const factors = term.kind === 'product' ? term.factors : [term];
    const [only] = factors;
    if (factors.length !== 1 || !only) return undefined;
    const { base, exponent } = splitPower(only);
    if (base.kind !== 'symbol' && base.kind !== 'abbreviation') return undefined;
    if (exponent.kind !== 'number' || (name !== undefined && name !== base.name)) return undefined;
    name = base.name;
    degrees.set(term, Q.toNumber(exponent.value));
  }
  return e.terms.length + (Q.isZero(e.constant) ? 0 : 1) > 1 ? degrees : undefined;
}

/** Terms without functions before terms with them, flat ones before fractions, then by names. */
function termKey(e: Expression, style: NameStyle): number[] {
  const factors = e.kind === 'product' ? e.factors : [e];
  const hasFunction = factors.some((factor) => splitPower(factor).base.kind === 'call') ? 1 : 0;
  const isFraction = factors.some((factor) => isBelow(splitPower(factor).exponent)) ? 1 : 0;
  const ranks = factors.map((factor) => placeOf(splitPower(factor).base, style));
  return [hasFunction, isFraction, ...ranks.sort((a, b) => a - b)];
}

function compareKeys(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < Math.max(a.length, b.length); i++) {
    const difference = (a[i] ?? -Infinity) - (b[i] ?? -Infinity);
    if (difference !== 0 && !Number.isNaN(difference)) return difference;
  }
  return 0;
}
