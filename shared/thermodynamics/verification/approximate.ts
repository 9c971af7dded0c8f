/**
 * Numbers that carry a bound of their error, so that a difference of nearly equal numbers is not
 * held against anyone: 1.0 − 1.0 is 0 with the error of both, not a failed check.
 */
export interface Approximate {
  readonly value: number;
  /** An upper estimate of |value − true value|. */
  readonly error: number;
}

const EPSILON = 2 ** -52;

export const ZERO: Approximate = { value: 0, error: 0 };
export const ONE: Approximate = { value: 1, error: 0 };

/** A number known to the last digit of a double. */
export function exactly(value: number): Approximate {
  return { value, error: EPSILON * Math.abs(value) };
}

function rounded(value: number, error: number): Approximate {
  return { value, error: error + EPSILON * Math.abs(value) };
}

export function add(a: Approximate, b: Approximate): Approximate {
  return rounded(a.value + b.value, a.error + b.error);
}

export function negate(a: Approximate): Approximate {
  return { value: -a.value, error: a.error };
}

export function multiply(a: Approximate, b: Approximate): Approximate {
  return rounded(
    a.value * b.value,
    Math.abs(a.value) * b.error + Math.abs(b.value) * a.error + a.error * b.error,
  );
}

/** a^n for a rational n given as a double. */
export function power(a: Approximate, n: number): Approximate {
  const value = a.value ** n;
  return rounded(value, Math.abs(n * a.value ** (n - 1)) * a.error);
}

/** The determinant of a small matrix, by its first row. */
export function determinant(rows: readonly (readonly Approximate[])[]): Approximate {
  const [first, ...rest] = rows;
  if (!first) return ONE;
  return first.reduce<Approximate>((total, entry, i) => {
    if (entry.value === 0 && entry.error === 0) return total;
    const minor = determinant(rest.map((row) => row.filter((_, j) => j !== i)));
    const term = multiply(entry, minor);
    return add(total, i % 2 === 0 ? term : negate(term));
  }, ZERO);
}
