/** How the derivation of a version stands, in a mark and words. */
import type { DerivationProgress } from '../../shared/contracts/models.ts';
import { Seal } from './Seal.tsx';

export function DerivationState({ derivation }: { readonly derivation: DerivationProgress }) {
  switch (derivation.state) {
    case 'complete':
      return derivation.verification ? (
        <Seal status={derivation.verification} />
      ) : (
        <span className="text-label text-ink-2 font-mono whitespace-nowrap">derived</span>
      );
    case 'failed':
      return (
        <span className="text-label text-cinnabar font-mono whitespace-nowrap">
          derivation failed
        </span>
      );
    case 'cancelled':
      return (
        <span className="text-label text-ochre font-mono whitespace-nowrap">
          derivation cancelled
        </span>
      );
    case 'queued':
      return (
        <span className="text-label text-ink-3 font-mono whitespace-nowrap">
          waiting to be derived
        </span>
      );
    case 'deriving':
    case 'verifying':
      return (
        <span className="text-label text-ultramarine font-mono whitespace-nowrap">
          {derivation.state} · {Math.round(100 * derivation.progress)} %
        </span>
      );
  }
}
