/** Factored forms written as expressions, in the shortest of several ways. */
import {
  addendsOf,
  call,
  multiply,
  negate,
  number,
  power,
  product,
  sum,
  zero,
} from './construct.ts';
import type { Bases } from './bases.ts';
import { readingCost } from './cost.ts';
import type { Expression } from './expression.ts';
import type { Factored } from './factored.ts';
import { gatherLogarithms } from './logarithm.ts';
import * as P from './polynomial/index.ts';
import * as Q from './rational.ts';

/** The factored form as an expression. */
export function writeShortest(bases: Bases, f: Factored): Expression {
  if (Q.isZero(f.coefficient)) return zero;
  const written = writeWith(bases, f, undefined);
  let best = written;
  for (const candidate of otherWritings(bases, f)) {
    if (readingCost(candidate) < readingCost(best)) best = candidate;
  }
  return best;
}

/** The bases as they are written, each to its power. */
export function writePlainly(bases: Bases, f: Factored): Expression {
  return Q.isZero(f.coefficient) ? zero : writeWith(bases, f, undefined);
}

function writeWith(
  bases: Bases,
  f: Factored,
  replaced: { index: number; by: Expression } | undefined,
): Expression {
  const factors: Expression[] = [number(f.coefficient)];
  for (const [index, exponent] of f.exponents) {
    const base = replaced?.index === index ? replaced.by : bases.baseAt(index).expression;
    factors.push(power(base, number(exponent)));
  }
  return product(factors);
}

/**
 * Writings that may be shorter: a minus sign taken into a difference, −(a − b) c = (b − a) c, and
 * an exponential taken into a sum, exp(−x)/(exp(x) − 1)^(−1) as 1 − exp(−x), and sinh x/cosh x as
 * tanh x or coth x.
 */
function* otherWritings(bases: Bases, f: Factored): Generator<Expression> {
  for (const [index, exponent] of f.exponents) {
    const { expression } = bases.baseAt(index);
    if (expression.kind !== 'call' || expression.name !== 'sinh') continue;
    const cosh = bases.numberOf(call('cosh', expression.arguments));
    const below = cosh === undefined ? undefined : f.exponents.get(cosh);
    if (cosh === undefined || !below || Q.sign(below) === Q.sign(exponent)) continue;
    const exponents = new Map(f.exponents);
    exponents.delete(index);
    const left = Q.add(below, exponent);
    if (Q.isZero(left)) exponents.delete(cosh);
    else exponents.set(cosh, left);
    const isAbove = Q.sign(exponent) > 0;
    yield multiply(
      power(
        call(isAbove ? 'tanh' : 'coth', expression.arguments),
        number(isAbove ? exponent : Q.negate(exponent)),
      ),
      writeWith(bases, { coefficient: f.coefficient, exponents }, undefined),
    );
  }
  for (const [index, exponent] of f.exponents) {
    const base = bases.baseAt(index);
    if (base.kind !== 'polynomial') continue;
    if (Q.sign(f.coefficient) < 0 && Q.isOne(exponent)) {
      const positive = { coefficient: Q.negate(f.coefficient), exponents: f.exponents };
      yield writeWith(bases, positive, { index, by: gatherLogarithms(negate(base.expression)) });
    }
    for (const variable of P.variablesOf(base.polynomial)) {
      const kernel = bases.kernelAt(variable);
      if (kernel.expression.kind !== 'call' || kernel.expression.name !== 'exp') continue;
      const kernelIndex = bases.kernel(kernel.expression);
      const present = f.exponents.get(kernelIndex);
      if (!present) continue;
      const shift = Q.negate(Q.divide(present, exponent));
      const absorbed = sum(
        addendsOf(base.expression).map((addend) =>
          multiply(addend, power(kernel.expression, number(Q.negate(shift)))),
        ),
      );
      const exponents = new Map(f.exponents);
      exponents.delete(kernelIndex);
      yield writeWith(bases, { coefficient: f.coefficient, exponents }, { index, by: absorbed });
    }
  }
}
