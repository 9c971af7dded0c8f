/** Dimensions of the properties, and how their units are written. */
import * as Q from '../../algebra/rational.ts';
import {
  BASE_UNITS,
  dimension,
  divideDimensions,
  equalDimensions,
  multiplyDimensions,
  type Dimension,
} from '../../units/dimension.ts';

export const NUMBER = dimension();
export const ENERGY = dimension(2, 1, -2);
export const TEMPERATURE = dimension(0, 0, 0, 0, 1);
export const PRESSURE = dimension(-1, 1, -2);
export const MASS = dimension(0, 1);
export const VELOCITY = dimension(1, 0, -1);
export const AMOUNT = dimension(0, 0, 0, 0, 0, 1);
export const ENTROPY = divideDimensions(ENERGY, TEMPERATURE);

/** Named units after which a dimension is written, the longer ones built from these. */
const NAMED: readonly (readonly [string, Dimension])[] = [
  ['1', NUMBER],
  ['J', ENERGY],
  ['J/K', ENTROPY],
  ['Pa', PRESSURE],
  ['1/Pa', divideDimensions(NUMBER, PRESSURE)],
  ['1/K', divideDimensions(NUMBER, TEMPERATURE)],
  ['K/Pa', divideDimensions(TEMPERATURE, PRESSURE)],
  ['m/s', VELOCITY],
  ['N', dimension(1, 1, -2)],
  ['N/m', dimension(0, 1, -2)],
  ['m/N', dimension(0, -1, 2)],
  ['1/N', dimension(-1, -1, 2)],
  ['1/J', divideDimensions(NUMBER, ENERGY)],
  ['K m/N', dimension(0, -1, 2, 0, 1)],
  ['K/N', dimension(-1, -1, 2, 0, 1)],
  ['K/J', dimension(-2, -1, 2, 0, 1)],
  ['J m^3', multiplyDimensions(ENERGY, dimension(3))],
  ['J/T', dimension(2, 0, 0, 1)],
  ['J/T^2', dimension(2, -1, 2, 2)],
  ['T', dimension(0, 1, -2, -1)],
  ['V/m', dimension(1, 1, -3, -1)],
  ['C m', dimension(1, 0, 1, 1)],
];

/** The coherent SI unit of a dimension: `J/K`, `K/Pa`, `kg m^2 s^-3`; `1` for a number. */
export function unitOf(d: Dimension): string {
  const named = NAMED.find(([, known]) => equalDimensions(known, d));
  if (named) return named[0];
  return BASE_UNITS.map((unit, i) => {
    const exponent = d[i] ?? Q.ZERO;
    if (Q.isZero(exponent)) return '';
    if (Q.isOne(exponent)) return unit;
    const text = Q.toText(exponent);
    return `${unit}^${Q.isInteger(exponent) ? text : `(${text})`}`;
  })
    .filter((part) => part !== '')
    .join(' ');
}

/** The unit per mole: `J/mol`, `J/(K mol)`, `m^3/mol`. */
export function unitPerMole(d: Dimension): string {
  const unit = unitOf(d);
  if (unit === '1') return '1/mol';
  if (!unit.includes('/')) return `${unit}/mol`;
  const [above, below] = unit.split('/');
  return `${above ?? ''}/(${below ?? ''} mol)`;
}
