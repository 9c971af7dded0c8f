/**
 * Where an integrand changes its formula: at r = σ and r = λ σ for a square well. A rule of
 * quadrature keeps its digits only on pieces between such points.
 */
import { divide, negate, number, power, subtract } from '../algebra/construct.ts';
import { childrenOf, type Expression, type SymbolNode } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { dependsOn } from '../algebra/traverse.ts';

/** The values of the variable at which conditions, steps and kinks of the body may switch. */
export function breakpointsOf(body: Expression, variable: SymbolNode): Expression[] {
  const found = new Set<Expression>();
  const seen = new Set<Expression>();
  const add = (difference: Expression): void => {
    const zero = zeroOf(difference, variable);
    if (zero) found.add(zero);
  };
  const visit = (e: Expression): void => {
    if (seen.has(e) || !dependsOn(e, variable)) return;
    // A point that moves with another running variable is none of this integral's.
    if (e.kind === 'summation' || e.kind === 'productOver' || e.kind === 'integral') return;
    seen.add(e);
    if (e.kind === 'piecewise') {
      for (const { condition } of e.branches) add(subtract(condition.left, condition.right));
    } else if (e.kind === 'call') {
      const [first, ...others] = e.arguments;
      if (first && (e.name === 'heaviside' || e.name === 'abs')) add(first);
      if (first && (e.name === 'min' || e.name === 'max')) {
        for (const other of others) add(subtract(first, other));
      }
    }
    childrenOf(e).forEach(visit);
  };
  visit(body);
  return [...found];
}

/** The zero of c xⁿ + rest, where only one term holds the variable; undefined for other forms. */
function zeroOf(difference: Expression, variable: SymbolNode): Expression | undefined {
  const terms = difference.kind === 'sum' ? difference.terms : [difference];
  const [only, another] = terms.filter((term) => dependsOn(term, variable));
  if (!only || another) return undefined;
  const rest = subtract(difference, only);
  const factors = only.kind === 'product' ? only.factors : [only];
  const withVariable = factors.filter((factor) => dependsOn(factor, variable));
  const [factor] = withVariable;
  if (!factor || withVariable.length > 1) return undefined;
  const value = divide(negate(rest), divide(only, factor));
  if (factor === variable) return value;
  if (factor.kind !== 'power' || factor.base !== variable || factor.exponent.kind !== 'number') {
    return undefined;
  }
  // A value of 0 has no negative power.
  if (value.kind === 'number' && Q.sign(value.value) <= 0) return undefined;
  return power(value, number(Q.invert(factor.exponent.value)));
}
