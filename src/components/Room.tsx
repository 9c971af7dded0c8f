/** A room of the application: running head, message line, content. */
import { useEffect } from 'react';
import type { ReactNode } from 'react';
import { MessageLine } from './MessageLine.tsx';
import { RunningHead } from './RunningHead.tsx';
import type { RunningHeadProps } from './RunningHead.tsx';

interface RoomProps extends RunningHeadProps {
  /** The title of the window: where one is, the nearest first. */
  readonly windowTitle: string;
  readonly children: ReactNode;
}

/** Sets the title of the window to `… · Massieu`. */
export function useWindowTitle(title: string): void {
  useEffect(() => {
    document.title = title === '' ? 'Massieu' : `${title} · Massieu`;
  }, [title]);
}

export function Room({ windowTitle, children, ...head }: RoomProps) {
  useWindowTitle(windowTitle);
  return (
    <>
      <RunningHead {...head} />
      <MessageLine />
      <Content>{children}</Content>
    </>
  );
}

/** The main part of a page at the measure of the design. */
export function Content({ children }: { readonly children: ReactNode }) {
  return (
    <main id="content" tabIndex={-1} className="px-(--gutter) pt-22 pb-80">
      <div className="max-w-content mx-auto">{children}</div>
    </main>
  );
}
