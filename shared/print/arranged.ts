/**
 * Mathematics as it is read: fractions, differences, roots and minus signs, in reading order, before
 * any decision between TeX and plain text. `arrange.ts` makes these trees; the printers walk them.
 *
 *     N k T/(V − N b) − a N²/V²  →  sum [ fraction(product [N, k, T], sum [V, −product [N, b]]),
 *                                         −fraction(product [a, power(N, 2)], power(V, 2)) ]
 */
import type { FunctionName, Relation } from '../algebra/expression.ts';
import type { Rational } from '../algebra/rational.ts';

export type Arranged =
  /** Not negative; the sign stands in `negative` or in the term of a sum. */
  | { readonly kind: 'number'; readonly value: Rational }
  | { readonly kind: 'name'; readonly name: string }
  | { readonly kind: 'infinity' }
  | { readonly kind: 'negative'; readonly inside: Arranged }
  | { readonly kind: 'sum'; readonly terms: readonly ArrangedTerm[] }
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

export interface ArrangedTerm {
  readonly minus: boolean;
  /** Never `negative` itself. */
  readonly term: Arranged;
}

export interface ArrangedRelation {
  readonly left: Arranged;
  readonly sign: Relation['sign'];
  readonly right: Arranged;
}

/** What is said with a name, a list's element or a whole number, and so needs no delimiters. */
export function isShort(a: Arranged): boolean {
  return (
    a.kind === 'name' ||
    a.kind === 'element' ||
    a.kind === 'infinity' ||
    (a.kind === 'number' && a.value.denominator === 1n)
  );
}

/** Σ and Π read as far as the next plus or minus; an integral ends at its d. */
export function isOpenEnded(a: Arranged): boolean {
  switch (a.kind) {
    case 'summation':
    case 'productOver':
      return true;
    case 'product': {
      const last = a.factors[a.factors.length - 1];
      return last !== undefined && isOpenEnded(last);
    }
    default:
      return false;
  }
}
