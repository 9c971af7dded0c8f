/** What the names of a formulation stand for, and what to say of a name that stands for nothing. */
import type { Expression, SymbolNode } from '../algebra/expression.ts';
import type { Rational } from '../algebra/rational.ts';
import { NATURAL_CONSTANTS } from '../units/constants.ts';
import type { Dimension } from '../units/dimension.ts';
import { nearest } from '../units/nearest.ts';
import type { Repair, Span } from './diagnostic.ts';
import type { OpenDimension } from './dimensionCheck.ts';
import type { ExpressionTree, NameTree } from './syntax.ts';

/** An expression with its dimension. */
export interface Typed {
  readonly e: Expression;
  readonly d: OpenDimension;
}

export type Entity =
  /** A symbol or an expression that the name stands for. */
  | { readonly kind: 'value'; readonly value: Typed; readonly what: string }
  | {
      readonly kind: 'function';
      readonly parameters: readonly NameTree[];
      readonly body: ExpressionTree;
    }
  | {
      readonly kind: 'list';
      readonly values: readonly Rational[];
      readonly dimension: Dimension;
    }
  /** A property, in claims and reports only. */
  | { readonly kind: 'property'; readonly symbol: SymbolNode; readonly dimension: Dimension }
  /** Its definition is at fault, which has been reported. */
  | { readonly kind: 'poisoned' };

/** Natural constants that are written by others: hbar is h/(2 pi), R is N_Av k. */
export const NATURAL_NAMES: readonly string[] = [
  'pi',
  ...NATURAL_CONSTANTS.map(({ name }) => name),
];

/** Names that nothing else can have, running variables included. */
export const FIXED_NAMES: readonly string[] = [
  'pi',
  ...NATURAL_CONSTANTS.filter(({ isReplaceable }) => !isReplaceable).map(({ name }) => name),
];

/**
 * The way out for an unknown name: the nearest known one, or the product that was written without
 * spaces (`kT`).
 */
export function suggestName(
  name: string,
  spelled: string,
  span: Span,
  known: readonly string[],
): { hint: string; repairs: Repair[] } {
  const parts = takenApart(name, new Set(known));
  if (parts) {
    const product = parts.join(' ');
    return {
      hint: `A product is written with spaces: ${product}.`,
      repairs: [{ title: `write ${product}`, edits: [{ span, text: product }] }],
    };
  }
  const meant = nearest(name, known);
  if (!meant) {
    return {
      hint: `Declare it: constant ${spelled} = …, parameter ${spelled} = … or let ${spelled} = ….`,
      repairs: [],
    };
  }
  return {
    hint: `Did you mean ${meant}?`,
    repairs: [{ title: `write ${meant}`, edits: [{ span, text: meant }] }],
  };
}

/** The name as two or three known names one behind the other. */
function takenApart(name: string, known: ReadonlySet<string>): string[] | undefined {
  if (name.length < 2 || name.length > 24) return undefined;
  for (let i = 1; i < name.length; i++) {
    const head = name.slice(0, i);
    if (!known.has(head)) continue;
    const rest = name.slice(i);
    if (known.has(rest) && rest !== head) return [head, rest];
    for (let j = 1; j < rest.length; j++) {
      if (known.has(rest.slice(0, j)) && known.has(rest.slice(j))) {
        return [head, rest.slice(0, j), rest.slice(j)];
      }
    }
  }
  return undefined;
}
