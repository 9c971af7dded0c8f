/** Where factors and terms stand in a product or a sum, as a colleague would write them. */
import { splitPower } from '../algebra/construct.ts';
import { childrenOf, type Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { NameStyle } from './nameStyle.ts';

/**
 * Places of factors from left to right. Names stand by their rank; a function follows everything
 * that its argument could swallow, and Σ and Π, which reach to the end of the product, come last.
 */
const PLACE = {
  number: -2,
  pi: -1,
  indexSum: 0.7,
  element: 1e5,
  sum: 2e5,
  root: 3e5,
  exponential: 4e5,
  call: 5e5,
  piecewise: 6e5,
  binding: 7e5,
} as const;

export const PLACE_OF_ROOT = PLACE.root;
export const PLACE_OF_GATHERED = PLACE.sum + 1;

/** The place of a factor with this base; a lower one is further left. */
export function placeOf(base: Expression, style: NameStyle): number {
  switch (base.kind) {
    case 'number':
      return PLACE.number;
    case 'symbol':
    case 'abbreviation':
      return base.name === 'pi' ? PLACE.pi : style.rankOf(base.name);
    case 'infinity':
    case 'element':
      return PLACE.element;
    case 'sum':
      // J (J + 1) Θ: what is made of a running index alone stays with the index.
      return isOfIndexAlone(base) ? PLACE.indexSum : PLACE.sum + base.terms.length;
    case 'power':
    case 'product':
      return PLACE.sum;
    case 'call':
      return base.name === 'exp' ? PLACE.exponential : PLACE.call;
    case 'piecewise':
      return PLACE.piecewise;
    case 'summation':
    case 'productOver':
    case 'integral':
      return PLACE.binding;
  }
}

function isOfIndexAlone(e: Expression): boolean {
  if (e.kind === 'symbol') return e.integer;
  if (e.kind === 'number') return true;
  return (e.kind === 'sum' || e.kind === 'product') && childrenOf(e).every(isOfIndexAlone);
}

/** True for what stands below the bar of a fraction: x^(−1), x^(−n). */
export function isBelow(exponent: Expression): boolean {
  return (
    (exponent.kind === 'number' && Q.sign(exponent.value) < 0) ||
    (exponent.kind === 'product' && Q.sign(exponent.coefficient) < 0)
  );
}

/**
 * The key by which the terms of a sum are compared: terms without functions before those with them,
 * flat ones before fractions, then by their names, and at last by ascending powers of these.
 */
export function keyOfTerm(e: Expression, style: NameStyle): readonly number[] {
  const factors = e.kind === 'product' ? e.factors : [e];
  let hasFunction = 0;
  let isFraction = 0;
  const placed = factors.map((factor): readonly [number, number] => {
    const { base, exponent } = splitPower(factor);
    if (base.kind === 'call' || base.kind === 'summation' || base.kind === 'integral') {
      hasFunction = 1;
    }
    if (isBelow(exponent)) isFraction = 1;
    return [placeOf(base, style), exponent.kind === 'number' ? Q.toNumber(exponent.value) : 0];
  });
  placed.sort((a, b) => a[0] - b[0]);
  return [
    hasFunction,
    isFraction,
    ...placed.map(([place]) => place),
    -Infinity,
    ...placed.map(([, exponent]) => exponent),
  ];
}

/** Compares two keys of terms; a key that is the beginning of the other comes first. */
export function compareKeys(a: readonly number[], b: readonly number[]): number {
  const shorter = Math.min(a.length, b.length);
  for (let i = 0; i < shorter; i++) {
    const [x = 0, y = 0] = [a[i], b[i]];
    if (x !== y) return x < y ? -1 : 1;
  }
  return a.length - b.length;
}

/**
 * For a sum that is a polynomial in one name, the power of each term and the name; undefined for
 * anything else.
 */
export function powersOfOneName(e: Extract<Expression, { kind: 'sum' }>):
  | {
      readonly powers: ReadonlyMap<Expression, number>;
      readonly isIndex: boolean;
    }
  | undefined {
  const powers = new Map<Expression, number>();
  let known: Expression | undefined;
  for (const term of e.terms) {
    const factors = term.kind === 'product' ? term.factors : [term];
    const [only] = factors;
    if (factors.length !== 1 || !only) return undefined;
    const { base, exponent } = splitPower(only);
    if (base.kind !== 'symbol' && base.kind !== 'abbreviation') return undefined;
    if (exponent.kind !== 'number' || (known !== undefined && known !== base)) return undefined;
    known = base;
    powers.set(term, Q.toNumber(exponent.value));
  }
  return { powers, isIndex: known?.kind === 'symbol' && known.integer };
}
