/** The work itself: from a source to the bytes that are stored. */
import { derive } from '../shared/thermodynamics/index.ts';
import { verify } from '../shared/thermodynamics/verification/index.ts';
import type { CheckStatus } from '../shared/contracts/derivation.ts';

export type Progress = (state: 'deriving' | 'verifying', stage: string, fraction: number) => void;

export interface Outcome {
  /** The derivation as JSON; the same source gives the same bytes. */
  readonly result: string;
  readonly verification: string;
  readonly verificationStatus: CheckStatus;
}

/** Counted up when the same source comes to give other bytes than before. */
export const ENGINE = '1';

/** The share of a job that deriving takes on the progress bar; verifying takes the rest. */
const DERIVING_SHARE = 0.4;

/** A formulation from which nothing can be derived, in a sentence for its author. */
export class CannotDerive extends Error {
  override name = 'CannotDerive';
}

/** Derives and verifies. Throws CannotDerive where the source has faults. */
export function work(source: string, progress: Progress): Outcome {
  const { derivation, model, diagnostics } = derive(source, {
    onProgress: (stage, fraction) => {
      progress('deriving', stage, fraction * DERIVING_SHARE);
    },
  });
  if (!derivation || !model) {
    const fault = diagnostics.find(({ severity }) => severity === 'error');
    throw new CannotDerive(
      fault ? `Line ${fault.line}: ${fault.message} ${fault.hint}` : 'Nothing could be derived.',
    );
  }
  const verification = verify(model, {
    onProgress: (stage, fraction) => {
      progress('verifying', stage, DERIVING_SHARE + fraction * (1 - DERIVING_SHARE));
    },
  });
  return {
    result: JSON.stringify(derivation),
    verification: JSON.stringify(verification),
    verificationStatus: verification.status,
  };
}
