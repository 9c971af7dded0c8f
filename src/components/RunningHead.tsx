/**
 * The running head: where one is, what stands in the sheet below with its state, and the sections
 * of it as a line of links.
 */
import type { ReactNode } from 'react';
import { Link, NavLink, useLocation } from 'react-router-dom';
import { countWaiting, useDesk, useSession } from '../api/index.ts';

import { paths, signInPath } from '../routes/paths.ts';
import { ActLink } from './Button.tsx';
import { FindButton } from './Find.tsx';
import { Mark } from './Mark.tsx';
import { PersonMenu } from './PersonMenu.tsx';
import { ThemeButton } from './ThemeButton.tsx';

export interface Place {
  readonly label: string;
  readonly to: string;
}

export interface Section {
  readonly label: string;
  readonly to: string;
  /** Current on the address itself only, not on those below it. */
  readonly isExact?: boolean;
}

export interface RunningHeadProps {
  readonly place?: readonly Place[];
  readonly title: ReactNode;
  /** The line under the title: version, state, hash, when. */
  readonly state?: ReactNode;
  /** The one thing to do here. */
  readonly action?: ReactNode;
  readonly sections?: readonly Section[];
}

const BAND = 'mx-auto max-w-content';

function DeskLink() {
  const desk = useDesk();
  const count = desk.data ? countWaiting(desk.data) : 0;
  return (
    <NavLink to={paths.desk} className="text-ink-2 hover:text-ink py-4 no-underline">
      Desk
      {count > 0 && (
        <>
          {' '}
          <b className="text-cinnabar font-bold">{count}</b>
          <span className="sr-only"> waiting</span>
        </>
      )}
    </NavLink>
  );
}

function Right() {
  const session = useSession();
  const { pathname, search } = useLocation();
  if (!session.data) return null;
  if (!session.data.person) {
    return (
      <>
        <ThemeButton />
        <Link to={paths.language} className="text-ink-2 hover:text-ink py-4 no-underline">
          The language
        </Link>
        {!pathname.startsWith(paths.signIn) && (
          <ActLink to={signInPath(pathname + search)}>Sign in</ActLink>
        )}
      </>
    );
  }
  return (
    <>
      <FindButton />
      <DeskLink />
      <PersonMenu person={session.data.person} />
    </>
  );
}

export function RunningHead({ place = [], title, state, action, sections }: RunningHeadProps) {
  return (
    <header className="border-rule bg-paper border-b px-(--gutter) pt-14">
      <div
        className={`${BAND} border-hair desk:flex-nowrap desk:gap-24 flex flex-wrap items-baseline gap-x-16 gap-y-8 border-b pb-12`}
      >
        <Mark />
        {place.length > 0 && (
          <nav
            aria-label="Place"
            className="text-label text-ink-3 desk:order-none desk:w-auto order-3 flex w-full min-w-0 flex-wrap gap-x-10 font-mono"
          >
            {place.map(({ label, to }, index) => (
              <span key={to} className="flex min-w-0 items-baseline gap-10">
                {index > 0 && <span aria-hidden="true">›</span>}
                <Link to={to} className="text-ink-2 hover:text-ink py-4 break-words no-underline">
                  {label}
                </Link>
              </span>
            ))}
          </nav>
        )}
        <div className="text-label text-ink-2 desk:gap-20 ml-auto flex items-baseline gap-14 font-mono">
          <Right />
        </div>
      </div>
      <div
        className={`${BAND} desk:flex-row desk:items-end flex flex-col items-start justify-between gap-x-24 gap-y-14 pt-22 ${sections ? '' : 'pb-22'}`}
      >
        <div className="max-w-full min-w-0 flex-1">
          <h1
            id="room-title"
            tabIndex={-1}
            className="text-heading text-ink desk:text-title font-[480] break-words"
          >
            {title}
          </h1>
          {state && (
            <p className="text-label text-ink-3 mt-8 flex flex-wrap items-baseline gap-x-14 gap-y-4 font-mono">
              {state}
            </p>
          )}
        </div>
        {action}
      </div>
      {sections && (
        <nav
          aria-label="Sections"
          className={`${BAND} desk:gap-30 mt-20 flex [scrollbar-width:none] gap-22 overflow-x-auto`}
        >
          {sections.map(({ label, to, isExact = false }) => (
            <NavLink
              key={to}
              to={to}
              end={isExact}
              className="text-ink-2 hover:text-ink aria-[current=page]:border-cinnabar aria-[current=page]:text-ink border-b-2 border-transparent pt-8 pb-10 font-mono text-[14px] leading-20 whitespace-nowrap no-underline -outline-offset-2"
            >
              {label}
            </NavLink>
          ))}
        </nav>
      )}
    </header>
  );
}
