/** Definite integrals of functions of one real variable. */
import { integrateAdaptively } from './gaussKronrod.ts';

export interface Quadrature {
  /** NaN where the integrand has no value inside, or where the integral diverges at an end. */
  readonly value: number;
  /** An estimate of the absolute error; Infinity where the integral did not settle. */
  readonly error: number;
  /** ∫ |f|, against which the error of an integral that cancels is judged. */
  readonly magnitude: number;
}

/** True where the error is within the tolerance, relative to the value or to what cancels. */
export function isSettled({ value, error, magnitude }: Quadrature, tolerance: number): boolean {
  return error <= tolerance * Math.abs(value) || error <= 1e-5 * tolerance * magnitude;
}

/** The abscissae are spaced by 2^−level in the variable of the double-exponential substitution. */
const COARSEST_LEVEL = 2;
const FINEST_LEVEL = 9;
/** Beyond this the abscissae are ends of the interval to the last digit. */
const REACH = 6.1;
/** A contribution below this part of the whole no longer counts. */
const NEGLIGIBLE = 1e-20;
/** What may at most be lost where the integrand stops to have a value towards an end. */
const TOLERABLE = 1e-10;

/** The difference of the level before the last that is believed. */
const LAST_BUT_ONE = 1e-8;

const NO_VALUE: Quadrature = { value: NaN, error: Infinity, magnitude: NaN };

/**
 * ∫ f from a to b, either of which may be infinite, by the double-exponential rule (H. Takahasi and
 * M. Mori, Publ. RIMS 9 (1974) 721), which takes integrable singularities at the ends as they come:
 * f is never asked at the ends themselves. Where the rule does not settle, because f has kinks or
 * narrow peaks, the substituted integrand is integrated adaptively instead.
 */
export function integrate(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = 1e-13,
): Quadrature {
  if (Number.isNaN(a) || Number.isNaN(b)) return NO_VALUE;
  if (a === b) return { value: 0, error: 0, magnitude: 0 };
  if (a > b) {
    const result = integrate(f, b, a, tolerance);
    return { ...result, value: -result.value };
  }
  const rule = substitution(a, b, scaleOf(f, a, b));
  const at = (t: number): number => {
    const { x, weight } = rule(t);
    // A weight of zero is the end of the interval, where f need not have a value.
    if (weight === 0 || !(x > a) || !(x < b) || x === Infinity || weight === Infinity) return 0;
    return f(x) * weight;
  };
  const coarse = 2 ** -COARSEST_LEVEL;
  const middle = at(0);
  const right = arm(at, coarse, 1, Math.abs(middle));
  const left = arm(at, coarse, -1, Math.max(right.largest, Math.abs(middle)));
  const largest = Math.max(right.largest, left.largest, Math.abs(middle));
  if (!Number.isFinite(middle) || left.last > TOLERABLE * largest) return NO_VALUE;
  if (right.last > TOLERABLE * largest) return NO_VALUE;

  let step = coarse;
  let sum = middle + right.sum + left.sum;
  let absolute = Math.abs(middle) + right.absolute + left.absolute;
  let previous = sum * step;
  let before = Infinity;
  for (let level = COARSEST_LEVEL + 1; level <= FINEST_LEVEL; level++) {
    step /= 2;
    for (let t = step; t <= right.reach; t += 2 * step) {
      const term = at(t);
      sum += term;
      absolute += Math.abs(term);
    }
    for (let t = step; t <= left.reach; t += 2 * step) {
      const term = at(-t);
      sum += term;
      absolute += Math.abs(term);
    }
    if (!Number.isFinite(sum)) return NO_VALUE;
    const value = sum * step;
    const magnitude = absolute * step;
    const error = Math.abs(value - previous);
    // The digits of a smooth integrand double with every level; with kinks a single small
    // difference may be an accident.
    if (
      error <= tolerance * Math.max(Math.abs(value), 1e-3 * magnitude) &&
      before <= LAST_BUT_ONE * magnitude
    ) {
      return { value, error, magnitude };
    }
    before = error;
    previous = value;
  }
  return integrateAdaptively(at, -left.reach, right.reach, tolerance);
}

/** One side of the sum at the coarsest step, from the middle to where nothing more comes. */
function arm(
  at: (t: number) => number,
  step: number,
  direction: 1 | -1,
  known: number,
): { sum: number; absolute: number; reach: number; largest: number; last: number } {
  let sum = 0;
  let absolute = 0;
  let largest = known;
  let last = 0;
  let quiet = 0;
  let reach = 0;
  for (let k = 1; k * step <= REACH; k++) {
    const term = at(direction * k * step);
    if (!Number.isFinite(term)) return { sum, absolute, reach, largest, last };
    reach = k * step;
    sum += term;
    last = Math.abs(term);
    absolute += last;
    largest = Math.max(largest, last);
    quiet = last <= NEGLIGIBLE * largest ? quiet + 1 : 0;
    // Narrow peaks may stand far out: silence before the first sound is no end.
    if (quiet >= 4 && largest > 0 && k * step > 4) break;
  }
  return { sum, absolute, reach, largest, last };
}

/** Half decades from 10^−30 to 10^30, among which the scale of an endless interval is looked for. */
const SCALES = Array.from({ length: 121 }, (_, i) => 10 ** (i / 2 - 30));

/**
 * How far from the end of an endless interval most of the integral lies: 10^−10 for a potential in
 * metres. The substitution has its finest abscissae about there. 1 for a finite interval.
 */
function scaleOf(f: (x: number) => number, a: number, b: number): number {
  if (Number.isFinite(a) && Number.isFinite(b)) return 1;
  let best = 1;
  let largest = 0;
  const end = Number.isFinite(a) ? a : Number.isFinite(b) ? b : 0;
  for (const distance of SCALES) {
    const right = b === Infinity ? Math.abs(f(end + distance)) : 0;
    const left = a === -Infinity ? Math.abs(f(end - distance)) : 0;
    const size = Math.max(right, left) * distance;
    if (size > largest && Number.isFinite(size)) [best, largest] = [distance, size];
  }
  return best;
}

/** x(t) and dx/dt that take −∞ < t < ∞ to the interval. */
function substitution(
  a: number,
  b: number,
  scale: number,
): (t: number) => { x: number; weight: number } {
  const isFrom = Number.isFinite(a);
  const isTo = Number.isFinite(b);
  if (isFrom && isTo) {
    const half = (b - a) / 2;
    return (t) => {
      const u = (Math.PI / 2) * Math.sinh(t);
      // Both keep their digits where tanh u is 1 to rounding and cosh u overflows.
      const decay = Math.exp(-2 * Math.abs(u));
      const distance = (2 * half * decay) / (1 + decay);
      return {
        x: t < 0 ? a + distance : b - distance,
        weight: (half * 2 * Math.PI * Math.cosh(t) * decay) / (1 + decay) ** 2,
      };
    };
  }
  if (isFrom || isTo) {
    const end = isFrom ? a : b;
    const direction = isFrom ? 1 : -1;
    return (t) => {
      const distance = scale * Math.exp((Math.PI / 2) * Math.sinh(t));
      return {
        x: end + direction * distance,
        weight: distance * (Math.PI / 2) * Math.cosh(t),
      };
    };
  }
  return (t) => {
    const u = (Math.PI / 2) * Math.sinh(t);
    return {
      x: scale * Math.sinh(u),
      weight: scale * Math.cosh(u) * (Math.PI / 2) * Math.cosh(t),
    };
  };
}

/** ∫ f from a to b in pieces between the given points, in any order; NaN among them is ignored. */
export function integratePieces(
  f: (x: number) => number,
  a: number,
  b: number,
  points: ArrayLike<number>,
  tolerance = 1e-13,
): Quadrature {
  const [low, high] = a <= b ? [a, b] : [b, a];
  const inside = Array.from(points)
    .filter((x) => x > low && x < high)
    .sort((x, y) => x - y);
  if (inside.length === 0) return integrate(f, a, b, tolerance);
  const ends = [low, ...inside, high];
  let value = 0;
  let error = 0;
  let magnitude = 0;
  for (let i = 1; i < ends.length; i++) {
    const piece = integrate(f, ends[i - 1] ?? NaN, ends[i] ?? NaN, tolerance);
    value += piece.value;
    error += piece.error;
    magnitude += piece.magnitude;
  }
  return { value: a <= b ? value : -value, error, magnitude };
}
