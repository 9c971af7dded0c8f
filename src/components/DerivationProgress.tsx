/** A derivation as it goes on or as it ended, with what can be done about it. */
import type { VersionSummary } from '../../shared/contracts/models.ts';
import { describeFault, isSettled, useCancelDerivation, useDeriveAgain } from '../api/index.ts';
import { QuietButton } from './Button.tsx';
import { say } from './messages.ts';
import { Progress } from './Progress.tsx';

interface DerivationProgressProps {
  readonly modelId: string;
  readonly version: VersionSummary;
  /** Whether the person may cancel it or have it done again. */
  readonly mayAct: boolean;
}

const STAGE = { queued: 'waiting for its turn', deriving: 'deriving', verifying: 'verifying' };

/** Nothing where the derivation is complete: then the seal says it. */
export function DerivationProgress({ modelId, version, mayAct }: DerivationProgressProps) {
  const cancel = useCancelDerivation(modelId);
  const again = useDeriveAgain(modelId);
  const { derivation, number } = version;
  const tell = { onError: (fault: Error) => say(describeFault(fault)) };

  if (!isSettled(derivation.state)) {
    const { state } = derivation;
    const fallback = state === 'verifying' || state === 'deriving' ? STAGE[state] : STAGE.queued;
    return (
      <Progress
        stage={derivation.stage || fallback}
        progress={derivation.progress}
        isCancelling={cancel.isPending}
        {...(mayAct ? { onCancel: () => cancel.mutate(number, tell) } : {})}
      />
    );
  }
  if (derivation.state === 'complete') return null;
  return (
    <div className="border-cinnabar my-8 border-l-2 pl-14">
      <p className="text-note text-ink-2">
        {derivation.state === 'cancelled' ? (
          'The derivation was cancelled before it came to an end.'
        ) : (
          <>
            <b className="text-cinnabar">The derivation failed.</b>{' '}
            {derivation.fault ?? 'No reason has been handed down.'}
          </>
        )}
      </p>
      {mayAct && (
        <QuietButton
          className="mt-8"
          onClick={() => again.mutate(number, tell)}
          disabled={again.isPending}
        >
          Derive again
        </QuietButton>
      )}
    </div>
  );
}
