/** A hairline that fills, with what is being done, how much, and Cancel. */
import { QuietButton } from './Button.tsx';

interface ProgressProps {
  /** What is being done: `deriving C_p`. */
  readonly stage: string;
  /** From 0 to 1. */
  readonly progress: number;
  readonly onCancel?: () => void;
  readonly isCancelling?: boolean;
}

export function Progress({ stage, progress, onCancel, isCancelling = false }: ProgressProps) {
  const percent = Math.round(100 * Math.min(1, Math.max(0, progress)));
  return (
    <div className="text-label text-ink-2 font-mono">
      <div className="flex flex-wrap items-baseline gap-14">
        <span>{stage}</span>
        <span className="text-ink-3 tabular-nums">{percent} %</span>
        {onCancel && (
          <QuietButton onClick={onCancel} disabled={isCancelling} className="ml-auto">
            {isCancelling ? 'Cancelling' : 'Cancel'}
          </QuietButton>
        )}
      </div>
      <div
        role="progressbar"
        aria-label={stage}
        aria-valuenow={percent}
        aria-valuemin={0}
        aria-valuemax={100}
        className="bg-rule mt-8 h-2"
      >
        <div
          className="bg-ultramarine h-full transition-[width] duration-[120ms]"
          style={{ width: `${percent}%` }}
        />
      </div>
    </div>
  );
}
