/**
 * What the language has to say of a source text. A fault of the author is a value with a stable
 * name, never an exception.
 */

/** A stretch of the source in UTF-16 code units; `end` is the first unit behind it. */
export interface Span {
  readonly start: number;
  readonly end: number;
}

export type Severity = 'error' | 'warning' | 'information';

/** A change of the text that mends the fault; the editor offers it under `title`. */
export interface Repair {
  readonly title: string;
  readonly edits: readonly { readonly span: Span; readonly text: string }[];
}

export interface Diagnostic {
  /** A name that stays: `dimension`, `unknown-name`, `ambiguous-division` … */
  readonly code: string;
  readonly severity: Severity;
  readonly span: Span;
  /** Line and column of the start, both counted from 1. */
  readonly line: number;
  readonly column: number;
  /** What is wrong, in one sentence. */
  readonly message: string;
  /** The way out, in one sentence; may be empty. */
  readonly hint: string;
  readonly repairs: readonly Repair[];
}
