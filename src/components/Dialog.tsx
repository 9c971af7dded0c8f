/** A dialog above the page: the browser's own, which keeps the focus inside and closes by Escape. */
import { useEffect, useEffectEvent, useId, useRef } from 'react';
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
  const onLeave = useEffectEvent(onClose);

  useEffect(() => {
    const dialog = element.current;
    if (!dialog) return undefined;
    if (!dialog.open) dialog.showModal();
    const close = () => onLeave();
    // A click beside the dialog, on its backdrop, has the dialog itself as its target.
    const click = (event: MouseEvent) => {
      if (event.target === dialog) onLeave();
    };
    dialog.addEventListener('close', close);
    dialog.addEventListener('click', click);
    return () => {
      dialog.removeEventListener('close', close);
      dialog.removeEventListener('click', click);
      dialog.close();
    };
  }, []);

  return (
    <dialog
      ref={element}
      aria-labelledby={id}
      className="border-rule bg-sheet text-ink text-body m-auto mt-[12vh] w-[min(640px,calc(100%-32px))] rounded border p-0 font-serif"
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
