/** ζ(s) for s > 0 without reflection, so that the gamma function can lean on it. */

/** B_{2k}/(2k)! for k = 1 … 6. */
const COEFFICIENTS = [
  1 / 12,
  -1 / 720,
  1 / 30240,
  -1 / 1209600,
  1 / 47900160,
  -691 / 1307674368000,
];

/** Terms that are added one by one before the formula takes the rest. */
const FROM = 20;

/** ζ(s) for s > 0, s ≠ 1, by Euler and Maclaurin's formula (DLMF 25.2.9). */
export function zetaSum(s: number): number {
  let sum = 0;
  for (let k = FROM - 1; k >= 1; k--) sum += k ** -s;
  sum += FROM ** (1 - s) / (s - 1) + FROM ** -s / 2;
  let term = s * FROM ** (-s - 1);
  COEFFICIENTS.forEach((c, i) => {
    sum += c * term;
    term *= ((s + 2 * i + 1) * (s + 2 * i + 2)) / (FROM * FROM);
  });
  return sum;
}
