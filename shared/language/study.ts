/** All that is known of one text, for what editors ask again and again. */
import { elaborate } from './elaborate.ts';
import type { Diagnostic } from './diagnostic.ts';
import { Findings } from './findings.ts';
import { normalize } from './format.ts';
import type { Formulation } from './formulation.ts';
import type { FormulationScope } from './formulationScope.ts';
import { parse } from './parser.ts';
import type { SourceTree } from './syntax.ts';
import type { Token } from './token.ts';

export interface Study {
  readonly source: string;
  readonly tokens: readonly Token[];
  readonly tree: SourceTree;
  readonly scope: FormulationScope;
  readonly formulation: Formulation | undefined;
  readonly diagnostics: readonly Diagnostic[];
}

const scopes = new WeakMap<Formulation, FormulationScope>();
let latest: Study | undefined;

/** Reads and checks a text; the latest one is remembered. */
export function study(source: string): Study {
  if (latest?.source === source) return latest;
  const findings = new Findings(source);
  const parsed = parse(source, findings);
  const normalized = findings.errorCount === 0 ? normalize(parsed) : '';
  const { formulation, scope } = elaborate(parsed.tree, findings, normalized);
  if (formulation) scopes.set(formulation, scope);
  latest = {
    source,
    tokens: parsed.tokens,
    tree: parsed.tree,
    scope,
    formulation,
    diagnostics: findings.all(),
  };
  return latest;
}

/** The names of a formulation that `study` has made. */
export function scopeOf(formulation: Formulation): FormulationScope | undefined {
  return scopes.get(formulation);
}
