/**
 * The value of an expression by plain recursion in doubles: slow, simple, and independent of the
 * project's own numerics, so that tests of the algebra do not lean on what they are to test.
 */
import type { Expression, Relation } from '../../../shared/algebra/expression.ts';
import { toNumber } from '../../../shared/algebra/rational.ts';

export function evaluatePlainly(e: Expression, values: Readonly<Record<string, number>>): number {
  const at = (part: Expression): number => evaluatePlainly(part, values);
  switch (e.kind) {
    case 'number':
      return toNumber(e.value);
    case 'infinity':
      return Infinity;
    case 'symbol':
      return e.name === 'pi' ? Math.PI : (values[e.name] ?? NaN);
    case 'abbreviation':
      return at(e.definition);
    case 'sum':
      return e.terms.reduce((total, term) => total + at(term), toNumber(e.constant));
    case 'product':
      return e.factors.reduce((total, factor) => total * at(factor), toNumber(e.coefficient));
    case 'power':
      return Math.pow(at(e.base), at(e.exponent));
    case 'call':
      return callValue(e.name, e.arguments.map(at));
    case 'piecewise':
      for (const { condition, value } of e.branches) if (holds(condition, at)) return at(value);
      return at(e.otherwise);
    case 'element':
      return toNumber(e.values[at(e.index) - 1] ?? { numerator: 0n, denominator: 1n });
    case 'summation':
    case 'productOver': {
      let result = e.kind === 'summation' ? 0 : 1;
      for (let i = at(e.from); i <= at(e.to); i++) {
        const term = evaluatePlainly(e.body, { ...values, [e.variable.name]: i });
        result = e.kind === 'summation' ? result + term : result * term;
      }
      return result;
    }
    case 'integral': {
      // Simpson's rule is enough for smooth bodies.
      const n = 400;
      const from = at(e.from);
      const step = (at(e.to) - from) / n;
      let result = 0;
      for (let i = 0; i <= n; i++) {
        const weight = i === 0 || i === n ? 1 : i % 2 ? 4 : 2;
        const x = from + i * step;
        result += weight * evaluatePlainly(e.body, { ...values, [e.variable.name]: x });
      }
      return (result * step) / 3;
    }
  }
}

function holds(condition: Relation, at: (e: Expression) => number): boolean {
  const left = at(condition.left);
  const right = at(condition.right);
  switch (condition.sign) {
    case '<':
      return left < right;
    case '<=':
      return left <= right;
    case '=':
      return left === right;
    case '>=':
      return left >= right;
    case '>':
      return left > right;
  }
}

function callValue(name: string, args: readonly number[]): number {
  const [x = NaN] = args;
  switch (name) {
    case 'exp':
      return Math.exp(x);
    case 'ln':
      return Math.log(x);
    case 'sinh':
      return Math.sinh(x);
    case 'cosh':
      return Math.cosh(x);
    case 'tanh':
      return Math.tanh(x);
    case 'coth':
      return 1 / Math.tanh(x);
    case 'sin':
      return Math.sin(x);
    case 'cos':
      return Math.cos(x);
    case 'tan':
      return Math.tan(x);
    case 'arcsinh':
      return Math.asinh(x);
    case 'arctanh':
      return Math.atanh(x);
    case 'abs':
      return Math.abs(x);
    case 'heaviside':
      return x >= 0 ? 1 : 0;
    case 'min':
      return Math.min(...args);
    case 'max':
      return Math.max(...args);
    default:
      return NaN;
  }
}
