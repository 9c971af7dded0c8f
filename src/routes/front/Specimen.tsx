/** The live specimen: a formulation, what follows from it, and its isotherms, as one types. */
import { useEffect, useMemo, useState } from 'react';
import { useLiveDerivation } from '../../workers/useLiveDerivation.ts';
import { Consequences } from './Consequences.tsx';
import { IsothermPlot } from './IsothermPlot.tsx';
import { MOLAR_UNIT, portray, traceIsotherm } from './isotherms.ts';
import { MovingTemperature } from './MovingTemperature.tsx';
import { SpecimenEditor } from './SpecimenEditor.tsx';
import { SPECIMEN } from './specimenSource.ts';
import { useFluid } from './useFluid.ts';
import { loadTypesetting } from '../../components/Formula.tsx';
import { QuietButton } from '../../components/Button.tsx';

const FIRST_REDUCED = 0.95;

export function Specimen() {
  const [source, setSource] = useState(SPECIMEN);
  const { derivation, diagnostics, isStale, milliseconds } = useLiveDerivation(source);
  const firstFault = diagnostics.find(({ severity }) => severity === 'error');
  useEffect(() => void loadTypesetting(), []);

  return (
    <div className="border-hair bg-sheet desk:grid-cols-[minmax(0,1.15fr)_minmax(0,1fr)] grid grid-cols-[minmax(0,1fr)] border">
      <section aria-label="Formulation" className="desk:px-28 desk:py-20 p-14">
        <div className="text-label text-ink-3 mb-8 flex min-h-28 items-baseline gap-14 font-mono">
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
        <div className="text-label text-ink-3 mb-8 flex min-h-28 items-baseline gap-14 font-mono">
          <span>Consequences</span>
          {derivation && milliseconds !== undefined && !isStale && (
            <span className="ml-auto tabular-nums">
              derived in {Math.max(1, Math.round(milliseconds))} ms
            </span>
          )}
        </div>
        {isStale && firstFault && derivation && (
          <p role="status" className="border-cinnabar text-note text-ink-2 mb-8 border-l-2 pl-14">
            Line {firstFault.line} must be mended before these follow again. They show the last
            sound text.
          </p>
        )}
        {derivation ? (
          <>
            <Consequences derivation={derivation} isStale={isStale} />
            <Isotherms derivation={derivation} isStale={isStale} />
          </>
        ) : (
          <p role="status" className="text-label text-ink-3 py-22 font-mono">
            {firstFault ? 'Nothing follows until the formulation is sound.' : 'Deriving …'}
          </p>
        )}
      </section>
    </div>
  );
}

function Isotherms({
  derivation,
  isStale,
}: {
  readonly derivation: Parameters<typeof useFluid>[0];
  readonly isStale: boolean;
}) {
  const fluid = useFluid(derivation);
  const portrait = useMemo(() => (fluid ? portray(fluid) : undefined), [fluid]);
  const [reduced, setReduced] = useState(FIRST_REDUCED);

  const critical = portrait?.critical;
  const temperature = reduced * (critical?.temperature ?? 300);
  const moving = useMemo(() => {
    if (!fluid || !portrait) return undefined;
    const unit = critical ?? MOLAR_UNIT;
    return {
      label: 'moving',
      points: traceIsotherm(fluid, temperature, portrait.xRange, unit),
    };
  }, [fluid, portrait, critical, temperature]);

  if (!fluid) return null;
  if (!portrait) {
    return (
      <p className="text-note text-ink-2 py-14">
        No isotherm is drawn: the pressure has no values over the volumes of a fluid.
      </p>
    );
  }
  return (
    <div className={isStale ? 'mt-14 opacity-60' : 'mt-14'}>
      <IsothermPlot portrait={portrait} moving={moving} />
      <MovingTemperature
        reduced={reduced}
        temperature={temperature}
        critical={critical}
        onChange={setReduced}
      />
    </div>
  );
}
