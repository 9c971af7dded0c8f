/** What the worker and the child that does the work say to each other. */
import type { Outcome } from './derivation.ts';

export interface ToChild {
  readonly source: string;
  /** The worker ends the child after `limits.seconds`; the child ends itself somewhat later. */
  readonly milliseconds: number;
}

export type FromChild =
  | {
      readonly kind: 'progress';
      readonly state: 'deriving' | 'verifying';
      readonly stage: string;
      readonly fraction: number;
    }
  | { readonly kind: 'outcome'; readonly outcome: Outcome }
  | { readonly kind: 'fault'; readonly message: string };
