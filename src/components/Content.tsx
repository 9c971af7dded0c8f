/** The main part of a page at the measure of the design. */
import type { ReactNode } from 'react';

export function Content({ children }: { readonly children: ReactNode }) {
  return (
    <main id="content" tabIndex={-1} className="px-(--gutter) pt-22 pb-80">
      <div className="max-w-content mx-auto">{children}</div>
    </main>
  );
}
