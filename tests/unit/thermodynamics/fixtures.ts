/** Formulations built by hand, for tests of what derives from them. */
import {
  abbreviation,
  fraction,
  integer,
  ln,
  minusOne,
  multiply,
  negate,
  pi,
  power,
  product,
  subtract,
  sum,
  symbol,
} from '../../../shared/algebra/construct.ts';
import * as Q from '../../../shared/algebra/rational.ts';
import type { DeclaredQuantity, Formulation } from '../../../shared/language/formulation.ts';
import { dimension, type Dimension } from '../../../shared/units/dimension.ts';

const span = { start: 0, end: 0 };
export const V = symbol('V', { positive: true });
export const T = symbol('T', { positive: true });
export const N = symbol('N', { positive: true });
export const k = symbol('k', { positive: true });
export const h = symbol('h', { positive: true });
export const m = symbol('m', { positive: true });
export const a = symbol('a', { positive: true });
export const b = symbol('b', { positive: true });
export const Lambda = abbreviation(
  'Lambda',
  multiply(h, power(product([integer(2), pi, m, k, T]), fraction(-1, 2))),
);

function quantity(
  kind: 'constant' | 'parameter',
  name: string,
  of: Dimension,
  unit: string,
  value: string,
  description: string,
): DeclaredQuantity {
  return {
    kind,
    name,
    symbol: symbol(name, { positive: true }),
    dimension: of,
    unit,
    unitFactor: Q.ONE,
    value: Q.fromDecimal(value),
    description,
    span,
    valueSpan: span,
  };
}

type Natural = Formulation['variables'][number];

const NATURALS: Readonly<Record<string, Natural>> = {
  N: { role: 'number', name: 'N', symbol: N, dimension: dimension(), description: '', species: '' },
  V: { role: 'extent', name: 'V', symbol: V, dimension: dimension(3), description: 'volume' },
  T: {
    role: 'temperature',
    name: 'T',
    symbol: T,
    dimension: dimension(0, 0, 0, 0, 1),
    description: 'temperature',
  },
  M: {
    role: 'extent',
    name: 'M',
    symbol: symbol('M', { positive: true }),
    dimension: dimension(),
    description: 'sites',
  },
  mu: {
    role: 'chemical potential',
    name: 'mu',
    symbol: symbol('mu'),
    dimension: dimension(2, 1, -2),
    description: '',
    species: '',
  },
  p: {
    role: 'pressure',
    name: 'p',
    symbol: symbol('p', { positive: true }),
    dimension: dimension(1, 1, -2),
    description: '',
  },
  U: {
    role: 'energy',
    name: 'U',
    symbol: symbol('U', { positive: true }),
    dimension: dimension(2, 1, -2),
    description: '',
  },
  B: {
    role: 'field',
    name: 'B',
    symbol: symbol('B'),
    dimension: dimension(0, 1, -2, -1),
    description: '',
    response: 'M_B',
  },
};

/** The symbol of a natural variable. */
export function natural(name: string): Natural['symbol'] {
  const found = NATURALS[name];
  if (!found) throw new RangeError(`no variable ${name}`);
  return found.symbol;
}

/** A formulation of any ensemble with the fluid's constants. */
export function stated(
  ensemble: Formulation['ensemble'],
  variables: readonly string[],
  lnPartitionFunction: Formulation['lnPartitionFunction'],
): Formulation {
  const names = {
    canonical: 'Q',
    'grand canonical': 'Xi',
    'isothermal-isobaric': 'Delta',
    microcanonical: 'W',
  } as const;
  return {
    ...fluid(),
    ensemble,
    partitionFunction: names[ensemble],
    variables: variables.flatMap((name) => NATURALS[name] ?? []),
    lnPartitionFunction,
    domain: [],
    normalizedSource: '',
  };
}

/** Hard core with mean-field attraction. */
export function fluid(): Formulation {
  const lnQ = sum([
    multiply(N, ln(subtract(V, multiply(N, b)))),
    product([integer(-3), N, ln(Lambda)]),
    product([a, power(N, integer(2)), power(product([V, k, T]), minusOne)]),
    negate(multiply(N, ln(N))),
    N,
  ]);
  return {
    title: 'Hard core with mean-field attraction',
    ensemble: 'canonical',
    partitionFunction: 'Q',
    species: [{ name: '', description: '' }],
    variables: ['N', 'V', 'T'].flatMap((name) => NATURALS[name] ?? []),
    quantities: [
      quantity('constant', 'm', dimension(0, 1), 'kg', '6.6335e-26', 'molecular mass'),
      quantity('parameter', 'a', dimension(5, 1, -2), 'J m^3', '3.7e-49', 'attraction'),
      quantity('parameter', 'b', dimension(3), 'm^3', '5.3e-29', 'excluded volume per molecule'),
    ],
    naturalConstants: [
      {
        name: 'k',
        symbol: k,
        dimension: dimension(2, 1, -2, 0, -1),
        value: Q.fromDecimal('1.380649e-23'),
        description: 'Boltzmann constant',
      },
      {
        name: 'h',
        symbol: h,
        dimension: dimension(2, 1, -1),
        value: Q.fromDecimal('6.62607015e-34'),
        description: 'Planck constant',
      },
    ],
    abbreviations: [
      {
        name: 'Lambda',
        expression: Lambda,
        dimension: dimension(1),
        description: '',
        span,
      },
    ],
    orderParameters: [],
    factorials: 'Stirling',
    lnPartitionFunction: lnQ,
    span,
    molar: [],
    reports: [],
    claims: [],
    domain: [{ left: V, sign: '>', right: multiply(N, b) }],
    nameOrder: ['m', 'a', 'N', 'b', 'V', 'k', 'T', 'h', 'Lambda'],
    normalizedSource: 'Q = q^N / N!',
  };
}
