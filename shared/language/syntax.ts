/** The tree of a source text, as written: nothing is looked up or computed in it yet. */
import type { Rational } from '../algebra/rational.ts';
import type { RelationSign } from '../algebra/expression.ts';
import type { Ensemble, PartitionFunctionName } from './formulation.ts';
import type { Span } from './diagnostic.ts';

interface Placed {
  readonly span: Span;
}

export interface NameTree extends Placed {
  /** The ASCII spelling. */
  readonly name: string;
  /** As the author typed it. */
  readonly spelled: string;
}

/** A unit in brackets; `text` is what stands between them. */
export interface UnitTree extends Placed {
  readonly text: string;
}

export interface DescriptionTree extends Placed {
  readonly text: string;
}

export interface NumberTree extends Placed {
  readonly kind: 'number';
  readonly value: Rational;
  readonly uncertainty?: Rational;
  /** Of `150 [K]`. */
  readonly unit?: UnitTree;
}

export interface SumTree extends Placed {
  readonly kind: 'sum';
  readonly terms: readonly { readonly isNegative: boolean; readonly term: ExpressionTree }[];
}

export interface ProductTree extends Placed {
  readonly kind: 'product';
  readonly factors: readonly {
    readonly joint: 'first' | 'beside' | '*' | '/';
    readonly factor: ExpressionTree;
  }[];
  /** A factor stands beside a divisor, which has been reported: it may mean two things. */
  readonly isAmbiguous?: true;
}

export interface PowerTree extends Placed {
  readonly kind: 'power';
  readonly base: ExpressionTree;
  readonly exponent: ExpressionTree;
}

export interface NegationTree extends Placed {
  readonly kind: 'negation';
  readonly of: ExpressionTree;
}

export interface FactorialTree extends Placed {
  readonly kind: 'factorial';
  readonly of: ExpressionTree;
}

export interface GroupTree extends Placed {
  readonly kind: 'group';
  readonly of: ExpressionTree;
}

export interface ReferenceTree extends NameTree {
  readonly kind: 'name';
}

export interface CallTree extends Placed {
  readonly kind: 'call';
  readonly name: NameTree;
  readonly arguments: readonly ExpressionTree[];
}

export interface PartialTree extends Placed {
  readonly kind: 'partial';
  readonly of: ExpressionTree;
  readonly by: ExpressionTree;
  readonly held: readonly ExpressionTree[];
}

export interface BinderTree extends Placed {
  readonly kind: 'binder';
  readonly what: 'sum' | 'product' | 'integral';
  readonly variable: NameTree;
  readonly unit?: UnitTree;
  readonly from: ExpressionTree;
  readonly to: ExpressionTree;
  readonly body: ExpressionTree;
}

export interface ConditionTree extends Placed {
  readonly left: ExpressionTree;
  readonly sign: RelationSign;
  readonly right: ExpressionTree;
}

export interface CasesTree extends Placed {
  readonly kind: 'cases';
  readonly branches: readonly {
    readonly condition: ConditionTree;
    readonly value: ExpressionTree;
  }[];
  readonly otherwise: ExpressionTree;
}

export interface InfinityTree extends Placed {
  readonly kind: 'infinity';
}

/** `ln Q` without parentheses: the logarithm of the partition function itself. */
export interface LnFunctionTree extends Placed {
  readonly kind: 'lnFunction';
  readonly name: NameTree;
}

export type ExpressionTree =
  | NumberTree
  | SumTree
  | ProductTree
  | PowerTree
  | NegationTree
  | FactorialTree
  | GroupTree
  | ReferenceTree
  | CallTree
  | PartialTree
  | BinderTree
  | CasesTree
  | InfinityTree
  | LnFunctionTree;

export interface RangeTree extends Placed {
  readonly of: ExpressionTree;
  readonly lower: ExpressionTree;
  readonly upper: ExpressionTree;
  readonly unit?: UnitTree;
}

export type ClaimTree = Placed &
  (
    | {
        readonly kind: 'limit';
        readonly of: ExpressionTree;
        readonly value: ExpressionTree;
        readonly variable: NameTree;
        readonly towards: ExpressionTree;
      }
    | {
        readonly kind: 'relation';
        readonly relation: ConditionTree;
        readonly ranges: readonly RangeTree[];
      }
  );

interface Described extends Placed {
  readonly name: NameTree;
  readonly unit?: UnitTree;
  readonly description: string;
}

interface QuantityFields extends Described {
  readonly value: ExpressionTree;
  readonly bounds?: { readonly lower: ExpressionTree; readonly upper: ExpressionTree };
}

export type StatementTree =
  | (Placed & { readonly kind: 'ensemble'; readonly ensemble: Ensemble })
  | (Placed & {
      readonly kind: 'species';
      readonly list: readonly { readonly name: NameTree; readonly description: string }[];
    })
  | (Described & { readonly kind: 'extent' })
  | (Described & { readonly kind: 'field'; readonly response: NameTree })
  | (QuantityFields & { readonly kind: 'constant' })
  | (QuantityFields & { readonly kind: 'parameter' })
  | (Described & { readonly kind: 'list'; readonly values: readonly ExpressionTree[] })
  | (Described & {
      readonly kind: 'let';
      /** Undefined for an abbreviation, names of the arguments for a function. */
      readonly parameters?: readonly NameTree[];
      readonly value: ExpressionTree;
    })
  | (Described & {
      readonly kind: 'order';
      readonly lower: ExpressionTree;
      readonly upper: ExpressionTree;
      readonly stationary: 'maximum' | 'saddle';
    })
  | (Placed & { readonly kind: 'factorials' })
  | (Described & {
      /** `q = …`, `Q = …`, `ln Q = …`. */
      readonly kind: 'function';
      readonly isLogarithm: boolean;
      readonly value: ExpressionTree;
    })
  | (Described & { readonly kind: 'molar'; readonly value: ExpressionTree })
  | (Described & { readonly kind: 'report'; readonly value: ExpressionTree })
  | (Placed & {
      readonly kind: 'claim';
      readonly title: string;
      readonly statement: ClaimTree;
    })
  | (Placed & {
      /** A statement that could not be read; the name that it would have defined is known. */
      readonly kind: 'faulty';
      readonly word: string;
      readonly name?: NameTree;
    });

export type Statement<K extends StatementTree['kind']> = Extract<StatementTree, { kind: K }>;

/** A whole source text. */
export interface SourceTree {
  readonly statements: readonly StatementTree[];
  /** The text of a comment on the first line. */
  readonly title: string;
}

/** The functions of the ensembles by name. */
export const PARTITION_FUNCTIONS: Readonly<Record<Ensemble, PartitionFunctionName>> = {
  canonical: 'Q',
  'grand canonical': 'Xi',
  'isothermal-isobaric': 'Delta',
  microcanonical: 'W',
};
