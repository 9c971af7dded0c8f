/** Numbers of the parameter table on their way back into the text. */
import type { DeclaredQuantityView } from '../../../shared/contracts/derivation.ts';

/** Digits enough for any measured parameter, and few enough to read. */
const DIGITS = 6;

/** A number as it is written in a formulation: `3.7e-49`, `0.5`. */
export function writtenNumber(value: number): string {
  if (value === 0) return '0';
  const rounded = Number(value.toPrecision(DIGITS));
  const size = Math.abs(rounded);
  if (size >= 1e-3 && size < 1e6) return String(rounded);
  return rounded.toExponential().replace('e+', 'e');
}

/** The text with the value of a declared number replaced where it stands. */
export function writeValue(
  source: string,
  { valueSpan }: Pick<DeclaredQuantityView, 'valueSpan'>,
  written: string,
): string {
  return source.slice(0, valueSpan.start) + written + source.slice(valueSpan.end);
}

/** Two decades or more between positive bounds are walked in equal ratios. */
function isLogarithmic(lower: number, upper: number): boolean {
  return lower > 0 && upper / lower >= 100;
}

/** Where a value stands between its bounds, from 0 to 1. */
export function positionOf(value: number, lower: number, upper: number): number {
  const fraction = isLogarithmic(lower, upper)
    ? Math.log(value / lower) / Math.log(upper / lower)
    : (value - lower) / (upper - lower);
  return Math.min(1, Math.max(0, Number.isFinite(fraction) ? fraction : 0));
}

/** The value at a position between the bounds. */
export function valueAt(position: number, lower: number, upper: number): number {
  return isLogarithmic(lower, upper)
    ? lower * (upper / lower) ** position
    : lower + (upper - lower) * position;
}
