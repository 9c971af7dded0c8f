/** What is around every room: the skip link, the keys, the region that is read out, the focus. */
import { useEffect, useRef } from 'react';
import { Outlet, ScrollRestoration, useLocation, useNavigation } from 'react-router-dom';
import { KeyboardHelp } from '../components/KeyboardHelp.tsx';
import { MessageAnnouncer } from '../components/MessageLine.tsx';

/** After going to another room the focus is on its title, as after loading a page. */
function useFocusOfRoom(): void {
  const { pathname } = useLocation();
  const previous = useRef(pathname);
  useEffect(() => {
    if (previous.current === pathname) return;
    previous.current = pathname;
    document.getElementById('room-title')?.focus({ preventScroll: true });
  }, [pathname]);
}

export function Root() {
  const { state } = useNavigation();
  useFocusOfRoom();
  return (
    <>
      <a
        href="#content"
        className="bg-ink text-label text-sheet sr-only rounded px-14 py-8 font-mono focus:not-sr-only focus:fixed focus:top-8 focus:left-8 focus:z-20"
      >
        Skip to the content
      </a>
      {state === 'loading' && (
        <div
          role="progressbar"
          aria-label="Opening the page"
          className="bg-ultramarine fixed inset-x-0 top-0 z-20 h-2"
        />
      )}
      <Outlet />
      <MessageAnnouncer />
      <KeyboardHelp />
      <ScrollRestoration />
    </>
  );
}
