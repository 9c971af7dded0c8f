/**
 * State functions and first derivatives, ensemble by ensemble, from one scheme: each logarithm is
 * a Massieu function whose first derivatives are the conjugates of the natural variables,
 *
 *     A = −k T ln Q(T, V, N)       dA = −S dT − p dV + Σ mu dN − M dB
 *     Ω = −k T ln Xi(T, V, mu)     dΩ = −S dT − p dV − Σ N dmu − M dB
 *     G = −k T ln Delta(T, p, N)   dG = −S dT + V dp + Σ mu dN − M dB
 *     S = k ln W(U, V, N)          dS = (dU + p dV − Σ mu dN)/T
 *
 * and the remaining state functions follow by Legendre's transformation.
 * (H. B. Callen, Thermodynamics, 2nd ed. 1985, chapters 5 and 17.)
 */
import {
  divide,
  minusOne,
  multiply,
  negate,
  power,
  product,
  square,
  subtract,
  sum,
} from '../../algebra/construct.ts';
import type { Expression, SymbolNode } from '../../algebra/expression.ts';
import { divideDimensions, isDimensionless } from '../../units/dimension.ts';
import { ENERGY, ENTROPY, NUMBER, TEMPERATURE } from './dimensions.ts';
import { partialOf, property, type Entry } from './entry.ts';
import {
  boltzmannConstant,
  gibbsSum,
  others,
  thermalEnergy,
  type Component,
  type Surroundings,
} from './surroundings.ts';

type Definitions = Readonly<Record<string, Expression | undefined>>;

/** The entries for p, U, S, A, H, G, Omega, mu, N, V, T and the field responses that exist. */
export function primaryEntries(s: Surroundings): Entry[] {
  const definitions = DEFINITIONS[s.ensemble](s);
  const linear = LINEAR[s.ensemble];
  const entries: Entry[] = [];
  const state = (
    symbol: string,
    name: string,
    dimension: Entry['dimension'],
    isExtensive: boolean,
    key = symbol,
    family = key,
  ): void => {
    const definition = definitions[key];
    if (!definition) return;
    entries.push({
      symbol,
      name,
      dimension,
      isExtensive,
      isPerMolecule: family === 'mu',
      isLinear: linear.includes(family),
      definition,
    });
  };
  state('T', 'thermodynamic temperature', TEMPERATURE, false);
  state('p', nameOfPressure(s), s.pressureDimension, false);
  state(s.extentName, nameOfExtent(s), s.extentDimension, true, 'extent');
  for (const component of s.components) {
    const name = component.numberName;
    state(name, titleOf('number of molecules', component), NUMBER, true, name, 'N');
  }
  state('U', 'internal energy', ENERGY, true);
  state('S', 'entropy', ENTROPY, true);
  state(s.helmholtzName, 'Helmholtz energy', ENERGY, true, 'A');
  state('H', 'enthalpy', ENERGY, true);
  state('G', 'Gibbs energy', ENERGY, true);
  state('Omega', 'grand potential', ENERGY, true);
  for (const component of s.components) {
    const name = component.chemicalPotentialName;
    state(name, titleOf('chemical potential', component), ENERGY, false, name, 'mu');
  }
  for (const { variable, response } of s.fields) {
    state(
      response,
      `response to ${variable.description === '' ? variable.name : variable.description}`,
      divideDimensions(ENERGY, variable.dimension),
      true,
      response,
      'response',
    );
  }
  return entries;
}

function titleOf(name: string, component: Component): string {
  return component.species === '' ? name : `${name} of ${component.title}`;
}

function nameOfPressure({ extentDimension }: Surroundings): string {
  if (isDimensionless(extentDimension)) return 'spreading pressure per site';
  const lengths = Number(extentDimension[0]?.numerator ?? 3n);
  if (lengths === 2) return 'spreading pressure';
  if (lengths === 1) return 'pressure in one dimension (negative tension)';
  return 'pressure';
}

function nameOfExtent({ extentDimension, naturals }: Surroundings): string {
  const declared = naturals.find(({ role }) => role === 'extent')?.description;
  if (declared) return declared;
  if (isDimensionless(extentDimension)) return 'number of sites';
  return { 1: 'length', 2: 'area' }[Number(extentDimension[0]?.numerator ?? 3n)] ?? 'volume';
}

/** Which properties are linear in the logarithm, so that its terms have shares in them. */
const LINEAR: Readonly<Record<Surroundings['ensemble'], readonly string[]>> = {
  canonical: ['p', 'U', 'S', 'A', 'H', 'G', 'Omega', 'mu', 'response'],
  'grand canonical': ['p', 'N', 'U', 'S', 'A', 'H', 'G', 'Omega', 'response'],
  'isothermal-isobaric': ['extent', 'U', 'S', 'A', 'H', 'G', 'mu', 'response'],
  microcanonical: ['S'],
};

function slope(s: Surroundings, by: Expression): Expression {
  return partialOf(s.lnFunction, by, others(s, by as SymbolNode));
}

const legendre = (s: Surroundings): Expression | undefined =>
  s.extent && multiply(s.pressure, s.extent);

function plus(a: Expression, b: Expression | undefined): Expression | undefined {
  return b && sum([a, b]);
}

/** k T² ∂ ln/∂T. */
function thermalSlope(s: Surroundings): Expression {
  return product([boltzmannConstant, square(s.temperature), slope(s, s.temperature)]);
}

function responses(s: Surroundings): Record<string, Expression> {
  return Object.fromEntries(
    s.fields.map(({ variable, response }) => [
      response,
      multiply(thermalEnergy(s), slope(s, variable.symbol)),
    ]),
  );
}

const DEFINITIONS: Readonly<Record<Surroundings['ensemble'], (s: Surroundings) => Definitions>> = {
  canonical: (s) => {
    const work = legendre(s);
    const helmholtz = property(s.helmholtzName);
    return {
      p: s.extent && multiply(thermalEnergy(s), slope(s, s.extent)),
      U: thermalSlope(s),
      S: sum([multiply(boltzmannConstant, s.lnFunction), divide(s.energy, s.temperature)]),
      A: negate(multiply(thermalEnergy(s), s.lnFunction)),
      H: plus(s.energy, work),
      G: plus(helmholtz, work),
      Omega: s.extent && s.components.length > 0 ? subtract(helmholtz, gibbsSum(s)) : undefined,
      ...Object.fromEntries(
        s.components.map((c) => [
          c.chemicalPotentialName,
          negate(multiply(thermalEnergy(s), slope(s, c.number))),
        ]),
      ),
      ...responses(s),
    };
  },
  'grand canonical': (s) => {
    const helmholtz = property(s.helmholtzName);
    return {
      p: s.extent && multiply(thermalEnergy(s), slope(s, s.extent)),
      Omega: negate(multiply(thermalEnergy(s), s.lnFunction)),
      ...Object.fromEntries(
        s.components.map((c) => [
          c.numberName,
          multiply(thermalEnergy(s), slope(s, c.chemicalPotential)),
        ]),
      ),
      U: sum([thermalSlope(s), gibbsSum(s)]),
      S: sum([
        multiply(boltzmannConstant, s.lnFunction),
        multiply(thermalEnergy(s), slope(s, s.temperature)),
      ]),
      A: subtract(s.energy, multiply(s.temperature, property('S'))),
      H: plus(s.energy, legendre(s)),
      G: plus(helmholtz, legendre(s)),
      ...responses(s),
    };
  },
  'isothermal-isobaric': (s) => {
    const work = legendre(s);
    return {
      extent: s.extent && negate(multiply(thermalEnergy(s), slope(s, s.pressure))),
      H: thermalSlope(s),
      G: negate(multiply(thermalEnergy(s), s.lnFunction)),
      S: sum([multiply(boltzmannConstant, s.lnFunction), divide(property('H'), s.temperature)]),
      U: work && subtract(property('H'), work),
      A: work && subtract(property('G'), work),
      Omega: undefined,
      ...Object.fromEntries(
        s.components.map((c) => [
          c.chemicalPotentialName,
          negate(multiply(thermalEnergy(s), slope(s, c.number))),
        ]),
      ),
      ...responses(s),
    };
  },
  microcanonical: (s) => {
    const helmholtz = property(s.helmholtzName);
    return {
      T: power(multiply(boltzmannConstant, slope(s, s.energy)), minusOne),
      S: multiply(boltzmannConstant, s.lnFunction),
      p: s.extent && multiply(thermalEnergy(s), slope(s, s.extent)),
      A: subtract(s.energy, multiply(s.temperature, property('S'))),
      H: plus(s.energy, legendre(s)),
      G: plus(helmholtz, legendre(s)),
      ...Object.fromEntries(
        s.components.map((c) => [
          c.chemicalPotentialName,
          negate(multiply(thermalEnergy(s), slope(s, c.number))),
        ]),
      ),
      ...responses(s),
    };
  },
};
