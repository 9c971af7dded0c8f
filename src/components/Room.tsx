/** A room of the application: running head, message line, content. */
import type { ReactNode } from 'react';
import { Content } from './Content.tsx';
import { MessageLine } from './MessageLine.tsx';
import { RunningHead } from './RunningHead.tsx';
import type { RunningHeadProps } from './RunningHead.tsx';
import { useWindowTitle } from './windowTitle.ts';

interface RoomProps extends RunningHeadProps {
  /** The title of the window: where one is, the nearest first. */
  readonly windowTitle: string;
  readonly children: ReactNode;
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
