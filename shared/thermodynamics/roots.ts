/**
 * Roots over the domain: √((V − N b)² x) is (V − N b) √x, since V − N b is positive there. The sums
 * that the domain keeps positive are replaced by positive symbols while canonical powers are taken.
 */
import { minusOne, negate, power, subtract, symbol } from '../algebra/construct.ts';
import { childrenOf, type Expression, type Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { rebuild, substitute } from '../algebra/traverse.ts';

/** Positive symbols for the sums that a domain keeps above zero. */
export function shieldOf(domain: readonly Relation[]): ReadonlyMap<Expression, Expression> {
  const shield = new Map<Expression, Expression>();
  domain.forEach((relation, i) => {
    const positive = positivePart(relation);
    if (positive) shield.set(positive, symbol(`positive quantity ${i}`, { positive: true }));
  });
  return shield;
}

/** The sum that a relation of the domain keeps above zero: V − N b of V > N b. */
function positivePart({ left, sign, right }: Relation): Expression | undefined {
  if (sign === '=') return undefined;
  const difference = sign === '>' || sign === '>=' ? subtract(left, right) : subtract(right, left);
  return difference.kind === 'sum' ? difference : undefined;
}

/** The expression with roots taken of what the domain keeps positive. */
export function takeOutOfRoots(
  e: Expression,
  shield: ReadonlyMap<Expression, Expression>,
): Expression {
  if (!hasRoot(e)) return e;
  const back = new Map([...shield].map(([sum, stand]) => [stand, sum]));
  return substitute(invertRoots(substitute(e, shield)), back);
}

/** √(1/x) is 1/√x: where one exists so does the other. */
function invertRoots(e: Expression): Expression {
  if (e.kind === 'abbreviation') return e;
  if (e.kind === 'power' && e.base.kind === 'power' && e.base.exponent === minusOne) {
    return power(invertRoots(e.base.base), negate(e.exponent));
  }
  return rebuild(e, invertRoots);
}

function hasRoot(e: Expression): boolean {
  if (e.kind === 'abbreviation') return false;
  if (e.kind === 'power' && e.exponent.kind === 'number' && !Q.isInteger(e.exponent.value)) {
    return true;
  }
  return childrenOf(e).some(hasRoot);
}
