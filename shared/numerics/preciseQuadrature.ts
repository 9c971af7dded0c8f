/** Definite integrals with many digits. */
import { big, BIG_ONE, BIG_PI, BIG_ZERO, DIGITS, type BigNumber } from './bigNumber.ts';

type Integrand = (x: BigNumber) => BigNumber | undefined;

const FINEST_LEVEL = 7;
/** Here an end is nearer than 10^−170: enough for x^(−1/2) to all digits. */
const REACH = 6;
/** Two levels that agree to this part have settled: the next would agree to the square of it. */
const SETTLED = big('1e-36');
const NEGLIGIBLE = big(`1e-${DIGITS + 6}`);
/** What may be lost where the integrand stops to have a value towards an end. */
const TOLERABLE = big('1e-38');
const HALF_PI = BIG_PI.div(2);

/**
 * ∫ f from a to b, either of which may be infinite, in pieces between the given points, by the
 * double-exponential rule (H. Takahasi and M. Mori, Publ. RIMS 9 (1974) 721) to thirty-odd digits;
 * undefined where it does not settle or f has no value.
 */
export function integratePrecisely(
  f: Integrand,
  a: BigNumber,
  b: BigNumber,
  points: readonly BigNumber[] = [],
): BigNumber | undefined {
  if (a.isNaN() || b.isNaN()) return undefined;
  if (a.eq(b)) return BIG_ZERO;
  if (a.gt(b)) return integratePrecisely(f, b, a, points)?.neg();
  const inside = points
    .filter((x) => x.gt(a) && x.lt(b) && x.isFinite())
    .sort((x, y) => (x.lt(y) ? -1 : x.gt(y) ? 1 : 0));
  // The whole line is cut where its substitution would have its middle.
  if (inside.length === 0 && !a.isFinite() && !b.isFinite()) inside.push(BIG_ZERO);
  const ends = [a, ...inside, b];
  let sum = BIG_ZERO;
  for (let i = 1; i < ends.length; i++) {
    const piece = integratePiece(f, ends[i - 1] ?? a, ends[i] ?? b);
    if (!piece) return undefined;
    sum = sum.plus(piece);
  }
  return sum;
}

function integratePiece(f: Integrand, a: BigNumber, b: BigNumber): BigNumber | undefined {
  if (a.eq(b)) return BIG_ZERO;
  const at = substituted(f, a, b);
  const middle = at(BIG_ZERO);
  if (!middle?.isFinite()) return undefined;
  let largest = middle.abs();
  let sum = middle;
  // The coarsest level finds how far the substituted integrand reaches on both sides.
  const reaches = ([1, -1] as const).map((direction) => {
    let reach = 0;
    let last = BIG_ZERO;
    let quiet = 0;
    for (let k = 1; k <= REACH * 2 && quiet < 3; k++) {
      const value = at(big((direction * k) / 2));
      if (!value?.isFinite()) break;
      reach = k / 2;
      last = value.abs();
      sum = sum.plus(value);
      if (last.gt(largest)) largest = last;
      quiet = last.lte(largest.times(NEGLIGIBLE)) ? quiet + 1 : 0;
    }
    return { direction, reach, last };
  });
  if (reaches.some(({ last }) => last.gt(largest.times(TOLERABLE)))) return undefined;

  let previous = sum.div(2);
  for (let level = 2; level <= FINEST_LEVEL; level++) {
    const step = 2 ** -level;
    for (const { direction, reach } of reaches) {
      for (let t = step; t <= reach; t += 2 * step) {
        const value = at(big(direction * t));
        if (!value?.isFinite()) return undefined;
        sum = sum.plus(value);
      }
    }
    const value = sum.times(step);
    if (value.minus(previous).abs().lte(value.abs().times(SETTLED))) return value;
    previous = value;
  }
  return undefined;
}

/** f(x(t)) dx/dt for the substitution that takes −∞ < t < ∞ to the interval. */
function substituted(f: Integrand, a: BigNumber, b: BigNumber): Integrand {
  if (a.isFinite() && b.isFinite()) {
    const length = b.minus(a);
    return (t) => {
      const u = HALF_PI.times(t.sinh());
      const decay = u.abs().times(-2).exp();
      const whole = decay.plus(1);
      const distance = length.times(decay).div(whole);
      const x = t.isNegative() ? a.plus(distance) : b.minus(distance);
      if (x.lte(a) || x.gte(b)) return BIG_ZERO;
      const speed = length.times(BIG_PI).times(t.cosh()).times(decay).div(whole.times(whole));
      return f(x)?.times(speed);
    };
  }
  const isFrom = a.isFinite();
  const end = isFrom ? a : b;
  const scale = scaleOf((distance) => f(isFrom ? end.plus(distance) : end.minus(distance)));
  return (t) => {
    const distance = scale.times(HALF_PI.times(t.sinh()).exp());
    const value = f(isFrom ? end.plus(distance) : end.minus(distance));
    return value?.times(distance).times(HALF_PI).times(t.cosh());
  };
}

/** The power of ten about which most of an endless integral lies. */
function scaleOf(at: Integrand): BigNumber {
  let best = BIG_ONE;
  let largest = BIG_ZERO;
  for (let exponent = -30; exponent <= 30; exponent++) {
    const distance = big(`1e${exponent}`);
    const size = at(distance)?.abs().times(distance);
    if (size?.isFinite() && size.gt(largest)) [best, largest] = [distance, size];
  }
  return best;
}
