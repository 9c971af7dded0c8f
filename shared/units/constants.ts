/**
 * Constants of nature: exact where the SI defines them (2019), else CODATA 2022 (P. J. Mohr,
 * D. B. Newell, B. N. Taylor, E. Tiesinga, Rev. Mod. Phys. 97, 025002, 2025).
 */
import * as Q from '../algebra/rational.ts';
import type { Rational } from '../algebra/rational.ts';
import { dimension, type Dimension } from './dimension.ts';

export interface NaturalConstantFacts {
  readonly name: string;
  readonly dimension: Dimension;
  /** In coherent SI units. */
  readonly value: Rational;
  /** Standard uncertainty; absent where the value is exact. */
  readonly uncertainty?: Rational;
  readonly description: string;
  /** False where no declaration may take the name. */
  readonly isReplaceable: boolean;
}

/** π to 60 decimals: more than any computation here carries. */
export const PI_VALUE: Rational = Q.fromDecimal(
  '3.141592653589793238462643383279502884197169399375105820974945',
);

const BOLTZMANN = Q.fromDecimal('1.380649e-23');
const PLANCK = Q.fromDecimal('6.62607015e-34');
const AVOGADRO = Q.fromDecimal('6.02214076e23');

function constant(
  name: string,
  description: string,
  value: Rational,
  of: Dimension,
  uncertainty?: string,
): NaturalConstantFacts {
  return {
    name,
    description,
    value,
    dimension: of,
    isReplaceable: !['k', 'h', 'N_Av'].includes(name),
    ...(uncertainty === undefined ? {} : { uncertainty: Q.fromDecimal(uncertainty) }),
  };
}

const ACTION = dimension(2, 1, -1);
const MASS = dimension(0, 1);

export const NATURAL_CONSTANTS: readonly NaturalConstantFacts[] = [
  constant('k', 'Boltzmann constant', BOLTZMANN, dimension(2, 1, -2, 0, -1)),
  constant('h', 'Planck constant', PLANCK, ACTION),
  constant(
    'hbar',
    'reduced Planck constant, h/(2 pi)',
    Q.divide(PLANCK, Q.multiply(Q.rational(2), PI_VALUE)),
    ACTION,
  ),
  constant('c', 'speed of light in vacuum', Q.rational(299_792_458), dimension(1, 0, -1)),
  constant('e', 'elementary charge', Q.fromDecimal('1.602176634e-19'), dimension(0, 0, 1, 1)),
  constant('N_Av', 'Avogadro constant', AVOGADRO, dimension(0, 0, 0, 0, 0, -1)),
  constant(
    'R',
    'molar gas constant, N_Av k',
    Q.multiply(AVOGADRO, BOLTZMANN),
    dimension(2, 1, -2, 0, -1, -1),
  ),
  constant('m_e', 'electron mass', Q.fromDecimal('9.1093837139e-31'), MASS, '2.8e-40'),
  constant('m_u', 'atomic mass constant', Q.fromDecimal('1.66053906892e-27'), MASS, '5.2e-37'),
  constant(
    'eps_0',
    'vacuum electric permittivity',
    Q.fromDecimal('8.8541878188e-12'),
    dimension(-3, -1, 4, 2),
    '1.4e-21',
  ),
  constant(
    'mu_0',
    'vacuum magnetic permeability',
    Q.fromDecimal('1.25663706127e-6'),
    dimension(1, 1, -2, -2),
    '2.0e-16',
  ),
];

const byName = new Map(NATURAL_CONSTANTS.map((facts) => [facts.name, facts]));

/** The constant of nature of this name. */
export function naturalConstant(name: string): NaturalConstantFacts | undefined {
  return byName.get(name);
}
