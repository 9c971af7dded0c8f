/**
 * Products as fractions: negative powers below the bar, the minus sign in front, the rational
 * factor where it reads best, and fractional powers with a common exponent gathered, so that
 * √2 π^(1/2) m^(1/2) is √(2 π m) again.
 */
import { negate, number as constant, one, product, splitPower } from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { isPositive } from '../algebra/sign.ts';
import type { Arranged } from './arranged.ts';
import type { NameStyle } from './nameStyle.ts';
import { asDecimal } from './numerals.ts';
import { isBelow, placeOf, PLACE_OF_GATHERED, PLACE_OF_ROOT } from './readingOrder.ts';

type ProductNode = Extract<Expression, { kind: 'product' | 'power' }>;
type Inner = (e: Expression) => Arranged;

interface Factor {
  readonly base: Expression;
  /** Without its minus sign: the side of the bar says it. */
  readonly exponent: Expression;
}

/** Something to stand in a product, with its place there. */
interface Placed {
  readonly place: number;
  readonly hash: number;
  readonly arranged: Arranged;
}

/** Factors, each to the same fractional or symbolic power, with a number among them. */
interface Gathered {
  readonly exponent: Expression;
  number: Rational;
  readonly above: Factor[];
  readonly below: Factor[];
}

/** Arranges a product or power; `inner` arranges its parts. */
export function arrangeProduct(e: ProductNode, style: NameStyle, inner: Inner): Arranged {
  let coefficient = e.kind === 'product' ? e.coefficient : Q.ONE;
  const isNegative = Q.sign(coefficient) < 0;
  if (isNegative) coefficient = Q.negate(coefficient);
  const above: Factor[] = [];
  const below: Factor[] = [];
  let numberRoot: Factor | undefined;
  for (const factor of e.kind === 'product' ? e.factors : [e]) {
    const { base, exponent } = splitPower(factor);
    if (!numberRoot && isNumberRoot(base, exponent)) numberRoot = { base, exponent };
    else if (isBelow(exponent)) below.push({ base, exponent: negate(exponent) });
    else above.push({ base, exponent });
  }

  const groups = gather(above, below);
  if (numberRoot) coefficient = placeNumberRoot(coefficient, numberRoot, groups, above, below);
  const numerator = above.map((factor) => placeFactor(factor, style, inner));
  const denominator = below.map((factor) => placeFactor(factor, style, inner));
  for (const group of groups) placeGroup(group, numerator, denominator, style, inner);
  return withSign(isNegative, asFraction(coefficient, inPlace(numerator), inPlace(denominator)));
}

function asFraction(
  coefficient: Rational,
  numerator: readonly Arranged[],
  denominator: readonly Arranged[],
): Arranged {
  const front: readonly Arranged[] = Q.isOne(coefficient)
    ? []
    : [{ kind: 'number', value: coefficient }];
  // 3/2 N k T keeps its number in front; with something else below the bar it joins the fraction,
  // and √3/2 is a fraction in any case.
  const [only] = numerator;
  const isRootOfNumber =
    numerator.length === 1 && only?.kind === 'root' && only.inside.kind === 'number';
  if (denominator.length === 0 && !(isRootOfNumber && coefficient.denominator !== 1n)) {
    return asProduct([...front, ...numerator]);
  }
  if (asDecimal(coefficient)) {
    return {
      kind: 'fraction',
      above: asProduct([...front, ...numerator]),
      below: asProduct(denominator),
    };
  }
  const top = Q.rational(coefficient.numerator);
  const bottom = Q.rational(coefficient.denominator);
  return {
    kind: 'fraction',
    above: asProduct(Q.isOne(top) ? numerator : [{ kind: 'number', value: top }, ...numerator]),
    below: asProduct(
      Q.isOne(bottom) ? denominator : [{ kind: 'number', value: bottom }, ...denominator],
    ),
  };
}

function withSign(isNegative: boolean, inside: Arranged): Arranged {
  return isNegative ? { kind: 'negative', inside } : inside;
}

function asProduct(factors: readonly Arranged[]): Arranged {
  const [first] = factors;
  if (!first) return { kind: 'number', value: Q.ONE };
  return factors.length === 1 ? first : { kind: 'product', factors };
}

function inPlace(placed: readonly Placed[]): Arranged[] {
  return [...placed]
    .sort((a, b) => a.place - b.place || a.hash - b.hash)
    .map(({ arranged }) => arranged);
}

function placeFactor({ base, exponent }: Factor, style: NameStyle, inner: Inner): Placed {
  if (isHalf(exponent)) {
    // √2 x, but x √y.
    const place = base.kind === 'number' ? placeOf(base, style) : PLACE_OF_ROOT;
    return { place, hash: base.hash, arranged: { kind: 'root', inside: inner(base) } };
  }
  const isPlain = exponent.kind === 'number' && Q.isOne(exponent.value);
  return {
    place: placeOf(base, style),
    hash: base.hash,
    arranged: isPlain
      ? inner(base)
      : { kind: 'power', base: inner(base), exponent: inner(exponent) },
  };
}

/** n^(1/d) for whole n: what canonical form leaves of √8 and √(2/3). */
function isNumberRoot(base: Expression, exponent: Expression): boolean {
  return (
    base.kind === 'number' &&
    Q.isInteger(base.value) &&
    exponent.kind === 'number' &&
    exponent.value.numerator === 1n &&
    exponent.value.denominator !== 1n
  );
}

function isHalf(exponent: Expression): boolean {
  return exponent.kind === 'number' && Q.equals(exponent.value, Q.HALF);
}

function isWhole(exponent: Expression): boolean {
  return exponent.kind === 'number' && Q.isInteger(exponent.value);
}

/**
 * Takes out of both sides what shares a fractional or symbolic exponent. (x y)^r is x^r y^r for
 * positive factors only, so at most one of a group may be of unknown sign.
 */
function gather(above: Factor[], below: Factor[]): Gathered[] {
  const groups = new Map<Expression, Gathered>();
  const take = (side: 'above' | 'below', factors: Factor[]): void => {
    const kept = factors.filter((factor) => {
      const { base, exponent } = factor;
      if (isWhole(exponent) || base.kind === 'number') return true;
      let group = groups.get(exponent);
      if (!group) groups.set(exponent, (group = { exponent, number: Q.ONE, above: [], below: [] }));
      const isOpen = [...group.above, ...group.below].every((other) => isPositive(other.base));
      if (!isOpen && !isPositive(base)) return true;
      group[side].push(factor);
      return false;
    });
    factors.splice(0, factors.length, ...kept);
  };
  take('above', above);
  take('below', below);
  return [...groups.values()];
}

/**
 * Finds the place of a root of a number, r^(1/d): joined to a group of like exponent (√2/2 · h/√m
 * is h/√(2 m)), or alone above or below the bar, whichever leaves the shortest numbers. Returns
 * the rational factor that remains.
 */
function placeNumberRoot(
  coefficient: Rational,
  root: Factor,
  groups: readonly Gathered[],
  above: Factor[],
  below: Factor[],
): Rational {
  const r = (root.base as Extract<Expression, { kind: 'number' }>).value;
  const exponent = (root.exponent as Extract<Expression, { kind: 'number' }>).value;
  const choices: { cost: number; coefficient: Rational; apply: () => void }[] = [];
  const offer = (c: Rational, inside: Rational, extra: number, apply: () => void): void => {
    choices.push({ cost: lengthOf(c) + lengthOf(inside) + extra, coefficient: c, apply });
  };
  for (const group of groups) {
    if (group.exponent.kind !== 'number') continue;
    // A number in a group above stands there to the power p/d, in one below to −p/d.
    const p = Q.divide(group.exponent.value, exponent);
    if (!Q.isInteger(p)) continue;
    const isAbove = group.above.length > 0;
    const degree = Number(exponent.denominator);
    const signs = [isAbove ? 1 : 0, group.below.length > 0 ? -1 : 0].filter((sign) => sign !== 0);
    for (const sign of signs) {
      const set = (inside: Rational) => (): void => {
        group.number = sign === (isAbove ? 1 : -1) ? inside : Q.invert(inside);
      };
      // r^(1/d) = r^(±p/d) · r^((1 ∓ p)/d), where the last is a whole power.
      const rest = Q.divide(Q.subtract(Q.ONE, Q.multiply(Q.rational(sign), p)), Q.rational(degree));
      if (Q.isInteger(rest)) {
        offer(Q.multiply(coefficient, Q.power(r, Number(rest.numerator))), r, 0, set(r));
      }
      // Everything inside: (c^d r)^(±1/p).
      const all = wholeRoot(Q.multiply(Q.power(coefficient, degree), r), Number(p.numerator));
      if (all) {
        const inside = sign > 0 ? all : Q.invert(all);
        const mayBeFraction = group.above.length > 0 && group.below.length > 0;
        if (Q.isInteger(inside) || mayBeFraction) offer(Q.ONE, inside, 0, set(inside));
      }
    }
  }
  offer(coefficient, r, 2, () => above.push(root));
  if (isHalf(root.exponent)) {
    offer(Q.multiply(coefficient, r), r, 2, () => below.push(root));
  }
  let best = choices[0];
  for (const choice of choices) if (best && choice.cost < best.cost) best = choice;
  best?.apply();
  return best?.coefficient ?? coefficient;
}

/** Characters of a factor; 1 is not written. */
function lengthOf(r: Rational): number {
  if (Q.isOne(r)) return 0;
  const top = r.numerator === 1n ? 0 : String(r.numerator).length;
  return top + (r.denominator === 1n ? 0 : 1 + String(r.denominator).length);
}

/** The rational p-th root of a positive rational, if there is one. */
function wholeRoot(r: Rational, p: number): Rational | undefined {
  if (p === 1) return r;
  if (p < 1) return undefined;
  const root = (n: bigint): bigint | undefined => {
    const guess = BigInt(Math.round(Number(n) ** (1 / p)));
    return guess ** BigInt(p) === n ? guess : undefined;
  };
  const top = root(r.numerator);
  const bottom = root(r.denominator);
  return top !== undefined && bottom !== undefined ? Q.rational(top, bottom) : undefined;
}

/** Puts a gathered group where it belongs: on its sides of the bar, or as the root of a fraction. */
function placeGroup(
  group: Gathered,
  numerator: Placed[],
  denominator: Placed[],
  style: NameStyle,
  inner: Inner,
): void {
  const { exponent, number, above, below } = group;
  const isRoot = isHalf(exponent);
  const basesOf = (factors: readonly Factor[]): Arranged[] =>
    inPlace(factors.map(({ base }) => placeFactor({ base, exponent: one }, style, inner)));
  const placeFor = (factors: readonly Factor[], inside: Arranged): number => {
    if (isRoot) return PLACE_OF_ROOT;
    const [only] = factors;
    const isAlone = inside.kind !== 'product' && inside.kind !== 'fraction';
    return isAlone && only ? placeOf(only.base, style) : PLACE_OF_GATHERED;
  };
  const place = (factors: readonly Factor[], inside: Arranged): Placed => ({
    place: placeFor(factors, inside),
    hash: exponent.hash,
    arranged: isRoot
      ? { kind: 'root', inside }
      : { kind: 'power', base: inside, exponent: inner(exponent) },
  });

  const isSymbolic = exponent.kind !== 'number';
  // √(x/y) is x^½ y^(−½) for a positive y only.
  const mayShareRoot = below.every(({ base }) => isPositive(base));
  if (
    mayShareRoot &&
    above.length > 0 &&
    below.length > 0 &&
    (denominator.length === 0 || isSymbolic)
  ) {
    // √(5 k T/(3 m)), (σ/r)^n
    const inside = asFraction(number, basesOf(above), basesOf(below));
    numerator.push(place([...above, ...below], inside));
    return;
  }
  const insideOf = (factors: readonly Factor[], n: Rational): Arranged => {
    if (factors.some(({ base }) => base.kind === 'product' || base.kind === 'power')) {
      return inner(product([constant(n), ...factors.map(({ base }) => base)]));
    }
    const bases = basesOf(factors);
    return asProduct(Q.isOne(n) ? bases : [{ kind: 'number', value: n }, ...bases]);
  };
  if (above.length === 0) {
    denominator.push(place(below, insideOf(below, number)));
    return;
  }
  numerator.push(place(above, insideOf(above, Q.rational(number.numerator))));
  if (below.length > 0) {
    denominator.push(place(below, insideOf(below, Q.rational(number.denominator))));
  }
}
