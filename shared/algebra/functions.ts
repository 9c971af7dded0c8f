/** What the algebra knows of each function by name; the derivatives stand in `differentiate.ts`. */
import type { FunctionName } from './expression.ts';

export interface FunctionFacts {
  /** How many arguments; undefined where any number from one up will do. */
  readonly arity: number | undefined;
  /** What it is called in prose. */
  readonly title: string;
  /** True where the value is above zero for all real arguments. */
  readonly positive: boolean;
  /** Names of the arguments as the reference shows them. */
  readonly parameters: readonly string[];
  /** False for what only the core itself writes (the derivative of digamma, say). */
  readonly writable: boolean;
}

function facts(
  title: string,
  parameters: readonly string[],
  more: Partial<FunctionFacts> = {},
): FunctionFacts {
  return { title, parameters, arity: parameters.length, positive: false, writable: true, ...more };
}

export const FUNCTIONS: Readonly<Record<FunctionName, FunctionFacts>> = {
  exp: facts('exponential function', ['x'], { positive: true }),
  ln: facts('natural logarithm', ['x']),
  log10: facts('decadic logarithm', ['x']),
  sinh: facts('hyperbolic sine', ['x']),
  cosh: facts('hyperbolic cosine', ['x'], { positive: true }),
  tanh: facts('hyperbolic tangent', ['x']),
  coth: facts('hyperbolic cotangent', ['x']),
  sin: facts('sine', ['x']),
  cos: facts('cosine', ['x']),
  tan: facts('tangent', ['x']),
  arcsinh: facts('inverse hyperbolic sine', ['x']),
  arctanh: facts('inverse hyperbolic tangent', ['x']),
  erf: facts('error function', ['x']),
  Gamma: facts('gamma function', ['x']),
  lnGamma: facts('logarithm of the gamma function', ['x']),
  digamma: facts('digamma function', ['x']),
  polygamma: facts('polygamma function', ['n', 'x'], { writable: false }),
  factorial: facts('factorial', ['n'], { positive: true, writable: false }),
  binomial: facts('binomial coefficient', ['n', 'k']),
  polylog: facts('polylogarithm', ['s', 'z']),
  besselI: facts('modified Bessel function of the first kind', ['n', 'x']),
  debye: facts('Debye function', ['n', 'x']),
  min: facts('smallest of the arguments', ['x', 'y'], { arity: undefined }),
  max: facts('largest of the arguments', ['x', 'y'], { arity: undefined }),
  abs: facts('absolute value', ['x']),
  heaviside: facts('Heaviside step function', ['x']),
  partial: facts('partial derivative of a property', ['X', 'Y', 'Z'], { arity: undefined }),
};

export function isFunctionName(name: string): name is FunctionName {
  return Object.hasOwn(FUNCTIONS, name);
}
