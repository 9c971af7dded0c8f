/** Whether a rational number is read better as a fraction or as a decimal. */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';

/** Up to here a denominator reads well: 3/2, 691/2730. */
const LARGEST_DENOMINATOR = 9999n;
/** Whole numbers with more digits and zeros behind are written with a power of ten. */
const LONGEST_WHOLE = 7;
/** Exponents of ten from −LONGEST_SHIFT up are written by zeros. */
const LONGEST_SHIFT = 3;

export interface Decimal {
  /** `6.02214076` */
  readonly mantissa: string;
  /** Power of ten; 0 where none is needed. */
  readonly exponent: number;
}

/**
 * The number as an exact decimal, where that is how it is read: 1.380649e-23, but not 3/2 nor 1/3.
 * Undefined for what stays a fraction or a plain whole number. The number is not negative.
 */
export function asDecimal(r: Rational): Decimal | undefined {
  if (Q.isInteger(r)) {
    const digits = String(r.numerator);
    const significant = digits.replace(/0+$/, '');
    if (digits.length <= LONGEST_WHOLE || digits.length - significant.length < 3) return undefined;
    return scientific(significant, digits.length - 1);
  }
  if (r.denominator <= LARGEST_DENOMINATOR) return undefined;
  const places = decimalPlaces(r.denominator);
  if (places === undefined) return undefined;
  const digits = String((r.numerator * 10n ** BigInt(places)) / r.denominator);
  const exponent = digits.length - 1 - places;
  if (exponent >= 0) {
    return { mantissa: withPoint(digits, exponent + 1), exponent: 0 };
  }
  if (exponent >= -LONGEST_SHIFT) {
    return { mantissa: `0.${'0'.repeat(-exponent - 1)}${digits}`, exponent: 0 };
  }
  return scientific(digits, exponent);
}

function scientific(digits: string, exponent: number): Decimal {
  return { mantissa: withPoint(digits, 1), exponent };
}

function withPoint(digits: string, position: number): string {
  return digits.length > position
    ? `${digits.slice(0, position)}.${digits.slice(position)}`
    : digits;
}

/** How many decimal places 1/denominator has; undefined where they do not end. */
function decimalPlaces(denominator: bigint): number | undefined {
  let rest = denominator;
  let twos = 0;
  let fives = 0;
  while (rest % 2n === 0n) [rest, twos] = [rest / 2n, twos + 1];
  while (rest % 5n === 0n) [rest, fives] = [rest / 5n, fives + 1];
  return rest === 1n ? Math.max(twos, fives) : undefined;
}
