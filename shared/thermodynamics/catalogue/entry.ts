/**
 * What an entry of the property catalogue says.
 *
 * A definition is an expression over names: natural variables stand as their own symbols, other
 * properties as symbols of their names, the logarithm of the partition function as `ln Q`, and
 * derivatives as calls of `partial` on what, by what, and what is held. So p reads
 *
 *     k T partial(ln Q, V; T, N)
 *
 * and one expression serves for the typeset definition, for the derivation, for the shares of the
 * terms of ln Q, and for the numerical check that works from values alone.
 */
import { call, symbol } from '../../algebra/construct.ts';
import type { Expression, SymbolNode } from '../../algebra/expression.ts';
import type { Dimension } from '../../units/dimension.ts';

export interface Entry {
  /** `p`, `C_V`, `mu_w` … as the language writes it. */
  readonly symbol: string;
  /** Name after the IUPAC recommendations and ISO 80000. */
  readonly name: string;
  readonly dimension: Dimension;
  /** True where the property doubles when the system does. */
  readonly isExtensive: boolean;
  /** True for a chemical potential: molar, it is multiplied by Avogadro's constant. */
  readonly isPerMolecule?: boolean;
  /** True where the property is linear in the logarithm of the partition function. */
  readonly isLinear: boolean;
  readonly definition: Expression;
  /**
   * An expression equal to the definition that needs derivatives along natural variables only,
   * with the name of the rule that leads there.
   */
  readonly working?: { readonly rule: string; readonly expression: Expression };
}

/** Above zero wherever a state is stable, so that roots of it may be taken apart. */
const POSITIVE: ReadonlySet<string> = new Set(['kappa_S']);

/** The property of this name, as definitions write it. */
export function property(name: string): Expression {
  return symbol(name, { positive: POSITIVE.has(name) });
}

/** True for a symbol that `property` made; a natural variable or a mass is another node. */
export function isProperty(e: SymbolNode): boolean {
  return property(e.name) === e;
}

/** (∂of/∂by) at constant `held`. */
export function partialOf(of: Expression, by: Expression, held: readonly Expression[]): Expression {
  return call('partial', [of, by, ...held]);
}
