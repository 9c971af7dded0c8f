/** A dialog above the page: the browser's own, which keeps the focus inside and closes by Escape. */
import { useEffect, useId, useRef } from 'react';
import type { ReactNode } from 'react';
import { QuietButton } from './Button.tsx';

interface DialogProps {
  readonly title: string;
  readonly onClose: () => void;
  readonly children: ReactNode;
}

/** Shown for as long as it is rendered. */
export function Dialog({ title, onClose, children }: DialogProps) {
  const element = useRef<HTMLDialogElement>(null);
  const id = useId();

  useEffect(() => {
    const dialog = element.current;
    if (dialog && !dialog.open) dialog.showModal();
    return () => dialog?.close();
  }, []);

  return (
    <dialog
      ref={element}
      aria-labelledby={id}
      onClose={onClose}
      onClick={(event) => {
        // A click on the backdrop has the dialog itself as its target.
        if (event.target === element.current) onClose();
      }}
      className="border-rule bg-sheet text-ink m-auto mt-[12vh] w-[min(640px,calc(100%-32px))] rounded border p-0"
    >
      <div className="px-22 pt-14 pb-22">
        <div className="mb-14 flex items-baseline gap-14">
          <h2 id={id} className="text-lede font-[520]">
            {title}
          </h2>
          <QuietButton onClick={onClose} className="ml-auto">
            Close
          </QuietButton>
        </div>
        {children}
      </div>
    </dialog>
  );
}
