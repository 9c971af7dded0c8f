/** Values of expressions of a model at states of it. */
import { number } from '../algebra/construct.ts';
import type { Expression, Relation } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import { symbolsOf } from '../algebra/traverse.ts';
import { compile } from '../numerics/compile.ts';
import type { Model } from './model.ts';
import { constantNumbersOf } from './numbers.ts';
import type { State } from './sampling.ts';

/** A relation of the domain that does not hold, with both sides. */
export interface Violation {
  readonly relation: Relation;
  readonly left: number;
  readonly right: number;
}

export interface Calculator {
  /** The value in doubles; NaN where there is none. The expression is compiled once. */
  value(e: Expression, state: State): number;
  /** The first relation of the domain that the state breaks. */
  violated(state: State): Violation | undefined;
  isInDomain(state: State): boolean;
  /** The state together with the constants, by name. */
  valuesAt(state: State): ReadonlyMap<string, number>;
}

/** A calculator with the declared values, or others where `overrides` has them (SI units). */
export function createCalculator(
  model: Model,
  overrides: Readonly<Record<string, number>> = {},
): Calculator {
  const constants = constantNumbersOf(model.formulation);
  for (const [name, value] of Object.entries(overrides)) constants.set(name, value);
  const compiled = new Map<Expression, (values: ReadonlyMap<string, number>) => number>();
  const valuesAt = (state: State): ReadonlyMap<string, number> => new Map([...constants, ...state]);
  const value = (e: Expression, state: State): number => {
    let code = compiled.get(e);
    if (!code) compiled.set(e, (code = compileByName(e)));
    return code(valuesAt(state));
  };
  const violated = (state: State): Violation | undefined => {
    for (const [name, x] of state) {
      const variable = model.surroundings.naturals.find((v) => v.name === name);
      const mayBeNegative = variable !== undefined && SIGNED.has(variable.role);
      if (variable && !mayBeNegative && !(x > 0)) {
        const relation: Relation = { left: variable.symbol, sign: '>', right: ZERO };
        return { relation, left: x, right: 0 };
      }
    }
    for (const relation of model.formulation.domain) {
      const left = value(relation.left, state);
      const right = value(relation.right, state);
      if (!holds(left, relation.sign, right)) return { relation, left, right };
    }
    return undefined;
  };
  return { value, violated, isInDomain: (state) => violated(state) === undefined, valuesAt };
}

/** Variables that may have either sign; all others are positive. */
const SIGNED: ReadonlySet<string> = new Set(['chemical potential', 'field', 'energy']);

const ZERO: Expression = number(Q.ZERO);

/** A function of the values of all symbols by name; π is known to it. */
export function compileByName(e: Expression): (values: ReadonlyMap<string, number>) => number {
  const names = [...symbolsOf(e)].map(({ name }) => name).filter((name) => name !== 'pi');
  const code = compile([e], names);
  return (values) => code(names.map((name) => values.get(name) ?? NaN))[0] ?? NaN;
}

/** Whether left (sign) right. */
export function holds(left: number, sign: Relation['sign'], right: number): boolean {
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
