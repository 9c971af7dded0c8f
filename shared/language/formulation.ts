/**
 * A checked formulation: what the language hands to the thermodynamics.
 *
 * Names here are the ASCII spellings (`theta`); all numbers are in coherent SI units; expressions
 * are those of the algebra, with `let`s kept as abbreviations and q, Q written out.
 */
import type { Expression, Relation, SymbolNode } from '../algebra/expression.ts';
import type { Rational } from '../algebra/rational.ts';
import type { Dimension } from '../units/dimension.ts';
import type { Span } from './diagnostic.ts';

export type Ensemble = 'canonical' | 'grand canonical' | 'isothermal-isobaric' | 'microcanonical';

/** The function of an ensemble: ln of it is what everything follows from. */
export type PartitionFunctionName = 'Q' | 'Xi' | 'Delta' | 'W';

export interface Species {
  /** `w`; empty for the one species of a formulation that names none. */
  readonly name: string;
  readonly description: string;
}

/** A number with a unit that the author declared: `constant` or `parameter`. */
export interface DeclaredQuantity {
  readonly kind: 'constant' | 'parameter';
  readonly name: string;
  readonly symbol: SymbolNode;
  readonly dimension: Dimension;
  /** The unit as written, without brackets: `J m^3`; empty for a pure number. */
  readonly unit: string;
  /** How many coherent SI units one of the written unit is. */
  readonly unitFactor: Rational;
  /** The value in coherent SI units. Products with k, h … in the source are multiplied out. */
  readonly value: Rational;
  /** Standard uncertainty in SI units, where the author gave one. */
  readonly uncertainty?: Rational;
  readonly bounds?: { readonly lower: Rational; readonly upper: Rational };
  readonly description: string;
  readonly span: Span;
  /** Where the number itself stands, for sliders that write back into the text. */
  readonly valueSpan: Span;
}

/** A constant of nature that the formulation uses (k, h, N_Av …). */
export interface NaturalConstant {
  readonly name: string;
  readonly symbol: SymbolNode;
  readonly dimension: Dimension;
  readonly value: Rational;
  /** Absent where the value is exact by definition. */
  readonly uncertainty?: Rational;
  readonly description: string;
}

/** A natural variable of ln Q: T, V, N, N_w, mu, p, an extent, a field. */
export interface NaturalVariable {
  readonly role:
    'temperature' | 'extent' | 'number' | 'chemical potential' | 'pressure' | 'energy' | 'field';
  readonly name: string;
  readonly symbol: SymbolNode;
  readonly dimension: Dimension;
  readonly description: string;
  /** Name of the response −∂A/∂B of a field. */
  readonly response?: string;
  /** Name of the species, for numbers and chemical potentials. */
  readonly species?: string;
}

export interface Abbreviation {
  readonly name: string;
  readonly expression: Expression;
  readonly dimension: Dimension;
  readonly description: string;
  readonly span: Span;
}

export interface OrderParameter {
  readonly name: string;
  readonly symbol: SymbolNode;
  readonly lower: Rational;
  readonly upper: Rational;
  readonly stationary: 'maximum' | 'saddle';
  readonly description: string;
  readonly span: Span;
}

/** A quantity of the author's own, or how a parameter is stated per mole. */
export interface Report {
  readonly name: string;
  readonly expression: Expression;
  readonly dimension: Dimension;
  readonly unit: string;
  readonly unitFactor: Rational;
  readonly description: string;
  readonly span: Span;
}

export interface RangeOfVariable {
  readonly expression: Expression;
  readonly lower: Rational;
  readonly upper: Rational;
}

/**
 * A statement to be checked. Symbols of properties (`p`, `U`, `kappa_T` …) stand in it as symbols
 * of these names; `partial(X, Y; Z, …)` as a call of `partial` on X, Y, Z ….
 */
export type Claim = {
  readonly title: string;
  readonly span: Span;
  /** The statement as written, without the title. */
  readonly text: string;
} & (
  | { readonly kind: 'equality'; readonly left: Expression; readonly right: Expression }
  | {
      readonly kind: 'inequality';
      readonly relation: Relation;
      readonly ranges: readonly RangeOfVariable[];
    }
  | {
      readonly kind: 'limit';
      readonly of: Expression;
      readonly value: Expression;
      readonly variable: SymbolNode;
      readonly towards: Expression;
    }
);

export interface Formulation {
  /** The text of a comment on the first line; empty without one. */
  readonly title: string;
  readonly ensemble: Ensemble;
  readonly partitionFunction: PartitionFunctionName;
  readonly species: readonly Species[];
  readonly variables: readonly NaturalVariable[];
  readonly quantities: readonly DeclaredQuantity[];
  readonly naturalConstants: readonly NaturalConstant[];
  readonly abbreviations: readonly Abbreviation[];
  readonly orderParameters: readonly OrderParameter[];
  readonly factorials: 'Stirling' | 'exact';
  /** ln of the partition function, with products and powers under the logarithm taken apart. */
  readonly lnPartitionFunction: Expression;
  /** Where the partition function is stated. */
  readonly span: Span;
  readonly molar: readonly Report[];
  readonly reports: readonly Report[];
  readonly claims: readonly Claim[];
  /** What ln, sqrt and denominators demand; T, V, N > 0 are not repeated here. */
  readonly domain: readonly Relation[];
  /** Every name of the formulation in the order in which products of the author name them. */
  readonly nameOrder: readonly string[];
  readonly normalizedSource: string;
}
