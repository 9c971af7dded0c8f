/**
 * Expressions compiled to a tape. Equal parts are computed once, numbers are folded beforehand, and
 * in sums and integrals what does not depend on the running variable is computed outside.
 *
 *     p = N k T/(V − N b)  →  r4 = N·b;  r5 = V − r4;  r6 = N·k·T;  r7 = r6/r5
 */
import { one, product, splitPower, sum } from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { symbolsOf } from '../algebra/traverse.ts';
import { breakpointsOf } from './breakpoints.ts';
import { BINARY, UNARY } from './elementary.ts';
import {
  asLargeExponential,
  exponentialAndOne,
  lnOfLargeExponential,
  splitExponentials,
  type LargeExponential,
} from './largeExponentials.ts';
import { holdsInfinity } from './infinitePotential.ts';
import { integratePieces, isSettled } from './quadrature.ts';
import { relationHolds } from './relation.ts';
import { multiplySeries, sumSeries } from './sumSeries.ts';
import { lnGamma } from './special/index.ts';
import { TapeBuilder, type Tape } from './tape.ts';

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

type Binding = Extract<Expression, { kind: 'summation' | 'productOver' | 'integral' }>;
type ProductNode = Extract<Expression, { kind: 'product' | 'power' }>;

/** Whole powers up to this size are multiplied out. */
const LARGEST_WHOLE_POWER = 64;

/** An integral whose error may exceed this part of its value has no value. */
const WORST_RELATIVE_ERROR = 1e-7;

class Compiler {
  readonly tape: TapeBuilder;
  /** Expressions of the surrounding compiler that stand as inputs here, with their registers. */
  readonly captured = new Map<Expression, number>();
  private readonly inputs: readonly string[];
  private readonly outer: Compiler | undefined;
  private readonly registerOf = new Map<Expression, number>();

  /** Within a sum or an integral the only input of its own is the running variable. */
  constructor(inputs: readonly string[], outer?: Compiler) {
    this.inputs = inputs;
    this.outer = outer;
    this.tape = new TapeBuilder(inputs.length);
  }

  /** The register that holds the value of an expression. */
  register(e: Expression): number {
    const known = this.registerOf.get(e);
    if (known !== undefined) return known;
    const register = this.outer && !this.isOwn(e) ? this.capture(e, this.outer) : this.place(e);
    this.registerOf.set(e, register);
    return register;
  }

  /** True where the value depends on an input of this compiler and not of an outer one alone. */
  private isOwn(e: Expression): boolean {
    if (e.kind === 'abbreviation' && this.inputs.includes(e.name)) return true;
    for (const { name } of symbolsOf(e)) if (this.inputs.includes(name)) return true;
    return false;
  }

  private capture(e: Expression, outer: Compiler): number {
    const outside = outer.register(e);
    const value = outer.tape.constantAt(outside);
    if (value !== undefined) return this.tape.constant(value);
    const register = this.tape.input();
    this.captured.set(e, register);
    return register;
  }

  private place(e: Expression): number {
    const { tape } = this;
    switch (e.kind) {
      case 'number':
        return tape.constant(Q.toNumber(e.value));
      case 'infinity':
        return tape.constant(Infinity);
      case 'symbol': {
        const index = this.inputs.lastIndexOf(e.name);
        if (index >= 0) return index;
        return tape.constant(e.name === 'pi' ? Math.PI : NaN);
      }
      case 'abbreviation': {
        // A value given for the name itself goes before the definition.
        const index = this.inputs.lastIndexOf(e.name);
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
        const values = e.values.map(Q.toNumber);
        return tape.unary(
          (i) => (Number.isInteger(i) ? (values[i - 1] ?? NaN) : NaN),
          this.register(e.index),
        );
      }
    }
  }

  private sum(e: Extract<Expression, { kind: 'sum' }>): number {
    const { tape } = this;
    // e^u − 1 and 1 − e^u keep their digits for small u.
    const found = exponentialAndOne(e);
    if (found?.isMinus) {
      const { argument, sign } = found;
      return tape.unary(sign > 0 ? Math.expm1 : (u) => -Math.expm1(u), this.register(argument));
    }
    let result: number | undefined = Q.isZero(e.constant)
      ? undefined
      : tape.constant(Q.toNumber(e.constant));
    for (const term of this.grouped(e.terms, sum)) {
      const isMinus = term.kind === 'product' && Q.isOne(Q.negate(term.coefficient));
      if (isMinus && result !== undefined) {
        result = tape.arithmetic('subtract', result, this.factors(Q.ONE, term.factors));
      } else {
        const register = this.register(term);
        result = result === undefined ? register : tape.arithmetic('add', result, register);
      }
    }
    return result ?? tape.constant(0);
  }

  /** Within a binding, what is not its own as one part, to be computed outside. */
  private grouped(
    parts: readonly Expression[],
    join: (parts: readonly Expression[]) => Expression,
  ): readonly Expression[] {
    if (!this.outer) return parts;
    const foreign = parts.filter((part) => !this.isOwn(part));
    if (foreign.length < 2) return parts;
    return [join(foreign), ...parts.filter((part) => this.isOwn(part))];
  }

  private quotient(e: ProductNode): number {
    return e.kind === 'product' ? this.factors(e.coefficient, e.factors) : this.factors(Q.ONE, [e]);
  }

  private factors(coefficient: Q.Rational, factors: readonly Expression[]): number {
    const large: LargeExponential[] = [];
    const plain: Expression[] = [];
    for (const factor of factors) {
      const exponential = asLargeExponential(factor);
      if (exponential) large.push(exponential);
      else plain.push(factor);
    }
    if (large.length < 2) {
      const result = this.plainFactors(coefficient, factors);
      const [only] = large;
      return only ? this.vanishing(result, only, plain) : result;
    }
    const rest = this.plainFactors(coefficient, plain);
    return this.tape.arithmetic('multiply', rest, this.largeProduct(large));
  }

  /** Π f(u)^n = exp(Σ n peak(u)) Π rest(u)^n. */
  private largeProduct(large: readonly LargeExponential[]): number {
    const { tape } = this;
    let peak: number | undefined;
    let rest: number | undefined;
    for (const part of large) {
      const u = this.register(part.argument);
      const ofPeak = tape.arithmetic(
        'multiply',
        tape.constant(part.power),
        tape.unary(part.peak, u),
      );
      const ofRest = tape.power(tape.unary(part.rest, u), part.power);
      peak = peak === undefined ? ofPeak : tape.arithmetic('add', peak, ofPeak);
      rest = rest === undefined ? ofRest : tape.arithmetic('multiply', rest, ofRest);
    }
    const exponential = tape.unary(Math.exp, peak ?? tape.constant(0));
    return tape.arithmetic('multiply', rest ?? tape.constant(1), exponential);
  }

  /** u e^(−u) is 0 where a potential u is infinite: the exponential outweighs every power. */
  private vanishing(
    result: number,
    { argument, power }: LargeExponential,
    others: readonly Expression[],
  ): number {
    if (power !== 1 || !others.some(holdsInfinity) || !holdsInfinity(argument)) return result;
    return this.tape.binary(
      (value, u) => (u === -Infinity ? 0 : value),
      result,
      this.register(argument),
    );
  }

  private plainFactors(coefficient: Q.Rational, factors: readonly Expression[]): number {
    const { tape } = this;
    let above: number | undefined = Q.isOne(coefficient)
      ? undefined
      : tape.constant(Q.toNumber(coefficient));
    let below: number | undefined;
    for (const factor of this.grouped(factors, product)) {
      const { base, exponent } = splitPower(factor);
      const isBelow = exponent.kind === 'number' && Q.sign(exponent.value) < 0;
      const register = this.power(base, exponent, isBelow);
      if (isBelow) {
        below = below === undefined ? register : tape.arithmetic('multiply', below, register);
      } else {
        above = above === undefined ? register : tape.arithmetic('multiply', above, register);
      }
    }
    if (below === undefined) return above ?? tape.constant(1);
    return tape.arithmetic('divide', above ?? tape.constant(1), below);
  }

  private power(base: Expression, exponent: Expression, inverted: boolean): number {
    const { tape } = this;
    const a = this.register(base);
    if (exponent.kind !== 'number') return tape.binary(Math.pow, a, this.register(exponent));
    const value = inverted ? Q.negate(exponent.value) : exponent.value;
    if (Q.isOne(value)) return a;
    const n = Q.toNumber(value);
    if (Q.isInteger(value) && Math.abs(n) <= LARGEST_WHOLE_POWER) return tape.power(a, n);
    if (Q.equals(value, Q.HALF)) return tape.unary(Math.sqrt, a);
    if (value.denominator === 2n && Math.abs(n) <= LARGEST_WHOLE_POWER) {
      return tape.power(tape.unary(Math.sqrt, a), Number(value.numerator));
    }
    return tape.binary(Math.pow, a, tape.constant(n));
  }

  private call(e: Extract<Expression, { kind: 'call' }>): number {
    const { tape } = this;
    const [x, y, ...rest] = e.arguments;
    if (!x) return tape.constant(NaN);
    if (e.name === 'ln') return this.logarithm(x);
    const unary = UNARY[e.name];
    if (unary && !y) return tape.unary(unary, this.register(x));
    const binary = BINARY[e.name];
    if (!binary) return tape.constant(NaN);
    if (!y) return this.register(x);
    let result = tape.binary(binary, this.register(x), this.register(y));
    for (const z of rest) result = tape.binary(binary, result, this.register(z));
    return result;
  }

  private logarithm(x: Expression): number {
    const { tape } = this;
    const large = lnOfLargeExponential(x);
    if (large) return tape.unary(large.f, this.register(large.argument));
    if (x.kind === 'call' && x.arguments[0]) {
      const argument = this.register(x.arguments[0]);
      if (x.name === 'Gamma') return tape.unary(lnGamma, argument);
      if (x.name === 'factorial') return tape.unary((n) => lnGamma(n + 1), argument);
    }
    if (x.kind === 'sum' && Q.isOne(x.constant)) {
      return tape.unary(Math.log1p, this.register(sum(x.terms)));
    }
    const parts = splitExponentials(x, (name) => this.isGiven(name));
    if (!parts) return tape.unary(Math.log, this.register(x));
    const exponent = this.register(sum(parts.exponents));
    if (parts.rest === one) return exponent;
    return tape.arithmetic('add', exponent, this.logarithm(parts.rest));
  }

  private isGiven(name: string): boolean {
    return this.inputs.includes(name) || (this.outer?.isGiven(name) ?? false);
  }

  private binding(e: Binding): number {
    const inner = new Compiler([e.variable.name], this);
    const output = inner.register(e.body);
    const breakpoints = e.kind === 'integral' ? breakpointsOf(e.body, e.variable) : [];
    const captured = [...inner.captured];
    const operands = [e.from, e.to, ...breakpoints, ...captured.map(([part]) => part)].map((part) =>
      this.register(part),
    );
    const body = inner.tape.finish();
    const registers = captured.map(([, register]) => register);
    const first = 2 + breakpoints.length;
    return this.tape.general(
      (values) => {
        const [from = NaN, to = NaN] = values;
        registers.forEach((register, i) => {
          body.registers[register] = values[first + i] ?? NaN;
        });
        const f = functionOf(body, output);
        if (e.kind === 'summation') return sumSeries(f, from, to).value;
        if (e.kind === 'productOver') return multiplySeries(f, from, to);
        const result = integratePieces(f, from, to, values.subarray(2, first));
        return isSettled(result, WORST_RELATIVE_ERROR) ? result.value : NaN;
      },
      operands,
      true,
    );
  }

  private piecewise(e: Extract<Expression, { kind: 'piecewise' }>): number {
    const { tape } = this;
    const signs = e.branches.map(({ condition }) => condition.sign);
    const operands = [
      ...e.branches.flatMap(({ condition, value }) => [condition.left, condition.right, value]),
      e.otherwise,
    ].map((part) => this.register(part));
    return tape.general((values) => {
      for (let i = 0; i < signs.length; i++) {
        const left = values[3 * i] ?? NaN;
        const right = values[3 * i + 1] ?? NaN;
        // A side without value decides nothing.
        if (Number.isNaN(left) || Number.isNaN(right)) return NaN;
        if (relationHolds(left, signs[i] ?? '=', right)) return values[3 * i + 2] ?? NaN;
      }
      return values[3 * signs.length] ?? NaN;
    }, operands);
  }
}

function functionOf(tape: Tape, output: number): (x: number) => number {
  const { registers } = tape;
  return (x) => {
    registers[0] = x;
    tape.run();
    return registers[output] ?? NaN;
  };
}

/**
 * Compiles expressions in named inputs. A symbol that is no input is NaN, π excepted; an input with
 * the name of an abbreviation takes the place of its definition. A value outside the domain of a
 * function comes out as NaN, as does a sum or an integral that does not settle: naming the reason is
 * the caller's business.
 */
export function compile(outputs: readonly Expression[], inputs: readonly string[]): Compiled {
  const compiler = new Compiler(inputs);
  const results = outputs.map((e) => compiler.register(e));
  const positions = inputs.map((_, i) => i);
  const tape = compiler.tape.finish();
  const { registers } = tape;
  const run = (values: ArrayLike<number>): void => {
    for (let i = 0; i < inputs.length; i++) registers[i] = values[i] ?? NaN;
    tape.run();
  };
  const into = (values: ArrayLike<number>, into: { [index: number]: number }): void => {
    run(values);
    for (let j = 0; j < results.length; j++) into[j] = registers[results[j] ?? 0] ?? NaN;
  };
  const call = (values: ArrayLike<number>): number[] => {
    run(values);
    return results.map((register) => registers[register] ?? NaN);
  };
  const columns: Compiled['columns'] = (given, taken, count) => {
    tape.runColumns(positions, given, results, taken, count);
  };
  return Object.assign(call, { into, columns, instructionCount: tape.length });
}
