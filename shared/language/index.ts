/** The formulation language: from source text to checked formulations, and what editors need. */
import type { Diagnostic } from './diagnostic.ts';
import { elaborate } from './elaborate.ts';
import { Findings } from './findings.ts';
import type { Formulation } from './formulation.ts';
import { parse } from './parser.ts';
import type { SourceTree } from './syntax.ts';

export interface Analysis {
  /** Present exactly where no diagnostic is an error. */
  readonly formulation: Formulation | undefined;
  readonly diagnostics: readonly Diagnostic[];
  readonly tree: SourceTree;
}

/** Reads and checks a source text. Never throws, whatever the text. */
export function analyse(source: string): Analysis {
  const findings = new Findings(source);
  const tree = parse(source, findings);
  const { formulation } = elaborate(tree, findings, source);
  return {
    formulation: findings.errorCount === 0 ? formulation : undefined,
    diagnostics: findings.all(),
    tree,
  };
}

export type { Diagnostic } from './diagnostic.ts';
export type { Formulation } from './formulation.ts';
