/**
 * Second derivatives: heat capacities, compressibilities, expansion, Joule–Thomson coefficient,
 * speed of sound; and the compressibility factor. Their definitions hold in every ensemble.
 */
import {
  add,
  divide,
  minusOne,
  multiply,
  negate,
  one,
  power,
  product,
  sqrt,
  square,
  subtract,
  sum,
} from '../../algebra/construct.ts';
import type { Expression } from '../../algebra/expression.ts';
import type { DeclaredQuantity, Formulation } from '../../language/formulation.ts';
import { divideDimensions, equalDimensions } from '../../units/dimension.ts';
import { ENERGY, ENTROPY, MASS, NUMBER, TEMPERATURE, VELOCITY } from './dimensions.ts';
import { partialOf, property, type Entry } from './entry.ts';
import { numbersOf, thermalEnergy, type Surroundings } from './surroundings.ts';

/** The entries that exist for what the formulation depends on. */
export function responseEntries(s: Surroundings, formulation: Formulation): Entry[] {
  return [
    ...heatCapacityAtConstantExtent(s),
    ...(s.extent ? withExtent(s, s.extent, formulation) : []),
    ...susceptibilities(s),
  ];
}

function heatCapacityAtConstantExtent(s: Surroundings): Entry[] {
  const held = [...(s.extent ? [s.extent] : []), ...numbersOf(s), ...fieldsOf(s)];
  const entry: Entry = {
    symbol: 'C_V',
    name:
      s.extentName === 'V' || !s.extent
        ? 'heat capacity at constant volume'
        : `heat capacity at constant ${s.extentName}`,
    dimension: ENTROPY,
    isExtensive: true,
    isLinear: s.ensemble === 'canonical',
    definition: partialOf(s.energy, s.temperature, held),
  };
  if (s.ensemble !== 'isothermal-isobaric') return [entry];
  if (!s.extent) return [];
  const difference = heatCapacityDifference(s, s.extent);
  return [
    {
      ...entry,
      working: {
        rule: 'difference of the heat capacities',
        expression: subtract(property('C_p'), difference),
      },
    },
  ];
}

/** T V α²/κ_T. */
function heatCapacityDifference(s: Surroundings, extent: Expression): Expression {
  return divide(product([s.temperature, extent, square(property('alpha'))]), property('kappa_T'));
}

function fieldsOf(s: Surroundings): Expression[] {
  return s.fields.map(({ variable }) => variable.symbol);
}

function withExtent(s: Surroundings, extent: Expression, formulation: Formulation): Entry[] {
  const { temperature: T, pressure: p } = s;
  const closed = [...numbersOf(s), ...fieldsOf(s)];
  const inverseExtent = power(extent, minusOne);
  const perPressure = divideDimensions(NUMBER, s.pressureDimension);
  const isCanonical = s.ensemble === 'canonical';
  const isIsobaric = s.ensemble === 'isothermal-isobaric';
  const entries: Entry[] = [
    {
      symbol: 'C_p',
      name: 'heat capacity at constant pressure',
      dimension: ENTROPY,
      isExtensive: true,
      isLinear: isIsobaric,
      definition: partialOf(property('H'), T, [p, ...closed]),
      ...(isIsobaric
        ? {}
        : {
            working: {
              rule: 'difference of the heat capacities',
              expression: add(property('C_V'), heatCapacityDifference(s, extent)),
            },
          }),
    },
    {
      symbol: 'gamma',
      name: 'ratio of the heat capacities',
      dimension: NUMBER,
      isExtensive: false,
      isLinear: false,
      definition: divide(property('C_p'), property('C_V')),
    },
    {
      symbol: 'kappa_T',
      name: 'isothermal compressibility',
      dimension: perPressure,
      isExtensive: false,
      isLinear: false,
      definition: negate(multiply(inverseExtent, partialOf(extent, p, [T, ...closed]))),
      ...(isCanonical
        ? {
            working: {
              rule: 'reciprocal',
              expression: negate(
                multiply(inverseExtent, power(partialOf(p, extent, [T, ...closed]), minusOne)),
              ),
            },
          }
        : {}),
    },
    {
      symbol: 'kappa_S',
      name: 'isentropic compressibility',
      dimension: perPressure,
      isExtensive: false,
      isLinear: false,
      definition: negate(multiply(inverseExtent, partialOf(extent, p, [property('S'), ...closed]))),
      working: {
        rule: 'Jacobians',
        expression: divide(multiply(property('kappa_T'), property('C_V')), property('C_p')),
      },
    },
    {
      symbol: 'alpha',
      name: 'cubic expansion coefficient',
      dimension: divideDimensions(NUMBER, TEMPERATURE),
      isExtensive: false,
      isLinear: false,
      definition: multiply(inverseExtent, partialOf(extent, T, [p, ...closed])),
      ...(isCanonical
        ? {
            working: {
              rule: 'cyclic rule',
              expression: multiply(property('kappa_T'), partialOf(p, T, [extent, ...closed])),
            },
          }
        : {}),
    },
    {
      symbol: 'pi_T',
      name: 'internal pressure',
      dimension: s.pressureDimension,
      isExtensive: false,
      isLinear: isCanonical,
      definition: partialOf(s.energy, extent, [T, ...closed]),
    },
    {
      symbol: 'mu_JT',
      name: 'Joule–Thomson coefficient',
      dimension: divideDimensions(TEMPERATURE, s.pressureDimension),
      isExtensive: false,
      isLinear: false,
      definition: partialOf(T, p, [property('H'), ...closed]),
      working: {
        rule: 'Jacobians',
        expression: divide(
          multiply(extent, subtract(multiply(T, property('alpha')), one)),
          property('C_p'),
        ),
      },
    },
  ];
  const mass = massOf(s, formulation);
  if (mass && s.extentName === 'V') {
    entries.push({
      symbol: 'w',
      name: 'speed of sound',
      dimension: VELOCITY,
      isExtensive: false,
      isLinear: false,
      // w² = (∂p/∂ρ)_S with ρ the mass in V.
      definition: sqrt(divide(extent, multiply(mass, property('kappa_S')))),
    });
  }
  if (s.components.length > 0) {
    entries.push({
      symbol: 'Z',
      name: 'compressibility factor',
      dimension: NUMBER,
      isExtensive: false,
      isLinear: false,
      definition: divide(multiply(p, extent), multiply(sum(numbersOf(s)), thermalEnergy(s))),
    });
  }
  return entries;
}

/** Σ m_i N_i, where one mass is declared, or `m_w` for every species w. */
function massOf(s: Surroundings, formulation: Formulation): Expression | undefined {
  const masses = formulation.quantities.filter((q) => equalDimensions(q.dimension, MASS));
  if (s.components.length === 0) return undefined;
  const [only, second] = masses;
  const addends: Expression[] = [];
  for (const { species, number } of s.components) {
    const found: DeclaredQuantity | undefined =
      species === ''
        ? (masses.find(({ name }) => name === 'm') ?? (second ? undefined : only))
        : masses.find(({ name }) => name === `m_${species}`);
    if (!found) return undefined;
    addends.push(multiply(found.symbol, number));
  }
  return sum(addends);
}

function susceptibilities(s: Surroundings): Entry[] {
  const rest = [...(s.extent ? [s.extent] : []), s.temperature, ...numbersOf(s)];
  return s.fields.map(({ variable, response }) => ({
    symbol: `chi_${variable.name}`,
    name: `susceptibility of ${response} to ${variable.name}`,
    dimension: divideDimensions(divideDimensions(ENERGY, variable.dimension), variable.dimension),
    isExtensive: true,
    isLinear: s.ensemble === 'canonical',
    definition: partialOf(property(response), variable.symbol, [
      ...rest,
      ...fieldsOf(s).filter((e) => e !== variable.symbol),
    ]),
  }));
}
