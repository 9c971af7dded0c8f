/** Definite integrals of functions of one real variable. */

export interface Quadrature {
  readonly value: number;
  /** An estimate of the absolute error; Infinity where the integral did not settle. */
  readonly error: number;
}

/** The abscissae are spaced by 2^−level in the variable of the double-exponential substitution. */
const COARSEST_LEVEL = 2;
const FINEST_LEVEL = 9;
/** Beyond this the weights of the substitution underflow. */
const REACH = 4.2;

/**
 * ∫ f from a to b, either of which may be infinite, by the double-exponential rule (H. Takahasi and
 * M. Mori, Publ. RIMS 9 (1974) 721). It takes integrable singularities at the ends as they come: f
 * is never asked at the ends themselves, and a value there that is not finite counts as zero.
 */
export function integrate(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = 1e-13,
): Quadrature {
  if (a === b) return { value: 0, error: 0 };
  if (a > b) {
    const { value, error } = integrate(f, b, a, tolerance);
    return { value: -value, error };
  }
  const rule = substitution(f, a, b);
  const at = (t: number): number => {
    const { x, weight } = rule(t);
    if (weight === 0 || !(x > a) || !(x < b)) return 0;
    const value = f(x) * weight;
    return Number.isFinite(value) ? value : 0;
  };
  let step = 2 ** -COARSEST_LEVEL;
  let sum = at(0);
  for (let t = step; t <= REACH; t += step) sum += at(t) + at(-t);
  let previous = sum * step;
  for (let level = COARSEST_LEVEL + 1; level <= FINEST_LEVEL; level++) {
    step /= 2;
    for (let t = step; t <= REACH; t += 2 * step) sum += at(t) + at(-t);
    const value = sum * step;
    const error = Math.abs(value - previous);
    if (error <= tolerance * Math.abs(value) && level > COARSEST_LEVEL + 2) return { value, error };
    previous = value;
  }
  return { value: previous, error: Math.abs(previous) * 1e-6 };
}

/** x(t) and dx/dt that take −∞ < t < ∞ to the interval. */
function substitution(
  f: (x: number) => number,
  a: number,
  b: number,
): (t: number) => { x: number; weight: number } {
  const isFrom = Number.isFinite(a);
  const isTo = Number.isFinite(b);
  if (isFrom && isTo) {
    const half = (b - a) / 2;
    return (t) => {
      const u = (Math.PI / 2) * Math.sinh(t);
      const cosh = Math.cosh(u);
      // The distance from the nearer end keeps its digits where tanh u is 1 to rounding.
      const distance = (half * Math.exp(-Math.abs(u))) / cosh;
      return {
        x: t < 0 ? a + distance : b - distance,
        weight: (half * (Math.PI / 2) * Math.cosh(t)) / (cosh * cosh),
      };
    };
  }
  if (isFrom || isTo) {
    const end = isFrom ? a : b;
    const direction = isFrom ? 1 : -1;
    const scale = scaleOf((distance) => f(end + direction * distance));
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
    return { x: Math.sinh(u), weight: Math.cosh(u) * (Math.PI / 2) * Math.cosh(t) };
  };
}

/**
 * The distance about which an integrand over a half-line weighs most, in powers of 10^(1/3): the
 * rule is dense there, be it at an ångström or at a light-year.
 */
function scaleOf(f: (distance: number) => number): number {
  let scale = 1;
  let largest = 0;
  for (let k = -120; k <= 120; k++) {
    const distance = 10 ** (k / 3);
    const weight = Math.abs(f(distance)) * distance;
    if (weight > largest && Number.isFinite(weight)) {
      largest = weight;
      scale = distance;
    }
  }
  return scale;
}
