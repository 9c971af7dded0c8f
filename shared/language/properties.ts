/** Names of the properties that claims, reports and the calculator may use, with their dimensions. */
import { rational } from '../algebra/rational.ts';
import {
  dimension,
  DIMENSIONLESS,
  divideDimensions,
  equalDimensions,
  powerDimension,
  type Dimension,
} from '../units/dimension.ts';
import type { Ensemble, NaturalVariable, Species } from './formulation.ts';

export interface PropertyName {
  readonly name: string;
  readonly dimension: Dimension;
  readonly description: string;
}

export const ENERGY = dimension(2, 1, -2);
export const TEMPERATURE = dimension(0, 0, 0, 0, 1);
const VOLUME = dimension(3);
const ENTROPY = divideDimensions(ENERGY, TEMPERATURE);
const VELOCITY = dimension(1, 0, -1);

/** What the properties of a formulation depend on. */
export interface Setting {
  readonly ensemble: Ensemble;
  readonly extent: { readonly name: string; readonly dimension: Dimension };
  readonly species: readonly Species[];
  readonly fields: readonly NaturalVariable[];
}

/** All property names of a setting, the natural variables of other ensembles among them. */
export function propertyNames({ extent, species, fields }: Setting): PropertyName[] {
  const pressure = divideDimensions(ENERGY, extent.dimension);
  const perPressure = divideDimensions(DIMENSIONLESS, pressure);
  const names: PropertyName[] = [];
  const taken = new Set<string>();
  const add = (name: string, of: Dimension, description: string): void => {
    if (taken.has(name)) return;
    taken.add(name);
    names.push({ name, dimension: of, description });
  };
  const pressureName = equalDimensions(extent.dimension, VOLUME)
    ? 'pressure'
    : `conjugate of the extent ${extent.name}`;
  add('T', TEMPERATURE, 'thermodynamic temperature');
  add(extent.name, extent.dimension, 'extent of the system');
  add('p', pressure, pressureName);
  add('N', DIMENSIONLESS, 'number of molecules');
  add('U', ENERGY, 'internal energy');
  add('S', ENTROPY, 'entropy');
  add(extent.name === 'A' ? 'F' : 'A', ENERGY, 'Helmholtz energy');
  add('H', ENERGY, 'enthalpy');
  add('G', ENERGY, 'Gibbs energy');
  add('Omega', ENERGY, 'grand potential');
  add('mu', ENERGY, 'chemical potential');
  add('C_V', ENTROPY, `heat capacity at constant ${extent.name}`);
  add('C_p', ENTROPY, 'heat capacity at constant pressure');
  add('gamma', DIMENSIONLESS, 'ratio of the heat capacities');
  add('kappa_T', perPressure, 'isothermal compressibility');
  add('kappa_S', perPressure, 'isentropic compressibility');
  add('alpha', divideDimensions(DIMENSIONLESS, TEMPERATURE), 'expansion coefficient');
  add('pi_T', pressure, 'internal pressure');
  add('mu_JT', divideDimensions(TEMPERATURE, pressure), 'Joule–Thomson coefficient');
  add('w', VELOCITY, 'speed of sound');
  add('Z', DIMENSIONLESS, 'compressibility factor');
  const named = species.filter(({ name }) => name !== '');
  for (const { name, description } of named) {
    const title = description === '' ? name : description;
    add(`N_${name}`, DIMENSIONLESS, `number of molecules of ${title}`);
    add(`mu_${name}`, ENERGY, `chemical potential of ${title}`);
    add(`x_${name}`, DIMENSIONLESS, `mole fraction of ${title}`);
    add(`gamma_${name}`, DIMENSIONLESS, `activity coefficient of ${title}`);
  }
  for (const field of fields) {
    const response = divideDimensions(ENERGY, field.dimension);
    add(field.response ?? `M_${field.name}`, response, `response to ${field.name}`);
    add(
      `chi_${field.name}`,
      divideDimensions(response, field.dimension),
      `susceptibility to ${field.name}`,
    );
  }
  for (let order = 2; order <= 5; order++) {
    const of = powerDimension(extent.dimension, rational(order - 1));
    add(`B${order}`, of, `virial coefficient of order ${order}, per molecule`);
  }
  return names;
}
