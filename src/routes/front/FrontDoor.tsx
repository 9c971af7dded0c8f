/** The front door: what Massieu does, shown by a formulation that the visitor may change. */
import { lazy, Suspense } from 'react';
import { Link } from 'react-router-dom';
import { useSession } from '../../api/session.ts';
import { ActLink } from '../../components/Button.tsx';
import { ErrorBoundary } from '../../components/ErrorBoundary.tsx';
import { MessageLine } from '../../components/MessageLine.tsx';
import { Content } from '../../components/Content.tsx';
import { useWindowTitle } from '../../components/windowTitle.ts';
import { Mark } from '../../components/Mark.tsx';
import { ThemeButton } from '../../components/ThemeButton.tsx';
import { paths } from '../paths.ts';

const Specimen = lazy(async () => ({ default: (await import('./Specimen.tsx')).Specimen }));

function Head() {
  const isSignedIn = Boolean(useSession().data?.person);
  return (
    <header className="px-(--gutter) pt-14">
      <div className="max-w-content border-hair mx-auto flex flex-wrap items-baseline gap-24 border-b pb-12">
        <Mark />
        <nav
          aria-label="Places"
          className="text-label desk:gap-20 ml-auto flex items-baseline gap-14 font-mono"
        >
          <ThemeButton />
          <Link to={paths.language} className="text-ink-2 hover:text-ink py-4 no-underline">
            The language
          </Link>
          {isSignedIn ? (
            <ActLink to={paths.desk}>Go to the desk</ActLink>
          ) : (
            <ActLink to={paths.signIn}>Sign in</ActLink>
          )}
        </nav>
      </div>
    </header>
  );
}

export function Component() {
  useWindowTitle('');
  return (
    <>
      <Head />
      <MessageLine />
      <Content>
        <h1 id="room-title" tabIndex={-1} className="text-hero desk:mt-52 mt-30 mb-22 font-[420]">
          Everything follows
          <br />
          from{' '}
          <span className="mathematics-roman">
            ln <i>Q</i>
          </span>
          .
        </h1>
        <p className="max-w-text text-lede text-ink-2 mb-44">
          State a partition function. Massieu derives every equilibrium property from it, checks the
          derivation against a second opinion, and freezes it as a version that never changes again.
        </p>
        <ErrorBoundary of="the specimen">
          <Suspense fallback={<div className="border-hair bg-sheet min-h-[560px] border" />}>
            <Specimen />
          </Suspense>
        </ErrorBoundary>
      </Content>
    </>
  );
}
