/**
 * What grows like an exponential, split into e^p and a rest of the order of one, so that quotients
 * such as e^u/(e^u − 1)² have a value where numerator and denominator alone would overflow: a
 * vibration at low temperature, u = Θ/T = 1000, has the heat capacity e^(−1000) u² and not ∞/∞.
 */
import { number, product, splitPower } from '../algebra/construct.ts';
import type { Expression } from '../algebra/expression.ts';
import * as Q from '../algebra/rational.ts';
import type { Unary } from './tape.ts';

/** f(u) = e^peak(u) · rest(u). */
export interface LargeExponential {
  readonly argument: Expression;
  readonly peak: Unary;
  readonly rest: Unary;
  /** The whole power to which it is raised. */
  readonly power: number;
}

const positivePart: Unary = (u) => (u > 0 ? u : u <= 0 ? 0 : NaN);

/** e^u − 1 = e^(u⁺) expm1-like rest, with all digits near u = 0. */
const minusOneRest: Unary = (u) => (u > 0 ? -Math.expm1(-u) : Math.expm1(u));

/** e^u + 1 = e^(u⁺) (1 + e^(−|u|)). */
const plusOneRest: Unary = (u) => 1 + Math.exp(-Math.abs(u));

/** The parts of ±(e^u − 1) or ±(e^u + 1); `sign` in front. */
export function exponentialAndOne(
  e: Expression,
): { argument: Expression; sign: number; isMinus: boolean } | undefined {
  if (e.kind !== 'sum' || e.terms.length !== 1) return undefined;
  const [term] = e.terms;
  if (!term) return undefined;
  const isNegative =
    term.kind === 'product' && term.factors.length === 1 && isMinusOne(term.coefficient);
  const exponential = isNegative && term.kind === 'product' ? term.factors[0] : term;
  if (exponential?.kind !== 'call' || exponential.name !== 'exp') return undefined;
  const [argument] = exponential.arguments;
  const isOne = Q.isOne(e.constant);
  if (!argument || (!isOne && !isMinusOne(e.constant))) return undefined;
  const sign = isNegative ? -1 : 1;
  return { argument, sign, isMinus: isOne === isNegative };
}

function isMinusOne(r: Q.Rational): boolean {
  return r.numerator === -1n && r.denominator === 1n;
}

/** The factor as a large exponential to a whole power; undefined for anything else. */
export function asLargeExponential(factor: Expression): LargeExponential | undefined {
  const { base, exponent } = splitPower(factor);
  if (exponent.kind !== 'number' || !Q.isInteger(exponent.value)) return undefined;
  const power = Q.toNumber(exponent.value);
  if (base.kind === 'call') {
    const [argument] = base.arguments;
    if (!argument) return undefined;
    switch (base.name) {
      case 'exp':
        return { argument, peak: (u) => u, rest: (u) => (Number.isNaN(u) ? NaN : 1), power };
      case 'sinh':
        return {
          argument,
          peak: Math.abs,
          rest: (u) => (Math.sign(u) * -Math.expm1(-2 * Math.abs(u))) / 2,
          power,
        };
      case 'cosh':
        return { argument, peak: Math.abs, rest: (u) => plusOneRest(2 * u) / 2, power };
      default:
        return undefined;
    }
  }
  const found = exponentialAndOne(base);
  if (!found) return undefined;
  const { argument, sign, isMinus } = found;
  const rest = isMinus ? minusOneRest : plusOneRest;
  return { argument, peak: positivePart, rest: sign > 0 ? rest : (u) => -rest(u), power };
}

const LN_2 = Math.LN2;

/** ln(1 − e^u) without loss near u = 0 and for large −u (M. Mächler, 2012). */
function lnOneMinusExp(u: number): number {
  return u > -LN_2 ? Math.log(-Math.expm1(u)) : Math.log1p(-Math.exp(u));
}

/** ln(1 + e^u) without overflow. */
function lnOnePlusExp(u: number): number {
  return u > 0 ? u + Math.log1p(Math.exp(-u)) : Math.log1p(Math.exp(u));
}

/** ln cosh u, also where it is nearly 0: cosh u = 1 + 2 sinh²(u/2). */
function lnCosh(u: number): number {
  const size = Math.abs(u);
  return size < 20 ? Math.log1p(2 * Math.sinh(u / 2) ** 2) : size - LN_2;
}

/**
 * ln of a large exponential as one function of its argument: ln(1 ± e^u), ln(e^u − 1), ln sinh u,
 * ln cosh u.
 */
export function lnOfLargeExponential(
  e: Expression,
): { readonly argument: Expression; readonly f: Unary } | undefined {
  if (e.kind === 'call') {
    const [argument] = e.arguments;
    if (!argument) return undefined;
    if (e.name === 'sinh') return { argument, f: (u) => u - LN_2 + lnOneMinusExp(-2 * u) };
    return e.name === 'cosh' ? { argument, f: lnCosh } : undefined;
  }
  const found = exponentialAndOne(e);
  if (!found) return undefined;
  const { argument, sign, isMinus } = found;
  if (!isMinus) return sign > 0 ? { argument, f: lnOnePlusExp } : undefined;
  return { argument, f: sign > 0 ? (u) => u + lnOneMinusExp(-u) : lnOneMinusExp };
}

/**
 * x as e^v y, so that ln x = v + ln y neither overflows nor underflows; also through abbreviations,
 * except those whose value `isGiven`. Undefined where there is no exponential.
 */
export function splitExponentials(
  x: Expression,
  isGiven: (name: string) => boolean,
): { readonly exponents: readonly Expression[]; readonly rest: Expression } | undefined {
  const exponents: Expression[] = [];
  const others: Expression[] = [];
  const visit = (e: Expression): void => {
    if (e.kind === 'abbreviation' && !isGiven(e.name) && isProductLike(e.definition)) {
      visit(e.definition);
    } else if (e.kind === 'product') {
      others.push(number(e.coefficient));
      e.factors.forEach(visit);
    } else if (e.kind === 'call' && e.name === 'exp' && e.arguments[0]) {
      exponents.push(e.arguments[0]);
    } else {
      others.push(e);
    }
  };
  visit(x);
  return exponents.length === 0 ? undefined : { exponents, rest: product(others) };
}

function isProductLike(e: Expression): boolean {
  return (
    e.kind === 'product' || e.kind === 'abbreviation' || (e.kind === 'call' && e.name === 'exp')
  );
}
