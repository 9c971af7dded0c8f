/**
 * Derivatives with respect to a symbol, by the rules of the calculus; results are canonical but not
 * simplified.
 */
import {
  add,
  call,
  divide,
  exp,
  fraction,
  half,
  integer,
  ln,
  minusOne,
  multiply,
  negate,
  number,
  one,
  pi,
  piecewise,
  integral,
  power,
  product,
  square,
  subtract,
  sum,
  summation,
  two,
  zero,
} from './construct.ts';
import type { CallNode, Expression, SymbolNode } from './expression.ts';
import { spend } from './budget.ts';
import { dependsOn, substitute } from './traverse.ts';

/** Asked for a derivative that has no closed form here, such as that of polylog by its order. */
export class NotDifferentiable extends Error {
  override name = 'NotDifferentiable';
}

const known = new WeakMap<SymbolNode, WeakMap<Expression, Expression>>();

/** ∂e/∂x, everything else constant. Throws NotDifferentiable. */
export function differentiate(e: Expression, x: SymbolNode): Expression {
  if (e === x) return one;
  if (!dependsOn(e, x)) return zero;
  let memory = known.get(x);
  if (!memory) known.set(x, (memory = new WeakMap()));
  const remembered = memory.get(e);
  if (remembered) return remembered;
  spend(1);
  const result = derive(e, x);
  memory.set(e, result);
  return result;
}

function derive(e: Expression, x: SymbolNode): Expression {
  switch (e.kind) {
    case 'number':
    case 'infinity':
    case 'symbol':
    case 'element':
      return zero;
    case 'abbreviation':
      return abbreviationDerivative(e, x);
    case 'sum':
      return sum(e.terms.map((term) => differentiate(term, x)));
    case 'product':
      return sum(
        e.factors.map((factor, i) => {
          const inner = differentiate(factor, x);
          if (inner === zero) return zero;
          return product([number(e.coefficient), inner, ...e.factors.filter((_, j) => j !== i)]);
        }),
      );
    case 'power':
      return powerDerivative(e.base, e.exponent, x);
    case 'call':
      return callDerivative(e, x);
    case 'summation':
      if (dependsOn(e.from, x) || dependsOn(e.to, x)) {
        throw new NotDifferentiable(
          `the ends of a sum over ${e.variable.name} vary with ${x.name}`,
        );
      }
      return summation(e.variable, e.from, e.to, differentiate(e.body, x));
    case 'productOver':
      if (dependsOn(e.from, x) || dependsOn(e.to, x)) {
        throw new NotDifferentiable(
          `the ends of a product over ${e.variable.name} vary with ${x.name}`,
        );
      }
      return multiply(e, summation(e.variable, e.from, e.to, logarithmicDerivative(e.body, x)));
    case 'integral':
      // Leibniz's rule: under the sign, and the integrand at each end that moves.
      return sum([
        integral(e.variable, e.from, e.to, differentiate(e.body, x)),
        endTerm(e, e.to, x),
        negate(endTerm(e, e.from, x)),
      ]);
    case 'piecewise':
      return piecewise(
        e.branches.map(({ condition, value }) => ({ condition, value: differentiate(value, x) })),
        differentiate(e.otherwise, x),
      );
  }
}

function endTerm(
  e: Extract<Expression, { kind: 'summation' | 'productOver' | 'integral' }>,
  end: Expression,
  x: SymbolNode,
): Expression {
  const speed = differentiate(end, x);
  if (speed === zero) return zero;
  return multiply(substitute(e.body, new Map<Expression, Expression>([[e.variable, end]])), speed);
}

/**
 * The derivative of Lambda = h (2π m k T)^(−1/2) is −Lambda/(2T): where the definition is a product,
 * the abbreviation times its logarithmic derivative keeps the author's name in the result.
 */
function abbreviationDerivative(
  e: Extract<Expression, { kind: 'abbreviation' }>,
  x: SymbolNode,
): Expression {
  const { definition } = e;
  const isProduct =
    definition.kind === 'product' ||
    definition.kind === 'power' ||
    (definition.kind === 'call' && definition.name === 'exp');
  return isProduct
    ? multiply(e, logarithmicDerivative(definition, x))
    : differentiate(definition, x);
}

/** (∂e/∂x)/e, factor by factor for products and powers. Throws NotDifferentiable. */
export function logarithmicDerivative(e: Expression, x: SymbolNode): Expression {
  if (!dependsOn(e, x)) return zero;
  if (e.kind === 'product') return sum(e.factors.map((factor) => logarithmicDerivative(factor, x)));
  if (e.kind === 'power' && !dependsOn(e.exponent, x)) {
    return multiply(e.exponent, logarithmicDerivative(e.base, x));
  }
  if (e.kind === 'call' && e.name === 'exp' && e.arguments[0]) {
    return differentiate(e.arguments[0], x);
  }
  if (e.kind === 'abbreviation' && e.definition.kind !== 'sum') {
    return logarithmicDerivative(e.definition, x);
  }
  return divide(differentiate(e, x), e);
}

function powerDerivative(base: Expression, exponent: Expression, x: SymbolNode): Expression {
  const whole = power(base, exponent);
  if (!dependsOn(exponent, x)) {
    return product([exponent, power(base, subtract(exponent, one)), differentiate(base, x)]);
  }
  return multiply(
    whole,
    add(
      multiply(differentiate(exponent, x), ln(base)),
      multiply(exponent, logarithmicDerivative(base, x)),
    ),
  );
}

function callDerivative(e: CallNode, x: SymbolNode): Expression {
  const [u, v] = e.arguments;
  if (!u) return zero;
  const chain = (outer: Expression, inner: Expression = u): Expression =>
    multiply(outer, differentiate(inner, x));
  switch (e.name) {
    case 'exp':
      return chain(e);
    case 'ln':
      return logarithmicDerivative(u, x);
    case 'log10':
      return divide(logarithmicDerivative(u, x), ln(integer(10)));
    case 'sinh':
      return chain(call('cosh', [u]));
    case 'cosh':
      return chain(call('sinh', [u]));
    case 'tanh':
    case 'coth':
      return chain(subtract(one, square(e)));
    case 'sin':
      return chain(call('cos', [u]));
    case 'cos':
      return chain(negate(call('sin', [u])));
    case 'tan':
      return chain(add(one, square(e)));
    case 'arcsinh':
      return chain(power(add(one, square(u)), fraction(-1, 2)));
    case 'arctanh':
      return chain(power(subtract(one, square(u)), minusOne));
    case 'erf':
      return chain(product([two, power(pi, fraction(-1, 2)), exp(negate(square(u)))]));
    case 'Gamma':
      return chain(multiply(e, call('digamma', [u])));
    case 'lnGamma':
      return chain(call('digamma', [u]));
    case 'digamma':
      return chain(call('polygamma', [one, u]));
    case 'factorial':
      return chain(multiply(e, call('digamma', [add(u, one)])));
    case 'polygamma':
      if (!v || dependsOn(u, x)) throw new NotDifferentiable('polygamma by its order');
      return chain(call('polygamma', [add(u, one), v]), v);
    case 'binomial': {
      // ln C(n, k) = ln Γ(n+1) − ln Γ(k+1) − ln Γ(n−k+1).
      if (!v) return zero;
      const psi = (argument: Expression): Expression =>
        multiply(call('digamma', [add(argument, one)]), differentiate(argument, x));
      return multiply(e, sum([psi(u), negate(psi(v)), negate(psi(subtract(u, v)))]));
    }
    case 'polylog':
      // z ∂Li_s(z)/∂z = Li_{s−1}(z) (DLMF 25.12.10 by the series).
      if (!v || dependsOn(u, x)) throw new NotDifferentiable('polylog by its order');
      return multiply(call('polylog', [subtract(u, one), v]), logarithmicDerivative(v, x));
    case 'besselI':
      // I_n' = (I_{n−1} + I_{n+1})/2 (DLMF 10.29.1).
      if (!v || dependsOn(u, x)) throw new NotDifferentiable('besselI by its order');
      return chain(
        multiply(
          half,
          add(call('besselI', [subtract(u, one), v]), call('besselI', [add(u, one), v])),
        ),
        v,
      );
    case 'debye':
      // D_n(x) = n/x^n ∫_0^x t^n/(e^t − 1) dt, so D_n' = n/(e^x − 1) − n D_n/x.
      if (!v || dependsOn(u, x)) throw new NotDifferentiable('debye by its order');
      return chain(multiply(u, subtract(power(subtract(exp(v), one), minusOne), divide(e, v))), v);
    case 'abs':
      return chain(subtract(multiply(two, call('heaviside', [u])), one));
    case 'heaviside':
      return zero;
    case 'min':
    case 'max':
      return extremumDerivative(e, x);
    case 'partial':
      throw new NotDifferentiable('a partial derivative that has not been worked out');
  }
}

/** The derivative of the argument that is the smallest (largest) one. */
function extremumDerivative(e: CallNode, x: SymbolNode): Expression {
  const [first, ...others] = e.arguments;
  if (!first) return zero;
  const rest = others.length === 0 ? undefined : call(e.name, others);
  if (!rest || others.length === 0) return differentiate(first, x);
  return piecewise(
    [
      {
        condition: { left: first, sign: e.name === 'min' ? '<=' : '>=', right: rest },
        value: differentiate(first, x),
      },
    ],
    differentiate(others.length === 1 && others[0] ? others[0] : rest, x),
  );
}

const FUNCTION_RULES: Partial<Record<CallNode['name'], string>> = {
  exp: 'exponential function',
  ln: 'logarithm',
};

/** The rules that ∂e/∂x uses, by their names, each once and outermost first. */
export function rulesUsed(e: Expression, x: SymbolNode): string[] {
  const rules = new Set<string>();
  const visit = (part: Expression): void => {
    if (part === x || !dependsOn(part, x)) return;
    switch (part.kind) {
      case 'sum':
        rules.add('sum');
        part.terms.forEach(visit);
        break;
      case 'product': {
        if (part.factors.filter((factor) => dependsOn(factor, x)).length > 1) rules.add('product');
        part.factors.forEach(visit);
        break;
      }
      case 'power':
        rules.add('power');
        visit(part.base);
        visit(part.exponent);
        break;
      case 'call':
        rules.add(FUNCTION_RULES[part.name] ?? part.name);
        for (const argument of part.arguments) {
          if (argument !== x && dependsOn(argument, x) && argument.kind !== 'product') {
            rules.add('chain rule');
          }
          visit(argument);
        }
        break;
      case 'abbreviation':
        rules.add('abbreviation');
        break;
      case 'summation':
        rules.add('sum under the sign');
        visit(part.body);
        break;
      case 'productOver':
        rules.add('product under the sign');
        visit(part.body);
        break;
      case 'integral':
        rules.add('Leibniz rule');
        visit(part.body);
        break;
      case 'piecewise':
        rules.add('branch by branch');
        part.branches.forEach(({ value }) => visit(value));
        visit(part.otherwise);
        break;
      case 'number':
      case 'infinity':
      case 'symbol':
      case 'element':
        break;
    }
  };
  visit(e);
  return [...rules];
}

/** ∂ⁿe/∂xⁿ for n ≥ 0. Throws NotDifferentiable. */
export function differentiateTimes(e: Expression, x: SymbolNode, n: number): Expression {
  let result = e;
  for (let i = 0; i < n; i++) result = differentiate(result, x);
  return result;
}
