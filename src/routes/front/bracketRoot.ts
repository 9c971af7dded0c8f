/**
 * A root of f between a and b, at which f has opposite signs; undefined where it has not. False
 * position with the Illinois weighting, which keeps the bracket and converges faster than halving.
 */
export function bracketRoot(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = 1e-12,
): number | undefined {
  let left = a;
  let right = b;
  let fLeft = f(left);
  let fRight = f(right);
  if (fLeft === 0) return left;
  if (fRight === 0) return right;
  // Written so that a value that is no number counts as no change of sign.
  if (!(fLeft * fRight < 0)) return undefined;
  let side = 0;
  for (let turn = 0; turn < 100; turn++) {
    const middle =
      turn % 8 === 7 ? (left + right) / 2 : (fLeft * right - fRight * left) / (fLeft - fRight);
    const value = f(middle);
    if (Number.isNaN(value)) return undefined;
    if (value === 0 || Math.abs(right - left) <= tolerance * Math.abs(middle)) return middle;
    if (value * fRight > 0) {
      right = middle;
      fRight = value;
      if (side === -1) fLeft /= 2;
      side = -1;
    } else {
      left = middle;
      fLeft = value;
      if (side === 1) fRight /= 2;
      side = 1;
    }
  }
  return (left + right) / 2;
}
