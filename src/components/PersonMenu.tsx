/** What belongs to the person who is signed in: the theme, and signing out. */
import { useEffect, useId, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Person } from '../../shared/contracts/people.ts';
import { describeFault, useSignOut } from '../api/index.ts';
import { paths } from '../routes/paths.ts';
import { ThemeChoiceControl } from './ThemeChoiceControl.tsx';
import { QuietButton, QuietLink } from './Button.tsx';
import { say } from './messages.ts';

export function PersonMenu({ person }: { readonly person: Person }) {
  const [isOpen, setOpen] = useState(false);
  const around = useRef<HTMLDivElement>(null);
  const opener = useRef<HTMLButtonElement>(null);
  const id = useId();
  const navigate = useNavigate();
  const signOut = useSignOut();

  useEffect(() => {
    const element = around.current;
    if (!isOpen || !element) return undefined;
    const onPointer = (event: PointerEvent) => {
      if (event.target instanceof Node && !element.contains(event.target)) setOpen(false);
    };
    const onKey = (event: KeyboardEvent) => {
      if (event.key !== 'Escape') return;
      setOpen(false);
      opener.current?.focus();
    };
    const onFocusOut = (event: FocusEvent) => {
      if (event.relatedTarget instanceof Node && !element.contains(event.relatedTarget)) {
        setOpen(false);
      }
    };
    document.addEventListener('pointerdown', onPointer);
    element.addEventListener('keydown', onKey);
    element.addEventListener('focusout', onFocusOut);
    return () => {
      document.removeEventListener('pointerdown', onPointer);
      element.removeEventListener('keydown', onKey);
      element.removeEventListener('focusout', onFocusOut);
    };
  }, [isOpen]);

  const leave = () =>
    signOut.mutate(undefined, {
      onSuccess: () => void navigate(paths.front),
      onError: (fault) => say(describeFault(fault)),
    });

  return (
    <div ref={around} className="relative">
      <button
        ref={opener}
        type="button"
        aria-expanded={isOpen}
        aria-controls={id}
        onClick={() => setOpen(!isOpen)}
        className="text-ink-2 hover:text-ink min-h-28"
      >
        {person.name}
      </button>
      {isOpen && (
        <div
          id={id}
          className="border-rule bg-sheet absolute top-[calc(100%+8px)] right-0 z-10 w-[280px] rounded border p-14"
        >
          <p className="text-ink-3 mb-14 break-words">{person.email ?? person.name}</p>
          <p className="text-ink-3 mb-4">Theme</p>
          <ThemeChoiceControl />
          <div className="border-hair mt-14 flex flex-wrap gap-8 border-t pt-14">
            <QuietLink to={paths.language}>The language</QuietLink>
            <QuietButton onClick={leave} disabled={signOut.isPending}>
              Sign out
            </QuietButton>
          </div>
        </div>
      )}
    </div>
  );
}
