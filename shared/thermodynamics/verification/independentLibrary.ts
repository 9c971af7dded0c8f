/**
 * Derivatives taken by an independent general-purpose library (mathjs). It is given trees built
 * node by node from our expressions, never a text, and its results are used as numbers only.
 */
import {
  absDependencies,
  acosDependencies,
  addDependencies,
  bignumberDependencies,
  asinhDependencies,
  atanhDependencies,
  ConstantNodeDependencies,
  coshDependencies,
  cosDependencies,
  cothDependencies,
  create,
  cschDependencies,
  derivativeDependencies,
  divideDependencies,
  expDependencies,
  FunctionNodeDependencies,
  log10Dependencies,
  logDependencies,
  multiplyDependencies,
  OperatorNodeDependencies,
  powDependencies,
  secDependencies,
  sechDependencies,
  sinDependencies,
  sinhDependencies,
  sqrtDependencies,
  subtractDependencies,
  SymbolNodeDependencies,
  tanDependencies,
  tanhDependencies,
  unaryMinusDependencies,
  type MathNode,
} from 'mathjs';
import type { Expression, FunctionName, SymbolNode } from '../../algebra/expression.ts';
import * as Q from '../../algebra/rational.ts';
import { expandAbbreviations, nodeCount } from '../../algebra/traverse.ts';
import { big, BIG_PI, bigOfRational, DIGITS, type BigNumber } from '../../numerics/bigNumber.ts';
import { known, type Approximate } from './approximate.ts';
import type { Jet } from './jet.ts';

/** Only what differentiates and evaluates; the library's parser is no part of the instance. */
const PARTS = [
  absDependencies,
  acosDependencies,
  addDependencies,
  bignumberDependencies,
  asinhDependencies,
  atanhDependencies,
  ConstantNodeDependencies,
  coshDependencies,
  cosDependencies,
  cothDependencies,
  cschDependencies,
  derivativeDependencies,
  divideDependencies,
  expDependencies,
  FunctionNodeDependencies,
  log10Dependencies,
  logDependencies,
  multiplyDependencies,
  OperatorNodeDependencies,
  powDependencies,
  secDependencies,
  sechDependencies,
  sinDependencies,
  sinhDependencies,
  sqrtDependencies,
  subtractDependencies,
  SymbolNodeDependencies,
  tanDependencies,
  tanhDependencies,
  unaryMinusDependencies,
].filter((part) => part !== undefined);

const math = create(Object.fromEntries(PARTS.map((part, i) => [String(i), part])), {
  number: 'BigNumber',
  precision: DIGITS,
});

export const LIBRARY = 'mathjs';

/** Larger trees are not given to the library: its second derivatives grow without sharing. */
const LARGEST_TREE = 400;

/** What the library cannot do with an expression, as a sentence. */
export class BeyondLibrary extends Error {
  override name = 'BeyondLibrary';
}

const FUNCTIONS: Partial<Record<FunctionName, string>> = {
  exp: 'exp',
  ln: 'log',
  sinh: 'sinh',
  cosh: 'cosh',
  tanh: 'tanh',
  coth: 'coth',
  sin: 'sin',
  cos: 'cos',
  tan: 'tan',
  arcsinh: 'asinh',
  arctanh: 'atanh',
  abs: 'abs',
};

/** Digits of the library's values that are relied on. */
const RELIABLE_DIGITS = 40;

/**
 * A function that gives ln Q with its first and second derivatives at values of all its symbols.
 * Throws BeyondLibrary where the library does not know a function or the tree is too large.
 */
export function jetByLibrary(
  f: Expression,
  naturals: readonly SymbolNode[],
): (values: ReadonlyMap<string, BigNumber>) => Jet {
  const expanded = expandAbbreviations(f);
  if (nodeCount(expanded) > LARGEST_TREE) {
    throw new BeyondLibrary(`the expression has more than ${LARGEST_TREE} nodes`);
  }
  const names = new Map<string, string>();
  const tree = build(expanded, names);
  const nameOf = (x: SymbolNode): string => names.get(x.name) ?? 'none';
  const by = (node: MathNode, x: SymbolNode): MathNode =>
    math.derivative(node, nameOf(x), { simplify: false });
  const first = naturals.map((x) => by(tree, x));
  const second = first.map((node, i) => naturals.slice(i).map((x) => by(node, x).compile()));
  const value = tree.compile();
  const gradient = first.map((node) => node.compile());
  return (values) => {
    const scope = new Map<string, unknown>();
    for (const [name, safe] of names) {
      // Numbers of one instance of the library are foreign to another: they pass as text.
      scope.set(safe, math.bignumber((values.get(name) ?? big(NaN)).toString()));
    }
    const at = (code: { evaluate(scope: Map<string, unknown>): unknown }): Approximate =>
      known(big(String(code.evaluate(scope))), RELIABLE_DIGITS);
    const upper = second.map((row) => row.map(at));
    return {
      value: at(value),
      gradient: gradient.map(at),
      hessian: naturals.map((_, i) =>
        naturals.map((__, j) => upper[Math.min(i, j)]?.[Math.abs(i - j)] ?? known(NaN)),
      ),
    };
  };
}

/** The tree, with symbols renamed x1, x2 … so that none is a name of the library's. */
function build(e: Expression, names: Map<string, string>): MathNode {
  const { ConstantNode, FunctionNode, OperatorNode, SymbolNode } = math;
  const constant = (value: BigNumber): MathNode =>
    new ConstantNode(math.bignumber(value.toString()) as unknown as number);
  const fold = (operator: '+' | '*', name: 'add' | 'multiply', parts: MathNode[]): MathNode => {
    const [first, ...rest] = parts;
    if (!first) return constant(big(operator === '+' ? 0 : 1));
    return rest.reduce<MathNode>(
      (left, right) => new OperatorNode(operator, name, [left, right]),
      first,
    );
  };
  switch (e.kind) {
    case 'number':
      return constant(bigOfRational(e.value));
    case 'symbol': {
      if (e.name === 'pi') return constant(BIG_PI);
      let safe = names.get(e.name);
      if (!safe) names.set(e.name, (safe = `x${names.size + 1}`));
      return new SymbolNode(safe);
    }
    case 'sum':
      return fold('+', 'add', [
        ...e.terms.map((term) => build(term, names)),
        ...(Q.isZero(e.constant) ? [] : [constant(bigOfRational(e.constant))]),
      ]);
    case 'product':
      return fold('*', 'multiply', [
        ...(Q.isOne(e.coefficient) ? [] : [constant(bigOfRational(e.coefficient))]),
        ...e.factors.map((factor) => build(factor, names)),
      ]);
    case 'power':
      return new OperatorNode('^', 'pow', [build(e.base, names), build(e.exponent, names)]);
    case 'call': {
      const name = FUNCTIONS[e.name];
      if (!name) throw new BeyondLibrary(`the library takes no derivative of ${e.name}`);
      return new FunctionNode(
        name,
        e.arguments.map((argument) => build(argument, names)),
      );
    }
    case 'summation':
      throw new BeyondLibrary('the library takes no derivative of sums over an index');
    case 'productOver':
      throw new BeyondLibrary('the library takes no derivative of products over an index');
    case 'integral':
      throw new BeyondLibrary('the library takes no derivative of integrals');
    case 'piecewise':
      throw new BeyondLibrary('the library takes no derivative of piecewise functions');
    default:
      throw new BeyondLibrary(`the library knows no ${e.kind}`);
  }
}
