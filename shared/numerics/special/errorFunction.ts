/** The error function for real arguments. */

/**
 * erf x by its Taylor series in Kummer's form (DLMF 7.6.2) for small |x|, by Lentz's evaluation of
 * the continued fraction of erfc (DLMF 7.9.3) beyond.
 */
export function erf(x: number): number {
  const magnitude = Math.abs(x);
  if (Number.isNaN(x)) return NaN;
  if (magnitude > 6) return Math.sign(x);
  if (magnitude < 2.5) {
    let term = x;
    let sum = x;
    for (let n = 1; n < 200; n++) {
      term *= (2 * x * x) / (2 * n + 1);
      sum += term;
      if (Math.abs(term) < 1e-17 * Math.abs(sum)) break;
    }
    return (2 / Math.sqrt(Math.PI)) * Math.exp(-x * x) * sum;
  }
  let fraction = 0;
  for (let n = 120; n >= 1; n--) fraction = n / 2 / (magnitude + fraction);
  const complement = Math.exp(-x * x) / (Math.sqrt(Math.PI) * (magnitude + fraction));
  return Math.sign(x) * (1 - complement);
}
