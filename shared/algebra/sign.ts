/**
 * What is known of the sign of an expression over the whole domain of a model.
 * `false` means "not known", never "negative".
 */
import type { Expression } from './expression.ts';
import { FUNCTIONS } from './functions.ts';
import * as Q from './rational.ts';

const known = new WeakMap<Expression, boolean>();

/** True where the expression is above zero whatever values its symbols take in the domain. */
export function isPositive(e: Expression): boolean {
  const remembered = known.get(e);
  if (remembered !== undefined) return remembered;
  const answer = decide(e);
  known.set(e, answer);
  return answer;
}

function decide(e: Expression): boolean {
  switch (e.kind) {
    case 'number':
      return Q.sign(e.value) > 0;
    case 'infinity':
      return true;
    case 'symbol':
      return e.positive;
    case 'abbreviation':
      return isPositive(e.definition);
    case 'sum':
      return Q.sign(e.constant) >= 0 && e.terms.every(isPositive);
    case 'product':
      return Q.sign(e.coefficient) > 0 && e.factors.every(isPositive);
    case 'power':
      // An even power is only known not to be negative: its base may vanish.
      return isPositive(e.base);
    case 'call':
      return FUNCTIONS[e.name].positive || (e.name === 'abs' && e.arguments.every(isPositive));
    case 'summation':
    case 'productOver':
    case 'integral':
      return e.kind !== 'integral' && isPositive(e.body);
    case 'piecewise':
      return isPositive(e.otherwise) && e.branches.every(({ value }) => isPositive(value));
    case 'element':
      return e.values.every((value) => Q.sign(value) > 0);
  }
}
