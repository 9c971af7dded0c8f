/**
 * The units that may stand in square brackets, each as an exact multiple of coherent SI units.
 *
 * Names are case-sensitive. A name of the table is tried whole before it is taken apart into prefix
 * and unit, so that `min` is the minute and `cd` the candela.
 */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { dimension, type Dimension } from './dimension.ts';

export interface Unit {
  /** How many coherent SI units one of it is. */
  readonly factor: Rational;
  readonly dimension: Dimension;
  readonly title: string;
}

interface Entry extends Unit {
  readonly takesPrefix: boolean;
}

const LENGTH = dimension(1);
const MASS = dimension(0, 1);
const TIME = dimension(0, 0, 1);
const ENERGY = dimension(2, 1, -2);
const PRESSURE = dimension(-1, 1, -2);

function withPrefix(title: string, factor: string, of: Dimension): Entry {
  return { factor: Q.fromDecimal(factor), dimension: of, title, takesPrefix: true };
}

function alone(title: string, factor: string, of: Dimension): Entry {
  return { ...withPrefix(title, factor, of), takesPrefix: false };
}

/** c in m/s, for the debye: 1 D is 1e-21 C m²/s divided by c. */
const SPEED_OF_LIGHT = Q.rational(299_792_458);

const UNITS: Readonly<Record<string, Entry>> = {
  m: withPrefix('metre', '1', LENGTH),
  g: withPrefix('gram', '0.001', MASS),
  s: withPrefix('second', '1', TIME),
  A: withPrefix('ampere', '1', dimension(0, 0, 0, 1)),
  K: withPrefix('kelvin', '1', dimension(0, 0, 0, 0, 1)),
  mol: withPrefix('mole', '1', dimension(0, 0, 0, 0, 0, 1)),
  cd: withPrefix('candela', '1', dimension(0, 0, 0, 0, 0, 0, 1)),
  Hz: withPrefix('hertz', '1', dimension(0, 0, -1)),
  N: withPrefix('newton', '1', dimension(1, 1, -2)),
  Pa: withPrefix('pascal', '1', PRESSURE),
  J: withPrefix('joule', '1', ENERGY),
  W: withPrefix('watt', '1', dimension(2, 1, -3)),
  C: withPrefix('coulomb', '1', dimension(0, 0, 1, 1)),
  V: withPrefix('volt', '1', dimension(2, 1, -3, -1)),
  F: withPrefix('farad', '1', dimension(-2, -1, 4, 2)),
  Ohm: withPrefix('ohm', '1', dimension(2, 1, -3, -2)),
  S: withPrefix('siemens', '1', dimension(-2, -1, 3, 2)),
  H: withPrefix('henry', '1', dimension(2, 1, -2, -2)),
  Wb: withPrefix('weber', '1', dimension(2, 1, -2, -1)),
  T: withPrefix('tesla', '1', dimension(0, 1, -2, -1)),
  L: withPrefix('litre', '0.001', dimension(3)),
  bar: withPrefix('bar', '1e5', PRESSURE),
  // Exact since the elementary charge is (SI 2019).
  eV: withPrefix('electronvolt', '1.602176634e-19', ENERGY),
  // The thermochemical calorie.
  cal: withPrefix('calorie', '4.184', ENERGY),
  atm: alone('standard atmosphere', '101325', PRESSURE),
  // CODATA 2022; relative standard uncertainty 3.1e-10.
  u: alone('unified atomic mass unit', '1.66053906892e-27', MASS),
  angstrom: alone('ångström', '1e-10', LENGTH),
  D: {
    factor: Q.divide(Q.fromDecimal('1e-21'), SPEED_OF_LIGHT),
    dimension: dimension(1, 0, 1, 1),
    title: 'debye',
    takesPrefix: false,
  },
  min: alone('minute', '60', TIME),
  h: alone('hour', '3600', TIME),
};

/** Other spellings of the same, in Unicode's composed form. */
const SPELLINGS: Readonly<Record<string, string>> = {
  '\u00c5': 'angstrom',
  '\u03a9': 'Ohm',
  l: 'L',
};

const PREFIXES: readonly (readonly [string, number])[] = [
  ['da', 1],
  ['Q', 30],
  ['R', 27],
  ['Y', 24],
  ['Z', 21],
  ['E', 18],
  ['P', 15],
  ['T', 12],
  ['G', 9],
  ['M', 6],
  ['k', 3],
  ['h', 2],
  ['d', -1],
  ['c', -2],
  ['m', -3],
  ['u', -6],
  ['µ', -6],
  ['μ', -6],
  ['n', -9],
  ['p', -12],
  ['f', -15],
  ['a', -18],
  ['z', -21],
  ['y', -24],
  ['r', -27],
  ['q', -30],
];

function entryOf(name: string): Entry | undefined {
  const composed = name.normalize('NFC');
  const spelled = Object.hasOwn(SPELLINGS, composed) ? (SPELLINGS[composed] ?? composed) : composed;
  return Object.hasOwn(UNITS, spelled) ? UNITS[spelled] : undefined;
}

const found = new Map<string, Unit | undefined>();

/** The unit of this name, with or without a prefix; undefined where there is none. */
export function unitNamed(name: string): Unit | undefined {
  const whole = entryOf(name);
  if (whole) return whole;
  if (name.length > 12) return undefined;
  if (found.has(name)) return found.get(name);
  let answer: Unit | undefined;
  for (const [prefix, exponent] of PREFIXES) {
    if (!name.startsWith(prefix)) continue;
    const entry = entryOf(name.slice(prefix.length));
    if (!entry?.takesPrefix) continue;
    answer = {
      factor: Q.multiply(entry.factor, Q.power(Q.rational(10), exponent)),
      dimension: entry.dimension,
      title: `10^${exponent} ${entry.title}`,
    };
    break;
  }
  if (found.size < 1000) found.set(name, answer);
  return answer;
}

/** Names for suggestions and completion: the table's, and the usual ones with a prefix. */
export const USUAL_UNITS: readonly string[] = [
  ...Object.keys(UNITS),
  'Å',
  'kg',
  'mg',
  'kJ',
  'kcal',
  'MPa',
  'kPa',
  'GPa',
  'hPa',
  'mbar',
  'cm',
  'mm',
  'nm',
  'pm',
  'dm',
  'mL',
  'meV',
  'keV',
  'mmol',
  'kmol',
  'kHz',
  'MHz',
  'GHz',
  'THz',
  'mK',
  'ns',
  'ps',
  'fs',
  'kV',
  'mV',
  'mT',
];
