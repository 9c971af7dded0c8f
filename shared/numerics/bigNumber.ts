/**
 * Numbers with many digits, by mathjs. The instance has nothing but the number type and its basic
 * functions; no text is ever parsed by it.
 */
import { bignumberDependencies, create, type BigNumber, type FactoryFunctionMap } from 'mathjs';
import type { Rational } from '../algebra/rational.ts';

/** Decimal digits of every operation: thirty are wanted after a numerical derivative. */
export const DIGITS = 64;

const math = create(
  // The declarations of mathjs leave open that a list of dependencies is missing; it never is.
  { bignumberDependencies } as unknown as FactoryFunctionMap,
  { number: 'BigNumber', precision: DIGITS },
);

export type { BigNumber };

export function big(value: number | string | bigint | BigNumber): BigNumber {
  return math.bignumber(
    typeof value === 'number' || typeof value === 'bigint' ? String(value) : value,
  );
}

export function bigOfRational(r: Rational): BigNumber {
  return big(r.numerator).div(big(r.denominator));
}

export const BIG_ZERO = big(0);
export const BIG_ONE = big(1);
export const BIG_PI = big(
  '3.14159265358979323846264338327950288419716939937510582097494459230781640628620899',
);
