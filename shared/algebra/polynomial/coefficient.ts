/**
 * Integers of any size: a number as long as it is safe, a bigint beyond. Most coefficients fit a
 * double, and arithmetic with doubles is an order of magnitude faster; none is ever rounded.
 */
import { gcd } from '../rational.ts';

export type Coefficient = number | bigint;

const SAFE = BigInt(Number.MAX_SAFE_INTEGER);

/** The same integer in its short form where it has one: equal integers are then `===`. */
export function shortened(n: bigint): Coefficient {
  return n <= SAFE && n >= -SAFE ? Number(n) : n;
}

export function plus(a: Coefficient, b: Coefficient): Coefficient {
  if (typeof a === 'number' && typeof b === 'number') {
    const sum = a + b;
    if (Number.isSafeInteger(sum)) return sum;
  }
  return shortened(BigInt(a) + BigInt(b));
}

export function times(a: Coefficient, b: Coefficient): Coefficient {
  if (typeof a === 'number' && typeof b === 'number') {
    const product = a * b;
    // −0 must not arise: it is not the same object as 0 in a key.
    if (Number.isSafeInteger(product)) return product === 0 ? 0 : product;
  }
  return shortened(BigInt(a) * BigInt(b));
}

export function opposite(a: Coefficient): Coefficient {
  return a === 0 ? 0 : -a;
}

/** a/b where b divides a, else undefined. */
export function dividedExactly(a: Coefficient, b: Coefficient): Coefficient | undefined {
  if (typeof a === 'number' && typeof b === 'number') {
    return a % b === 0 ? (a === 0 ? 0 : a / b) : undefined;
  }
  const [left, right] = [BigInt(a), BigInt(b)];
  return left % right === 0n ? shortened(left / right) : undefined;
}

export function isNegative(a: Coefficient): boolean {
  return a < 0;
}

/** Never negative. */
export function commonDivisor(a: Coefficient, b: Coefficient): Coefficient {
  if (typeof a === 'number' && typeof b === 'number') {
    let [x, y] = [Math.abs(a), Math.abs(b)];
    while (y !== 0) [x, y] = [y, x % y];
    return x;
  }
  return shortened(gcd(BigInt(a), BigInt(b)));
}
