/** Limits by expansion about the point. */
import {
  add,
  divide,
  infinity,
  negate,
  number,
  one,
  power,
  subtract,
  symbol,
  zero,
} from './construct.ts';
import { childrenOf, type Expression, type SymbolNode } from './expression.ts';
import * as Q from './rational.ts';
import { isExactZero, seriesIn } from './series.ts';
import { isPositive } from './sign.ts';
import { simplify } from './simplify.ts';
import { dependsOn, expandAbbreviations, substitute } from './traverse.ts';

/** Cancellation of leading terms is followed to this order before a limit is given up. */
const MOST_TERMS = 12;

/**
 * The limit of e as the symbol x tends to a value (from above) or to ±∞; ±∞ itself where e grows
 * with a sign that is known; undefined where it cannot be told.
 */
export function limitAt(e: Expression, x: SymbolNode, towards: Expression): Expression | undefined {
  const expanded = expandAbbreviations(e);
  if (!dependsOn(expanded, x)) return simplify(expanded);
  const t = symbol('small quantity', { positive: true });
  const root = number(Q.rational(leastRoot(expanded, x)));
  const small = power(t, root);
  const place =
    towards === infinity
      ? power(small, number(Q.MINUS_ONE))
      : towards === negate(infinity)
        ? negate(divide(one, small))
        : add(towards, small);
  const moved = substitute(expanded, new Map<Expression, Expression>([[x, place]]));
  for (let count = 2; count <= MOST_TERMS; count += 2) {
    const series = seriesIn(moved, t, count);
    if (!series) return undefined;
    const [lead] = series.coefficients;
    if (!lead) {
      if (isExactZero(series)) return zero;
      continue;
    }
    if (series.start > 0) return zero;
    const value = simplify(lead);
    if (series.start === 0) return value;
    if (isPositive(value)) return infinity;
    if (isPositive(simplify(subtract(zero, value)))) return negate(infinity);
    return undefined;
  }
  return undefined;
}

/** The least common denominator of the exponents of what varies with x. */
function leastRoot(e: Expression, x: SymbolNode): bigint {
  let root = 1n;
  const visit = (part: Expression): void => {
    if (!dependsOn(part, x)) return;
    if (part.kind === 'power' && part.exponent.kind === 'number') {
      const d = part.exponent.value.denominator;
      root = (root * d) / Q.gcd(root, d);
    }
    childrenOf(part).forEach(visit);
  };
  visit(e);
  return root;
}
