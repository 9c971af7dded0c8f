/** Sums and products over whole numbers, sums also without end. */

export interface SeriesSum {
  readonly value: number;
  /** A bound on what was left out, by the ratio of the last terms; Infinity where none was found. */
  readonly remainder: number;
}

/** A series that has not settled after so many terms is given up; a longer finite one is not begun. */
const MOST_TERMS = 2_000_000;
/** Terms of a rotor's sum rise before they fall: no verdict before this many. */
const FEWEST_TERMS = 8;
/** Leading terms may underflow to zero before the others come; more zeros than this are all zeros. */
const MOST_LEADING_ZEROS = 10_000;

const NO_VALUE: SeriesSum = { value: NaN, remainder: Infinity };

/**
 * Σ f(i) for i from `from` to `to`, which may be infinite. An endless sum stops where the terms
 * fall by a ratio r < 1 and what is left, at most |term| r/(1 − r), is below rounding; where they do
 * not, the value is NaN. It is also NaN for more than two million terms.
 */
export function sumSeries(f: (i: number) => number, from: number, to: number): SeriesSum {
  const isEndless = to === Infinity;
  if (!Number.isFinite(from) || Number.isNaN(to)) return NO_VALUE;
  if (!isEndless && to - from > MOST_TERMS) return NO_VALUE;
  let sum = 0;
  let lost = 0;
  let previous = Infinity;
  let settled = 0;
  let isSilent = true;
  for (let i = from, count = 0; i <= to; i++, count++) {
    const term = f(i);
    if (!Number.isFinite(term)) return NO_VALUE;
    // Compensated summation (Neumaier 1974).
    const total = sum + term;
    lost += Math.abs(sum) >= Math.abs(term) ? sum - total + term : term - total + sum;
    sum = total;
    if (!isEndless) continue;
    if (count > MOST_TERMS) return NO_VALUE;
    const size = Math.abs(term);
    if (size > 0) isSilent = false;
    else if (isSilent) {
      if (count < MOST_LEADING_ZEROS) continue;
      return { value: 0, remainder: 0 };
    }
    const ratio = size / previous;
    const remainder = ratio < 1 ? (size * ratio) / (1 - ratio) : Infinity;
    settled = remainder <= 1e-17 * Math.abs(sum) || size === 0 ? settled + 1 : 0;
    // Alternate terms may vanish, so three in a row have to be small.
    if (count >= FEWEST_TERMS && settled >= 3) return { value: sum + lost, remainder };
    previous = size === 0 ? previous : size;
  }
  return { value: sum + lost, remainder: 0 };
}

/** Π f(i) for i from `from` to `to`; NaN for more than two million factors or an endless product. */
export function multiplySeries(f: (i: number) => number, from: number, to: number): number {
  if (!Number.isFinite(from) || !(to - from <= MOST_TERMS)) return NaN;
  let product = 1;
  for (let i = from; i <= to; i++) product *= f(i);
  return product;
}
