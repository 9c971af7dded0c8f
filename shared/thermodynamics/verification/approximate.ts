/**
 * Numbers with many digits that carry a bound of their error and the size of what they were made
 * from, so that a difference of nearly equal numbers is judged by that size: 1.0 − 1.0 is a sound 0
 * as long as the error of both is far below 1.
 */
import { big, BIG_ZERO, type BigNumber } from '../../numerics/bigNumber.ts';

export interface Approximate {
  readonly value: BigNumber;
  /** An upper estimate of |value − true value|. */
  readonly error: number;
  /** The sum of the magnitudes of the terms that the value is made of; never below |value|. */
  readonly scale: number;
}

/** Sixty-four digits are carried; a few are left to the operations. */
const EPSILON = 1e-60;

function size(value: BigNumber): number {
  return Math.abs(Number(value.toString()));
}

export const ZERO: Approximate = { value: BIG_ZERO, error: 0, scale: 0 };
export const ONE: Approximate = { value: big(1), error: 0, scale: 1 };

/** A number of which the digits after the first `digits` are not known. */
export function known(value: BigNumber | number, digits = 60): Approximate {
  const number = typeof value === 'number' ? big(value) : value;
  const scale = size(number);
  return { value: number, error: scale * 10 ** -digits, scale };
}

function made(value: BigNumber, error: number, scale: number): Approximate {
  return { value, error: error + EPSILON * scale, scale };
}

export function add(a: Approximate, b: Approximate): Approximate {
  return made(a.value.plus(b.value), a.error + b.error, a.scale + b.scale);
}

export function negate(a: Approximate): Approximate {
  return { ...a, value: a.value.negated() };
}

export function multiply(a: Approximate, b: Approximate): Approximate {
  const error = size(a.value) * b.error + size(b.value) * a.error + a.error * b.error;
  return made(a.value.times(b.value), error, a.scale * b.scale);
}

/** a^n for a rational n. */
export function power(a: Approximate, n: BigNumber): Approximate {
  const value = a.value.pow(n);
  const magnitude = size(a.value);
  const relative = magnitude === 0 ? Infinity : a.error / magnitude;
  const spread = magnitude === 0 ? 1 : Math.max(1, a.scale / magnitude);
  return made(value, size(value) * Math.abs(Number(n.toString())) * relative, size(value) * spread);
}

/** The determinant of a small matrix, by its first row. */
export function determinant(rows: readonly (readonly Approximate[])[]): Approximate {
  const [first, ...rest] = rows;
  if (!first) return ONE;
  return first.reduce<Approximate>((total, entry, i) => {
    if (entry.value.isZero() && entry.error === 0) return total;
    const minor = determinant(rest.map((row) => row.filter((_, j) => j !== i)));
    const term = multiply(entry, minor);
    return add(total, i % 2 === 0 ? term : negate(term));
  }, ZERO);
}
