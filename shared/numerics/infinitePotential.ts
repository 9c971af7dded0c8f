/** Hard walls: potentials that are infinite somewhere. */
import type { Expression } from '../algebra/expression.ts';

/**
 * True where the value may be infinite because the author wrote inf: cases { r < s: inf; … }. In
 * products with exp(−u) such an infinity counts as nothing, since the exponential outweighs powers.
 */
export function holdsInfinity(e: Expression): boolean {
  switch (e.kind) {
    case 'infinity':
      return true;
    case 'abbreviation':
      return holdsInfinity(e.definition);
    case 'sum':
      return e.terms.some(holdsInfinity);
    case 'product':
      return e.factors.some(holdsInfinity);
    case 'power':
      return holdsInfinity(e.base);
    case 'piecewise':
      return holdsInfinity(e.otherwise) || e.branches.some(({ value }) => holdsInfinity(value));
    default:
      return false;
  }
}
