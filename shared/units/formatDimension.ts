/** Dimensions in words and as units that a reader knows. */
import * as Q from '../algebra/rational.ts';
import {
  BASE_UNITS,
  dimension,
  DIMENSIONLESS,
  divideDimensions,
  equalDimensions,
  isDimensionless,
  multiplyDimensions,
  type Dimension,
} from './dimension.ts';

interface Named {
  /** With its article: `an energy`. */
  readonly words: string;
  readonly dimension: Dimension;
}

const NAMED_QUANTITIES: readonly Named[] = [
  { words: 'a number', dimension: DIMENSIONLESS },
  { words: 'an energy', dimension: dimension(2, 1, -2) },
  { words: 'a temperature', dimension: dimension(0, 0, 0, 0, 1) },
  { words: 'a length', dimension: dimension(1) },
  { words: 'an area', dimension: dimension(2) },
  { words: 'a volume', dimension: dimension(3) },
  { words: 'a mass', dimension: dimension(0, 1) },
  { words: 'a time', dimension: dimension(0, 0, 1) },
  { words: 'a frequency', dimension: dimension(0, 0, -1) },
  { words: 'a wavenumber', dimension: dimension(-1) },
  { words: 'a number density', dimension: dimension(-3) },
  { words: 'a pressure', dimension: dimension(-1, 1, -2) },
  { words: 'an entropy', dimension: dimension(2, 1, -2, 0, -1) },
  { words: 'an action', dimension: dimension(2, 1, -1) },
  { words: 'a velocity', dimension: dimension(1, 0, -1) },
  { words: 'a force', dimension: dimension(1, 1, -2) },
  { words: 'a surface tension', dimension: dimension(0, 1, -2) },
  { words: 'an electric charge', dimension: dimension(0, 0, 1, 1) },
  { words: 'an electric potential', dimension: dimension(2, 1, -3, -1) },
  { words: 'an electric field strength', dimension: dimension(1, 1, -3, -1) },
  { words: 'a magnetic flux density', dimension: dimension(0, 1, -2, -1) },
  { words: 'a magnetic moment', dimension: dimension(2, 0, 0, 1) },
  { words: 'an electric dipole moment', dimension: dimension(1, 0, 1, 1) },
  { words: 'an amount of substance', dimension: dimension(0, 0, 0, 0, 0, 1) },
  { words: 'a reciprocal amount of substance', dimension: dimension(0, 0, 0, 0, 0, -1) },
  { words: 'a molar energy', dimension: dimension(2, 1, -2, 0, 0, -1) },
  { words: 'a molar volume', dimension: dimension(3, 0, 0, 0, 0, -1) },
  { words: 'a molar mass', dimension: dimension(0, 1, 0, 0, 0, -1) },
];

/** Derived units with which compound ones are built, the more telling ones first. */
const BUILDING: readonly (readonly [string, Dimension])[] = [
  ['J', dimension(2, 1, -2)],
  ['Pa', dimension(-1, 1, -2)],
  ['N', dimension(1, 1, -2)],
  ['T', dimension(0, 1, -2, -1)],
  ['V', dimension(2, 1, -3, -1)],
  ['C', dimension(0, 0, 1, 1)],
];

function size(d: Dimension): number {
  let total = 0;
  for (const exponent of d) total += Math.abs(Q.toNumber(exponent)) + (Q.isZero(exponent) ? 0 : 1);
  return total;
}

function writePower(unit: string, exponent: Q.Rational): string {
  if (Q.isOne(exponent)) return unit;
  const text = Q.toText(exponent);
  return Q.isInteger(exponent) ? `${unit}^${text}` : `${unit}^(${text})`;
}

function writeFactors(factors: readonly (readonly [string, Q.Rational])[]): string {
  const above = factors.filter(([, e]) => Q.sign(e) > 0).map(([u, e]) => writePower(u, e));
  const below = factors
    .filter(([, e]) => Q.sign(e) < 0)
    .map(([u, e]) => writePower(u, Q.negate(e)));
  if (below.length === 0) return above.join(' ');
  const divisor = below.length === 1 ? below[0] : `(${below.join(' ')})`;
  return `${above.length === 0 ? '1' : above.join(' ')}/${divisor ?? ''}`;
}

function baseFactors(d: Dimension): (readonly [string, Q.Rational])[] {
  const factors = BASE_UNITS.map((unit, i) => [unit, d[i] ?? Q.ZERO] as const);
  return factors.filter(([, exponent]) => !Q.isZero(exponent));
}

/**
 * The coherent SI unit of a dimension as a reader expects it: `Pa`, `J/K`, `J m^3`, `J/(K mol)`,
 * `1` for a number. `parseUnit` reads it back to the same dimension with factor 1.
 */
export function formatDimension(d: Dimension): string {
  if (isDimensionless(d)) return '1';
  let best = baseFactors(d);
  let bestSize = size(d);
  for (const [unit, of] of BUILDING) {
    for (const exponent of [1, -1, 2]) {
      let rest = d;
      for (let i = 0; i < Math.abs(exponent); i++) {
        rest = exponent > 0 ? divideDimensions(rest, of) : multiplyDimensions(rest, of);
      }
      const total = size(rest) + 1 + Math.abs(exponent);
      if (total < bestSize) {
        best = [[unit, Q.rational(exponent)], ...baseFactors(rest)];
        bestSize = total;
      }
    }
  }
  return writeFactors(best);
}

/** `an energy, J`; `a number`; `a quantity in J m^3` where it has no common name. */
export function describeDimension(d: Dimension): string {
  if (isDimensionless(d)) return 'a number';
  const named = NAMED_QUANTITIES.find((known) => equalDimensions(known.dimension, d));
  const unit = formatDimension(d);
  return named ? `${named.words}, ${unit}` : `a quantity in ${unit}`;
}
