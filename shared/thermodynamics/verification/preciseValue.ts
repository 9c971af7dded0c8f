/** Values worked out to many digits and rounded once, so that nothing cancels away. */
import type { Expression } from '../../algebra/expression.ts';
import {
  big,
  evaluatePrecisely,
  type BigNumber,
  type PreciseValues,
} from '../../numerics/index.ts';
import type { Formulation } from '../../language/formulation.ts';
import { compileByName } from '../calculator.ts';
import type { Entry } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import { constantsOf } from '../numbers.ts';
import type { State } from '../sampling.ts';

/**
 * The value at values of all symbols by name, as a double. Where it cannot be had to many digits it
 * is worked out in doubles; NaN where there is none.
 */
export function preciseValue(e: Expression, values: ReadonlyMap<string, number>): number {
  const precise = evaluatePrecisely(e, values);
  if (precise) return Number(precise.toString());
  return compileByName(e)(values);
}

/** The constants of a formulation with all their digits, by name. */
export function preciseConstants(formulation: Formulation): Map<string, BigNumber> {
  return new Map(
    [...constantsOf(formulation)].map(([name, value]) => [
      name,
      big(value.numerator).div(big(value.denominator)),
    ]),
  );
}

/** The value of a property of the model at a state. */
export function preciseCalculator(model: Model): (entry: Entry, state: State) => number {
  const constants = preciseConstants(model.formulation);
  return (entry, state) => {
    const values: PreciseValues = new Map<string, BigNumber | number>([...constants, ...state]);
    const precise = evaluatePrecisely(model.worked(entry.symbol).value, values);
    if (precise) return Number(precise.toString());
    const doubles = [...constants].map(([name, x]): [string, number] => [
      name,
      Number(x.toString()),
    ]);
    return preciseValue(model.worked(entry.symbol).value, new Map([...doubles, ...state]));
  };
}

/** The state and the constants with all their digits, by name. */
export function preciseValuesAt(
  constants: ReadonlyMap<string, BigNumber>,
  state: State,
): ReadonlyMap<string, BigNumber> {
  return new Map([...constants, ...[...state].map(([n, x]): [string, BigNumber] => [n, big(x)])]);
}
