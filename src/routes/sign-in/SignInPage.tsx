/** The frame of the pages around signing in: one column of text measure on a sheet. */
import type { ReactNode } from 'react';
import { Room } from '../../components/Room.tsx';
import { Sheet } from '../../components/Layout.tsx';

export function SignInPage({
  title,
  children,
}: {
  readonly title: string;
  readonly children: ReactNode;
}) {
  return (
    <Room windowTitle={title} title={title}>
      <Sheet className="max-w-[520px]">{children}</Sheet>
    </Room>
  );
}
