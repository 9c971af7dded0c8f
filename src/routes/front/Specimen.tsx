/** The live specimen: a formulation, what follows from it, and its isotherms, as one types. */
import { lazy, Suspense, useEffect, useState } from 'react';
import { useLiveDerivation } from '../../workers/useLiveDerivation.ts';
import { Consequences } from './Consequences.tsx';
import { SpecimenEditor } from './SpecimenEditor.tsx';
import { SPECIMEN, SPECIMEN_PROPERTIES } from './specimenSource.ts';
import { loadTypesetting } from '../../components/Formula.tsx';
import { QuietButton } from '../../components/Button.tsx';

// The drawing comes when there is something to draw.
const Isotherms = lazy(async () => ({ default: (await import('./Isotherms.tsx')).Isotherms }));

export function Specimen() {
  const [source, setSource] = useState(SPECIMEN);
  const { derivation, diagnostics, failure, isStale, milliseconds } = useLiveDerivation(
    source,
    SPECIMEN_PROPERTIES,
  );
  const firstFault = diagnostics.find(({ severity }) => severity === 'error');
  useEffect(() => void loadTypesetting(), []);

  return (
    <div className="border-hair bg-sheet desk:grid-cols-[minmax(0,1.15fr)_minmax(0,1fr)] grid grid-cols-[minmax(0,1fr)] border">
      <section aria-label="Formulation" className="desk:px-28 desk:py-20 p-14">
        <div className="text-label text-ink-3 mb-12 flex min-h-28 items-center gap-14 font-mono">
          <span>Change a line and watch</span>
          {source !== SPECIMEN && (
            <QuietButton className="ml-auto" onClick={() => setSource(SPECIMEN)}>
              As it was
            </QuietButton>
          )}
        </div>
        <SpecimenEditor source={source} diagnostics={diagnostics} onChange={setSource} />
      </section>
      <section
        aria-label="Consequences"
        className="border-hair desk:border-t-0 desk:border-l desk:px-28 desk:py-20 min-h-[620px] border-t p-14"
      >
        <div className="text-label text-ink-3 mb-12 flex min-h-28 items-center gap-14 font-mono">
          <span>Consequences</span>
          {derivation && milliseconds !== undefined && !isStale && (
            <span className="ml-auto tabular-nums">
              derived in {Math.max(1, Math.round(milliseconds))} ms
            </span>
          )}
        </div>
        {isStale && derivation && (firstFault ?? failure) && (
          <p role="status" className="border-cinnabar text-note text-ink-2 mb-8 border-l-2 pl-14">
            {firstFault
              ? `Line ${firstFault.line} must be mended before these follow again. They show the last sound text.`
              : `${failure} These show the last sound text.`}
          </p>
        )}
        {derivation ? (
          <>
            <Consequences derivation={derivation} isStale={isStale} />
            <Suspense fallback={<div className="mt-14 min-h-[360px]" />}>
              <Isotherms derivation={derivation} isStale={isStale} />
            </Suspense>
          </>
        ) : (
          <p role="status" className="text-label text-ink-3 py-22 font-mono">
            {failure ??
              (firstFault ? 'Nothing follows until the formulation is sound.' : 'Deriving …')}
          </p>
        )}
      </section>
    </div>
  );
}
