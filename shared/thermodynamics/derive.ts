/** From a source text to everything that follows from it. */
import { analyse } from '../language/index.ts';
import { deriveFormulation, type Derived, type DeriveOptions } from './deriveFormulation.ts';

/**
 * Reads the source and derives every property. Never throws for what an author wrote: faults are
 * diagnostics. The same source gives the same result, byte for byte.
 */
export function derive(source: string, options: DeriveOptions = {}): Derived {
  options.onProgress?.('reading the formulation', 0);
  const { formulation, diagnostics } = analyse(source);
  if (!formulation || diagnostics.some(({ severity }) => severity === 'error')) {
    return { diagnostics, derivation: undefined, model: undefined };
  }
  const outcome = deriveFormulation(formulation, source, options);
  return { ...outcome, diagnostics: [...diagnostics, ...outcome.diagnostics] };
}
