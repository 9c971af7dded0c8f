/**
 * The dimension of a derived expression, found by changing the units: in units of length λ times as
 * small every length has a value λ times as large, and a property of dimension length^n must come
 * out λ^n times as large, constants of nature included.
 */
import type { VerificationCheck } from '../../contracts/derivation.ts';
import { big, evaluatePrecisely, isCostly, type BigNumber } from '../../numerics/index.ts';
import * as Q from '../../algebra/rational.ts';
import { BASE_UNITS, type Dimension } from '../../units/dimension.ts';
import { ENTROPY, unitOf, type Entry } from '../catalogue/index.ts';
import type { Model } from '../model.ts';
import type { State } from '../sampling.ts';
import { preciseConstants, preciseValuesAt } from './preciseValue.ts';

/** By how much each base unit is made smaller: numbers without a simple relation. */
const FACTORS = ['1.7', '0.43', '2.9', '1.13', '0.61', '3.7', '0.83'];
/** Far below the ratio of a molecule's size to a litre: no term may hide behind another. */
const TOLERANCE = 1e-36;
/** Sums and integrals are worked out to fewer digits. */
const TOLERANCE_OF_COSTLY = 1e-12;

/** Whether the derived expression has the dimension that its entry states. */
export function dimensionChecks(
  model: Model,
  states: readonly State[],
): (entry: Entry) => VerificationCheck {
  const dimensions = dimensionsByName(model);
  const tolerance = isCostly(model.f) ? TOLERANCE_OF_COSTLY : TOLERANCE;
  const constants = preciseConstants(model.formulation);
  return (entry) => {
    const report = (status: VerificationCheck['status'], detail: string): VerificationCheck => ({
      kind: 'dimension',
      title: `dimension ${unitOf(entry.dimension)}`,
      status,
      detail,
    });
    const { value } = model.worked(entry.symbol);
    for (const state of states) {
      const values = preciseValuesAt(constants, state);
      const changed = new Map(
        [...values].map(([name, x]): [string, BigNumber] => [
          name,
          x.times(factorOf(dimensions.get(name))),
        ]),
      );
      const here = evaluatePrecisely(value, values);
      const there = evaluatePrecisely(value, changed);
      if (!here || !there) continue;
      const expected = here.times(factorOf(entry.dimension));
      const difference = Number(there.minus(expected).abs().toString());
      if (difference <= tolerance * Math.abs(Number(expected.toString()))) {
        return report('passed', 'Found by a change of all base units.');
      }
      return report('failed', 'A change of the base units does not change it as it should.');
    }
    return report('undecided', 'It has no value at the states tried.');
  };
}

/** How many times as large a value of this dimension is in the smaller units. */
function factorOf(dimension: Dimension | undefined): BigNumber {
  return BASE_UNITS.reduce<BigNumber>((product, _, i) => {
    const exponent = dimension?.[i] ?? Q.ZERO;
    if (Q.isZero(exponent)) return product;
    return product.times(
      big(FACTORS[i] ?? '1').pow(big(exponent.numerator).div(big(exponent.denominator))),
    );
  }, big(1));
}

function dimensionsByName(model: Model): ReadonlyMap<string, Dimension> {
  const { naturalConstants, quantities, variables } = model.formulation;
  return new Map<string, Dimension>([
    ['k', ENTROPY],
    ...[...naturalConstants, ...quantities, ...variables].map(
      ({ name, dimension }): [string, Dimension] => [name, dimension],
    ),
  ]);
}
