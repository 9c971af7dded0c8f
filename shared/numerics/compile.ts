/**
 * Expressions compiled to a tape: a flat list of instructions over numbered registers, run by one
 * loop. Equal parts are computed once, numbers are folded beforehand, and no text ever becomes code,
 * so that it runs under a content security policy without eval.
 *
 *     p = N k T/(V − N b)  →  r4 = N·b;  r5 = V − r4;  r6 = N·k·T;  r7 = r6/r5
 */
import { splitPower } from '../algebra/construct.ts';
import type { Expression, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import {
  besselI,
  debyeFunction,
  digamma,
  erf,
  gamma,
  lnGamma,
  polygamma,
  polylogarithm,
} from './special/index.ts';
import { integrate } from './quadrature.ts';
import { sumSeries } from './sumSeries.ts';

/** Values of all outputs for values of all inputs, in the order in which they were given. */
export interface Compiled {
  (inputs: ArrayLike<number>): number[];
  /** The same without making an array: results go to `outputs`. */
  into(inputs: ArrayLike<number>, outputs: { [index: number]: number }): void;
  /**
   * A whole column of states at once: `columns[i]` holds the values of input i, `results[j]` takes
   * those of output j; a column of one value stands for all states.
   */
  columns(
    columns: readonly ArrayLike<number>[],
    results: readonly Float64Array[],
    count: number,
  ): void;
  /** How many instructions one state takes. */
  readonly instructionCount: number;
}

type Unary = (x: number) => number;
type Binary = (x: number, y: number) => number;

type Instruction =
  | {
      readonly op: 'add' | 'multiply' | 'divide' | 'subtract';
      readonly a: number;
      readonly b: number;
    }
  | { readonly op: 'whole power'; readonly a: number; readonly n: number }
  | { readonly op: 'unary'; readonly a: number; readonly f: Unary }
  | { readonly op: 'binary'; readonly a: number; readonly b: number; readonly f: Binary }
  | { readonly op: 'special'; readonly f: (inputs: ArrayLike<number>) => number };

const UNARY: Readonly<Record<string, Unary>> = {
  exp: Math.exp,
  ln: Math.log,
  log10: Math.log10,
  sinh: Math.sinh,
  cosh: Math.cosh,
  tanh: Math.tanh,
  coth: (x) => 1 / Math.tanh(x),
  sin: Math.sin,
  cos: Math.cos,
  tan: Math.tan,
  arcsinh: Math.asinh,
  arctanh: Math.atanh,
  erf,
  Gamma: gamma,
  lnGamma,
  digamma,
  factorial: (x) => gamma(x + 1),
  abs: Math.abs,
  heaviside: (x) => (x >= 0 ? 1 : 0),
};

const BINARY: Readonly<Record<string, Binary>> = {
  polygamma,
  polylog: polylogarithm,
  besselI,
  debye: debyeFunction,
  binomial: (n, k) => Math.exp(lnGamma(n + 1) - lnGamma(k + 1) - lnGamma(n - k + 1)),
  min: Math.min,
  max: Math.max,
};

/** ln(1 − e^u) without loss near u = 0 (M. Mächler, 2012). */
function lnOneMinusExp(u: number): number {
  return u > -Math.LN2 ? Math.log(-Math.expm1(u)) : Math.log1p(-Math.exp(u));
}

function wholePower(x: number, n: number): number {
  if (n < 0) return 1 / wholePower(x, -n);
  let result = 1;
  let square = x;
  for (let rest = n; rest > 0; rest >>= 1) {
    if (rest & 1) result *= square;
    square *= square;
  }
  return result;
}

class Compiler {
  readonly inputs: readonly string[];
  readonly instructions: Instruction[] = [];
  /** Registers: the inputs, then the constants and results in the order in which they came up. */
  readonly initial: number[];
  /** The register that each instruction writes. */
  readonly targets: number[] = [];
  private readonly registerOf = new Map<Expression, number>();
  private readonly constants = new Map<number, number>();

  constructor(inputs: readonly string[]) {
    this.inputs = inputs;
    this.initial = inputs.map(() => NaN);
  }

  register(e: Expression): number {
    const known = this.registerOf.get(e);
    if (known !== undefined) return known;
    const register = this.place(e);
    this.registerOf.set(e, register);
    return register;
  }

  private constant(value: number): number {
    const known = this.constants.get(value);
    if (known !== undefined) return known;
    const register = this.initial.push(value) - 1;
    this.constants.set(value, register);
    return register;
  }

  private isConstant(register: number): boolean {
    return this.constants.get(this.initial[register] ?? NaN) === register;
  }

  private emit(instruction: Instruction): number {
    // What depends on constants alone is computed now.
    if (instruction.op !== 'special') {
      const operands = 'b' in instruction ? [instruction.a, instruction.b] : [instruction.a];
      if (operands.every((operand) => this.isConstant(operand))) {
        const registers = Float64Array.from(this.initial);
        return this.constant(step(instruction, registers, []));
      }
    }
    const target = this.initial.push(NaN) - 1;
    this.instructions.push(instruction);
    this.targets.push(target);
    return target;
  }

  private unary(f: Unary, x: Expression): number {
    return this.emit({ op: 'unary', a: this.register(x), f });
  }

  private place(e: Expression): number {
    switch (e.kind) {
      case 'number':
        return this.constant(Q.toNumber(e.value));
      case 'infinity':
        return this.constant(Infinity);
      case 'symbol': {
        const index = this.inputs.indexOf(e.name);
        if (index >= 0) return index;
        return this.constant(e.name === 'pi' ? Math.PI : NaN);
      }
      case 'abbreviation': {
        // A value given for the name itself goes before the definition.
        const index = this.inputs.indexOf(e.name);
        return index >= 0 ? index : this.register(e.definition);
      }
      case 'sum':
        return this.sum(e);
      case 'product':
      case 'power':
        return this.quotient(e);
      case 'call':
        return this.call(e);
      case 'summation':
      case 'productOver':
      case 'integral':
        return this.binding(e);
      case 'piecewise':
        return this.piecewise(e);
      case 'element': {
        const index = compile([e.index], this.inputs);
        const values = e.values.map(Q.toNumber);
        return this.emit({
          op: 'special',
          f: (inputs) => values[Math.round(index(inputs)[0] ?? NaN) - 1] ?? NaN,
        });
      }
    }
  }

  private sum(e: Extract<Expression, { kind: 'sum' }>): number {
    const special = this.nearlyOne(e);
    if (special !== undefined) return special;
    let result: number | undefined = Q.isZero(e.constant)
      ? undefined
      : this.constant(Q.toNumber(e.constant));
    for (const term of e.terms) {
      const isMinus = term.kind === 'product' && Q.isOne(Q.negate(term.coefficient));
      if (isMinus && result !== undefined && term.kind === 'product') {
        const positive = this.factors(Q.ONE, term.factors);
        result = this.emit({ op: 'subtract', a: result, b: positive });
      } else {
        const register = this.register(term);
        result = result === undefined ? register : this.emit({ op: 'add', a: result, b: register });
      }
    }
    return result ?? this.constant(0);
  }

  /** e^u − 1 and 1 − e^u keep their digits for small u. */
  private nearlyOne(e: Extract<Expression, { kind: 'sum' }>): number | undefined {
    const [term] = e.terms;
    if (e.terms.length !== 1 || !term) return undefined;
    const [exponential, sign] =
      term.kind === 'product' && term.factors.length === 1 && Q.isOne(Q.negate(term.coefficient))
        ? [term.factors[0], -1]
        : [term, 1];
    if (exponential?.kind !== 'call' || exponential.name !== 'exp') return undefined;
    const [u] = exponential.arguments;
    if (!u || !Q.equals(e.constant, Q.rational(-sign))) return undefined;
    return this.unary(sign > 0 ? Math.expm1 : (x) => -Math.expm1(x), u);
  }

  private quotient(e: Extract<Expression, { kind: 'product' | 'power' }>): number {
    return e.kind === 'product' ? this.factors(e.coefficient, e.factors) : this.factors(Q.ONE, [e]);
  }

  private factors(coefficient: Q.Rational, factors: readonly Expression[]): number {
    let above: number | undefined = Q.isOne(coefficient)
      ? undefined
      : this.constant(Q.toNumber(coefficient));
    let below: number | undefined;
    for (const factor of factors) {
      const { base, exponent } = splitPower(factor);
      const isBelow = exponent.kind === 'number' && Q.sign(exponent.value) < 0;
      const register = this.power(base, exponent, isBelow);
      if (isBelow) {
        below =
          below === undefined ? register : this.emit({ op: 'multiply', a: below, b: register });
      } else {
        above =
          above === undefined ? register : this.emit({ op: 'multiply', a: above, b: register });
      }
    }
    if (below === undefined) return above ?? this.constant(1);
    return this.emit({ op: 'divide', a: above ?? this.constant(1), b: below });
  }

  private power(base: Expression, exponent: Expression, inverted: boolean): number {
    const a = this.register(base);
    if (exponent.kind !== 'number') {
      return this.emit({ op: 'binary', a, b: this.register(exponent), f: Math.pow });
    }
    const value = inverted ? Q.negate(exponent.value) : exponent.value;
    if (Q.isOne(value)) return a;
    const n = Q.toNumber(value);
    if (Q.isInteger(value) && Math.abs(n) <= 64) return this.emit({ op: 'whole power', a, n });
    if (Q.equals(value, Q.HALF)) return this.emit({ op: 'unary', a, f: Math.sqrt });
    return this.emit({ op: 'binary', a, b: this.constant(n), f: Math.pow });
  }

  private call(e: Extract<Expression, { kind: 'call' }>): number {
    const [x, y, ...rest] = e.arguments;
    if (!x) return this.constant(NaN);
    if (e.name === 'ln') return this.logarithm(x);
    const unary = UNARY[e.name];
    if (unary && !y) return this.unary(unary, x);
    const binary = BINARY[e.name];
    if (!binary) return this.constant(NaN);
    if (!y) return this.register(x);
    let result = this.emit({
      op: 'binary',
      a: this.register(x),
      b: this.register(y),
      f: binary,
    });
    for (const z of rest) {
      result = this.emit({ op: 'binary', a: result, b: this.register(z), f: binary });
    }
    return result;
  }

  /** ln(1 + u) by log1p, ln(1 − e^u) by what suits the size of u. */
  private logarithm(x: Expression): number {
    if (x.kind === 'sum' && Q.isOne(x.constant)) {
      const [term] = x.terms;
      if (x.terms.length === 1 && term?.kind === 'product') {
        const [exponential] = term.factors;
        if (
          term.factors.length === 1 &&
          Q.isOne(Q.negate(term.coefficient)) &&
          exponential?.kind === 'call' &&
          exponential.name === 'exp' &&
          exponential.arguments[0]
        ) {
          return this.unary(lnOneMinusExp, exponential.arguments[0]);
        }
      }
      const rest = x.terms.map((part) => this.register(part));
      const [first, ...others] = rest;
      if (first !== undefined) {
        const u = others.reduce((a, b) => this.emit({ op: 'add', a, b }), first);
        return this.emit({ op: 'unary', a: u, f: Math.log1p });
      }
    }
    return this.unary(Math.log, x);
  }

  private binding(
    e: Extract<Expression, { kind: 'summation' | 'productOver' | 'integral' }>,
  ): number {
    const ends = compile([e.from, e.to], this.inputs);
    const body = compile([e.body], [...this.inputs, e.variable.name]);
    const bodyAt = (inputs: ArrayLike<number>): ((x: number) => number) => {
      const values = [...Array.from(inputs), NaN];
      const result = [NaN];
      return (x) => {
        values[values.length - 1] = x;
        body.into(values, result);
        return result[0] ?? NaN;
      };
    };
    return this.emit({
      op: 'special',
      f: (inputs) => {
        const [from = NaN, to = NaN] = ends(inputs);
        const f = bodyAt(inputs);
        if (e.kind === 'integral') return integrate(f, from, to).value;
        if (e.kind === 'summation') return sumSeries(f, from, to).value;
        let product = 1;
        for (let i = from; i <= to; i++) product *= f(i);
        return product;
      },
    });
  }

  private piecewise(e: Extract<Expression, { kind: 'piecewise' }>): number {
    const branches = e.branches.map(({ condition, value }) => ({
      sides: compile([condition.left, condition.right], this.inputs),
      sign: condition.sign,
      value: compile([value], this.inputs),
    }));
    const otherwise = compile([e.otherwise], this.inputs);
    return this.emit({
      op: 'special',
      f: (inputs) => {
        for (const { sides, sign, value } of branches) {
          const [left = NaN, right = NaN] = sides(inputs);
          if (relationHolds(left, sign, right)) return value(inputs)[0] ?? NaN;
        }
        return otherwise(inputs)[0] ?? NaN;
      },
    });
  }
}

function relationHolds(left: number, sign: Relation['sign'], right: number): boolean {
  switch (sign) {
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

function step(
  instruction: Instruction,
  registers: Float64Array,
  inputs: ArrayLike<number>,
): number {
  switch (instruction.op) {
    case 'add':
      return (registers[instruction.a] ?? NaN) + (registers[instruction.b] ?? NaN);
    case 'subtract':
      return (registers[instruction.a] ?? NaN) - (registers[instruction.b] ?? NaN);
    case 'multiply':
      return (registers[instruction.a] ?? NaN) * (registers[instruction.b] ?? NaN);
    case 'divide':
      return (registers[instruction.a] ?? NaN) / (registers[instruction.b] ?? NaN);
    case 'whole power':
      return wholePower(registers[instruction.a] ?? NaN, instruction.n);
    case 'unary':
      return instruction.f(registers[instruction.a] ?? NaN);
    case 'binary':
      return instruction.f(registers[instruction.a] ?? NaN, registers[instruction.b] ?? NaN);
    case 'special':
      return instruction.f(inputs);
  }
}

/**
 * Compiles expressions in named inputs. A symbol that is no input is NaN, π excepted; an input with
 * the name of an abbreviation takes the place of its definition. A value outside the domain of a
 * function comes out as NaN: naming the reason is the caller's business.
 */
export function compile(outputs: readonly Expression[], inputs: readonly string[]): Compiled {
  const compiler = new Compiler(inputs);
  const results = outputs.map((e) => compiler.register(e));
  const { instructions, targets } = compiler;
  const registers = Float64Array.from(compiler.initial);
  const run = (values: ArrayLike<number>): void => {
    for (let i = 0; i < inputs.length; i++) registers[i] = values[i] ?? NaN;
    for (let i = 0; i < instructions.length; i++) {
      const instruction = instructions[i];
      const target = targets[i];
      if (instruction && target !== undefined) {
        registers[target] = step(instruction, registers, values);
      }
    }
  };
  const into = (values: ArrayLike<number>, into: { [index: number]: number }): void => {
    run(values);
    for (let j = 0; j < results.length; j++) into[j] = registers[results[j] ?? 0] ?? NaN;
  };
  const call = (values: ArrayLike<number>): number[] => {
    run(values);
    return results.map((register) => registers[register] ?? NaN);
  };
  const columns = (
    given: readonly ArrayLike<number>[],
    taken: readonly Float64Array[],
    count: number,
  ): void => {
    const state = new Float64Array(inputs.length);
    for (let row = 0; row < count; row++) {
      for (let i = 0; i < inputs.length; i++) {
        const column = given[i];
        state[i] = column ? (column[column.length === 1 ? 0 : row] ?? NaN) : NaN;
      }
      run(state);
      for (let j = 0; j < results.length; j++) {
        const column = taken[j];
        if (column) column[row] = registers[results[j] ?? 0] ?? NaN;
      }
    }
  };
  return Object.assign(call, { into, columns, instructionCount: instructions.length });
}
