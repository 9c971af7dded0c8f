/**
 * Monomials as strings: the code unit at position i is the exponent of variable i, trailing zeros
 * left away. x₀² x₂ is "\u0002\u0000\u0001" and 1 is "". Strings are compared, hashed and copied by the
 * engine itself, and their order is the lexicographic order of monomials.
 */
export type Monomial = string;

export const UNIT: Monomial = '';

/** Exponents are 16-bit; a higher one would wrap. */
const HIGHEST_EXPONENT = 65_535;

function fromExponents(exponents: number[]): Monomial {
  let length = exponents.length;
  while (length > 0 && exponents[length - 1] === 0) length--;
  exponents.length = length;
  return String.fromCharCode(...exponents);
}

export function monomialOf(variable: number, exponent: number): Monomial {
  if (exponent === 0) return UNIT;
  return '\0'.repeat(variable) + String.fromCharCode(exponent);
}

/** Throws RangeError where an exponent outgrows 65535. */
export function multiplyMonomials(a: Monomial, b: Monomial): Monomial {
  if (a === UNIT) return b;
  if (b === UNIT) return a;
  const [long, short] = a.length >= b.length ? [a, b] : [b, a];
  const exponents: number[] = [];
  for (let i = 0; i < short.length; i++) {
    const exponent = long.charCodeAt(i) + short.charCodeAt(i);
    if (exponent > HIGHEST_EXPONENT) throw new RangeError('an exponent above 65535');
    exponents.push(exponent);
  }
  return String.fromCharCode(...exponents) + long.slice(short.length);
}

/** a/b where b divides a, else undefined. */
export function divideMonomials(a: Monomial, b: Monomial): Monomial | undefined {
  if (b === UNIT) return a;
  if (b.length > a.length) return undefined;
  const exponents: number[] = [];
  for (let i = 0; i < b.length; i++) {
    const exponent = a.charCodeAt(i) - b.charCodeAt(i);
    if (exponent < 0) return undefined;
    exponents.push(exponent);
  }
  if (b.length < a.length) return String.fromCharCode(...exponents) + a.slice(b.length);
  return fromExponents(exponents);
}

/** The lower exponent of each variable. */
export function commonMonomial(a: Monomial, b: Monomial): Monomial {
  const exponents: number[] = [];
  for (let i = 0; i < Math.min(a.length, b.length); i++) {
    exponents.push(Math.min(a.charCodeAt(i), b.charCodeAt(i)));
  }
  return fromExponents(exponents);
}

export function exponentIn(a: Monomial, variable: number): number {
  return variable < a.length ? a.charCodeAt(variable) : 0;
}

/** The monomial with one variable taken out. */
export function withoutVariable(a: Monomial, variable: number): Monomial {
  if (exponentIn(a, variable) === 0) return a;
  const exponents = Array.from({ length: a.length }, (_, i) =>
    i === variable ? 0 : a.charCodeAt(i),
  );
  return fromExponents(exponents);
}

/** Pairs of variable and exponent, by variable. */
export function exponentsOf(a: Monomial): [variable: number, exponent: number][] {
  const pairs: [number, number][] = [];
  for (let i = 0; i < a.length; i++) {
    const exponent = a.charCodeAt(i);
    if (exponent > 0) pairs.push([i, exponent]);
  }
  return pairs;
}
