/** The words of a source text, with their places. */
import type { Rational } from '../algebra/rational.ts';
import type { Span } from './diagnostic.ts';

export type TokenKind =
  'name' | 'number' | 'text' | 'unit' | 'operator' | 'comment' | 'newline' | 'end';

export interface Token {
  readonly kind: TokenKind;
  readonly span: Span;
  /** As it stands in the source. */
  readonly text: string;
  /**
   * What it means: the ASCII spelling of a name, the inside of quotation marks or brackets, the
   * one spelling of an operator (`->` for `→`).
   */
  readonly value: string;
  readonly number?: Rational;
  /** In `39.948(1)` the standard uncertainty, 0.001. */
  readonly uncertainty?: Rational;
}

/** Words with a place in the grammar of expressions; no quantity can have such a name. */
export const EXPRESSION_WORDS: ReadonlySet<string> = new Set([
  'sum',
  'product',
  'integral',
  'cases',
  'partial',
  'from',
  'to',
  'between',
  'and',
  'as',
  'for',
  'in',
  'otherwise',
  'inf',
]);

/** Words that begin a statement. */
export const STATEMENT_WORDS: ReadonlySet<string> = new Set([
  'ensemble',
  'species',
  'extent',
  'field',
  'constant',
  'parameter',
  'list',
  'let',
  'order',
  'factorials',
  'molar',
  'report',
  'claim',
]);

export function isReserved(word: string): boolean {
  return EXPRESSION_WORDS.has(word) || STATEMENT_WORDS.has(word);
}
