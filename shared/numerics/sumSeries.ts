/** Sums over whole numbers, also without end. */

export interface SeriesSum {
  readonly value: number;
  /** A bound on what was left out, by the ratio of the last terms; Infinity where none was found. */
  readonly remainder: number;
}

/** A series that has not settled after so many terms is given up. */
const MOST_TERMS = 2_000_000;
/** Terms of a rotor's sum rise before they fall: no verdict before this many. */
const FEWEST_TERMS = 8;

/**
 * Σ f(i) for i from `from` to `to`, which may be infinite. An endless sum stops where the terms
 * fall by a ratio r < 1 and what is left, at most |term| r/(1 − r), is below rounding; where they do
 * not, the value is NaN.
 */
export function sumSeries(f: (i: number) => number, from: number, to: number): SeriesSum {
  let sum = 0;
  let lost = 0;
  let previous = Infinity;
  let settled = 0;
  for (let i = from, count = 0; i <= to; i++, count++) {
    const term = f(i);
    // Compensated summation (Neumaier 1974).
    const total = sum + term;
    lost += Math.abs(sum) >= Math.abs(term) ? sum - total + term : term - total + sum;
    sum = total;
    if (to !== Infinity) continue;
    if (Number.isNaN(term) || count > MOST_TERMS) return { value: NaN, remainder: Infinity };
    const size = Math.abs(term);
    const ratio = previous === 0 ? 0 : size / previous;
    const remainder = ratio < 1 ? (size * ratio) / (1 - ratio) : Infinity;
    settled = remainder <= 1e-17 * Math.abs(sum) || size === 0 ? settled + 1 : 0;
    // Alternate terms may vanish, so three in a row have to be small.
    if (count >= FEWEST_TERMS && settled >= 3) return { value: sum + lost, remainder };
    previous = size === 0 ? previous : size;
  }
  return { value: sum + lost, remainder: 0 };
}
