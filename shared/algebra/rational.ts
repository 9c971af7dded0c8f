/**
 * Exact rational numbers.
 *
 * A rational is kept in lowest terms with a positive denominator, so that equal numbers have equal
 * fields. Both fields are bigint: coefficients of derivatives outgrow 2^53 sooner than one expects
 * (a tenth derivative of a sixth power does), and a silent loss of digits is the one fault that an
 * exact core may not have.
 */
export interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

export const ZERO: Rational = { numerator: 0n, denominator: 1n };
export const ONE: Rational = { numerator: 1n, denominator: 1n };
export const MINUS_ONE: Rational = { numerator: -1n, denominator: 1n };
export const HALF: Rational = { numerator: 1n, denominator: 2n };

function absolute(n: bigint): bigint {
  return n < 0n ? -n : n;
}

const SAFE = BigInt(Number.MAX_SAFE_INTEGER);

/** The greatest common divisor of two integers; gcd(0, 0) = 0; never negative. */
export function gcd(a: bigint, b: bigint): bigint {
  let x = absolute(a);
  let y = absolute(b);
  if (x === 1n || y === 1n) return 1n;
  // Numbers that fit a double are divided as doubles: an order of magnitude faster than bigint.
  while (y !== 0n) {
    if (x <= SAFE && y <= SAFE) {
      let p = Number(x);
      let q = Number(y);
      while (q !== 0) [p, q] = [q, p % q];
      return BigInt(p);
    }
    [x, y] = [y, x % y];
  }
  return x;
}

/** numerator/denominator in lowest terms. Throws RangeError when the denominator is zero. */
export function rational(numerator: bigint | number, denominator: bigint | number = 1n): Rational {
  let n = BigInt(numerator);
  let d = BigInt(denominator);
  if (d === 0n) throw new RangeError('a rational number has no zero denominator');
  if (d === 1n) return n === 0n ? ZERO : n === 1n ? ONE : { numerator: n, denominator: d };
  const g = gcd(n, d);
  if (g !== 1n) {
    n /= g;
    d /= g;
  }
  if (d < 0n) {
    n = -n;
    d = -d;
  }
  return { numerator: n, denominator: d };
}

export function add(a: Rational, b: Rational): Rational {
  if (a.denominator === 1n && b.denominator === 1n) return rational(a.numerator + b.numerator);
  return rational(
    a.numerator * b.denominator + b.numerator * a.denominator,
    a.denominator * b.denominator,
  );
}

export function negate(a: Rational): Rational {
  return { numerator: -a.numerator, denominator: a.denominator };
}

export function subtract(a: Rational, b: Rational): Rational {
  return add(a, negate(b));
}

export function multiply(a: Rational, b: Rational): Rational {
  if (a.denominator === 1n && b.denominator === 1n) return rational(a.numerator * b.numerator);
  return rational(a.numerator * b.numerator, a.denominator * b.denominator);
}

/** 1/a. Throws RangeError for a = 0. */
export function invert(a: Rational): Rational {
  return rational(a.denominator, a.numerator);
}

/** a/b. Throws RangeError for b = 0. */
export function divide(a: Rational, b: Rational): Rational {
  return rational(a.numerator * b.denominator, a.denominator * b.numerator);
}

/** a^n for an integer n. Throws RangeError for 0 to a negative power. */
export function power(a: Rational, n: number): Rational {
  if (n < 0) return power(invert(a), -n);
  return { numerator: a.numerator ** BigInt(n), denominator: a.denominator ** BigInt(n) };
}

export function equals(a: Rational, b: Rational): boolean {
  return a.numerator === b.numerator && a.denominator === b.denominator;
}

/** Negative, zero or positive as a is less than, equal to or greater than b. */
export function compare(a: Rational, b: Rational): number {
  const left = a.numerator * b.denominator;
  const right = b.numerator * a.denominator;
  return left < right ? -1 : left > right ? 1 : 0;
}

export function isZero(a: Rational): boolean {
  return a.numerator === 0n;
}

export function isOne(a: Rational): boolean {
  return a.numerator === 1n && a.denominator === 1n;
}

export function isInteger(a: Rational): boolean {
  return a.denominator === 1n;
}

export function sign(a: Rational): -1 | 0 | 1 {
  return a.numerator < 0n ? -1 : a.numerator > 0n ? 1 : 0;
}

/** The largest integer not above a. */
export function floor(a: Rational): bigint {
  const quotient = a.numerator / a.denominator;
  return a.numerator < 0n && quotient * a.denominator !== a.numerator ? quotient - 1n : quotient;
}

/** The greatest rational g such that a/g and b/g are integers; gcd(0, b) = |b|. */
export function contentGcd(a: Rational, b: Rational): Rational {
  const g = gcd(a.numerator, b.numerator);
  const d = (a.denominator / gcd(a.denominator, b.denominator)) * b.denominator;
  return rational(g, d);
}

/**
 * The nearest double. Numerator and denominator are scaled by a common power of two before the
 * division, so that neither overflows on its own.
 */
export function toNumber(a: Rational): number {
  const n = Number(a.numerator);
  const d = Number(a.denominator);
  if (Number.isSafeInteger(n) && Number.isSafeInteger(d)) return n / d;
  const bits = absolute(a.numerator).toString(2).length - a.denominator.toString(2).length;
  const shift = 64 - bits;
  const quotient =
    shift >= 0
      ? (a.numerator << BigInt(shift)) / a.denominator
      : a.numerator / (a.denominator << BigInt(-shift));
  // Two steps, since 2^-shift alone may underflow where the product does not.
  const half = Math.trunc(shift / 2);
  return Number(quotient) * 2 ** -half * 2 ** (half - shift);
}

/**
 * The rational written by a decimal literal such as `6.02214076e23`, exactly.
 * Throws RangeError when the text is no decimal number.
 */
export function fromDecimal(text: string): Rational {
  const match = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d+))?$/.exec(text);
  const digits = (match?.[2] ?? '') + (match?.[3] ?? '');
  if (!match || digits === '') throw new RangeError(`not a decimal number: ${text}`);
  const exponent = Number(match[4] ?? 0) - (match[3]?.length ?? 0);
  const magnitude = BigInt(digits) * (match[1] === '-' ? -1n : 1n);
  return exponent >= 0
    ? rational(magnitude * 10n ** BigInt(exponent))
    : rational(magnitude, 10n ** BigInt(-exponent));
}

/** `3`, `-3/2`. */
export function toText(a: Rational): string {
  return a.denominator === 1n ? String(a.numerator) : `${a.numerator}/${a.denominator}`;
}
