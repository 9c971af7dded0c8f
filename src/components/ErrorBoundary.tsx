/** Catches a fault of ours within one part of the page, so that the rest stays usable. */
import { Component } from 'react';
import type { ReactNode } from 'react';
import { QuietButton } from './Button.tsx';

interface Props {
  /** What the part is, for the sentence: `the properties`. */
  readonly of: string;
  readonly children: ReactNode;
}

interface State {
  readonly fault: Error | undefined;
}

export class ErrorBoundary extends Component<Props, State> {
  override state: State = { fault: undefined };

  static getDerivedStateFromError(fault: unknown): State {
    return { fault: fault instanceof Error ? fault : new Error(String(fault)) };
  }

  override render(): ReactNode {
    const { fault } = this.state;
    if (!fault) return this.props.children;
    return (
      <div role="alert" className="border-cinnabar my-14 border-l-2 pl-14">
        <p className="max-w-text text-note text-cinnabar">
          Showing {this.props.of} failed by a mistake of ours. What was saved is safe.
        </p>
        <p className="text-label text-ink-3 mt-4 font-mono">{fault.message}</p>
        <QuietButton className="mt-8" onClick={() => this.setState({ fault: undefined })}>
          Show it again
        </QuietButton>
      </div>
    );
  }
}
