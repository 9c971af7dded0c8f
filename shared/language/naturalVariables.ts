/** The natural variables of each ensemble. */
import { symbol } from '../algebra/construct.ts';
import { dimension, DIMENSIONLESS, divideDimensions, type Dimension } from '../units/dimension.ts';
import type { Ensemble, NaturalVariable, Species } from './formulation.ts';
import { ENERGY, TEMPERATURE, type Setting } from './properties.ts';

/** Dimensions of extents that need no unit beside their name. */
export const USUAL_EXTENTS: Readonly<Record<string, Dimension>> = {
  V: dimension(3),
  A: dimension(2),
  L: dimension(1),
  M: DIMENSIONLESS,
};

const VARIABLES: Readonly<Record<Ensemble, readonly ('mu' | 'N' | 'extent' | 'p' | 'T' | 'U')[]>> =
  {
    canonical: ['N', 'extent', 'T'],
    'grand canonical': ['mu', 'extent', 'T'],
    'isothermal-isobaric': ['N', 'p', 'T'],
    microcanonical: ['N', 'extent', 'U'],
  };

function ofSpecies(
  list: readonly Species[],
  letter: 'N' | 'mu',
): Pick<NaturalVariable, 'name' | 'description' | 'species'>[] {
  const what = letter === 'N' ? 'number of molecules' : 'chemical potential';
  return list.map(({ name, description }) => ({
    name: name === '' ? letter : `${letter}_${name}`,
    description: name === '' ? what : `${what} of ${description === '' ? name : description}`,
    species: name,
  }));
}

/**
 * In the order in which the ensemble is named, fields last. T, p, numbers and extents are positive;
 * energies, chemical potentials and fields may have either sign.
 */
export function naturalVariables(
  { ensemble, extent, species, fields }: Setting,
  extentDescription: string,
): NaturalVariable[] {
  const positive = { positive: true };
  const variables = VARIABLES[ensemble].flatMap((letter): NaturalVariable[] => {
    switch (letter) {
      case 'N':
        return ofSpecies(species, 'N').map((one) => ({
          ...one,
          role: 'number',
          symbol: symbol(one.name, positive),
          dimension: DIMENSIONLESS,
        }));
      case 'mu':
        return ofSpecies(species, 'mu').map((one) => ({
          ...one,
          role: 'chemical potential',
          symbol: symbol(one.name),
          dimension: ENERGY,
        }));
      case 'extent':
        return [
          {
            role: 'extent',
            name: extent.name,
            symbol: symbol(extent.name, positive),
            dimension: extent.dimension,
            description: extentDescription,
          },
        ];
      case 'p':
        return [
          {
            role: 'pressure',
            name: 'p',
            symbol: symbol('p', positive),
            dimension: divideDimensions(ENERGY, extent.dimension),
            description: 'pressure',
          },
        ];
      case 'T':
        return [
          {
            role: 'temperature',
            name: 'T',
            symbol: symbol('T', positive),
            dimension: TEMPERATURE,
            description: 'temperature',
          },
        ];
      case 'U':
        return [
          {
            role: 'energy',
            name: 'U',
            symbol: symbol('U'),
            dimension: ENERGY,
            description: 'internal energy',
          },
        ];
    }
  });
  return [...variables, ...fields];
}
