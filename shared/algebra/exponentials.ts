/** Functions by others of which they are made, so that what is independent is seen to be so. */
import {
  add,
  call,
  divide,
  exp,
  integer,
  ln,
  negate,
  number,
  one,
  power,
  subtract,
  two,
} from './construct.ts';
import type { CallNode, Expression } from './expression.ts';
import * as Q from './rational.ts';

/** Hyperbolic functions by exponentials, the rest by functions that are independent of each other. */
export function asExponentials(name: CallNode['name'], x: Expression): Expression | undefined {
  const plus = (): Expression => add(exp(x), exp(negate(x)));
  const minus = (): Expression => subtract(exp(x), exp(negate(x)));
  switch (name) {
    case 'cosh':
      return divide(plus(), two);
    case 'sinh':
      return divide(minus(), two);
    case 'tanh':
      return divide(minus(), plus());
    case 'coth':
      return divide(plus(), minus());
    case 'arctanh':
      return divide(subtract(ln(add(one, x)), ln(subtract(one, x))), two);
    case 'arcsinh':
      return ln(add(x, power(add(one, power(x, two)), number(Q.HALF))));
    case 'log10':
      return divide(ln(x), ln(integer(10)));
    case 'tan':
      return divide(call('sin', [x]), call('cos', [x]));
    default:
      return undefined;
  }
}
