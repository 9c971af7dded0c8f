/** The formulation language: from source text to checked formulations, and what editors need. */
import type { Diagnostic } from './diagnostic.ts';
import { tidy } from './format.ts';
import type { Formulation } from './formulation.ts';
import { study } from './study.ts';
import type { SourceTree } from './syntax.ts';

export interface Analysis {
  /** Present exactly where no diagnostic is an error. */
  readonly formulation: Formulation | undefined;
  readonly diagnostics: readonly Diagnostic[];
  readonly tree: SourceTree;
}

/** Reads and checks a source text. Never throws, whatever the text. */
export function analyse(source: string): Analysis {
  const { formulation, diagnostics, tree } = study(source);
  return { formulation, diagnostics, tree };
}

/** The text with even spacing; unchanged where it cannot be read. */
export function format(source: string): string {
  return tidy(source);
}

export { CATALOGUE, type CatalogueEntry, type Code } from './catalogue.ts';
export type { Diagnostic, Repair, Severity, Span } from './diagnostic.ts';
export type { Formulation } from './formulation.ts';
export { parseExpressionFor, type ParsedFor, type ParsedStatement } from './parseExpressionFor.ts';
export { parseState, type ParsedState, type StateValue } from './parseState.ts';
export { completionsAt, type Completion } from './completions.ts';
export { hoverAt, type Hover } from './hover.ts';
export { tokensOf, type HighlightKind, type HighlightToken } from './highlight.ts';
