/** Zeros of functions of one real variable. */

/**
 * A zero of f between a and b, where f has opposite signs, by R. P. Brent's method (Algorithms for
 * Minimization without Derivatives, 1973, ch. 4); undefined where the signs are equal.
 */
export function brent(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = 0,
): number | undefined {
  let [left, right] = [a, b];
  let [fLeft, fRight] = [f(left), f(right)];
  if (fLeft === 0) return left;
  if (fRight === 0) return right;
  if (!(fLeft * fRight < 0)) return undefined;
  let [other, fOther] = [left, fLeft];
  let step = right - left;
  let before = step;
  for (let i = 0; i < 200; i++) {
    if (Math.abs(fOther) < Math.abs(fRight)) {
      [left, right, other] = [right, other, right];
      [fLeft, fRight, fOther] = [fRight, fOther, fRight];
    }
    const precision = 2 * Number.EPSILON * Math.abs(right) + tolerance / 2;
    const middle = (other - right) / 2;
    if (Math.abs(middle) <= precision || fRight === 0) return right;
    if (Math.abs(before) < precision || Math.abs(fLeft) <= Math.abs(fRight)) {
      step = before = middle;
    } else {
      const s = fRight / fLeft;
      let p: number;
      let q: number;
      if (left === other) {
        p = 2 * middle * s;
        q = 1 - s;
      } else {
        const r = fRight / fOther;
        const t = fLeft / fOther;
        p = s * (2 * middle * t * (t - r) - (right - left) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
      if (2 * p < Math.min(3 * middle * q - Math.abs(precision * q), Math.abs(before * q))) {
        before = step;
        step = p / q;
      } else {
        step = before = middle;
      }
    }
    [left, fLeft] = [right, fRight];
    right += Math.abs(step) > precision ? step : middle > 0 ? precision : -precision;
    fRight = f(right);
    if (fRight * fOther > 0) {
      [other, fOther] = [left, fLeft];
      step = before = right - left;
    }
  }
  return right;
}

/**
 * A zero of f between a and b, where f has opposite signs, by Newton's method, which halves the
 * bracket instead wherever a step would leave it or gain too little (as rtsafe of W. H. Press et
 * al., Numerical Recipes, ch. 9.4, describes the safeguard). `f` returns the value and the slope.
 * Undefined where the signs are equal or a value is missing.
 */
export function newton(
  f: (x: number) => readonly [value: number, slope: number],
  a: number,
  b: number,
  tolerance = 0,
): number | undefined {
  const [fa] = f(a);
  const [fb] = f(b);
  if (fa === 0) return a;
  if (fb === 0) return b;
  if (!(fa * fb < 0)) return undefined;
  let [below, above] = fa < 0 ? [a, b] : [b, a];
  let x = (a + b) / 2;
  let before = Math.abs(b - a);
  for (let i = 0; i < 200; i++) {
    const [value, slope] = f(x);
    if (Number.isNaN(value)) return undefined;
    if (value === 0) return x;
    if (value < 0) below = x;
    else above = x;
    const [low, high] = below < above ? [below, above] : [above, below];
    const byNewton = x - value / slope;
    const isSafe = byNewton > low && byNewton < high && Math.abs(byNewton - x) < before / 2;
    const next = isSafe ? byNewton : (low + high) / 2;
    before = Math.abs(next - x);
    x = next;
    if (before <= 2 * Number.EPSILON * Math.abs(x) + tolerance / 2) return x;
  }
  return x;
}
