/** Whether ln Q doubles when the system does, by Euler's theorem: f = Σ X ∂f/∂X over the sizes. */
import { add, ln, multiply, negate, one, subtract, sum } from '../algebra/construct.ts';
import { differentiate } from '../algebra/differentiate.ts';
import { isZero } from '../algebra/equality.ts';
import type { Expression, SymbolNode } from '../algebra/expression.ts';
import type { Model } from './model.ts';

export type Homogeneity = 'extensive' | 'not extensive' | 'undecided';

/** f − Σ X ∂f/∂X over the sizes of the system; zero for an extensive f. */
export function eulerDefect(f: Expression, sizes: readonly SymbolNode[]): Expression {
  return subtract(f, sum(sizes.map((size) => multiply(size, differentiate(f, size)))));
}

/** Decided exactly; a model with exact factorials is extensive only in the limit of large N. */
export function homogeneityOf(model: Model, f: Expression = model.f): Homogeneity {
  const sizes = extensiveVariables(model);
  if (sizes.length === 0) return 'undecided';
  const verdict = isZero(model.simplify(eulerDefect(f, sizes)));
  if (verdict === 'undecided') return 'undecided';
  return verdict === 'zero' ? 'extensive' : 'not extensive';
}

/** ln of the function after division by N! (by Stirling's formula) for every species. */
export function withFactorials(model: Model): Expression {
  return sum([
    model.f,
    ...model.surroundings.components.map(({ number }) =>
      multiply(number, add(one, negate(ln(number)))),
    ),
  ]);
}

/** The natural variables that double when the system does: numbers, extent and energy. */
export function extensiveVariables(model: Model): SymbolNode[] {
  return model.surroundings.naturals
    .filter(({ role }) => role === 'number' || role === 'extent' || role === 'energy')
    .map(({ symbol }) => symbol);
}
