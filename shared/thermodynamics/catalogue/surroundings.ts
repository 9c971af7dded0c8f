/** What the definitions of an ensemble are written in: its variables, numbers and constants. */
import { ln, multiply, product, sum, symbol } from '../../algebra/construct.ts';
import type { Expression, SymbolNode } from '../../algebra/expression.ts';
import { dependsOn } from '../../algebra/traverse.ts';
import type { Formulation, NaturalVariable } from '../../language/formulation.ts';
import { divideDimensions, isDimensionless, type Dimension } from '../../units/dimension.ts';
import { ENERGY } from './dimensions.ts';
import { property } from './entry.ts';

export const boltzmannConstant = symbol('k', { positive: true });

export interface Component {
  /** Name of the species; empty for the only one. */
  readonly species: string;
  readonly title: string;
  readonly number: Expression;
  readonly numberName: string;
  readonly chemicalPotential: Expression;
  readonly chemicalPotentialName: string;
}

export interface Field {
  readonly variable: NaturalVariable;
  readonly response: string;
}

export interface Surroundings {
  readonly ensemble: Formulation['ensemble'];
  /** ln Q (ln Xi …) as definitions write it. */
  readonly lnFunction: Expression;
  readonly temperature: Expression;
  readonly energy: Expression;
  /** Undefined where ln Q knows no extent and no pressure. */
  readonly extent: Expression | undefined;
  readonly extentName: string;
  readonly extentDimension: Dimension;
  readonly pressure: Expression;
  readonly pressureDimension: Dimension;
  readonly components: readonly Component[];
  readonly fields: readonly Field[];
  /** The natural variables that ln Q depends on, in the order of the formulation. */
  readonly naturals: readonly NaturalVariable[];
  /** Helmholtz's symbol: A, or F where A is the area. */
  readonly helmholtzName: string;
}

const EXTENT_NAMES = ['M', 'L', 'A', 'V'];

/** Reads off a formulation which variables its definitions may use. */
export function surroundingsOf(formulation: Formulation): Surroundings {
  const f = formulation.lnPartitionFunction;
  const naturals = formulation.variables.filter(({ symbol: s }) => dependsOn(f, s));
  const ofRole = (role: NaturalVariable['role']): NaturalVariable | undefined =>
    naturals.find((variable) => variable.role === role);
  const extent = ofRole('extent');
  const pressure = ofRole('pressure');
  const extentDimension =
    extent?.dimension ?? (pressure ? divideDimensions(ENERGY, pressure.dimension) : undefined);
  const hasExtent = extentDimension !== undefined;
  const extentName = extent?.name ?? nameOfExtent(extentDimension);
  return {
    ensemble: formulation.ensemble,
    lnFunction: ln(symbol(formulation.partitionFunction)),
    temperature: ofRole('temperature')?.symbol ?? property('T'),
    energy: ofRole('energy')?.symbol ?? property('U'),
    extent: hasExtent ? (extent?.symbol ?? property(extentName)) : undefined,
    extentName,
    extentDimension: extentDimension ?? [],
    pressure: pressure?.symbol ?? property('p'),
    pressureDimension: extentDimension ? divideDimensions(ENERGY, extentDimension) : [],
    components: componentsOf(formulation, naturals),
    fields: naturals
      .filter(({ role }) => role === 'field')
      .map((variable) => ({ variable, response: variable.response ?? `M_${variable.name}` })),
    naturals,
    helmholtzName: extentName === 'A' ? 'F' : 'A',
  };
}

function nameOfExtent(dimension: Dimension | undefined): string {
  if (!dimension || isDimensionless(dimension)) return 'M';
  return EXTENT_NAMES[Number(dimension[0]?.numerator ?? 3n)] ?? 'V';
}

function componentsOf(formulation: Formulation, naturals: readonly NaturalVariable[]): Component[] {
  const isOpen = formulation.ensemble === 'grand canonical';
  return formulation.species.flatMap(({ name, description }) => {
    const natural = naturals.find(
      ({ role, species }) =>
        role === (isOpen ? 'chemical potential' : 'number') && (species ?? '') === name,
    );
    if (!natural) return [];
    const suffix = name === '' ? '' : `_${name}`;
    const numberName = isOpen ? `N${suffix}` : natural.name;
    const chemicalPotentialName = isOpen ? natural.name : `mu${suffix}`;
    return [
      {
        species: name,
        title: description === '' ? name : description,
        numberName,
        chemicalPotentialName,
        number: isOpen ? property(numberName) : natural.symbol,
        chemicalPotential: isOpen ? natural.symbol : property(chemicalPotentialName),
      },
    ];
  });
}

/** Σ mu_i N_i. */
export function gibbsSum({ components }: Surroundings): Expression {
  return sum(components.map((c) => multiply(c.chemicalPotential, c.number)));
}

/** The numbers of molecules, for what is held constant in a closed system. */
export function numbersOf({ components }: Surroundings): Expression[] {
  return components.map((component) => component.number);
}

/** The natural variables but one, as what a derivative by that one holds. */
export function others(surroundings: Surroundings, by: SymbolNode): Expression[] {
  return surroundings.naturals.map((v) => v.symbol).filter((s) => s !== by);
}

export function thermalEnergy({ temperature }: Surroundings): Expression {
  return product([boltzmannConstant, temperature]);
}
