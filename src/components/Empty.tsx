/** States of a list or a room other than its content: empty, loading, at fault. */
import type { ReactNode } from 'react';
import { describeFault } from '../api/problem.ts';
import { QuietButton } from './Button.tsx';

/** One sentence on what belongs here, and the action that makes it. */
export function Empty({
  children,
  action,
}: {
  readonly children: ReactNode;
  readonly action?: ReactNode;
}) {
  return (
    <div className="py-22">
      <p className="max-w-text text-body text-ink-2">{children}</p>
      {action && <div className="mt-14">{action}</div>}
    </div>
  );
}

export function Loading({ what }: { readonly what: string }) {
  return (
    <p role="status" className="text-label text-ink-3 py-22 font-mono">
      Fetching {what} …
    </p>
  );
}

/** A fault in words, with another attempt where one may help. */
export function Fault({
  fault,
  onRetry,
}: {
  readonly fault: unknown;
  readonly onRetry?: () => void;
}) {
  return (
    <div role="alert" className="border-cinnabar my-14 border-l-2 py-2 pl-14">
      <p className="max-w-text text-note text-cinnabar">{describeFault(fault)}</p>
      {onRetry && (
        <QuietButton onClick={onRetry} className="mt-8">
          Try again
        </QuietButton>
      )}
    </div>
  );
}

/** Said above results that stay visible although they are out of date. */
export function Stale({ children }: { readonly children: ReactNode }) {
  return (
    <p role="status" className="border-ochre text-note text-ink-2 my-8 border-l-2 pl-14">
      {children}
    </p>
  );
}
