/** Dimensions of the properties, and how their units are written. */
import {
  dimension,
  divideDimensions,
  equalDimensions,
  type Dimension,
} from '../../units/dimension.ts';
import { formatDimension } from '../../units/formatDimension.ts';

export const NUMBER = dimension();
export const ENERGY = dimension(2, 1, -2);
export const TEMPERATURE = dimension(0, 0, 0, 0, 1);
export const PRESSURE = dimension(-1, 1, -2);
export const MASS = dimension(0, 1);
export const VELOCITY = dimension(1, 0, -1);
export const AMOUNT = dimension(0, 0, 0, 0, 0, 1);
export const ENTROPY = divideDimensions(ENERGY, TEMPERATURE);

/** Units that have a better name in this trade than the one of the general rule. */
const NAMED: readonly (readonly [string, Dimension])[] = [
  ['N/m', dimension(0, 1, -2)],
  ['m/N', dimension(0, -1, 2)],
  ['K m/N', dimension(0, -1, 2, 0, 1)],
  ['J/T', dimension(2, 0, 0, 1)],
  ['J/T^2', dimension(2, -1, 2, 2)],
];

/** The coherent SI unit of a dimension: `J/K`, `K/Pa`; `1` for a number. */
export function unitOf(d: Dimension): string {
  const named = NAMED.find(([, known]) => equalDimensions(known, d));
  return named ? named[0] : formatDimension(d);
}

/** The unit per mole: `J/mol`, `J/(K mol)`, `m^3/mol`. */
export function unitPerMole(d: Dimension): string {
  return unitOf(divideDimensions(d, AMOUNT));
}
