/**
 * Any thermodynamic partial derivative from functions of the natural variables, by Jacobians:
 *
 *     (∂X/∂Y)_{Z…} = ∂(X, Z…)/∂(x…) / ∂(Y, Z…)/∂(x…)
 *
 * over those natural variables x that are not themselves held.
 * (H. B. Callen, Thermodynamics, 2nd ed. 1985, section 7-5.)
 */
import { add, divide, multiply, negate, zero } from '../algebra/construct.ts';
import { spend } from '../algebra/budget.ts';
import { differentiate } from '../algebra/differentiate.ts';
import type { Expression, SymbolNode } from '../algebra/expression.ts';

/** A derivative that does not exist for this model, with the reason as a sentence. */
export class NoSuchDerivative extends Error {
  override name = 'NoSuchDerivative';
}

/**
 * (∂of/∂by)_held for expressions in the natural variables, canonical but not simplified. As many
 * quantities are held as there are natural variables but one; fields that are not mentioned are
 * held. Throws NoSuchDerivative where the number is wrong or `by` cannot vary.
 */
export function partialDerivative(
  naturals: readonly SymbolNode[],
  of: Expression,
  by: Expression,
  held: readonly Expression[],
): Expression {
  const free = naturals.filter((x) => !held.includes(x));
  const conditions = held.filter((z) => !naturals.includes(z as SymbolNode));
  if (free.length !== conditions.length + 1) {
    const wanted = naturals.length - 1;
    throw new NoSuchDerivative(
      `A derivative of this model holds ${wanted} ${wanted === 1 ? 'quantity' : 'quantities'} constant, not ${held.length}.`,
    );
  }
  const [only] = free;
  if (conditions.length === 0 && only) {
    const slope = differentiate(by, only);
    if (slope === zero) throw new NoSuchDerivative('What it is taken by does not vary.');
    return divide(differentiate(of, only), slope);
  }
  const rows = conditions.map((z) => gradient(z, free));
  const below = determinant([gradient(by, free), ...rows]);
  if (below === zero) {
    throw new NoSuchDerivative('What it is taken by does not vary where the others are held.');
  }
  return divide(determinant([gradient(of, free), ...rows]), below);
}

function gradient(e: Expression, variables: readonly SymbolNode[]): Expression[] {
  return variables.map((x) => differentiate(e, x));
}

/** The determinant by its first row; rows of natural variables are mostly zero. */
function determinant(rows: readonly (readonly Expression[])[]): Expression {
  spend(1, 'a Jacobian');
  const [first, ...rest] = rows;
  if (!first) return zero;
  if (rest.length === 0) return first[0] ?? zero;
  return first.reduce<Expression>((total, entry, i) => {
    if (entry === zero) return total;
    const minor = determinant(rest.map((row) => row.filter((_, j) => j !== i)));
    const term = multiply(entry, minor);
    return add(total, i % 2 === 0 ? term : negate(term));
  }, zero);
}
