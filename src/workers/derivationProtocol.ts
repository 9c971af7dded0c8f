/** What the page and the Web Worker that derives say to each other. */
import type { Derivation } from '../../shared/contracts/derivation.ts';
import type { Diagnostic } from '../../shared/language/diagnostic.ts';

export interface DerivationRequest {
  /** Counts up; an answer names the request that it belongs to. */
  readonly id: number;
  readonly source: string;
  /** Only these properties, and only their formulas; without it everything. */
  readonly brief?: readonly string[];
}

export interface DerivationResponse {
  readonly id: number;
  readonly diagnostics: readonly Diagnostic[];
  /** Undefined where the source is at fault. */
  readonly derivation: Derivation | undefined;
  /** Time spent in the worker. */
  readonly milliseconds: number;
  /** How many expressions the worker holds by now; it never lets go of one. */
  readonly expressions: number;
}
