/** The title of the window. */
import { useEffect } from 'react';

/** Sets it to `… · Massieu`, or to `Massieu` alone for the front door. */
export function useWindowTitle(title: string): void {
  useEffect(() => {
    document.title = title === '' ? 'Massieu' : `${title} · Massieu`;
  }, [title]);
}
